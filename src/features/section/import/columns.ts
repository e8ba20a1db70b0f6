import { type DimensionName, unitFactor, unitText } from '@/engine/quantity';
import type { SectionTableMeta } from '../section';
import { type ImportFault, isError, onColumn } from './fault';
import { cellText } from './old-cells';
import {
  FIELD_QUANTITY,
  type Field,
  fieldOf,
  type Heading,
  isNumberField,
  readHeading,
} from './old-headings';

export type Column = Heading & { index: number; heading: string; field: Field };

const USUAL_UNITS: Partial<Record<DimensionName, string>> = {
  length: 'mm',
  mass_per_length: 'kg/m',
  area: 'cm2',
  second_moment: 'cm4',
  section_modulus: 'cm3',
  warping: 'cm6',
};

/** One heading as a column, or why it is none. */
function readColumn(
  read: Heading,
  index: number,
  heading: string,
  axes: SectionTableMeta['axes'],
  line: number,
) {
  const fault = onColumn(line, heading);
  const field = fieldOf(read, axes);
  if (field === 'axis') {
    const message = `"${heading}" means opposite axes by region. Say which convention the file follows.`;
    return fault('axis_unresolved', 'error', message);
  }
  if (field === null) {
    return fault(
      'column_unknown',
      'note',
      `"${heading}" is not a column of a section table and is left out.`,
    );
  }
  return { ...read, index, heading, field };
}

/** What a column of numbers leaves open about its unit. */
function unitFault({ field, unit, name, heading }: Column, line: number): ImportFault | null {
  if (!isNumberField(field)) return null;
  const usual = unitText(USUAL_UNITS[FIELD_QUANTITY[field]] ?? '');
  const fault = onColumn(line, heading);
  if (unit === null) {
    const message = `"${heading}" has no unit. Write it into the heading, for example "${name} (${usual})".`;
    return fault('unit_missing', 'error', message);
  }
  if (unitFactor(unit, FIELD_QUANTITY[field]).ok) return null;
  return fault(
    'column_unit',
    'error',
    `"${unit}" is not a unit of this column. Write, for example, ${usual}.`,
  );
}

/** German tables head web and flange with s and t: t is the wall of a tube only where there is no web. */
function settleFlange(columns: readonly Column[]): Column[] {
  const has = (field: Field) => columns.some((column) => column.field === field);
  const isFlange = has('tw') && !has('tf');
  return columns.map((column) => (isFlange && column.field === 't' ? { ...column, field: 'tf' } : column));
}

/** The columns of a file, with everything that its heading lines leave open. `units`: a second line of units, if any. */
export function readColumns(
  headings: readonly string[],
  units: readonly string[] | null,
  line: number,
  { axes }: Pick<SectionTableMeta, 'axes'>,
): { columns: Column[]; faults: ImportFault[] } {
  const faults: ImportFault[] = [];
  const found: Column[] = [];
  for (const [index, cell] of headings.entries()) {
    const heading = cellText(cell);
    if (heading === '') continue;
    const read = readHeading(heading);
    const unit = read.unit ?? (cellText(units?.[index] ?? '') || null);
    const column = readColumn({ ...read, unit }, index, heading, axes, line);
    if ('code' in column) faults.push(column);
    else if (found.some(({ field }) => field === column.field)) {
      const message = `"${heading}" is the second column for the same value. Remove one.`;
      faults.push(onColumn(line, heading)('column_repeated', 'error', message));
    } else found.push(column);
  }
  const columns = settleFlange(found);
  faults.push(...columns.map((column) => unitFault(column, line)).filter((fault) => fault !== null));
  if (!columns.some(({ field }) => field === 'designation') && !faults.some(isError)) {
    const message = 'No column is headed as the designation. Name one "designation".';
    faults.push(onColumn(line, '')('column_missing', 'error', message));
  }
  return { columns, faults };
}
