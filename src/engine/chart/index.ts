export type { ChartCase, Movement } from './case';
export {
  add,
  constant,
  divide,
  type Expression,
  evaluate,
  expand,
  expandable,
  multiply,
  negate,
  oriented,
  power,
  powerOf,
  simplest,
  substitute,
  subtract,
  symbol,
  symbolsOf,
  ZERO,
} from './expression';
export { formula } from './formula';
export { forceOf, momentAbout, type NamedLoad } from './load';
export { CHART } from './register';
export {
  chartTerms,
  movementTerms,
  type Released,
  type SupportForces,
  type SupportMovements,
  shearTerms,
  supportForces,
} from './released';
export type { Setting } from './setting';
export { cut } from './stretch';
export { type ChartTerm, total } from './term';
export { texOf, type Writer } from './tex';
