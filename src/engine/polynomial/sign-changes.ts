import { COINCIDENT, magnitude } from './extremes';
import { evaluatePiece, pieceCount } from './piecewise';
import { rootsOf } from './roots';
import type { Piecewise } from './types';

/** A stretch where |p| stays below this part of its largest value is zero: the sign there would be rounding's. */
const NOTHING = 1e-12;

type Stretch = { from: number; to: number; sign: number };

/**
 * The positions, ascending, where p changes its sign, through a root or by a jump. Touching zero is no change. Where p
 * stays zero in between, the two ends of that stretch.
 */
export function signChanges(p: Piecewise): number[] {
  const signed = stretchesOf(p).filter(({ sign }) => sign !== 0);
  const nearness = COINCIDENT * (p.breaks.at(-1)! - p.breaks[0]!);
  return signed.slice(1).flatMap((next, i) => {
    const { to, sign } = signed[i]!;
    if (sign === next.sign) return [];
    // Rounding may put a root just beside the break where it belongs, such as a hinge.
    if (next.from - to <= nearness) return [p.breaks.includes(to) ? to : next.from];
    return [to, next.from];
  });
}

function stretchesOf(p: Piecewise): Stretch[] {
  const nothing = NOTHING * magnitude(p);
  const rootsIn = rootsOf(p);
  return Array.from({ length: pieceCount(p) }, (_, k) => {
    const cuts = [...new Set([p.breaks[k]!, ...rootsIn(k), p.breaks[k + 1]!])];
    return cuts.slice(1).map((to, i) => stretch(p, k, cuts[i]!, to, nothing));
  }).flat();
}

function stretch(p: Piecewise, k: number, from: number, to: number, nothing: number): Stretch {
  const samples = [0.25, 0.5, 0.75].map((t) => evaluatePiece(p, k, from + t * (to - from) - p.breaks[k]!));
  const largest = samples.reduce((a, b) => (Math.abs(b) > Math.abs(a) ? b : a));
  return { from, to, sign: Math.abs(largest) <= nothing ? 0 : Math.sign(largest) };
}
