import type { LetteredBeam, Spot } from './lettered-beam';
import type { Quantity, Side, Trace } from './types';

/** What acts just right of a place, and its stiffness; null for nothing. */
export type Local = {
  readonly w: Trace | null;
  readonly r: Trace | null;
  readonly kappa: Trace | null;
  readonly EI: Trace;
  readonly GA: Trace | null;
};

/** What varies along a beam under loads that act at once. */
export interface Field {
  readonly beam: LetteredBeam;
  /** Sagging moments, deflections down and slopes clockwise. */
  at(quantity: Quantity, spot: Spot, side: Side): Trace;
  local(x: number): Local;
  /** Up, or in the sense of a fixing moment; null where the support carries nothing that way. */
  reaction(support: number, component: 'vertical' | 'moment'): Trace | null;
}
