/** An exact fraction of whole numbers in lowest terms, d > 0. */
export type Rational = { readonly n: number; readonly d: number };

export const ONE: Rational = { n: 1, d: 1 };

/** n/d in lowest terms. Refuses what doubles cannot hold exactly: a coefficient must never be nearly right. */
export function rational(n: number, d = 1): Rational {
  if (!Number.isSafeInteger(n) || !Number.isSafeInteger(d) || d === 0) {
    throw new RangeError(`${n}/${d} is not a fraction of whole numbers below 2⁵³`);
  }
  const common = gcd(Math.abs(n), Math.abs(d)) * Math.sign(d);
  return { n: n / common, d: d / common };
}

/** The decimal as written: 0.25 is 1/4. */
export function fromDecimal(text: string): Rational {
  const [whole = '', decimals = ''] = text.split('.');
  return rational(Number(whole + decimals), 10 ** decimals.length);
}

export const sum = (a: Rational, b: Rational): Rational => rational(a.n * b.d + b.n * a.d, a.d * b.d);

export const product = (a: Rational, b: Rational): Rational => rational(a.n * b.n, a.d * b.d);

/** aᵏ for a whole k; k < 0 needs a ≠ 0. */
export function raised(a: Rational, k: number): Rational {
  return k < 0 ? rational(a.d ** -k, a.n ** -k) : rational(a.n ** k, a.d ** k);
}

/** The largest fraction that both are whole multiples of. */
export const common = (a: Rational, b: Rational): Rational =>
  rational(gcd(Math.abs(a.n), Math.abs(b.n)), (a.d / gcd(a.d, b.d)) * b.d);

function gcd(a: number, b: number): number {
  let [x, y] = [a, b];
  while (y !== 0) [x, y] = [y, x % y];
  return x || 1;
}
