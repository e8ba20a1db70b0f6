export { Cholesky, type LowerRow, SingularMatrix } from './cholesky';
export { CANCELLED, Sum } from './sum';
export { Wide } from './wide';
