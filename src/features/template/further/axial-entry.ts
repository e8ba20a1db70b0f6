/** The axial force that a person states beside the beam, and whether the beam is still in scope with it. */
import { AXIAL_LIMIT, axialScope, isOverhang } from '@/engine/beam';
import { type Beam, spansOf } from '@/engine/model';
import { formatNumber } from '@/engine/quantity';

/** The longest span, or twice the longest overhang: a free end bends in half a wave of twice its length. */
export function bucklingLengthOf(beam: Beam): number {
  return Math.max(...spansOf(beam).map((span) => (isOverhang(span) ? 2 : 1) * (span.to - span.from)));
}

export interface AxialJudgement {
  readonly state: 'none' | 'within' | 'beyond';
  /** "0.04" */
  readonly ratio: string;
  /** What to do where it is beyond. */
  readonly message: string | null;
}

/** N/N_cr of a compression in N, with the smallest EI of the beam and a buckling length in m. */
export function judgeAxial({ segments }: Beam, compression: number, bucklingLength: number): AxialJudgement {
  const ei = Math.min(...segments.map((segment) => segment.ei));
  const { ratio, inScope } = axialScope(compression, ei, bucklingLength);
  const text = formatNumber(ratio, { places: 2 });
  if (inScope) return { state: compression === 0 ? 'none' : 'within', ratio: text, message: null };
  const shown = formatNumber(ratio, ratio - AXIAL_LIMIT < 0.005 ? { places: 4 } : { places: 2 });
  return {
    state: 'beyond',
    ratio: shown,
    message: `The axial force is ${shown} of the buckling force, more than ${formatNumber(AXIAL_LIMIT, { places: 2 })}: out of scope. ${effectOf(ratio)} Check the member for compression with bending by another method, or state a smaller force.`,
  };
}

function effectOf(ratio: number): string {
  if (ratio >= 1) return 'The member buckles under this force.';
  const more = formatNumber(100 / (1 - ratio) - 100, { places: 0 });
  return `The force makes moments and deflections about ${more} % larger, which these results leave out.`;
}
