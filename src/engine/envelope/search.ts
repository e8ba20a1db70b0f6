import { extremes, settle } from '../polynomial/index';
import { Adverse, type Cases, type Sense } from './cases';
import { type Arrangement, actingFactors, arrangementCurve, type Curves, dot, valuesAt } from './curves';
import { PieceMaximum } from './piece';

/** What is below this part of the largest value of its kind is rounding: a share that adverse loading leaves out. */
export const NOTHING = 1e-12;
/** Values nearer to an extreme than this part of the largest magnitude attain it, as in a solution's own extremes. */
const TIE = 1e-9;

/** An extreme of an envelope: its value, and every position where the arrangement that gives it attains it. */
export type EnvelopeExtreme = { value: number; at: number[]; combination: number; pattern: number[] };

type Found = { value: number; piece: number; t: number; combination: number };

/** The most that sense · envelope can be in each piece and combination (k·combinations + c), and the largest of its values at their ends and middles. */
type Bounds = { inside: Float64Array; best: Found };

/**
 * The exact extremes of one quantity over all combinations and patterns.
 *
 * The envelope of the control coefficients, each added up adversely, bounds the envelope on a piece (the sum of
 * adverse shares is convex in the sources, and Bernstein's polynomials are never negative and add up to 1). So pieces
 * are searched in the order of their bounds, until none is left that could hold more than has been found.
 */
export function envelopeExtremes(
  curves: Curves,
  cases: Cases,
): { max: EnvelopeExtreme; min: EnvelopeExtreme } {
  const [high, low] = boundsOf(curves, cases);
  const size = Math.max(largestOf(high), largestOf(low));
  const piece = new PieceMaximum(curves, cases, NOTHING * size);
  const found = (
    [
      [high, 1],
      [low, -1],
    ] as const
  ).map(([bounds, sense]) =>
    described(curves, cases, search(bounds, piece, cases, NOTHING * size, sense), sense, size),
  );
  const [max, min] = found as [EnvelopeExtreme, EnvelopeExtreme];
  const largest = Math.max(Math.abs(max.value), Math.abs(min.value));
  return {
    max: { ...max, value: settle(max.value, largest) },
    min: { ...min, value: settle(min.value, largest) },
  };
}

const largestOf = ({ inside, best }: Bounds): number =>
  inside.reduce(
    (most, bound) => (Number.isFinite(bound) ? Math.max(most, Math.abs(bound)) : most),
    Math.abs(best.value),
  );

/** For the largest and for the smallest, by every combination's control coefficients. */
function boundsOf(curves: Curves, cases: Cases): [Bounds, Bounds] {
  const { degree, count, control, breaks } = curves;
  const pieces = breaks.length - 1;
  const combinations = cases.combinations.length;
  const adverse = new Adverse(cases);
  const [high, low] = [newBounds(pieces * combinations), newBounds(pieces * combinations)];
  for (let c = 0; c < combinations; c++) {
    for (let k = 0; k < pieces; k++) {
      for (let j = 0; j <= 2 * degree; j++) {
        adverse.add(control, (k * (2 * degree + 1) + j) * count, c);
        if (degree === 0 || j % degree === 0) {
          const t = degree === 0 ? 0 : j / degree / 2;
          if (adverse.most > high.best.value)
            high.best = { value: adverse.most, piece: k, t, combination: c };
          if (-adverse.least > low.best.value)
            low.best = { value: -adverse.least, piece: k, t, combination: c };
        } else {
          const i = k * combinations + c;
          if (adverse.most > high.inside[i]!) high.inside[i] = adverse.most;
          if (-adverse.least > low.inside[i]!) low.inside[i] = -adverse.least;
        }
      }
    }
  }
  return [high, low];
}

const newBounds = (size: number): Bounds => ({
  inside: new Float64Array(size).fill(Number.NEGATIVE_INFINITY),
  best: { value: Number.NEGATIVE_INFINITY, piece: 0, t: 0, combination: 0 },
});

function search(
  { inside, best }: Bounds,
  piece: PieceMaximum,
  cases: Cases,
  nothing: number,
  sense: Sense,
): Found {
  let found = best;
  for (;;) {
    let [next, most] = [-1, found.value + nothing];
    for (let i = 0; i < inside.length; i++) {
      if (inside[i]! > most) {
        most = inside[i]!;
        next = i;
      }
    }
    if (next < 0) return found;
    inside[next] = Number.NEGATIVE_INFINITY;
    const combination = next % cases.combinations.length;
    const k = (next - combination) / cases.combinations.length;
    piece.find(k, combination, sense);
    if (piece.value > found.value) found = { value: piece.value, piece: k, t: piece.t, combination };
  }
}

/** The pattern at the place found, and every position where that arrangement comes to the same value. */
function described(
  curves: Curves,
  cases: Cases,
  { value, piece, t, combination }: Found,
  sense: Sense,
  size: number,
): EnvelopeExtreme {
  const values = new Float64Array(curves.count);
  valuesAt(curves, piece, t, values);
  const pattern = new Adverse(cases).pattern(values, 0, combination, sense, NOTHING * size);
  const least = value - TIE * size;
  const at = runsReaching(curves, cases, { combination, pattern }, sense, least).flatMap(([first, last]) => {
    const { max, min } = extremes(arrangementCurve(curves, cases, { combination, pattern }, first, last));
    const run = sense > 0 ? max : min;
    return sense * run.value >= least ? run.at : [];
  });
  return { value: sense * value + 0, at, combination, pattern };
}

/** Runs of pieces, [first, last), where the bounds of one arrangement let it come to `least`. */
function runsReaching(
  { breaks, degree, count, control }: Curves,
  cases: Cases,
  arrangement: Arrangement,
  sense: Sense,
  least: number,
): [number, number][] {
  const factors = actingFactors(cases, arrangement);
  const width = 2 * degree + 1;
  const reaches = (k: number): boolean => {
    for (let j = 0; j < width; j++) {
      if (sense * dot(factors, control, (k * width + j) * count) >= least) return true;
    }
    return false;
  };
  const runs: [number, number][] = [];
  for (let k = 0; k + 1 < breaks.length; k++) {
    if (!reaches(k)) continue;
    const run = runs.at(-1);
    if (run?.[1] === k) run[1] = k + 1;
    else runs.push([k, k + 1]);
  }
  return runs;
}
