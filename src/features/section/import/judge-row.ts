import {
  dimensionFaults,
  type SectionDimensions,
  type SectionProperties,
  sectionProperties,
} from '@/engine/section';
import { cellText } from './cells';
import type { Finding, NameFacts, NumberField } from './contract';
import { dropRow, findingOf, isError } from './finding';
import { sizesInWords } from './formula';
import { judge } from './judge';
import { nameFindings } from './names';
import { columnOf, type Plan } from './plan';
import { dimensionsOf, type RowRead, readRow, SIZES } from './reading';
import type { FileLine } from './stream';

/** A row and what is said of it. Dimensions are there where the section can exist, properties where it is judged by them. */
export type JudgedRow = RowRead & {
  dimensions: SectionDimensions | null;
  computed: SectionProperties | null;
};

/** Which column holds each dimension of the engine. */
const SIZE_FIELDS: Readonly<Record<string, NumberField>> = { d: 'h', ro: 't', ri: 't' };

function geometryFindings(row: RowRead, d: SectionDimensions, plan: Plan): Finding[] {
  return dimensionFaults(d).map(({ dimension, message }) => {
    const field = SIZE_FIELDS[dimension] ?? (dimension as NumberField);
    const column = columnOf(plan, field);
    return findingOf({
      rule: 15,
      severity: 'error',
      cause: 'geometry',
      line: row.line.number,
      designation: row.printed,
      ...(column ? { column: column.index, heading: column.heading } : {}),
      read: column ? cellText(row.line.cells[column.index] ?? '') : '',
      formula: sizesInWords(d),
      message: `This section cannot exist: ${message}.`,
      fixes: [dropRow(row.line.number)],
    });
  });
}

/** Reads a line whose file has been judged already: nothing is said but of cells and geometry that do not stand. */
export function measureLine(line: FileLine, plan: Plan): JudgedRow {
  const row = readRow(line, plan);
  const { shape, values, findings } = row;
  const without = { ...row, dimensions: null, computed: null };
  if (shape === null || SIZES[shape].some((field) => values[field] === undefined)) return without;
  const dimensions = dimensionsOf(shape, values, plan.mapping);
  const faults = geometryFindings(row, dimensions, plan);
  if (faults.length > 0) return { ...without, findings: [...findings, ...faults] };
  return { ...row, dimensions, computed: null };
}

/** Reads a line and judges it by itself; properties only where its cells and its geometry stand. */
export function judgeLine(line: FileLine, plan: Plan, names: NameFacts): JudgedRow {
  const row = measureLine(line, plan);
  const { dimensions, findings } = row;
  if (!dimensions) return row;
  const computed = sectionProperties(dimensions);
  const judged = judge(row, dimensions, computed, plan);
  const isMassWrong = judged.some(({ cause }) => cause === 'mass_units' || cause === 'mass');
  const named = nameFindings(row, plan, names).filter(({ cause }) => !(isMassWrong && cause === 'name_mass'));
  const all = judged.length + named.length === 0 ? findings : [...findings, ...judged, ...named];
  return { ...row, findings: all, computed };
}

export const hasError = ({ findings }: Pick<JudgedRow, 'findings'>): boolean => findings.some(isError);
