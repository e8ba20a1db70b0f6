export { POST } from '../../../library/[kind]/[slug]/drafts/index';
