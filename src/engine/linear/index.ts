export { Cholesky, type LowerRow, SingularMatrix } from './cholesky';
export { Wide } from './wide';
