import { toUnit } from '@/engine/quantity';
import {
  asciiDesignation,
  depthOf,
  keyOfParts,
  type SectionDimensions,
  type SectionProperties,
  sectionProperties,
  type TabulatedName,
  widthOf,
} from '@/engine/section';
import type { SectionRow } from '../section';
import { cellText } from './cells';
import type { JudgedRow } from './judge-row';
import type { Plan } from './plan';

const EXACT = 12; // figures: what a file prints, without the last bits of its conversion
const units = {
  mm: toUnit(1, 'mm'),
  cm2: toUnit(1, 'cm2'),
  cm3: toUnit(1, 'cm3'),
  cm4: toUnit(1, 'cm4'),
  cm6: toUnit(1, 'cm6'),
};
const inUnit = (value: number, unit: keyof typeof units) => Number((value * units[unit]).toPrecision(EXACT));

/** 7.6 × 0.001 as 0.0076: lengths without the last bit of their conversion. */
const rounded = <D extends SectionDimensions>(dimensions: D): D => {
  const lengths: Record<string, unknown> = {};
  for (const [symbol, value] of Object.entries(dimensions)) {
    lengths[symbol] = typeof value === 'number' ? Number(value.toPrecision(EXACT)) : value;
  }
  return lengths as D;
};

type SoundRow = JudgedRow & { dimensions: SectionDimensions };
export const isSound = (row: JudgedRow): row is SoundRow => row.dimensions !== null;

/** The supplied values; what the file does not give is computed from the dimensions and named so. */
export function toSectionRow(
  { dimensions, computed: known, values, printed, name, line }: SoundRow,
  plan: Plan,
): SectionRow {
  let found = known;
  const properties = (): SectionProperties => {
    found ??= sectionProperties(dimensions);
    return found;
  };
  const named = plan.computed === null ? '' : cellText(line.cells[plan.computed] ?? '');
  const computed = new Set(named === '' ? [] : named.split(/[\s;]+/));
  const value = (name: Exclude<TabulatedName, 'mass'>, unit: keyof typeof units, field: string): number => {
    const supplied = values[name];
    if (supplied === undefined) computed.add(field);
    return inUnit(supplied ?? properties()[name], unit);
  };
  const supplied = {
    area_cm2: value('area', 'cm2', 'area_cm2'),
    i_major_cm4: value('iMajor', 'cm4', 'i_major_cm4'),
    i_minor_cm4: value('iMinor', 'cm4', 'i_minor_cm4'),
    w_el_cm3: value('wElMajor', 'cm3', 'w_el_cm3'),
    w_el_minor_cm3: value('wElMinor', 'cm3', 'w_el_minor_cm3'),
    w_pl_cm3: value('wPlMajor', 'cm3', 'w_pl_cm3'),
    w_pl_minor_cm3: value('wPlMinor', 'cm3', 'w_pl_minor_cm3'),
    j_cm4: value('j', 'cm4', 'j_cm4'),
    iw_cm6: value('iw', 'cm6', 'iw_cm6'),
  };
  if (values.mass === undefined) computed.add('mass_kg_m');
  return {
    designation: asciiDesignation(printed),
    printed,
    key: keyOfParts(name),
    shape: dimensions.shape,
    depth_mm: inUnit(depthOf(dimensions), 'mm'),
    width_mm: inUnit(widthOf(dimensions), 'mm'),
    mass_kg_m: Number((values.mass ?? plan.mapping.density * properties().area).toPrecision(EXACT)),
    ...supplied,
    computed: [...computed].sort(),
    dimensions: rounded(dimensions),
  };
}
