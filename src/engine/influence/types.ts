import type { Proof } from '../beam/index';
import type { Extreme, Piecewise } from '../polynomial/index';

/** Just left or just right of a section: a support there makes the shear or the moment jump. */
export type Side = 'left' | 'right';

/**
 * What an influence line is of. A reaction by its support's place in the beam's list: vertical, N, positive up, or the
 * moment, N·m, anticlockwise on the beam. Shear N, moment N·m sagging, deflection m, up, at a section.
 */
export type InfluenceQuantity =
  | { kind: 'reaction'; support: number; component: 'vertical' | 'rotation' }
  | { kind: 'shear' | 'moment'; at: number; side: Side }
  | { kind: 'deflection'; at: number };

/** ∫ of the positive and of the negative part of a line over a span or an overhang. */
export type SpanArea = { from: number; to: number; positive: number; negative: number };

/**
 * The quantity for a downward force of 1 N at x, as an exact piecewise cubic of x: N/N for forces, N·m/N for moments,
 * m/N for a deflection. The area under it times a uniform load is the quantity for that load.
 */
export type InfluenceLine = {
  quantity: InfluenceQuantity;
  line: Piecewise;
  extremes: { max: Extreme; min: Extreme };
  areas: SpanArea[];
  /** Of the beam whose deflection the line is. */
  proof: Proof;
};
