/** Where Newton's step is this part of the piece, Chebyshev's is the last: the one after it, its cube, would be rounding. */
const STEP = 1e-6;
const STEPS = 100; // bisection alone needs 60

/** Zeros of c₀ + c₁ s + c₂ s² strictly between 0 and h, ascending, into `out`; their number. Closed form. */
export function quadraticZeros(c0: number, c1: number, c2: number, h: number, out: Float64Array): number {
  if (c2 === 0) {
    const s = -c0 / c1;
    if (!(s > 0 && s < h)) return 0; // also where c₁ is 0
    out[0] = s;
    return 1;
  }
  const discriminant = c1 * c1 - 4 * c0 * c2;
  if (!(discriminant > 0)) return 0; // where it only touches zero it does not change its sign
  const q = -0.5 * (c1 + (c1 < 0 ? -1 : 1) * Math.sqrt(discriminant)); // no difference of nearly equal numbers
  const one = q / c2;
  const other = c0 / q;
  const first = Math.min(one, other);
  const second = Math.max(one, other);
  let count = 0;
  if (first > 0 && first < h) out[count++] = first;
  if (second > 0 && second < h) out[count++] = second;
  return count;
}

/** Value of c₀ + c₁ s + c₂ s² + c₃ s³ + c₄ s⁴. */
export const quartic = (c: Float64Array, s: number): number =>
  c[0]! + s * (c[1]! + s * (c[2]! + s * (c[3]! + s * c[4]!)));

/**
 * The zero of a quartic c between stretch[0] and stretch[1], where its values are stretch[2] and stretch[3], of opposite
 * signs, and it is monotone, into stretch[4]: Chebyshev's method from the chord, Newton's where the curve bends too much for
 * it, kept inside by bisection.
 */
export function findMonotoneZero(c: Float64Array, stretch: Float64Array): void {
  const c0 = c[0]!;
  const c1 = c[1]!;
  const c2 = c[2]!;
  const c3 = c[3]!;
  const c4 = c[4]!;
  let from = stretch[0]!;
  let to = stretch[1]!;
  const low = stretch[2]!;
  const last = STEP * to;
  const rises = low < 0;
  let s = from + ((to - from) * low) / (low - stretch[3]!);
  for (let n = 0; n < STEPS; n++) {
    const value = c0 + s * (c1 + s * (c2 + s * (c3 + s * c4)));
    const slope = c1 + s * (2 * c2 + s * (3 * c3 + s * 4 * c4));
    const curve = c2 + s * (3 * c3 + s * 6 * c4); // half the second derivative
    if (value < 0 === rises) from = s;
    else to = s;
    const inverse = 1 / slope;
    const newton = value * inverse;
    const bend = newton * curve * inverse;
    const next = s - (Math.abs(bend) < 0.5 ? newton * (1 + bend) : newton);
    const near = Math.abs(newton) <= last;
    s = near || (next > from && next < to) ? next : (from + to) / 2; // also where a quotient is none
    if (near) break;
  }
  stretch[4] = s;
}
