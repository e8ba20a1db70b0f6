export { type AbsoluteMoment, absoluteMoment } from './absolute-moment';
export { influenceLine } from './line';
export { type AskedQuantity, readInfluenceQuantity } from './quantity';
export { readWheels } from './read-wheels';
export { type Direction, type TrainExtreme, type Wheel, worstTrain } from './train';
export type * from './types';
