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
  const power = new Float64Array((breaks.length - 1) * (degree + 1) * count);
  sources.forEach((source, i) => {
    if (!sameBreaks(breaks, source.breaks)) throw new RangeError('the sources have breaks of their own');
    scaleInto(power, source, degree, count, i);
  });
  return { breaks, degree, count, power, control: controlOf(power, degree, count) };
}

const sameBreaks = (a: Float64Array, b: Float64Array): boolean =>
  a === b || (a.length === b.length && a.every((x, k) => x === b[k]));

function scaleInto(power: Float64Array, source: Piecewise, degree: number, count: number, i: number): void {
  const { breaks, coefficients } = source;
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

function controlOf(power: Float64Array, degree: number, count: number): Float64Array {
  const pieces = power.length / ((degree + 1) * count);
  const control = new Float64Array(pieces * (2 * degree + 1) * count);
  const whole = new Float64Array(degree + 1);
  for (let k = 0; k < pieces; k++) {
    for (let i = 0; i < count; i++) {
      toBernstein(power, k * (degree + 1) * count + i, count, whole);
      halve(whole, control, k * (2 * degree + 1) * count + i, count);
    }
  }
  return control;
}

/** bⱼ = Σ C(j,i)/C(d,i)·aᵢ over i ≤ j, from tⁱ = Σ C(j,i)/C(d,i)·Bⱼ(t) over j ≥ i. */
function toBernstein(power: Float64Array, first: number, step: number, whole: Float64Array): void {
  const degree = whole.length - 1;
  for (let j = 0; j <= degree; j++) {
    let weight = 1;
    let sum = 0;
    for (let i = 0; i <= j; i++) {
      sum += weight * power[first + i * step]!;
      weight *= (j - i) / (degree - i);
    }
    whole[j] = sum;
  }
}

/** Cuts at t = 1/2 (de Casteljau's algorithm). `whole` is used up. */
function halve(whole: Float64Array, control: Float64Array, first: number, step: number): void {
  const degree = whole.length - 1;
  control[first] = whole[0]!;
  control[first + 2 * degree * step] = whole[degree]!;
  for (let r = 1; r <= degree; r++) {
    for (let i = 0; i <= degree - r; i++) whole[i] = (whole[i]! + whole[i + 1]!) / 2;
    control[first + r * step] = whole[0]!;
    control[first + (2 * degree - r) * step] = whole[degree - r]!;
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

/** The values of all sources at t of piece k, by Horner's rule. */
export function valuesAt({ degree, count, power }: Curves, k: number, t: number, values: Float64Array): void {
  const first = k * (degree + 1) * count;
  values.fill(0);
  for (let j = degree; j >= 0; j--) {
    for (let i = 0; i < count; i++) values[i] = values[i]! * t + power[first + j * count + i]!;
  }
}

/** A combination, by its index, with the loads of the spans in its pattern. */
export type Arrangement = { readonly combination: number; readonly pattern: readonly number[] };

/** The factor of each source in an arrangement; 0 where its span is not loaded. */
export function actingFactors(
  { count, starts, spans, factors }: Cases,
  { combination, pattern }: Arrangement,
) {
  const acting = factors.slice(combination * count, (combination + 1) * count);
  spans.forEach((span, p) => {
    if (!pattern.includes(span)) acting.fill(0, starts[p + 1]!, starts[p + 2]!);
  });
  return acting;
}

export function dot(factors: Float64Array, values: Float64Array, at: number): number {
  let sum = 0;
  for (let i = 0; i < factors.length; i++) sum += factors[i]! * values[at + i]!;
  return sum;
}
