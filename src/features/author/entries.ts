/** Entries of a document as they begin: parameters with sane names and ranges, ready to be changed. */
import type { DimensionName } from '@/engine/quantity';
import { texOf } from './rename';

export interface NewParameter {
  readonly name: string;
  readonly help: string;
  readonly dimension: DimensionName;
  readonly default: string;
  readonly min: string;
  readonly max: string;
  readonly step: string;
  readonly units?: { readonly metric: string; readonly us: string };
  readonly group?: string;
}

export const quantity = (symbol: string, parameter: NewParameter) => ({
  kind: 'quantity' as const,
  symbol,
  tex: texOf(symbol),
  ...parameter,
});

const LENGTH = { dimension: 'length', step: '0.05 m' } as const;

export const SPAN: NewParameter = {
  ...LENGTH,
  name: 'Span',
  help: 'Between the centres of the supports.',
  default: '6 m',
  min: '0.3 m',
  max: '30 m',
};
export const FREE_LENGTH: NewParameter = {
  ...LENGTH,
  name: 'Length',
  help: 'From the face of the fixed end to the free end.',
  default: '2 m',
  min: '0.1 m',
  max: '15 m',
};
export const OVERHANG: NewParameter = {
  ...LENGTH,
  name: 'Overhang',
  help: 'From the centre of the support to the free end. Zero is allowed.',
  default: '1.5 m',
  min: '0 m',
  max: '15 m',
};
export const PLACE: NewParameter = {
  ...LENGTH,
  name: 'Place',
  help: 'From the left end of its length.',
  default: '2 m',
  min: '0 m',
  max: '30 m',
};
export const UNIFORM: NewParameter = {
  name: 'Uniform load',
  help: 'Per length of beam, down positive; an area load times the width it is carried over. The section’s own weight is added by the member.',
  dimension: 'line_load',
  default: '5 kN/m',
  min: '-50 kN/m',
  max: '250 kN/m',
  step: '0.5 kN/m',
  group: 'G',
};
export const TRIANGULAR: NewParameter = {
  ...UNIFORM,
  name: 'Triangular load',
  help: 'Where it is largest, down positive.',
};
export const POINT: NewParameter = {
  name: 'Point load',
  help: 'Down positive.',
  dimension: 'force',
  default: '10 kN',
  min: '-500 kN',
  max: '1000 kN',
  step: '0.5 kN',
  group: 'Q',
};
export const COUPLE: NewParameter = {
  name: 'Couple',
  help: 'Anticlockwise positive.',
  dimension: 'moment',
  default: '10 kNm',
  min: '-500 kNm',
  max: '500 kNm',
  step: '0.5 kNm',
  group: 'Q',
};
export const SETTLEMENT: NewParameter = {
  name: 'Settlement',
  help: 'Of the support beside the others, down positive.',
  dimension: 'length',
  default: '5 mm',
  min: '-200 mm',
  max: '200 mm',
  step: '1 mm',
  units: { metric: 'mm', us: 'in' },
};
export const CURVATURE: NewParameter = {
  name: 'Thermal curvature',
  help: 'Expansion times the temperature difference of bottom and top, over the depth; sagging positive.',
  dimension: 'curvature',
  default: '0.0005 1/m',
  min: '-0.01 1/m',
  max: '0.01 1/m',
  step: '0.0001 1/m',
  group: 'T',
};

/** Of a beam whose results do not follow from its stiffness, but its shape does. */
export const STIFFNESS = { default_ei: '20000 kNm2', affects: ['slope', 'deflection'] };

/** Of each dimension a parameter as it begins. */
const BEGINNINGS: Partial<Record<DimensionName, NewParameter>> = {
  length: SPAN,
  line_load: UNIFORM,
  force: POINT,
  moment: COUPLE,
  curvature: CURVATURE,
};

/** Texts of other dimensions: a default, a range and a step. */
const TEXTS: Partial<Record<DimensionName, readonly [string, string, string, string]>> = {
  spring: ['5000 kN/m', '10 kN/m', '1000000 kN/m', '100 kN/m'],
  rotational_spring: ['5000 kNm/rad', '10 kNm/rad', '1000000 kNm/rad', '100 kNm/rad'],
  rotation: ['1 mrad', '-20 mrad', '20 mrad', '0.1 mrad'],
  ratio: ['1', '0', '10', '0.1'],
  temperature: ['20 C', '-60 C', '60 C', '1 C'],
  area_load: ['2 kN/m2', '0 kN/m2', '50 kN/m2', '0.1 kN/m2'],
  bending_stiffness: ['20000 kNm2', '100 kNm2', '10000000 kNm2', '100 kNm2'],
};

/** A parameter of this dimension with nothing said of it but a range to begin with. */
export function ofDimension(symbol: string, dimension: DimensionName) {
  const known = BEGINNINGS[dimension];
  if (known) return quantity(symbol, { ...known, name: '', help: '' });
  const [start = '', min = '', max = '', step = ''] = TEXTS[dimension] ?? [];
  return quantity(symbol, { dimension, name: '', help: '', default: start, min, max, step });
}

export const choice = (symbol: string) => ({
  kind: 'choice' as const,
  symbol,
  tex: texOf(symbol),
  name: '',
  help: '',
  options: [
    { value: 'one', name: '' },
    { value: 'two', name: '' },
  ],
  default: 'one',
});

/** The load group that a row of a list belongs to. */
export const groupColumn = (symbol: string) => ({
  kind: 'group' as const,
  symbol,
  tex: texOf(symbol),
  name: 'Group',
  help: 'The load group of this row.',
  default: 'Q',
});

/** A list of point loads: where, how large, and of which group. */
export const pointLoadRows = (symbol: string, x: string, load: string, group: string) => ({
  kind: 'rows' as const,
  symbol,
  tex: texOf(symbol),
  name: 'Point loads',
  help: 'One row for each load.',
  columns: [
    quantity(x, { ...PLACE, name: 'Place', help: 'From the left end.' }),
    quantity(load, POINT),
    groupColumn(group),
  ],
  least: 1,
  most: 12,
  default: [{ [x]: '2 m', [load]: '10 kN', [group]: 'Q' }],
});
