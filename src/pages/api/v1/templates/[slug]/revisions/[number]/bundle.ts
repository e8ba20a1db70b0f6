export { GET } from '../../../../library/[kind]/[slug]/revisions/[number]/bundle';
