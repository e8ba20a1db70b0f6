const STEPS = 200; // bisection alone needs 60; Newton's steps are extra and seldom more than five
const DEGREE = 5; // of a deflection
/** Coefficients of a polynomial of the highest degree. */
export const WIDTH: number = DEGREE + 1;

/**
 * Roots in the open interval (0, 1) of polynomials up to the fifth degree, into buffers that are kept, since
 * envelopes and extremes look for many: closed forms up to the second degree; beyond, one root between neighbouring turning points
 * of unlike sign, by Newton's method kept in its bracket. Roots without a change of sign are found where they are exact.
 */
export class UnitRoots {
  /** The roots found last, ascending. */
  roots: Float64Array = new Float64Array(WIDTH);
  private readonly buffers = Array.from({ length: WIDTH }, () => ({
    coefficients: new Float64Array(WIDTH),
    roots: new Float64Array(WIDTH),
  }));

  /** How many roots Σ a[j]·tʲ has there; 0 where it is zero throughout. */
  find(a: Float64Array, degree: number): number {
    let top = degree;
    while (top > 0 && a[top] === 0) top--;
    const { coefficients, roots } = this.buffers[top]!;
    for (let j = 0; j <= top; j++) coefficients[j] = a[j]!;
    this.roots = roots;
    return this.solve(top);
  }

  private solve(degree: number): number {
    if (degree === 0) return 0;
    if (degree === 1) return this.solveLinear();
    if (degree === 2) return this.solveQuadratic();
    const { coefficients: a, roots } = this.buffers[degree]!;
    const { coefficients: slope, roots: turns } = this.buffers[degree - 1]!;
    for (let j = 0; j < degree; j++) slope[j] = a[j + 1]! * (j + 1);
    const turning = this.solve(degree - 1);
    let count = 0;
    let from = 0;
    let left = a[0]!;
    for (let i = 0; i <= turning; i++) {
      const to = i < turning ? turns[i]! : 1;
      const right = horner(a, degree, to);
      if (left * right < 0) roots[count++] = bracketedRoot(a, slope, degree, from, to, left < 0);
      if (right === 0 && to < 1) roots[count++] = to;
      from = to;
      left = right;
    }
    return count;
  }

  private solveLinear(): number {
    const { coefficients: a, roots } = this.buffers[1]!;
    return keep(roots, 0, -a[0]! / a[1]!);
  }

  /** Without the difference of like numbers: one root from q = −(b ± √(b² − 4ac))/2, the other from c/q. */
  private solveQuadratic(): number {
    const { coefficients, roots } = this.buffers[2]!;
    const c = coefficients[0]!;
    const b = coefficients[1]!;
    const a = coefficients[2]!;
    const discriminant = b * b - 4 * a * c;
    if (!(discriminant >= 0)) return 0;
    const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2;
    const one = q / a;
    const other = c / q;
    const count = keep(roots, 0, Math.min(one, other));
    return one === other ? count : keep(roots, count, Math.max(one, other));
  }
}

function keep(roots: Float64Array, count: number, t: number): number {
  if (!(t > 0 && t < 1)) return count;
  roots[count] = t;
  return count + 1;
}

function bracketedRoot(
  a: Float64Array,
  slope: Float64Array,
  degree: number,
  from: number,
  to: number,
  rising: boolean,
): number {
  let low = from;
  let high = to;
  let t = (low + high) / 2;
  for (let step = 0; step < STEPS; step++) {
    const value = horner(a, degree, t);
    if (value === 0) return t;
    if (value < 0 === rising) low = t;
    else high = t;
    const newton = t - value / horner(slope, degree - 1, t);
    // Every third step bisects, so that a bracket that Newton closes from one side only is closed all the same.
    const next = step % 3 < 2 && newton > low && newton < high ? newton : (low + high) / 2;
    if (next === t || next <= low || next >= high) return next;
    t = next;
  }
  return t;
}

export function horner(a: Float64Array, degree: number, t: number): number {
  let value = 0;
  for (let j = degree; j >= 0; j--) value = value * t + a[j]!;
  return value;
}
