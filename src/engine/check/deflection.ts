import type { Region } from '../combination/index';
import { add, evaluate, extremes, type Piecewise, piecewise } from '../polynomial/index';
import type { UnitSystemName } from '../quantity/index';
import type { DeflectionLimit } from './criteria';
import { texFigure } from './figure';
import type { CheckRow, ServiceArrangement } from './types';

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
 * support. m, positive up. The most of either sign, and where (jobmap: upward movement is held to the same ratio).
 */
function movementIn(region: Region, deflection: Piecewise): { value: number; at: number } {
  const within = restrict(deflection, region.from, region.to);
  const left = evaluate(deflection, region.from)[1];
  const right = evaluate(deflection, region.to)[0];
  const isLeftOverhang = region.kind === 'overhang' && region.from === 0;
  const datum: [number, number] =
    region.kind === 'overhang'
      ? [isLeftOverhang ? right : left, 0]
      : [left, (right - left) / (region.to - region.from)];
  const chord = piecewise([region.from, region.to], [datum.map((c) => -c)]);
  const { max, min } = extremes(add(within, chord));
  const most = Math.abs(max.value) > Math.abs(min.value) ? max : min;
  return { value: most.value, at: most.at[0] ?? region.from };
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

/** One row per limit and region: δ ≤ L/n of a span, or its multiple of an overhang, and the absolute cap. */
export function deflectionChecks(
  arrangements: readonly ServiceArrangement[],
  regions: readonly Region[],
  system: UnitSystemName,
): CheckRow[] {
  return arrangements.flatMap(({ limit, solution }, index) =>
    regions.map((region) => {
      const { value, at } = movementIn(region, solution.diagrams.deflection);
      const capacity = allowedMovement(limit, region);
      const isCapped = capacity === limit.cap;
      const words = isCapped ? 'cap' : ratioInWords(limit, region);
      return {
        id: `deflection-${index}-${region.name.replaceAll(/[^A-Za-z]+/g, '-')}`,
        kind: 'deflection' as const,
        title: `Deflection, ${limit.name.toLowerCase()}, ${words}`,
        place: `${region.name}, ${limit.combination.name}${value > 0 ? ', upward' : ''}`,
        clause: `${limit.source.publication}, ${limit.source.clause}`,
        demand: Math.abs(value),
        capacity,
        dimension: 'length' as const,
        ratio: Math.abs(value) / capacity,
        combination: limit.combination.name,
        at,
        symbols: `\\delta \\le ${isCapped ? '\\delta_{max}' : `\\frac{${region.kind === 'span' ? 'L' : `${limit.overhang_factor === 1 ? '' : limit.overhang_factor}a`}}{${region.kind === 'span' ? limit.span_ratio : limit.overhang_ratio}}`}`,
        numbers: `${texFigure(Math.abs(value), 'deflection', system)} \\le ${texFigure(capacity, 'deflection', system)}`,
      };
    }),
  );
}
