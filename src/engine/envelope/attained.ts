import { horner, type UnitRoots, WIDTH } from '../polynomial/index';
import type { Cases, Sense } from './cases';
import { type Arrangement, type Curves, dot, readFactors } from './curves';

/** Values nearer to an extreme than this part of the largest magnitude attain it, as in a solution's own extremes. */
const TIE = 1e-9;
/** What varies by less than this part of the largest magnitude varies by rounding only. */
const ROUNDING = 1e-13;
/** Two positions nearer than this part of the beam are one: a turning point found beside a break is the break. */
const COINCIDENT = 1e-9;

/** Where one arrangement attains a value: at ends of pieces and turning points, ascending; of a constant piece its ends. */
export class AttainedPlaces {
  private readonly sum = new Float64Array(WIDTH);
  private readonly slope = new Float64Array(WIDTH);
  private readonly factors: Float64Array;
  private curves!: Curves;
  private size = 0;

  constructor(
    private readonly cases: Cases,
    private readonly roots: UnitRoots,
  ) {
    this.factors = new Float64Array(cases.count);
  }

  /** The curves of a quantity, and its largest magnitude. */
  take(curves: Curves, size: number): void {
    this.curves = curves;
    this.size = size;
  }

  /** The positions where sense · the arrangement's curve comes to `value`. */
  find(arrangement: Arrangement, sense: Sense, value: number): number[] {
    const { breaks } = this.curves;
    readFactors(this.cases, arrangement, this.factors);
    const least = value - TIE * this.size;
    const at: number[] = [];
    for (let k = 0; k + 1 < breaks.length; k++) {
      if (!this.reaches(k, sense, least)) continue;
      for (const t of this.placesIn(k, sense, least)) this.add(at, k, t);
    }
    return at;
  }

  /** Whether the bounds of a piece let the arrangement come to `least` there. */
  private reaches(k: number, sense: Sense, least: number): boolean {
    const { degree, count, control } = this.curves;
    const { factors } = this;
    for (let j = 0; j <= 2 * degree; j++) {
      if (sense * dot(factors, control, (k * (2 * degree + 1) + j) * count) >= least) return true;
    }
    return false;
  }

  private placesIn(k: number, sense: Sense, least: number): number[] {
    const { degree, count, power } = this.curves;
    const { sum, slope, factors } = this;
    for (let j = 0; j <= degree; j++) {
      sum[j] = sense * dot(factors, power, (k * (degree + 1) + j) * count);
      if (j > 0) slope[j - 1] = sum[j]! * j;
    }
    const turns = degree > 1 ? this.roots.find(slope, degree - 1) : 0;
    return this.distinct(turns).filter((t) => horner(sum, degree, t) >= least);
  }

  /**
   * The ends, and the turning points that differ from what is beside them. A piece that levels out towards its end has
   * a multiple root of its slope there, which rounding moves: by 1e-8 of the piece where it is double, 1e-5 where triple.
   */
  private distinct(turns: number): number[] {
    const kept = [0];
    for (let i = 0; i < turns; i++) {
      const t = this.roots.roots[i]!;
      if (this.differ(t, kept.at(-1)!)) kept.push(t);
    }
    while (kept.length > 1 && !this.differ(kept.at(-1)!, 1)) kept.pop();
    kept.push(1);
    return kept;
  }

  private differ(one: number, other: number): boolean {
    const { degree } = this.curves;
    const difference = horner(this.sum, degree, one) - horner(this.sum, degree, other);
    return Math.abs(difference) > ROUNDING * this.size;
  }

  /** Without repeats: breaks as they are, turning points only where no other position is so near. */
  private add(at: number[], k: number, t: number): void {
    const { breaks } = this.curves;
    const from = breaks[k]!;
    const to = breaks[k + 1]!;
    const x = t === 0 ? from : t === 1 ? to : from + t * (to - from);
    const last = at.at(-1);
    const isBreak = t === 0 || t === 1;
    if (last === undefined || x - last > COINCIDENT * (breaks.at(-1)! - breaks[0]!)) at.push(x);
    else if (isBreak && x !== last) {
      if (breaks.includes(last)) at.push(x);
      else at[at.length - 1] = x;
    }
  }
}
