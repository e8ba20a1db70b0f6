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
  substitute,
  subtract,
  symbol,
  symbolsOf,
  ZERO,
} from './expression';
export { formula } from './formula';
export type { NamedLoad } from './load';
export { CHART, type ChartCase, type Curve, chart, type Movement, type Source } from './register';
export { chartTerms, movementTerms, type Released, type SupportMovements } from './released';
export type { Setting } from './setting';
export { cut, resultant, type Stretch } from './stretch';
export { type ChartTerm, total } from './term';
export { type Atom, SYMBOLS, symbolTex, texOf, type Writer } from './tex';
