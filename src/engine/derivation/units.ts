import { fromUnit, type UnitSystemName } from '../quantity/index';
import type { DisplayUnit } from './types';

/**
 * Kinds of symbol, in the order in which they stand in a product: loads, lengths, stiffness. Each with its unit where
 * everything is in one set of base units, as the closed forms need it, and where movements are handed on in small ones.
 */
const METRIC = {
  line: ['kN/m', 'kN/m'],
  force: ['kN', 'kN'],
  moment: ['kNm', 'kNm'],
  curvature: ['1/m', '1/m'],
  'load term': ['kNm2', 'kNm2'],
  deflection: ['m', 'mm'],
  rotation: ['rad', 'mrad'],
  length: ['m', 'm'],
  'deflection per force': ['m/kN', 'mm/kN'],
  'deflection per moment': ['m/kNm', 'mm/kNm'],
  'rotation per force': ['rad/kN', 'mrad/kN'],
  'rotation per moment': ['rad/kNm', 'mrad/kNm'],
  spring: ['kN/m', 'kN/m'],
  'rotational spring': ['kNm/rad', 'kNm/rad'],
  shear: ['kN', 'kN'],
  bending: ['kNm2', 'kNm2'],
  number: ['', ''],
} as const satisfies Record<string, readonly [string, string]>;

export type Kind = keyof typeof METRIC;
/** Movements in m or ft and in rad, as the closed forms give them; or in mm or in and in mrad, as they are handed on. */
export type Scale = 'base' | 'handed';

const US: Record<Kind, readonly [string, string]> = {
  line: ['kip/ft', 'kip/ft'],
  force: ['kip', 'kip'],
  moment: ['kip-ft', 'kip-ft'],
  curvature: ['1/ft', '1/ft'],
  'load term': ['kip-ft2', 'kip-ft2'],
  deflection: ['ft', 'in'],
  rotation: ['rad', 'mrad'],
  length: ['ft', 'ft'],
  'deflection per force': ['ft/kip', 'in/kip'],
  'deflection per moment': ['ft/kip-ft', 'in/kip-ft'],
  'rotation per force': ['rad/kip', 'mrad/kip'],
  'rotation per moment': ['rad/kip-ft', 'mrad/kip-ft'],
  spring: ['kip/ft', 'kip/ft'],
  'rotational spring': ['kip-ft/rad', 'kip-ft/rad'],
  shear: ['kip', 'kip'],
  bending: ['kip-ft2', 'kip-ft2'],
  number: ['', ''],
};

const KINDS = Object.keys(METRIC);
export const rankOf = (kind: Kind): number => KINDS.indexOf(kind);

/** How the trade gives what the working needs in other units: EI in kip-in², where the formulas take kip-ft². */
const US_GIVEN: Partial<Record<Kind, string>> = {
  bending: 'kip-in2',
  spring: 'kip/in',
  'rotational spring': 'kip-in/rad',
  curvature: '1/in',
};

/** Kinds whose values are not results, or have no unit. */
const UNSHOWN: ReadonlySet<Kind> = new Set<Kind>([
  'line',
  'curvature',
  'spring',
  'rotational spring',
  'shear',
  'bending',
  'number',
]);

/** The units that a derivation is worked in. */
export type Units = {
  system: UnitSystemName;
  of: (kind: Kind, scale: Scale) => string;
  /** Of results. */
  shown: (kind: Kind) => DisplayUnit;
  /** As it is given, if that is not the unit it is worked in. */
  given: (kind: Kind) => string | null;
};

export function unitsOf(system: UnitSystemName): Units {
  const table = system === 'us' ? US : METRIC;
  const of = (kind: Kind, scale: Scale) => table[kind][scale === 'base' ? 0 : 1];
  return {
    system,
    of,
    shown: (kind) => (UNSHOWN.has(kind) ? '' : (of(kind, 'handed') as DisplayUnit)),
    given: (kind) => (system === 'us' ? (US_GIVEN[kind] ?? null) : null),
  };
}

/** SI value of one of a unit such as "in/kip-ft": what stands after the slash all divides. */
function readFactor(unit: string): number {
  const [above = '', below = ''] = unit.split('/');
  return fromUnit(1, above) / fromUnit(1, below);
}

/** Read once, not at every number. */
const FACTORS: ReadonlyMap<string, number> = new Map(
  [...Object.values(METRIC), ...Object.values(US), Object.values(US_GIVEN)]
    .flat()
    .map((unit) => [unit, readFactor(unit)]),
);

/** An SI value in one of the derivation's units. */
export const inUnit = (si: number, unit: string): number => si / (FACTORS.get(unit) ?? Number.NaN);

/** SI of a value in one of the derivation's units. */
export const toSi = (value: number, unit: string): number => value * (FACTORS.get(unit) ?? Number.NaN);

/** A unit in maths mode. */
export const unitTex = (unit: string): string =>
  `\\mathrm{${unit.replace(/2$/, '^2').replaceAll('-', '\\text{-}')}}`;
