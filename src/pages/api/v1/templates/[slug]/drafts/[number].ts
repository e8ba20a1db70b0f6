export { DELETE, GET, PUT } from '../../../library/[kind]/[slug]/drafts/[number]';
