export { GET } from '../../library/[kind]/[slug]/compare';
