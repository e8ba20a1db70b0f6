export { extremes, magnitude, settle } from './extremes';
export {
  add,
  differentiate,
  evaluate,
  evaluatePiece,
  integralOfProduct,
  integrate,
  multiply,
  pieceAt,
  pieceCount,
  piecewise,
  scale,
  withoutBreaks,
} from './piecewise';
export { signChanges } from './sign-changes';
export type { Extreme, Piecewise } from './types';
export { horner, UnitRoots, WIDTH } from './unit-roots';
