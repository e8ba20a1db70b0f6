import { MEASURED_SHAPES, type MeasuredShape } from '@/engine/section';
import type { SectionTableMeta } from '../section';
import type { Column } from './columns';
import type { ImportFault } from './fault';
import { cellText, type DecimalMark, hasLookAlike, isMissing, readCell } from './old-cells';
import { FIELD_QUANTITY, type Field, isNumberField, type NumberField } from './old-headings';

export type RowContext = { columns: readonly Column[]; mark: DecimalMark; meta: SectionTableMeta };

/** SI values of a row's cells; a field that the file or the row leaves out is undefined. */
export type Values = { readonly [Name in NumberField]?: number | undefined };

/** A line of the file with its columns named, collecting its faults. */
export type Line = {
  number: number;
  text: (field: Field) => string;
  faults: ImportFault[];
  report: (field: Field, fault: Omit<ImportFault, 'line' | 'column' | 'got'>) => void;
};

export function lineOf(cells: readonly string[], number: number, columns: readonly Column[]): Line {
  const faults: ImportFault[] = [];
  const columnOf = (field: Field) => columns.find((column) => column.field === field);
  const text = (field: Field) => {
    const column = columnOf(field);
    return column ? cellText(cells[column.index] ?? '') : '';
  };
  return {
    number,
    text,
    faults,
    report: (field, fault) =>
      faults.push({ line: number, column: columnOf(field)?.heading ?? '', got: text(field), ...fault }),
  };
}

const FLANGED: readonly NumberField[] = ['h', 'b', 'tw', 'tf'];
const SIZES: Readonly<Record<MeasuredShape, readonly NumberField[]>> = {
  i: FLANGED,
  tapered_i: FLANGED,
  channel: FLANGED,
  tapered_channel: FLANGED,
  tee: FLANGED,
  angle: ['h', 'b', 't'],
  rhs: ['h', 'b', 't'],
  shs: ['h', 'b', 't'],
  chs: ['h', 't'],
  rectangle: ['h', 'b'],
  round: ['h'],
};

/** Values that no row may leave out where the file has a column for them. */
const NEEDED: readonly NumberField[] = ['mass', 'area', 'iMajor', 'iMinor', 'wElMajor'];
const MAY_BE_ZERO: readonly NumberField[] = ['r', 'iw'];

export function readDesignation(line: Line): string {
  const printed = line.text('designation');
  if (isMissing(printed)) {
    line.report('designation', {
      code: 'missing',
      severity: 'error',
      message: 'The row has no designation.',
    });
  } else if (/^[=+@]|^-\D/.test(printed)) {
    line.report('designation', {
      code: 'dangerous_text',
      severity: 'error',
      message: 'The designation is a formula. Paste its value instead.',
    });
  } else if (hasLookAlike(printed)) {
    line.report('designation', {
      code: 'look_alike',
      severity: 'warning',
      message: 'A letter of another alphabet stands in the designation. It is read as the Latin one.',
    });
  }
  return printed;
}

export function readShape(line: Line, meta: SectionTableMeta): MeasuredShape | null {
  const text = line.text('shape').toLowerCase() || meta.shape;
  const shape = MEASURED_SHAPES.find((one) => one === text) ?? null;
  if (shape === null) {
    line.report('shape', {
      code: 'not_allowed',
      severity: 'error',
      message: `Give the shape as one of ${MEASURED_SHAPES.join(', ')}.`,
    });
  }
  return shape;
}

/** Every number of the row. A missing one is a fault where the shape or the file's own columns ask for it. */
export function readNumbers(line: Line, shape: MeasuredShape, { columns, mark }: RowContext): Values {
  const values: Partial<Record<NumberField, number>> = {};
  const needed = new Set([
    ...SIZES[shape],
    ...NEEDED.filter((field) => columns.some((one) => one.field === field)),
  ]);
  for (const { field, unit, factor } of columns) {
    if (!isNumberField(field) || unit === null) continue;
    const text = line.text(field);
    if (isMissing(text)) continue;
    const reading = readCell(text, FIELD_QUANTITY[field], unit, mark);
    if (!reading.ok) {
      line.report(field, { severity: 'error', ...withoutOk(reading) });
      needed.delete(field);
    } else if (reading.value < 0 || (reading.value === 0 && needed.has(field))) {
      line.report(field, { code: 'not_allowed', severity: 'error', message: `${text} is not more than 0.` });
      needed.delete(field);
    } else if (reading.value > 0 || MAY_BE_ZERO.includes(field)) {
      values[field] = reading.value * factor;
    }
  }
  for (const field of needed) {
    if (values[field] !== undefined) continue;
    line.report(field, {
      code: 'missing',
      severity: 'error',
      message: `The value of ${WORDS[field]} is missing.`,
    });
  }
  return values;
}

function withoutOk<T extends { ok: false }>({ ok: _ok, ...rest }: T): Omit<T, 'ok'> {
  return rest;
}

const WORDS: Readonly<Record<NumberField, string>> = {
  h: 'h, the depth',
  b: 'b, the width',
  tw: 't_w, the web',
  tf: 't_f, the flange',
  r: 'r, the root radius',
  t: 't, the wall',
  mass: 'the mass',
  area: 'A, the area',
  iMajor: 'I major',
  iMinor: 'I minor',
  wElMajor: 'W_el major',
  wElMinor: 'W_el minor',
  wPlMajor: 'W_pl major',
  wPlMinor: 'W_pl minor',
  rMajor: 'i major',
  rMinor: 'i minor',
  j: 'I_t',
  iw: 'I_w',
};
