import type { ArrangementNamer, Region } from '../combination/index';
import type { SuperposedBeam } from '../envelope/index';
import { add, evaluate, type Piecewise, piecewise } from '../polynomial/index';
import type { UnitSystemName } from '../quantity/index';
import type { DeflectionLimit } from './criteria';
import { texFigure } from './figure';
import type { CheckRow } from './types';

/** The pieces of p between two of its breaks. */
function restrict(p: Piecewise, from: number, to: number): Piecewise {
  const first = p.breaks.indexOf(from);
  const last = p.breaks.indexOf(to);
  const width = p.degree + 1;
  const pieces = Array.from({ length: last - first }, (_, k) => [
    ...p.coefficients.subarray((first + k) * width, (first + k + 1) * width),
  ]);
  return piecewise(p.breaks.subarray(first, last + 1), pieces);
}

/**
 * The movement that a limit is about: in a span from the chord between its two supports, in an overhang from its
 * support. m, positive up.
 */
function movementIn({ from, to, held }: Region, deflection: Piecewise): Piecewise {
  const left = evaluate(deflection, from)[1];
  const right = evaluate(deflection, to)[0];
  const datum = held === 'both' ? [left, (right - left) / (to - from)] : [held === 'left' ? left : right, 0];
  return add(restrict(deflection, from, to), piecewise([from, to], [datum.map((c) => -c)]));
}

/** The limit of a region, m: its length over the ratio, or the absolute cap where that is lower. */
function allowedMovement(limit: DeflectionLimit, { kind, from, to }: Region): number {
  const length = to - from;
  const byRatio =
    kind === 'span' ? length / limit.span_ratio : (length * limit.overhang_factor) / limit.overhang_ratio;
  return Math.min(byRatio, limit.cap ?? Number.POSITIVE_INFINITY);
}

function ratioInWords(limit: DeflectionLimit, { kind }: Region): string {
  if (kind === 'span') return `L/${limit.span_ratio}`;
  return `${limit.overhang_factor === 1 ? '' : limit.overhang_factor}a/${limit.overhang_ratio}`;
}

/** The id of the row of a limit, by its place among those that act, in a region. */
export const deflectionId = (limit: number, { name }: Region): string =>
  `deflection-${limit}-${name.replaceAll(/[^A-Za-z]+/g, '-')}`;

/**
 * One row per limit and region: δ ≤ L/n of a span, or its multiple of an overhang, and the absolute cap. The most of
 * either sign over all patterns: upward movement is held to the same ratio.
 */
export function deflectionChecks(
  superposed: SuperposedBeam,
  limits: readonly DeflectionLimit[],
  regions: readonly Region[],
  nameOf: ArrangementNamer,
  system: UnitSystemName,
): CheckRow[] {
  const combinations = limits.map(({ combination }) => combination);
  const movements = regions.map((region) =>
    superposed.measured(({ deflection }) => movementIn(region, deflection), combinations),
  );
  return limits.flatMap((limit, index) =>
    regions.map((region, place): CheckRow => {
      const { max, min } = movements[place]![index]!;
      const { value, at, ...by } = Math.abs(max.value) > Math.abs(min.value) ? max : min;
      const capacity = allowedMovement(limit, region);
      const isCapped = capacity === limit.cap;
      const words = isCapped ? 'cap' : ratioInWords(limit, region);
      return {
        id: deflectionId(index, region),
        kind: 'deflection',
        title: `Deflection, ${limit.name.toLowerCase()}, ${words}`,
        place: `${region.name}, ${nameOf(by)}${value > 0 ? ', upward' : ''}`,
        clause: `${limit.source.publication}, ${limit.source.clause}`,
        demand: Math.abs(value),
        capacity,
        dimension: 'length',
        ratio: Math.abs(value) / capacity,
        ...by,
        at: at[0] ?? region.from,
        symbols: `\\delta \\le ${isCapped ? '\\delta_{max}' : `\\frac{${region.kind === 'span' ? 'L' : `${limit.overhang_factor === 1 ? '' : limit.overhang_factor}a`}}{${region.kind === 'span' ? limit.span_ratio : limit.overhang_ratio}}`}`,
        numbers: `${texFigure(Math.abs(value), 'deflection', system)} \\le ${texFigure(capacity, 'deflection', system)}`,
      };
    }),
  );
}
