import { evaluatePiece, type Piecewise, pieceAt } from '../polynomial/index';
import { type Letters, numberTex } from './symbols';
import { inUnit, type Kind } from './units';

/** One number of a sum, at so many figures: as TeX with its sign, and its value in the working's base units. */
export type NumberTerm = {
  value: (figures: number) => number;
  tex: (figures: number) => string;
  size: number;
  /** The same in two: what stands before the integral, without a sign, and the rest with its sign. */
  apart?: (figures: number) => { outside: string; inside: string };
};

/** A polynomial of the distance from the left end of a stretch, lowest power first, SI. */
type Polynomial = { coefficients: number[]; kind: Kind | 'number' };

/** ∫ p q dx over a stretch, times a factor over a stiffness. */
type Product = {
  length: number;
  p: Polynomial;
  /** Null for a constant 1. */
  q: Polynomial | null;
  sign: 1 | -1;
  /** Above or below the line: a curvature, or EI or GA. */
  times: { value: number; kind: Kind; isBelow: boolean };
};

/** The coefficients of a diagram between two of its breaks. */
export function between(diagram: Piecewise, from: number, to: number): number[] {
  const k = pieceAt(diagram, (from + to) / 2);
  const start = diagram.breaks[k]!;
  const all = Array.from(
    diagram.coefficients.subarray(k * (diagram.degree + 1), (k + 1) * (diagram.degree + 1)),
  );
  const moved = shifted(all, from - start);
  const largest = Math.max(
    ...moved.map((c, j) => Math.abs(c) * (to - from) ** j),
    Math.abs(evaluatePiece(diagram, k, 0)),
  );
  return moved.map((c, j) => (Math.abs(c) * (to - from) ** j <= 1e-11 * largest ? 0 : c));
}

/** The same polynomial about a point further along. */
function shifted(coefficients: readonly number[], by: number): number[] {
  if (by === 0) return [...coefficients];
  const found = [...coefficients];
  for (let first = 0; first < found.length; first++)
    for (let j = found.length - 2; j >= first; j--) found[j]! += by * found[j + 1]!;
  return found;
}

const isZero = (coefficients: readonly number[]): boolean => coefficients.every((c) => c === 0);

/** The integral in the letters' units; null where it is nothing. */
export function productTerm(letters: Letters, product: Product): NumberTerm | null {
  const { p, q, times, length } = product;
  if (isZero(p.coefficients) || (q && isZero(q.coefficients)) || times.value === 0) return null;
  const unitOf = (kind: Kind) => letters.units.of(kind, 'base');
  const lengthUnit = unitOf('length');
  const own = ({ coefficients, kind }: Polynomial) => {
    const unit = unitOf(kind);
    return coefficients.map((c, j) => inUnit(c, unit) / inUnit(1, lengthUnit) ** j);
  };
  const [first, second] = [oriented(own(p)), oriented(q ? own(q) : [1])];
  const factor = inUnit(times.value, unitOf(times.kind));
  const sign = product.sign * first.sign * second.sign * Math.sign(factor);
  const end = inUnit(length, lengthUnit);
  const at = (figures: number) => ({
    end: rounded(end, Math.max(figures, 6)),
    a: first.coefficients.map((c) => rounded(c, figures)),
    b: second.coefficients.map((c) => rounded(c, figures)),
    factor: rounded(Math.abs(factor), figures),
  });
  const value = (figures: number) => {
    const { end: l, a, b, factor: f } = at(figures);
    return sign * integralOf(a, b, l) * (times.isBelow ? 1 / f : f);
  };
  const apart = (figures: number) => {
    const { end: l, a, b, factor: f } = at(figures);
    return {
      outside: times.isBelow ? `\\dfrac{1}{${numberTex(f)}}` : `${numberTex(f)}\\times`,
      inside: `${sign < 0 ? '-' : ''}\\int_{0}^{${numberTex(l)}}${integrandTex(a, b)}\\,dx`,
    };
  };
  return {
    value,
    size: Math.abs(value(17)),
    apart,
    tex: (figures) => {
      const { outside, inside } = apart(figures);
      return inside.startsWith('-') ? `-${outside}${inside.slice(1)}` : `${outside}${inside}`;
    },
  };
}

/** The numbers of a sum; what stands before all integrals of it is written once. */
export function sumTex(terms: readonly NumberTerm[], figures: number): string {
  const parted = terms.flatMap(({ apart }) => (apart ? [apart(figures)] : []));
  const outsides = new Set(parted.map(({ outside }) => outside));
  if (terms.length > 1 && parted.length === terms.length && outsides.size === 1)
    return `${parted[0]!.outside}\\Bigl(${joined(parted.map(({ inside }) => inside))}\\Bigr)`;
  return joined(terms.map(({ tex }) => tex(figures)));
}

const joined = (texts: readonly string[]): string =>
  texts.map((tex, k) => (k === 0 || tex.startsWith('-') ? tex : `+${tex}`)).join('');

/** A product of plain numbers over one: r R/k, r Δ. */
export function fractionTerm(
  letters: Letters,
  factors: readonly { value: number; kind: Kind }[],
  below: { value: number; kind: Kind } | null,
  sign: 1 | -1,
): NumberTerm | null {
  const numbers = factors.map(({ value, kind }) => inUnit(value, letters.units.of(kind, 'base')));
  const divisor = below ? inUnit(below.value, letters.units.of(below.kind, 'base')) : 1;
  const isNegative = numbers.reduce((s, n) => s * Math.sign(n), sign * Math.sign(divisor)) < 0;
  if (numbers.includes(0)) return null;
  const at = (figures: number) => numbers.map((n) => rounded(Math.abs(n), figures));
  const value = (figures: number) =>
    ((isNegative ? -1 : 1) * at(figures).reduce((product, n) => product * n, 1)) /
    rounded(Math.abs(divisor), figures);
  return {
    value,
    size: Math.abs(value(17)),
    tex: (figures) => {
      const others = at(figures).filter((n) => n !== 1);
      const top = others.length === 0 ? '1' : others.map(numberTex).join('\\times');
      const text = below ? `\\dfrac{${top}}{${numberTex(rounded(Math.abs(divisor), figures))}}` : top;
      return `${isNegative ? '-' : ''}${text}`;
    },
  };
}

const rounded = (value: number, figures: number): number =>
  figures > 16 ? value : Number(value.toPrecision(figures));

/** With its leading coefficient positive, and the sign apart. */
function oriented(coefficients: number[]): { coefficients: number[]; sign: 1 | -1 } {
  const lead = coefficients.find((c) => c !== 0) ?? 0;
  return lead < 0 ? { coefficients: coefficients.map((c) => -c + 0), sign: -1 } : { coefficients, sign: 1 };
}

function integralOf(a: readonly number[], b: readonly number[], length: number): number {
  let total = 0;
  a.forEach((x, i) => {
    b.forEach((y, j) => {
      total += (x * y * length ** (i + j + 1)) / (i + j + 1);
    });
  });
  return total;
}

function integrandTex(a: readonly number[], b: readonly number[]): string {
  const factors = [a, b].map(polynomialTex).filter((tex) => tex !== '1');
  if (factors.length === 2 && factors[0] === factors[1]) return `${bracketed(factors[0]!)}^2`;
  return factors.map((tex) => bracketed(tex)).join('\\,');
}

const bracketed = (tex: string): string => (/^(?:x|[\d.]+)$/.test(tex) ? tex : `(${tex})`);

function polynomialTex(coefficients: readonly number[]): string {
  const terms = coefficients.flatMap((c, j) => {
    if (c === 0) return [];
    const power = j === 0 ? '' : j === 1 ? 'x' : `x^${j}`;
    const size = Math.abs(c) === 1 && j > 0 ? '' : numberTex(Math.abs(c));
    return [{ isNegative: c < 0, tex: `${size}${power}` }];
  });
  return terms.map(({ isNegative, tex }, k) => (isNegative ? `-${tex}` : k > 0 ? `+${tex}` : tex)).join('');
}
