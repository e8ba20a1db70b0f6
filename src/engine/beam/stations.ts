import { type Beam, COINCIDENT } from '../model/index';
import { evaluatePiece, magnitude, type Piecewise, pieceAt, pieceCount, settle } from '../polynomial/index';
import type { Diagrams, Pair, Station } from './types';

/** Stations unless said otherwise: ten equal steps. */
const STATIONS = 11;

/** Positions of n equal steps' ends, length·k/(n − 1), the last exactly the length; or the positions given. */
export function stationPositions(
  { length }: Pick<Beam, 'length'>,
  stations: number | readonly number[] = STATIONS,
): number[] {
  if (typeof stations !== 'number') return [...stations];
  const last = stations - 1;
  return Array.from({ length: stations }, (_, k) => (k === last ? length : (length * k) / last));
}

/**
 * Shear, moment and slope just left and right of every position, and the deflection. Positions within 1e-12 of the
 * length of a point coincide with it; at the two ends both values are the one inside the beam.
 */
export function stationsAt({ diagrams }: { diagrams: Diagrams }, positions: readonly number[]): Station[] {
  const read = {
    shear: reader(diagrams.shear),
    moment: reader(diagrams.moment),
    slope: reader(diagrams.slope),
    deflection: reader(diagrams.deflection),
  };
  return positions.map((x) => ({
    x: x + 0,
    shear: read.shear(x),
    moment: read.moment(x),
    slope: read.slope(x),
    deflection: read.deflection(x)[1],
  }));
}

/** Reads [left, right]; what is nothing beside the largest value is 0. */
function reader(p: Piecewise): (x: number) => Pair {
  const largest = magnitude(p);
  const tolerance = COINCIDENT * (p.breaks.at(-1)! - p.breaks[0]!);
  const value = (k: number, x: number) => settle(evaluatePiece(p, k, x - p.breaks[k]!), largest);
  return (x) => {
    const k = pieceAt(p, x);
    const [from, to] = [p.breaks[k]!, p.breaks[k + 1]!];
    if (x - from <= tolerance && k > 0) return [value(k - 1, from), value(k, from)];
    if (to - x <= tolerance && k < pieceCount(p) - 1) return [value(k, to), value(k + 1, to)];
    const inside = value(k, Math.min(Math.max(x, from), to));
    return [inside, inside];
  };
}
