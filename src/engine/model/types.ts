/**
 * The beam document (what a person or a template describes) and the normalised beam (what every solver reads).
 * SI throughout: m, N, N·m, N·m², rad. Signs: x to the right; transverse load positive down; couple and rotation
 * anticlockwise; rise positive up; curvature positive sagging.
 */

export const SUPPORT_KINDS = ['fixed', 'pin', 'roller', 'guided', 'free'] as const;
export type SupportKind = (typeof SUPPORT_KINDS)[number];

export type SupportDocument = {
  at: number;
  kind: SupportKind;
  /** Spring against vertical movement, N/m; only where the kind leaves vertical movement free. */
  kv?: number | undefined;
  /** Spring against rotation, N·m/rad; only where the kind leaves rotation free. */
  kr?: number | undefined;
  /** Prescribed vertical movement, m, positive up (a settlement is negative); of the spring's ground end if sprung. */
  rise?: number | undefined;
  /** Prescribed rotation, rad, anticlockwise; of the spring's ground end if sprung. */
  rotation?: number | undefined;
};

type Grouped = { group?: string | undefined };
export type PointLoad = { kind: 'point'; at: number; p: number } & Grouped;
export type LineLoad = { kind: 'line'; from: number; to: number; w0: number; w1: number } & Grouped;
export type Couple = { kind: 'couple'; at: number; m: number } & Grouped;
/** Free curvature, 1/m, such as α(T_bottom − T_top)/h. */
export type CurvatureLoad = { kind: 'curvature'; from: number; to: number; kappa: number } & Grouped;
export type Load = PointLoad | LineLoad | Couple | CurvatureLoad;

export type SegmentDocument = { from: number; to: number; ei: number; ga?: number | null | undefined };

/** A component that may be released: of a support (by its index in the document), or an internal moment at x. */
export type Redundant =
  | { support: number; component: 'vertical' | 'rotation' }
  | { at: number; component: 'moment' };

export type BeamDocument = {
  length: number;
  segments?: SegmentDocument[] | undefined;
  /** Instead of segments: one EI (and GA) for the whole beam. */
  ei?: number | undefined;
  ga?: number | null | undefined;
  supports: SupportDocument[];
  hinges?: number[] | undefined;
  loads?: Load[] | undefined;
  redundants?: Redundant[] | undefined;
  /** n equal steps' ends, or positions in m. */
  stations?: number | number[] | undefined;
  /** "ignore": do not ask for a horizontal restraint. */
  horizontal?: 'ignore' | undefined;
};

/** How one direction of a support is held. `movement` is prescribed, in m or rad, of the ground end where sprung. */
export type Restraint =
  | { kind: 'free' }
  | { kind: 'rigid'; movement: number }
  | { kind: 'spring'; stiffness: number; movement: number };

export type Support = {
  at: number;
  kind: SupportKind;
  vertical: Restraint;
  rotation: Restraint;
  horizontal: boolean;
};

export type Segment = { from: number; to: number; ei: number; ga: number | null };

/** A validated, stable beam. Supports and loads keep the order of the document. Positions that coincide are snapped. */
export type Beam = {
  length: number;
  segments: readonly Segment[];
  supports: readonly Support[];
  /** Ascending, strictly inside the beam. */
  hinges: readonly number[];
  loads: readonly Load[];
  /** Vertical and rotational restraints, springs included, − 2 − hinges. */
  degree: number;
};

export type FaultCode =
  | 'required'
  | 'not_finite'
  | 'not_positive'
  | 'out_of_range'
  | 'order'
  | 'gap'
  | 'overlap'
  | 'conflict'
  | 'duplicate'
  | 'restrained'
  | 'unrestrained'
  | 'at_hinge'
  | 'unstable'
  | 'wrong_count'
  | 'ineligible_redundant'
  | 'inadmissible_redundants'
  | 'unproven';

/** Corners of a displaced shape that is straight between them; the largest deflection is 1. */
export type DisplacedShape = { x: number; deflection: number }[];

/** What is wrong with the person's data: where, which rule, and words that say what to do. */
export type Fault = {
  path: (string | number)[];
  code: FaultCode;
  message: string;
  /** How the beam moves, where it is a mechanism; for a drawing. */
  motion?: DisplacedShape | undefined;
};

export type Reading<T> = { ok: true; value: T } | { ok: false; faults: Fault[] };
