import { horner, type Piecewise, piecewise, UnitRoots } from '../polynomial/index';
import type { Cases, Sense } from './cases';
import type { Curves } from './curves';
import { PieceEnvelope } from './piece';

/** Part of a piece that is too short to draw, or to tell one polynomial from another on. */
const SLIVER = 1e-9;

/** A polynomial of t on a stretch of a piece, lowest power first. */
type Stretch = { readonly from: number; readonly to: number; readonly a: Float64Array };

/** The most (sense 1) or the least (−1) over all combinations and patterns all along the beam, exactly, for a drawing. */
export function envelopeCurve(curves: Curves, cases: Cases, sense: Sense): Piecewise {
  const roots = new UnitRoots();
  const envelope = new PieceEnvelope(cases, roots);
  envelope.take(curves, 0);
  const breaks = [curves.breaks[0]!];
  const pieces: number[][] = [];
  for (let k = 0; k + 1 < curves.breaks.length; k++) {
    const [x, end] = [curves.breaks[k]!, curves.breaks[k + 1]!];
    const each = cases.combinations.map((_, c) => stretchesOf(envelope, k, c, sense));
    const highest = each.reduce((most, other) => higher(most, other, roots));
    for (const { from, to, a } of highest) {
      breaks.push(to === 1 ? end : x + to * (end - x));
      pieces.push(shifted(a, from).map((c, j) => (sense * c) / (end - x) ** j));
    }
  }
  return piecewise(breaks, pieces);
}

function stretchesOf(envelope: PieceEnvelope, k: number, combination: number, sense: Sense): Stretch[] {
  const stretches: Stretch[] = [];
  envelope.walk(k, combination, sense, (from, to, a) => {
    if (to - from > SLIVER || from === 0 || to === 1) stretches.push({ from, to, a: a.slice() });
  });
  return joined(stretches);
}

/** Without gaps: each stretch begins where the one before it ends. */
const joined = (stretches: readonly Stretch[]): Stretch[] =>
  stretches.map((stretch, i) => ({ ...stretch, from: i === 0 ? 0 : stretches[i - 1]!.to }));

/** The higher of two, stretch by stretch, cut where they cross. */
function higher(one: readonly Stretch[], other: readonly Stretch[], roots: UnitRoots): Stretch[] {
  const found: Stretch[] = [];
  const add = (from: number, to: number, a: Float64Array) => {
    const last = found.at(-1);
    if (last?.a === a) found[found.length - 1] = { ...last, to };
    else found.push({ from, to, a });
  };
  let [i, j, from] = [0, 0, 0];
  while (from < 1) {
    const [a, b] = [one[i]!, other[j]!];
    const to = Math.min(a.to, b.to);
    const cuts = [
      from,
      ...crossings(a.a, b.a, roots).filter((t) => t - from > SLIVER && to - t > SLIVER),
      to,
    ];
    for (let n = 1; n < cuts.length; n++) {
      const middle = (cuts[n - 1]! + cuts[n]!) / 2;
      const isOne = heightOf(a.a, middle) >= heightOf(b.a, middle);
      add(cuts[n - 1]!, cuts[n]!, isOne ? a.a : b.a);
    }
    if (a.to === to) i++;
    if (b.to === to) j++;
    from = to;
  }
  return found;
}

const heightOf = (a: Float64Array, t: number): number => horner(a, a.length - 1, t);

function crossings(a: Float64Array, b: Float64Array, roots: UnitRoots): number[] {
  const difference = a.map((c, j) => c - b[j]!);
  const count = roots.find(difference, difference.length - 1);
  return [...roots.roots.subarray(0, count)];
}

/** The coefficients about t (repeated synthetic division). */
function shifted(a: Float64Array, t: number): number[] {
  const c = [...a];
  for (let i = 0; t !== 0 && i < c.length - 1; i++) {
    for (let j = c.length - 2; j >= i; j--) c[j]! += t * c[j + 1]!;
  }
  return c;
}
