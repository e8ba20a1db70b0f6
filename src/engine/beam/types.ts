import type { Redundant } from '../model/index';
import type { Extreme, Piecewise } from '../polynomial/index';

/** [just left, just right]; at the two ends both are the value inside the beam. */
export type Pair = [number, number];

export type Station = { x: number; shear: Pair; moment: Pair; slope: Pair; deflection: number };

export type { Extreme } from '../polynomial/index';

export type Extremes = Record<'shear' | 'moment' | 'slope' | 'deflection', { max: Extreme; min: Extreme }>;

/** Vertical N, positive up; moment N·m, anticlockwise on the beam; 0 where unrestrained. */
export type Reaction = { at: number; vertical: number; moment: number };

type ForceMethod = {
  redundants: Redundant[];
  /** Every component that may be released alone. */
  eligible: Redundant[];
  /** f_ij: displacement at redundant i for a unit value of redundant j. m/N, rad/N, rad/(N·m). */
  flexibility: number[][];
  /** Released-structure displacement at each redundant, of loads, curvature and the other supports' movements. */
  gaps: number[];
  /** Prescribed movement of each redundant: flexibility·values + gaps = imposed. */
  imposed: number[];
  /** N or N·m; internal moments sagging positive. */
  values: number[];
};

/** Relative to the largest value of its kind. */
export type Proof = {
  equilibrium: number;
  compatibility: number;
  agreement: number;
  method: 'direct stiffness';
};

/** The diagrams as exact piecewise polynomials of x: V ≤ 2, M ≤ 3, θ ≤ 4, v ≤ 5 in degree. */
export type Diagrams = { shear: Piecewise; moment: Piecewise; slope: Piecewise; deflection: Piecewise };

export type Solution = {
  degree: number;
  reactions: Reaction[];
  diagrams: Diagrams;
  extremes: Extremes;
  contraflexure: number[];
  forceMethod: ForceMethod;
};
