import { type DimensionName, unitText } from '@/engine/quantity';
import { readCell } from '@/features/section/import/cells';
import type { DecimalMark, Field, MappedColumn } from '@/features/section/import/contract';
import { offeredUnits } from '@/features/section/import/mapping';

interface FieldWords {
  readonly label: string;
  readonly quantity: DimensionName | null;
}

const length = (label: string): FieldWords => ({ label, quantity: 'length' });
const modulus = (label: string): FieldWords => ({ label, quantity: 'section_modulus' });

/** What a column can hold, as the mapping names it. */
export const FIELDS: Readonly<Record<Field, FieldWords>> = {
  designation: { label: 'Designation', quantity: null },
  shape: { label: 'Shape', quantity: null },
  computed: { label: 'Names of what is computed', quantity: null },
  mass: { label: 'Mass m', quantity: 'mass_per_length' },
  h: length('Depth h'),
  b: length('Width b'),
  tw: length('Web tw'),
  tf: length('Flange tf'),
  t: length('Wall t'),
  r: length('Root radius r'),
  dClear: length('Clear depth d'),
  area: { label: 'Area A', quantity: 'area' },
  iMajor: { label: 'Second moment, major', quantity: 'second_moment' },
  iMinor: { label: 'Second moment, minor', quantity: 'second_moment' },
  wElMajor: modulus('Elastic modulus, major'),
  wElMinor: modulus('Elastic modulus, minor'),
  wPlMajor: modulus('Plastic modulus, major'),
  wPlMinor: modulus('Plastic modulus, minor'),
  rMajor: length('Radius of gyration, major'),
  rMinor: length('Radius of gyration, minor'),
  j: { label: 'Torsion constant', quantity: 'second_moment' },
  iw: { label: 'Warping constant', quantity: 'warping' },
};
export const FIELD_NAMES = Object.keys(FIELDS) as readonly Field[];

const plain = (unit: string): string => unit.replace('^', '');

/** The units that a column may be in, its own among them however it is written. */
export function unitsOf(field: Field | null, own: string | null): readonly string[] {
  const offered = field === null ? [] : offeredUnits(field);
  if (own === null) return offered;
  return [own, ...offered.filter((one) => plain(one) !== plain(own))];
}

/** "cm4" or "cm^4" as it is printed: "cm⁴". */
export const unitWords = (unit: string): string => unitText(plain(unit));

/** What a cell of a column is read as, with its unit; as it stands there where it is no number yet. */
export function readsAs(cell: string, { field, unit }: MappedColumn, mark: DecimalMark | null): string {
  if (field === null) return '–';
  const { quantity } = FIELDS[field];
  if (quantity === null || unit === null || mark === null) return cell;
  const value = readCell(cell, { quantity, unit, scale: 1 }, mark);
  if (typeof value !== 'number') return `${cell} ${unitWords(unit)}`;
  const decimals = cell.split(mark)[1]?.match(/^\d+/)?.[0].length ?? 0;
  const digits = value.toLocaleString('en-GB', {
    minimumFractionDigits: decimals,
    maximumFractionDigits: Math.max(decimals, 6),
  });
  return `${digits.replaceAll(',', '\u202f')} ${unitWords(unit)}`;
}
