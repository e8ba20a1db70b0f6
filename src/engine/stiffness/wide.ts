/**
 * A number of about 32 digits: the unevaluated sum of two doubles, hi + lo with |lo| ≤ ulp(hi)/2.
 *
 * The stiffness of a piece of length h grows as 1/h³, so plain doubles lose twelve of their sixteen digits where a
 * piece is a ten-thousandth of the beam. Carrying twice the digits keeps the check sharper than what it checks.
 *
 * Source: T. J. Dekker, "A floating-point technique for extending the available precision", Numerische Mathematik 18
 * (1971), for the product; D. E. Knuth, The Art of Computer Programming, vol. 2, 4.2.2, for the sum.
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

  /** a − b of two doubles, without rounding. */
  static difference(a: number, b: number): Wide {
    return sum(a, -b);
  }

  /** hi + lo brought to the canonical pair; needs |hi| ≥ |lo|. */
  static renormalised(hi: number, lo: number): Wide {
    const s = hi + lo;
    return new Wide(s, lo - (s - hi));
  }

  plus(b: Wide): Wide {
    const high = sum(this.hi, b.hi);
    const low = sum(this.lo, b.lo);
    const partial = Wide.renormalised(high.hi, high.lo + low.hi);
    return Wide.renormalised(partial.hi, partial.lo + low.lo);
  }

  minus(b: Wide): Wide {
    return this.plus(b.negated());
  }

  negated(): Wide {
    return new Wide(-this.hi, -this.lo);
  }

  times(b: Wide | number): Wide {
    if (typeof b === 'number') {
      const p = product(this.hi, b);
      return Wide.renormalised(p.hi, p.lo + this.lo * b);
    }
    const p = product(this.hi, b.hi);
    return Wide.renormalised(p.hi, p.lo + (this.hi * b.lo + this.lo * b.hi));
  }

  /** Long division, three digits in base 2⁵³. */
  over(b: Wide | number): Wide {
    const divisor = typeof b === 'number' ? Wide.of(b) : b;
    const first = this.hi / divisor.hi;
    const rest = this.minus(divisor.times(first));
    const second = rest.hi / divisor.hi;
    const third = rest.minus(divisor.times(second)).hi / divisor.hi;
    return Wide.renormalised(first, second).plus(Wide.of(third));
  }

  /** The nearest double. */
  rounded(): number {
    return this.hi + this.lo;
  }
}

function sum(a: number, b: number): Wide {
  const s = a + b;
  const v = s - a;
  return Wide.renormalised(s, a - (s - v) + (b - v));
}

const SPLITTER = 2 ** 27 + 1; // cuts 53 bits into two halves whose products are exact

function product(a: number, b: number): Wide {
  const p = a * b;
  const ca = SPLITTER * a;
  const cb = SPLITTER * b;
  const ah = ca - (ca - a);
  const bh = cb - (cb - b);
  const al = a - ah;
  const bl = b - bh;
  return Wide.renormalised(p, ah * bh - p + ah * bl + al * bh + al * bl);
}
