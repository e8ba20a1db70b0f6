import type { DimensionName } from './dimension';

/** Decimals of a displayed number: see formatNumber. */
export type Rounding = { readonly significant?: number; readonly places?: number };
export type Display = Rounding & { readonly unit: string };

/** What a figure is for, where the dimension alone does not decide its unit or its rounding. */
const PURPOSES = [
  'position',
  'deflection',
  'section_size',
  'reaction',
  'radius_of_gyration',
  'slope',
] as const;
export type Purpose = DimensionName | (typeof PURPOSES)[number];

export type UnitSystemName = 'metric' | 'us';

/**
 * The unit and rounding in which each quantity is shown. Loads and moments to three figures, reactions to 0.1 kN or
 * 0.01 kip, deflections to 0.1 mm or 0.01 in, positions to the millimetre or 1/16 in (ASTM E29, ISO 80000-1).
 * A quantity without rounding is shown as exactly as it was given.
 */
export const UNIT_SYSTEMS: Readonly<Record<UnitSystemName, Readonly<Record<Purpose, Display>>>> = {
  metric: {
    length: { unit: 'm' },
    position: { unit: 'm', places: 3 },
    deflection: { unit: 'mm', places: 1 },
    section_size: { unit: 'mm', places: 1 },
    radius_of_gyration: { unit: 'cm', places: 2 },
    force: { unit: 'kN', significant: 3, places: 1 },
    reaction: { unit: 'kN', places: 1 },
    line_load: { unit: 'kN/m', significant: 3, places: 1 },
    moment: { unit: 'kNm', significant: 3, places: 1 },
    stress: { unit: 'N/mm2', significant: 3 },
    modulus: { unit: 'N/mm2' },
    area_load: { unit: 'kN/m2', significant: 3 },
    second_moment: { unit: 'cm4', significant: 3 },
    section_modulus: { unit: 'cm3', significant: 3 },
    area: { unit: 'cm2', significant: 3, places: 1 },
    warping: { unit: 'dm6', significant: 3 },
    bending_stiffness: { unit: 'kNm2', significant: 4 },
    shear_stiffness: { unit: 'kN', significant: 4 },
    spring: { unit: 'kN/m', significant: 4 },
    rotational_spring: { unit: 'kNm/rad', significant: 4 },
    curvature: { unit: '1/m', significant: 3 },
    rotation: { unit: 'mrad', significant: 3, places: 2 },
    slope: { unit: 'mrad', places: 2 },
    mass_per_length: { unit: 'kg/m', places: 1 },
    density: { unit: 'kg/m3', significant: 3 },
    temperature: { unit: 'C', places: 0 },
    expansion: { unit: '1/K', significant: 3 },
    ratio: { unit: '' },
  },
  us: {
    length: { unit: 'ft-in' },
    position: { unit: 'ft-in' },
    deflection: { unit: 'in', places: 2 },
    section_size: { unit: 'in', significant: 3 },
    radius_of_gyration: { unit: 'in', significant: 3 },
    force: { unit: 'kip', significant: 3, places: 1 },
    reaction: { unit: 'kip', places: 2 },
    line_load: { unit: 'kip/ft', significant: 3, places: 2 },
    moment: { unit: 'kip-ft', significant: 3, places: 1 },
    stress: { unit: 'ksi', significant: 3 },
    modulus: { unit: 'ksi' },
    area_load: { unit: 'psf', significant: 3 },
    second_moment: { unit: 'in4', significant: 3 },
    section_modulus: { unit: 'in3', significant: 3 },
    area: { unit: 'in2', significant: 3 },
    warping: { unit: 'in6', significant: 3 },
    bending_stiffness: { unit: 'kip-in2', significant: 4 },
    shear_stiffness: { unit: 'kip', significant: 4 },
    spring: { unit: 'kip/in', significant: 4 },
    rotational_spring: { unit: 'kip-in/rad', significant: 4 },
    curvature: { unit: '1/in', significant: 3 },
    rotation: { unit: 'mrad', significant: 3, places: 2 },
    slope: { unit: 'mrad', places: 2 },
    mass_per_length: { unit: 'lbm/ft', places: 1 },
    density: { unit: 'lbm/ft3', significant: 3 },
    temperature: { unit: 'F', places: 0 },
    expansion: { unit: '1/F', significant: 3 },
    ratio: { unit: '' },
  },
};
