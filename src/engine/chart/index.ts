export {
  add,
  constant,
  divide,
  type Expression,
  evaluate,
  expand,
  multiply,
  negate,
  oriented,
  power,
  subtract,
  symbol,
  symbolsOf,
  ZERO,
} from './expression';
export { formula } from './formula';
export type { NamedLoad } from './load';
export { CHART, type Movement } from './register';
export { chartTerms, movementTerms, type Released, type SupportMovements } from './released';
export type { Setting } from './setting';
export { cut, resultant } from './stretch';
export { type ChartTerm, total } from './term';
export { texOf, type Writer } from './tex';
