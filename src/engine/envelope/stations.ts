import { COINCIDENT } from '../model/index';
import { pieceAt } from '../polynomial/index';
import { type Curves, valuesAt } from './curves';
import type { GoverningSearch } from './governing';
import type { Governing, Range } from './types';

/** Reads the envelope of one quantity at positions, on both sides of a break. */
export class StationReader {
  private readonly tolerance: number;
  /** What the sources give at the position; at a break left of it, then right. */
  private readonly values: Float64Array;

  constructor(
    private readonly curves: Curves,
    private readonly governing: GoverningSearch,
    /** The largest magnitude of the quantity. */
    private readonly largest: number,
  ) {
    const { breaks, count } = curves;
    this.tolerance = COINCIDENT * (breaks.at(-1)! - breaks[0]!);
    this.values = new Float64Array(2 * count);
  }

  at(x: number): Range<Governing> {
    const { curves, values } = this;
    const k = pieceAt(curves, x);
    const from = curves.breaks[k]!;
    const to = curves.breaks[k + 1]!;
    if (x - from <= this.tolerance && k > 0) return this.atBreak(k);
    if (to - x <= this.tolerance && k + 2 < curves.breaks.length) return this.atBreak(k + 1);
    valuesAt(curves, k, Math.min(Math.max((x - from) / (to - from), 0), 1), values, 0);
    return this.governing.find(values, 1, this.largest);
  }

  private atBreak(k: number): Range<Governing> {
    const { curves, values } = this;
    valuesAt(curves, k - 1, 1, values, 0);
    valuesAt(curves, k, 0, values, curves.count);
    return this.governing.find(values, 2, this.largest);
  }
}
