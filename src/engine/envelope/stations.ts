import { COINCIDENT } from '../model/index';
import { pieceAt } from '../polynomial/index';
import { type Curves, valuesAt } from './curves';
import type { GoverningSearch } from './governing';
import type { Governing, Range } from './types';

/** Reads the envelope of a quantity at positions, on both sides of a break. */
export class StationReader {
  /** What the sources give at the position; at a break left of it, then right. */
  private readonly values: Float64Array;

  constructor(
    private readonly governing: GoverningSearch,
    count: number,
  ) {
    this.values = new Float64Array(2 * count);
  }

  /** `largest`: the largest magnitude of the quantity. */
  read(curves: Curves, x: number, largest: number): Range<Governing> {
    const { breaks } = curves;
    const tolerance = COINCIDENT * (breaks.at(-1)! - breaks[0]!);
    const k = pieceAt(curves, x);
    const from = breaks[k]!;
    const to = breaks[k + 1]!;
    if (x - from <= tolerance && k > 0) return this.readBreak(curves, k, largest);
    if (to - x <= tolerance && k + 2 < breaks.length) return this.readBreak(curves, k + 1, largest);
    valuesAt(curves, k, Math.min(Math.max((x - from) / (to - from), 0), 1), this.values, 0);
    return this.governing.find(this.values, 1, largest);
  }

  private readBreak(curves: Curves, k: number, largest: number): Range<Governing> {
    valuesAt(curves, k - 1, 1, this.values, 0);
    valuesAt(curves, k, 0, this.values, curves.count);
    return this.governing.find(this.values, 2, largest);
  }
}
