import type { Expression } from './expression';

/** Deflection, positive down, and the turn of the section, positive clockwise: what the printed charts mean by Δ and θ. */
export type Movement = 'deflection' | 'slope';
type Curve = Readonly<Record<Movement, Expression>>;

export type Source = { work: string; edition: string; table: string; entry: string; fromMemory: boolean };

/** A kind of determinate beam: fixed at one place; on two supports; guided at one place and propped at another. */
export type ReleasedKind = 'cantilever' | 'simple' | 'guided';

/**
 * One published closed form. x is measured from the fixed end of a cantilever, from the left support of a simple span of
 * length L, or from the guide of a span that is L long from there to its prop; a is where the load is, or how far it
 * reaches from there. Loads are positive down, couples clockwise, curvature sagging. Validity, for every case: straight,
 * one EI, small deflection; bending only, but for the cases of shear.
 */
export type ChartCase = {
  id: string;
  released: ReleasedKind;
  title: string;
  validity: string;
  /** Where x ≤ a, or everywhere if there is no `beyond`. */
  within: Curve;
  /** Where x ≥ a. */
  beyond: Curve | null;
  source: Source;
};

export type Formulas = readonly [deflection: string, slope: string];

/** A case as it is written down; its id begins with the kind of beam. */
export type CaseRow = Pick<ChartCase, 'title' | 'validity' | 'source'> & {
  id: `${ReleasedKind}-${string}`;
  within: Formulas;
  beyond?: Formulas;
};
