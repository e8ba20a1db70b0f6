export { type AbsoluteMoment, absoluteMoment } from './absolute-moment';
export { fastSolver } from './fast';
export { influenceLine } from './line';
export { type AskedQuantity, readInfluenceQuantity } from './quantity';
export { readWheels } from './read-wheels';
export { type SolveMoved, solveWide } from './solver';
export { type Direction, type TrainExtreme, type Wheel, worstTrain } from './train';
export type * from './types';
