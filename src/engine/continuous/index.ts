export { ContinuousBeam, continuousBeam } from './continuous-beam';
export { prepareFast } from './fast';
