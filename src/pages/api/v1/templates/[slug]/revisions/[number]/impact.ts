export { GET, POST } from '../../../../library/[kind]/[slug]/revisions/[number]/impact';
