import type { Count } from './count';

/** The bounds of ω² are closed to this part of it: f is known to half of that. */
const CLOSED = 1e-12;

/** No natural frequency lies below the lower bound, one or more below the upper. */
export type Bracket = { readonly lower: Count; readonly upper: Count };

/** How far a chord's zero is moved towards the middle, to close the bracket from its other side: this part of its width squared. */
const TRUNCATED = 0.2;
/** Steps beyond those of halving alone that may be taken at worst. */
const SLACK = 4;

/**
 * Closes a bracket around the first natural frequency. Where `upper.below` of them come together the determinant falls
 * to zero with that power, so that its root of that order is nearly straight where no other is near: the next ω² is
 * where the chord of those roots is zero, moved a little towards the middle, and no further from it than lets the bracket
 * close in the steps that halving takes, and a few more.
 *
 * Source: I. F. D. Oliveira, R. H. C. Takahashi, "An enhancement of the bisection method average performance preserving
 * minmax optimality", ACM Transactions on Mathematical Software 47 (2020) (from memory).
 */
export function closeBracket(bracket: Bracket, at: (omega2: number) => Count): Bracket {
  let { lower, upper } = bracket;
  const first = upper.omega2 - lower.omega2;
  const closed = CLOSED * lower.omega2;
  const steps = Math.ceil(Math.log2(first / closed)) + SLACK;
  for (let left = steps; upper.omega2 - lower.omega2 > closed; left--) {
    const width = upper.omega2 - lower.omega2;
    const middle = width / 2;
    const chord = width * chordZero(lower, upper);
    const inwards = Math.sign(middle - chord);
    const moved = Math.max(TRUNCATED * first * (width / first) ** 2, closed / 4);
    const target = moved <= Math.abs(middle - chord) ? chord + inwards * moved : middle;
    const reach = Math.max(0, (closed / 2) * 2 ** left - middle);
    const step = Math.abs(target - middle) <= reach ? target : middle - inwards * reach;
    const count = at(lower.omega2 + step);
    if (count.below > 0) upper = count;
    else lower = count;
  }
  return { lower, upper };
}

/** Where the chord is zero, as a part of the bracket. */
const chordZero = (lower: Count, upper: Count): number =>
  1 / (1 + Math.exp((upper.log - lower.log) / upper.below));
