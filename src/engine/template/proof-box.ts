/** The parameter box of a template, and points that are spread over it. */
import { toUnit } from '../quantity/index';
import type { ProofCase, Template } from './document';
import { defaultEi } from './instance';
import { limitsOf, unitOf } from './measured';
import type { Parameter, QuantityParameter, RowsParameter } from './parts';

/** A point of the box, each value as an author would type it in a proof case. */
export type BoxPoint = { readonly parameters: ProofCase['parameters']; readonly ei: string };
export type Stated = ProofCase['parameters'][string];

/** Points of one Latin hypercube. */
export const BATCH = 240;
/** A list of rows is drawn with at most so many. */
const MOST_ROWS = 6;
/** EI is drawn from a tenth of the template's own to ten times it. */
const EI_RANGE = 10;
/** A range over more than this ratio is drawn over its orders of magnitude. */
const WIDE = 1e3;
/** Figures of a drawn value: what a person would type. */
const FIGURES = 4;

/**
 * Points of the box by their number: a Latin hypercube of 240, then another, and so on for ever. Choices take each of
 * their values equally often. The same seed gives the same points.
 */
export function boxOf(template: Template, seed: number): (index: number) => BoxPoint {
  const axes = 1 + template.parameters.reduce((sum, parameter) => sum + axesOf(parameter), 0);
  let batch = -1;
  let points: readonly Float64Array[] = [];
  return (index) => {
    const wanted = Math.floor(index / BATCH);
    if (wanted !== batch) points = hypercube(seed + wanted, axes);
    batch = wanted;
    return pointAt(template, points[index % BATCH] ?? new Float64Array(axes));
  };
}

/** The template at its defaults, as its author wrote them. */
export const defaultPoint = (template: Template): BoxPoint => ({
  parameters: Object.fromEntries(template.parameters.map((one) => [one.symbol, one.default])),
  ei: template.stiffness.default_ei,
});

const measuredColumns = ({ columns }: RowsParameter): QuantityParameter[] =>
  columns.filter((column) => column.kind === 'quantity');

const axesOf = (parameter: Parameter): number =>
  parameter.kind === 'rows' ? 1 + MOST_ROWS * measuredColumns(parameter).length : 1;

function pointAt(template: Template, shares: Float64Array): BoxPoint {
  let axis = 0;
  const next = () => shares[axis++] ?? 0;
  const ei = defaultEi(template) * EI_RANGE ** (2 * next() - 1);
  return {
    ei: `${rounded(toUnit(ei, 'kNm2'))} kNm2`,
    parameters: Object.fromEntries(
      template.parameters.map((parameter) => [parameter.symbol, valueAt(parameter, next)]),
    ),
  };
}

function valueAt(parameter: Parameter, next: () => number): Stated {
  switch (parameter.kind) {
    case 'quantity':
      return quantityAt(parameter, next());
    case 'choice': {
      const { options } = parameter;
      return options[Math.floor(next() * options.length)]?.value ?? parameter.default;
    }
    case 'rows': {
      const most = Math.max(parameter.least, Math.min(parameter.most, MOST_ROWS));
      const count = parameter.least + Math.floor(next() * (most - parameter.least + 1));
      // Every row takes its shares, drawn or not, so that each axis stays a hypercube's.
      return Array.from({ length: most }, () => rowAt(parameter, next)).slice(0, count);
    }
  }
}

const rowAt = (parameter: RowsParameter, next: () => number): Record<string, string> =>
  Object.fromEntries(
    parameter.columns.map((column) => [
      column.symbol,
      column.kind === 'quantity' ? quantityAt(column, next()) : column.default,
    ]),
  );

function quantityAt(parameter: QuantityParameter, share: number): string {
  const { min, max } = limitsOf(parameter);
  const isWide = min > 0 && max / min > WIDE;
  const value = isWide ? min * (max / min) ** share : min + (max - min) * share;
  const unit = unitOf(parameter, 'metric');
  const figure = rounded(toUnit(value, unit));
  if (figure < toUnit(min, unit)) return parameter.min;
  if (figure > toUnit(max, unit)) return parameter.max;
  return `${figure} ${unit === 'ft-in' ? 'ft' : unit}`.trim();
}

const rounded = (value: number): number => Number(value.toPrecision(FIGURES));

/** McKay, Beckman and Conover 1979: each of the equal parts of every axis holds one point. */
function hypercube(seed: number, axes: number): readonly Float64Array[] {
  const random = mulberry32(seed);
  const points = Array.from({ length: BATCH }, () => new Float64Array(axes));
  for (let axis = 0; axis < axes; axis++) {
    const parts = points.map((_, k) => k);
    for (let k = BATCH - 1; k > 0; k--) {
      const other = Math.floor(random() * (k + 1));
      [parts[k], parts[other]] = [parts[other] ?? 0, parts[k] ?? 0];
    }
    for (const [k, point] of points.entries()) point[axis] = ((parts[k] ?? 0) + random()) / BATCH;
  }
  return points;
}

/** Numbers in [0, 1) from a seed: Tommy Ettinger's mulberry32, public domain. */
function mulberry32(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}
