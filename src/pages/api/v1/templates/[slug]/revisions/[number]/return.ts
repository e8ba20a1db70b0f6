export { POST } from '../../../../library/[kind]/[slug]/revisions/[number]/return';
