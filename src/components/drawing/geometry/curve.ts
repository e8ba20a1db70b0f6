import type { Piecewise } from '@/engine/polynomial/index';

export type Point = readonly [x: number, y: number];

/** One Bézier span over x0…x1: two to four ordinates, their abscissae equally spaced. */
export type Span = { x0: number; x1: number; ordinates: readonly number[] };

const coefficientsOf = (curve: Piecewise, piece: number): Float64Array =>
  curve.coefficients.subarray(piece * (curve.degree + 1), (piece + 1) * (curve.degree + 1));

const horner = (coefficients: ArrayLike<number>, u: number): number => {
  let sum = 0;
  for (let power = coefficients.length - 1; power >= 0; power--) sum = sum * u + (coefficients[power] ?? 0);
  return sum;
};

/** [just left, just right] of x; the ends repeat the value inside. Outside the curve its end values are given. */
export function valuesAt(curve: Piecewise, x: number): [number, number] {
  const { breaks } = curve;
  const pieces = breaks.length - 1;
  let right = 0;
  while (right < pieces - 1 && x >= (breaks[right + 1] ?? 0)) right++;
  const start = breaks[right] ?? 0;
  const u = Math.min(Math.max(x, breaks[0] ?? 0), breaks[pieces] ?? 0) - start;
  const onRight = horner(coefficientsOf(curve, right), u);
  if (right === 0 || x > start) return [onRight, onRight];
  return [horner(coefficientsOf(curve, right - 1), start - (breaks[right - 1] ?? 0)), onRight];
}

/** The larger of the two sides in absolute value, for dots and readings that show one figure. */
export function valueAt(curve: Piecewise, x: number): number {
  const [left, right] = valuesAt(curve, x);
  return Math.abs(left) > Math.abs(right) ? left : right;
}

/** Coefficients of t in 0…1 for u = from + width·t. */
function reparametrised(coefficients: ArrayLike<number>, from: number, width: number): number[] {
  const shifted = Array.from(coefficients);
  for (let pass = 0; pass < shifted.length - 1; pass++) {
    for (let power = shifted.length - 2; power >= pass; power--) {
      shifted[power] = (shifted[power] ?? 0) + from * (shifted[power + 1] ?? 0);
    }
  }
  return shifted.map((value, power) => value * width ** power);
}

const BINOMIAL = [[1], [1, 1], [1, 2, 1], [1, 3, 3, 1]] as const;

function bernstein(c: readonly number[], degree: 1 | 2 | 3): number[] {
  return Array.from({ length: degree + 1 }, (_, i) => {
    let ordinate = 0;
    for (let k = 0; k <= i; k++) {
      ordinate += ((BINOMIAL[i]?.[k] ?? 1) / (BINOMIAL[degree]?.[k] ?? 1)) * (c[k] ?? 0);
    }
    return ordinate;
  });
}

function degreeOf(c: readonly number[], negligible: number): number {
  let degree = c.length - 1;
  while (degree > 1 && Math.abs(c[degree] ?? 0) <= negligible) degree--;
  return Math.max(degree, 1);
}

/** Cubic Hermite on t0…t1 of Σ c·t^j: exact at both ends, off by less than h⁴·max|f⁗|/384 between them. */
function hermite(c: readonly number[], t0: number, t1: number): number[] {
  const [y0 = 0, slope0 = 0] = reparametrised(c, t0, t1 - t0);
  const end = reparametrised(c, t1, t1 - t0);
  const y1 = end[0] ?? 0;
  return [y0, y0 + slope0 / 3, y1 - (end[1] ?? 0) / 3, y1];
}

function spansOfPiece(c: readonly number[], x0: number, x1: number, tolerance: number): Span[] {
  const degree = degreeOf(c, tolerance * 1e-3);
  if (degree <= 3) return [{ x0, x1, ordinates: bernstein(c, degree === 1 ? 1 : degree === 2 ? 2 : 3) }];
  const fourth = Math.max(Math.abs(24 * (c[4] ?? 0)), Math.abs(24 * (c[4] ?? 0) + 120 * (c[5] ?? 0)));
  const count = Math.min(64, Math.max(1, Math.ceil((fourth / (384 * tolerance)) ** 0.25)));
  return Array.from({ length: count }, (_, i) => {
    const t0 = i / count;
    const t1 = (i + 1) / count;
    return { x0: x0 + (x1 - x0) * t0, x1: x0 + (x1 - x0) * t1, ordinates: hermite(c, t0, t1) };
  });
}

/**
 * The curve as Bézier spans: pieces up to cubic exactly, quartics and quintics by enough cubics to stay within
 * `tolerance` (in the curve's own unit). Breakpoints, jumps and the positions `through` (the extremes) are always ends of spans.
 */
export function spansOf(curve: Piecewise, tolerance: number, through: readonly number[] = []): Span[] {
  const spans: Span[] = [];
  const cuts = curve.degree > 3 ? [...through].sort((a, b) => a - b) : [];
  for (let piece = 0; piece < curve.breaks.length - 1; piece++) {
    const start = curve.breaks[piece] ?? 0;
    const end = curve.breaks[piece + 1] ?? 0;
    if (end <= start) continue;
    const clear = (end - start) * 1e-6;
    const ends = [start, ...cuts.filter((x) => x > start + clear && x < end - clear), end];
    for (let i = 0; i < ends.length - 1; i++) {
      const [x0 = start, x1 = end] = [ends[i], ends[i + 1]];
      const c = reparametrised(coefficientsOf(curve, piece), x0 - start, x1 - x0);
      spans.push(...spansOfPiece(c, x0, x1, tolerance));
    }
  }
  return spans;
}

export type Map1 = (value: number) => number;

const px = (value: number): string => String(Math.round(value * 100) / 100);

/** SVG path data of the spans; jumps are vertical lines. With a baseline the path starts and ends on it. */
export function pathOf(spans: readonly Span[], X: Map1, Y: Map1, baseline?: number): string {
  const first = spans[0];
  const last = spans.at(-1);
  if (!first || !last) return '';
  const parts: string[] = [];
  const go = (command: string, x: number, y: number) => parts.push(`${command}${px(x)} ${px(y)}`);
  const start = Y(first.ordinates[0] ?? 0);
  if (baseline === undefined) go('M', X(first.x0), start);
  else {
    go('M', X(first.x0), baseline);
    go('L', X(first.x0), start);
  }
  let previous = start;
  for (const { x0, x1, ordinates } of spans) {
    const ys = ordinates.map(Y);
    const degree = ys.length - 1;
    const from = ys[0] ?? 0;
    if (Math.abs(from - previous) > 0.005) go('L', X(x0), from);
    const controls = ys.slice(1).map((y, i) => `${px(X(x0 + ((x1 - x0) * (i + 1)) / degree))} ${px(y)}`);
    parts.push(`${degree === 1 ? 'L' : degree === 2 ? 'Q' : 'C'}${controls.join(' ')}`);
    previous = ys[degree] ?? 0;
  }
  if (baseline !== undefined) go('L', X(last.x1), baseline);
  return parts.join('');
}

function bezierAt(ordinates: readonly number[], t: number): number {
  let row = [...ordinates];
  while (row.length > 1) row = row.slice(1).map((y, i) => (row[i] ?? 0) * (1 - t) + y * t);
  return row[0] ?? 0;
}

/** The spans as a polyline with a point at least every `pitch` px; straight spans keep only their ends. */
export function polylineOf(spans: readonly Span[], X: Map1, Y: Map1, pitch = 8): Point[] {
  const points: Point[] = [];
  for (const { x0, x1, ordinates } of spans) {
    const steps = ordinates.length === 2 ? 1 : Math.max(2, Math.ceil((X(x1) - X(x0)) / pitch));
    for (let i = 0; i <= steps; i++) {
      points.push([X(x0 + ((x1 - x0) * i) / steps), Y(bezierAt(ordinates, i / steps))]);
    }
  }
  return points;
}
