import Papa from 'papaparse';
import type { UnitSystemName } from '@/engine/quantity';
import { FIELD_WORDS, toShown } from './display';
import { measureOf, type SectionField } from './query';
import type { SectionItem } from './section';

const EXACT = 12; // figures: without the last bits of a conversion

/**
 * Sections as CSV in the units shown, figures unrounded. Text that a spreadsheet would take for a formula is made
 * harmless; numbers stay numbers.
 */
export function sectionsCsv(
  items: readonly SectionItem[],
  fields: readonly SectionField[],
  system: UnitSystemName,
): string {
  const heads = fields.map((field) => `${FIELD_WORDS[field].name} (${FIELD_WORDS[field][system].unit})`);
  const rows = items.map((item) => [
    item.designation,
    item.table,
    item.edition,
    ...fields.map((field) => {
      const value = measureOf(item, field);
      return value === null ? '' : Number(toShown(field, value, system).toPrecision(EXACT));
    }),
    item.computed.join(' '),
  ]);
  return Papa.unparse([['designation', 'table', 'edition', ...heads, 'computed'], ...rows], {
    escapeFormulae: true,
  });
}
