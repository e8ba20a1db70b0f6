import { evaluate, magnitude, type Piecewise, settle } from '../polynomial/index';
import type { Side } from './types';

/** A diagram just left or right of a place; what is nothing beside its largest value is 0. */
export const valueAt = (diagram: Piecewise, x: number, side: Side): number =>
  settle(evaluate(diagram, x)[side === 'left' ? 0 : 1], magnitude(diagram));
