import type { Piecewise } from '../polynomial/index';
import type { Cases } from './cases';

/**
 * One quantity under every source, on breaks that they share. On piece k, with t = (x − breaks[k])/h from 0 to 1, source
 * i is Σ power[(k·(degree + 1) + j)·count + i]·tʲ. `control` holds what bounds it: its coefficients in the basis of
 * Bernstein's polynomials on either half of the piece, control[(k·(2·degree + 1) + j)·count + i]. The values on a half
 * lie between the least and the greatest of its coefficients, and number 0, degree and 2·degree are the values at the
 * piece's left end, middle and right end.
 */
export type Curves = {
  readonly breaks: Float64Array;
  readonly degree: number;
  readonly count: number;
  readonly power: Float64Array;
  readonly control: Float64Array;
};

/** The curves of the sources, all of them on the same breaks. */
export function curvesOf(sources: readonly Piecewise[]): Curves {
  const breaks = sources[0]?.breaks ?? new Float64Array([0, 1]);
  const count = sources.length;
  const degree = sources.reduce((highest, source) => Math.max(highest, source.degree), 0);
  const pieces = breaks.length - 1;
  const powers = pieces * (degree + 1) * count;
  // To allocate takes longer than to fill.
  const memory = new Float64Array(powers + pieces * (2 * degree + 1) * count);
  const curves = {
    breaks,
    degree,
    count,
    power: memory.subarray(0, powers),
    control: memory.subarray(powers),
  };
  sources.forEach((source, i) => {
    if (!sameBreaks(breaks, source.breaks)) throw new RangeError('the sources have breaks of their own');
    readPowers(curves, source, i);
  });
  readControl(curves);
  return curves;
}

function sameBreaks(a: Float64Array, b: Float64Array): boolean {
  if (a === b) return true;
  for (let k = 0; k < a.length; k++) if (a[k] !== b[k]) return false;
  return a.length === b.length;
}

function readPowers({ breaks, degree, count, power }: Curves, source: Piecewise, i: number): void {
  const { coefficients } = source;
  const width = source.degree + 1;
  for (let k = 0; k + 1 < breaks.length; k++) {
    const h = breaks[k + 1]! - breaks[k]!;
    let scale = 1;
    for (let j = 0; j < width; j++) {
      power[(k * (degree + 1) + j) * count + i] = coefficients[k * width + j]! * scale;
      scale *= h;
    }
  }
}

function readControl({ breaks, degree, count, power, control }: Curves): void {
  const rows = new Float64Array((degree + 1) * count);
  for (let k = 0; k + 1 < breaks.length; k++) {
    for (let n = 0; n < rows.length; n++) rows[n] = power[k * rows.length + n]!;
    toBernstein(rows, degree, count);
    halve(rows, degree, count, control, k * (2 * degree + 1) * count);
  }
}

/**
 * Turns coefficients of powers into those of Bernstein's polynomials, bⱼ = Σ C(j,i)/C(d,i)·aᵢ over i ≤ j: divided by
 * C(d,i), then summed as in Pascal's triangle. Row j holds those of all sources.
 */
function toBernstein(rows: Float64Array, degree: number, count: number): void {
  let binomial = 1;
  for (let i = 1; i < degree; i++) {
    binomial *= (degree + 1 - i) / i;
    for (let n = i * count; n < (i + 1) * count; n++) rows[n]! /= binomial;
  }
  for (let r = 1; r <= degree; r++) {
    for (let n = (degree + 1) * count - 1; n >= r * count; n--) rows[n]! += rows[n - count]!;
  }
}

/** Cuts at t = 1/2 (de Casteljau's algorithm): the rows of the left half, then of the right. `rows` is used up. */
function halve(rows: Float64Array, degree: number, count: number, into: Float64Array, at: number): void {
  for (let r = 0; r <= degree; r++) {
    const last = (degree - r) * count;
    for (let i = 0; i < count; i++) {
      into[at + r * count + i] = rows[i]!;
      into[at + (2 * degree - r) * count + i] = rows[last + i]!;
    }
    for (let n = 0; n < last; n++) rows[n] = (rows[n]! + rows[n + count]!) / 2;
  }
}

/** The pieces first … last − 1. */
export function between(curves: Curves, first: number, last: number): Curves {
  const { breaks, degree, count, power, control } = curves;
  const [width, wide] = [(degree + 1) * count, (2 * degree + 1) * count];
  return {
    ...curves,
    breaks: breaks.subarray(first, last + 1),
    power: power.subarray(first * width, last * width),
    control: control.subarray(first * wide, last * wide),
  };
}

/** Writes the values of all sources at t of piece k, by Horner's rule, into values[at] and on. */
export function valuesAt(
  { degree, count, power }: Curves,
  k: number,
  t: number,
  values: Float64Array,
  at: number,
): void {
  const first = k * (degree + 1) * count;
  for (let i = 0; i < count; i++) {
    let value = 0;
    for (let j = degree; j >= 0; j--) value = value * t + power[first + j * count + i]!;
    values[at + i] = value;
  }
}

/** A combination, by its index, with the loads of the spans in its pattern. */
export type Arrangement = { readonly combination: number; readonly pattern: readonly number[] };

/** Writes the factor of each source in an arrangement: 0 where its span is not loaded. */
export function readFactors(
  { count, starts, spans, factors }: Cases,
  { combination, pattern }: Arrangement,
  into: Float64Array,
): void {
  for (let i = 0; i < count; i++) into[i] = factors[combination * count + i]!;
  for (let p = 0; p < spans.length; p++) {
    if (!pattern.includes(spans[p]!)) into.fill(0, starts[p + 1]!, starts[p + 2]!);
  }
}

export function dot(factors: Float64Array, values: Float64Array, at: number): number {
  let sum = 0;
  for (let i = 0; i < factors.length; i++) sum += factors[i]! * values[at + i]!;
  return sum;
}
