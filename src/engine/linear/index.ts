export { Cholesky, type LowerRow, SingularMatrix } from './cholesky';
export { CANCELLED, largest, Sum, settled } from './sum';
export { Wide } from './wide';
