/** A mass along the beam, kg/m, varying linearly from `start` at its left end to `end` at its right. */
export type DistributedMass = { from: number; to: number; start: number; end: number };

/** A mass at a point, kg. */
export type LumpedMass = { at: number; mass: number };

/** All that moves with the beam. Every mass is zero or more. */
export type Masses = { distributed: readonly DistributedMass[]; lumped: readonly LumpedMass[] };

/**
 * The first natural frequency, Hz, with the proof that it is the first: at the lower bound no natural frequency is
 * passed, at the upper one `count` of them are (more than one where several coincide).
 */
export type FirstFrequency = {
  frequency: number;
  lower: number;
  upper: number;
  count: number;
  /** The largest deflection, m, up or down, under the weight of the masses, and where it is. */
  sag: { deflection: number; at: number };
  /** What the usual estimate makes of that, 18/√δ, Hz. */
  estimate: number;
};
