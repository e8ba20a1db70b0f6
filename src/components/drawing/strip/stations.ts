import type { Beam } from '@/engine/model/index';
import type { Piecewise } from '@/engine/polynomial/index';
import { roundStep } from '@/lib/round-step';
import type { AskedStation } from '../asked';
import type { DrawingFormat } from '../format';
import { valuesAt } from '../geometry/curve';
import { type Quantity, toScreen } from '../signs';
import { PURPOSE } from './diagram-layout';

/** A column of the table: one curve, or one side of an envelope. */
export type StationColumn = {
  quantity: Quantity;
  words: string;
  curve: Piecewise;
  bound: AskedStation['bound'];
};

export type StationRow = { x: number; side: 'left' | 'right' | null; values: string[] };

const MOST_STEPS = 24;

function stationsOf(
  beam: Beam,
  columns: readonly StationColumn[],
  extremes: readonly number[],
  format: DrawingFormat,
): number[] {
  const step = format.station.step * Math.max(0.5, roundStep(beam.length / format.station.step / MOST_STEPS));
  const even = Array.from({ length: Math.floor(beam.length / step + 1e-9) + 1 }, (_, i) => i * step);
  const all = [...even, beam.length, ...columns.flatMap(({ curve }) => [...curve.breaks]), ...extremes];
  const sorted = all.filter((x) => x >= 0 && x <= beam.length).sort((a, b) => a - b);
  return sorted.filter((x, i) => i === 0 || x - (sorted[i - 1] ?? 0) > beam.length * 1e-6);
}

/**
 * Stations at even steps, at every point where a curve changes its law, and at the extremes. Where a value jumps the station
 * has two rows.
 */
export function stationRows(
  beam: Beam,
  columns: readonly StationColumn[],
  extremes: readonly number[],
  format: DrawingFormat,
): StationRow[] {
  return stationsOf(beam, columns, extremes, format).flatMap((x): StationRow[] => {
    const pairs = columns.map(({ quantity, curve }) =>
      valuesAt(curve, x).map((value) => format.value(PURPOSE[quantity], toScreen(quantity, value))),
    );
    const side = (i: 0 | 1) => pairs.map((pair) => pair[i] ?? '');
    if (pairs.every(([left, right]) => left === right)) return [{ x, side: null, values: side(1) }];
    return [
      { x, side: 'left', values: side(0) },
      { x, side: 'right', values: side(1) },
    ];
  });
}
