export { isProven, proofLimit, proveSolution } from './proof';
export { relative, type Scales, scalesOf } from './scale';
