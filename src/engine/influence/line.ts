import { type Beam, type Redundant, spansOf } from '../model/index';
import {
  add,
  evaluate,
  evaluatePiece,
  extremes,
  integrate,
  type Piecewise,
  pieceCount,
  piecewise,
  signChanges,
} from '../polynomial/index';
import { dislocated } from './dislocation';
import { type SolveMoved, solveWide } from './solver';
import type { InfluenceLine, InfluenceQuantity, SpanArea } from './types';

/** A piece that stays below this part of the largest ordinate is zero: all that is there is rounding. */
const NOTHING = 1e-13;
/** Powers of a cubic. */
const CUBIC = 4;

/**
 * The influence line by the force method, proven by the direct stiffness method. Fails as `solve` does.
 *
 * Between its points an unloaded beam has a straight moment, so that v is a cubic there, with shear flexibility too:
 * the line is exact. The beam's own loads and movements have no part in it.
 */
export function influenceLine(
  beam: Beam,
  quantity: InfluenceQuantity,
  redundants?: readonly Redundant[],
  solve: SolveMoved = solveWide,
): InfluenceLine {
  const { line, proof } = provenLine(beam, quantity, redundants, solve);
  return { quantity, line, extremes: extremes(line), areas: areasUnder(beam, line), proof };
}

/** The line alone. */
export function provenLine(
  beam: Beam,
  quantity: InfluenceQuantity,
  redundants: readonly Redundant[] | undefined,
  solve: SolveMoved,
): Pick<InfluenceLine, 'line' | 'proof'> {
  const { beam: moved, rigid, sense } = dislocated(beam, quantity);
  const { deflection, proof } = solve(moved, redundants);
  const line = cubicOf(rigid ? add(deflection, rigid) : deflection, isZero(beam, quantity) ? 0 : sense);
  return { line, proof };
}

/** A hinge passes no moment, whatever stands where. */
const isZero = ({ hinges }: Beam, quantity: InfluenceQuantity): boolean =>
  quantity.kind === 'moment' && hinges.includes(quantity.at);

/** `sense` times the curve, of which only the powers up to the third are not zero. */
function cubicOf(curve: Piecewise, sense: number): Piecewise {
  const sizes = Array.from({ length: pieceCount(curve) }, (_, k) => {
    const h = curve.breaks[k + 1]! - curve.breaks[k]!;
    return Math.max(...[0, 1 / 3, 2 / 3, 1].map((t) => Math.abs(evaluatePiece(curve, k, t * h))));
  });
  const nothing = NOTHING * Math.max(...sizes);
  const pieces = sizes.map((size, k) => {
    const first = k * (curve.degree + 1);
    const coefficients = curve.coefficients.subarray(first, first + CUBIC);
    return size <= nothing ? [0] : Array.from(coefficients, (c) => sense * c + 0);
  });
  return piecewise(curve.breaks, pieces);
}

/** The areas under a line, span by span, what lies above the axis apart from what lies below it. */
function areasUnder(beam: Beam, line: Piecewise): SpanArea[] {
  const integral = integrate(line);
  const crossings = [...line.breaks, ...signChanges(line)].sort((a, b) => a - b);
  let next = 0;
  return spansOf(beam).map(({ from, to }) => {
    const cuts = [from];
    for (; next < crossings.length && crossings[next]! <= to; next++) {
      if (crossings[next]! > cuts.at(-1)!) cuts.push(crossings[next]!);
    }
    if (to > cuts.at(-1)!) cuts.push(to);
    const areas = cuts.slice(1).map((x, k) => evaluate(integral, x)[0] - evaluate(integral, cuts[k]!)[1]);
    const sum = (sign: 1 | -1) =>
      areas.reduce((total, area) => total + (Math.sign(area) === sign ? area : 0), 0);
    return { from, to, positive: sum(1), negative: sum(-1) };
  });
}
