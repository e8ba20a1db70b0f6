export { isProven, proofLimit, proveSolution } from './proof';
