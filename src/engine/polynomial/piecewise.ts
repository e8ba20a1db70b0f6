import type { Piecewise } from './types';

/** A piecewise polynomial from its pieces' coefficients, lowest power first, each about its piece's left end. */
export function piecewise(breaks: ArrayLike<number>, pieces: readonly (readonly number[])[]): Piecewise {
  if (breaks.length !== pieces.length + 1) {
    throw new RangeError(`${pieces.length} pieces need ${pieces.length + 1} breaks, not ${breaks.length}`);
  }
  const degree = pieces.reduce((highest, piece) => Math.max(highest, piece.length - 1), 0);
  const coefficients = new Float64Array(pieces.length * (degree + 1));
  pieces.forEach((piece, k) => {
    coefficients.set(piece, k * (degree + 1));
  });
  return { breaks: Float64Array.from(breaks), degree, coefficients };
}

/** How many pieces there are. */
export const pieceCount = (p: Pick<Piecewise, 'breaks'>): number => p.breaks.length - 1;

/** Value of piece k at s from its left end (Horner). */
export function evaluatePiece(p: Piecewise, k: number, s: number): number {
  const first = k * (p.degree + 1);
  let value = 0;
  for (let j = first + p.degree; j >= first; j--) value = value * s + p.coefficients[j]!;
  return value;
}

/** The piece that holds x; at a break the one to its right. */
export function pieceAt(p: Pick<Piecewise, 'breaks'>, x: number): number {
  let low = 0;
  let high = pieceCount(p) - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (p.breaks[middle]! <= x) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** [just left, just right] of x; at the two ends of the domain both are the value inside it. */
export function evaluate(p: Piecewise, x: number): [number, number] {
  const k = pieceAt(p, x);
  const right = evaluatePiece(p, k, x - p.breaks[k]!);
  const left = x === p.breaks[k] && k > 0 ? evaluatePiece(p, k - 1, x - p.breaks[k - 1]!) : right;
  return [left, right];
}

/** c · p */
export function scale(p: Piecewise, c: number): Piecewise {
  return { ...p, coefficients: p.coefficients.map((a) => a * c) };
}

/** p + q on the breaks of both. */
export function add(p: Piecewise, q: Piecewise): Piecewise {
  return combine(p, q, (a, b) =>
    Array.from({ length: Math.max(a.length, b.length) }, (_, j) => (a[j] ?? 0) + (b[j] ?? 0)),
  );
}

/** p · q on the breaks of both. */
export function multiply(p: Piecewise, q: Piecewise): Piecewise {
  return combine(p, q, (a, b) => {
    const product = new Array<number>(a.length + b.length - 1).fill(0);
    a.forEach((ai, i) => {
      b.forEach((bj, j) => {
        product[i + j]! += ai * bj;
      });
    });
    return product;
  });
}

/** p without breaks where it does not change: each piece holds on to the next break that is left. */
export function withoutBreaks(p: Piecewise, positions: readonly number[]): Piecewise {
  if (positions.length === 0) return p;
  const kept = Array.from(p.breaks.subarray(0, -1), (_, k) => k).filter(
    (k) => !positions.includes(p.breaks[k]!),
  );
  const breaks = [...kept.map((k) => p.breaks[k]!), p.breaks.at(-1)!];
  return piecewise(
    breaks,
    kept.map((k) => coefficientsOf(p, k)),
  );
}

/** dp/dx, piece by piece; jumps are not differentiated. */
export function differentiate(p: Piecewise): Piecewise {
  return mapPieces(p, (a) => (a.length === 1 ? [0] : a.slice(1).map((c, j) => c * (j + 1))));
}

/** The continuous antiderivative that is `start` at the left end. */
export function integrate(p: Piecewise, start = 0): Piecewise {
  let constant = start;
  return mapPieces(p, (a, length) => {
    const piece = [constant, ...a.map((c, j) => c / (j + 1))];
    constant = piece.reduceRight((value, c) => value * length + c, 0);
    return piece;
  });
}

/** ∫ p q dx over the whole domain, exact but for rounding. */
export function integralOfProduct(p: Piecewise, q: Piecewise): number {
  const antiderivative = integrate(multiply(p, q));
  return evaluate(antiderivative, antiderivative.breaks.at(-1)!)[0];
}

function mapPieces(p: Piecewise, map: (coefficients: number[], length: number) => number[]): Piecewise {
  const pieces = Array.from({ length: pieceCount(p) }, (_, k) =>
    map(coefficientsOf(p, k), p.breaks[k + 1]! - p.breaks[k]!),
  );
  return piecewise(p.breaks, pieces);
}

function coefficientsOf({ degree, coefficients }: Piecewise, k: number): number[] {
  const a: number[] = [];
  for (let j = 0; j <= degree; j++) a.push(coefficients[k * (degree + 1) + j]!);
  return a;
}

function combine(p: Piecewise, q: Piecewise, join: (a: number[], b: number[]) => number[]): Piecewise {
  const breaks = [...new Set([...p.breaks, ...q.breaks])].sort((a, b) => a - b);
  const pieces = breaks.slice(0, -1).map((x) => join(shifted(p, x), shifted(q, x)));
  return piecewise(breaks, pieces);
}

/** The coefficients of the piece that starts at or before x, about x (repeated synthetic division). */
function shifted(p: Piecewise, x: number): number[] {
  const k = pieceAt(p, x);
  const a = coefficientsOf(p, k);
  const s = x - p.breaks[k]!;
  if (s === 0) return a;
  for (let i = 0; i < p.degree; i++) {
    for (let j = p.degree - 1; j >= i; j--) a[j]! += s * a[j + 1]!;
  }
  return a;
}
