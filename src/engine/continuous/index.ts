export { type ContinuousBeam, continuousBeam } from './continuous-beam';
