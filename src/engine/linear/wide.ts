const SPLITTER = 2 ** 27 + 1; // cuts 53 bits into two halves whose products are exact

/**
 * A number of about 32 digits: the unevaluated sum of two doubles, hi + lo with |lo| ≤ ulp(hi)/2.
 *
 * Both methods need the room. Twelve props released at once leave a cantilever whose flexibility matrix has a condition
 * of 10¹² and more: doubles alone would keep four digits of it. The stiffness of a piece of length h grows as 1/h³, so
 * the independent check would lose twelve digits where a piece is a ten-thousandth of the beam. The two share this
 * arithmetic and nothing that solves; the tests beside it compare it with exact whole numbers.
 *
 * Relative error of each operation: below 2⁻¹⁰². Operands stay below 10²⁹⁰, where the splitting would overflow.
 * Source: T. J. Dekker, "A floating-point technique for extending the available precision", Numerische Mathematik 18
 * (1971); D. E. Knuth, The Art of Computer Programming, vol. 2, 4.2.2, theorem B, for the sum.
 */
export class Wide {
  static readonly ZERO = new Wide(0, 0);
  static readonly ONE = new Wide(1, 0);

  private constructor(
    readonly hi: number,
    readonly lo: number,
  ) {}

  static of(value: number): Wide {
    return new Wide(value, 0);
  }

  /** The pair hi + lo, brought to canonical form. */
  static pair(hi: number, lo: number): Wide {
    const s = hi + lo;
    const v = s - hi;
    return new Wide(s, hi - (s - v) + (lo - v));
  }

  /** a − b of two doubles, without rounding. */
  static difference(a: number, b: number): Wide {
    return Wide.pair(a, -b);
  }

  plus(b: Wide): Wide {
    const s = this.hi + b.hi;
    const v = s - this.hi;
    const e = this.hi - (s - v) + (b.hi - v);
    const t = this.lo + b.lo;
    const u = t - this.lo;
    const f = this.lo - (t - u) + (b.lo - u);
    const hi = s + (e + t);
    const lo = e + t - (hi - s) + f;
    const sum = hi + lo;
    return new Wide(sum, lo - (sum - hi));
  }

  minus(b: Wide): Wide {
    return this.plus(b.negated());
  }

  negated(): Wide {
    return new Wide(-this.hi, -this.lo);
  }

  times(b: Wide | number): Wide {
    const bHi = typeof b === 'number' ? b : b.hi;
    const bLo = typeof b === 'number' ? 0 : b.lo;
    const p = this.hi * bHi;
    const ca = SPLITTER * this.hi;
    const cb = SPLITTER * bHi;
    const ah = ca - (ca - this.hi);
    const bh = cb - (cb - bHi);
    const al = this.hi - ah;
    const bl = bHi - bh;
    const e = ah * bh - p + ah * bl + al * bh + al * bl + (this.hi * bLo + this.lo * bHi);
    const sum = p + e;
    return new Wide(sum, e - (sum - p));
  }

  /** Long division, three digits in base 2⁵³. */
  over(b: Wide | number): Wide {
    const divisor = typeof b === 'number' ? Wide.of(b) : b;
    const first = this.hi / divisor.hi;
    const rest = this.minus(divisor.times(first));
    const second = rest.hi / divisor.hi;
    const third = rest.minus(divisor.times(second)).hi / divisor.hi;
    return Wide.pair(first, second).plus(Wide.of(third));
  }

  /** The nearest double. */
  rounded(): number {
    return this.hi + this.lo;
  }
}
