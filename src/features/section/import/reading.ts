import {
  cornerRadii,
  type DesignationParts,
  designationParts,
  designWall,
  MEASURED_SHAPES,
  type SectionDimensions,
  type SectionShape,
  taper,
} from '@/engine/section';
import { type CellFault, cellText, hasControl, hasLookAlike, isFormula, isMissing, readCell } from './cells';
import type { Cause, Finding, Mapping, NumberField, RuleNumber } from './contract';
import { dropRow, findingOf, setCell } from './finding';
import { FIELD_WORDS } from './headings';
import { columnOf, type NumberColumn, type Plan } from './plan';
import type { FileLine } from './stream';

/** SI values of a row's cells; one that the file or the row leaves out is not there. */
export type Values = { [Name in NumberField]?: number };

/** A line read as a section, with what is wrong with its cells. Without a shape it is none. */
export type RowRead = {
  line: FileLine;
  printed: string;
  /** Family and sizes of the name. */
  name: DesignationParts;
  shape: SectionShape | null;
  values: Values;
  findings: Finding[];
};

export const SIZES: Readonly<Record<SectionShape, readonly NumberField[]>> = {
  i: ['h', 'b', 'tw', 'tf'],
  tapered_i: ['h', 'b', 'tw', 'tf'],
  channel: ['h', 'b', 'tw', 'tf'],
  tapered_channel: ['h', 'b', 'tw', 'tf'],
  tee: ['h', 'b', 'tw', 'tf'],
  angle: ['h', 'b', 't'],
  rhs: ['h', 'b', 't'],
  shs: ['h', 't'],
  chs: ['h', 't'],
  rectangle: ['h', 'b'],
  round: ['h'],
  outline: [],
  values: [],
};

/** Values that no row may leave out where the file has a column for them. */
const NEEDED: readonly NumberField[] = ['mass', 'area', 'iMajor', 'iMinor', 'wElMajor'];
const MAY_BE_ZERO: ReadonlySet<NumberField> = new Set(['r', 'iw']);

type Place = {
  line: number;
  printed: string;
  column: { index: number; heading: string } | null;
  read: string;
};

/** Shapes that are rolled in series, named by serial depth and mass. */
export const isRolled = (shape: SectionShape | null): boolean =>
  shape === 'i' || shape === 'channel' || shape === 'tapered_i' || shape === 'tapered_channel';

/** A finding of one cell. */
function cellFinding(
  { line, printed, column, read }: Place,
  fault: {
    rule: RuleNumber;
    severity: Finding['severity'];
    cause: Cause;
    message: string;
    expected?: string;
  },
  fixes: Finding['fixes'] = [],
): Finding {
  const { expected, ...rest } = fault;
  const at = column ? { column: column.index, heading: column.heading } : {};
  return findingOf({ ...rest, ...at, line, designation: printed, read, expected: expected ?? null, fixes });
}

function readDesignation(line: FileLine, plan: Plan, findings: Finding[]): string {
  const raw = line.cells[plan.designation] ?? '';
  const printed = cellText(raw);
  const column = { index: plan.designation, heading: plan.headings[plan.designation] ?? '' };
  const place: Place = { line: line.number, printed, column, read: printed };
  const report = (rule: RuleNumber, severity: Finding['severity'], cause: Cause, message: string) =>
    findings.push(cellFinding(place, { rule, severity, cause, message }, [dropRow(line.number)]));
  if (isMissing(printed)) {
    report(33, 'error', 'missing', 'The row has no designation. Give it one, or leave the row out.');
  } else if (isFormula(printed)) {
    report(
      38,
      'error',
      'formula',
      'The designation is a formula; it is never worked out. Type the name instead.',
    );
  } else if (printed.includes('\ufffd')) {
    report(30, 'error', 'replacement_character', 'A character of the name could not be read. Type it again.');
  } else if (hasControl(printed)) {
    report(38, 'error', 'control_character', 'The name holds control characters. Type it again.');
  } else if (hasLookAlike(printed)) {
    const latin = printed.normalize('NFKC').replaceAll(/[хХχΧ]/g, 'x');
    const message =
      'A letter of another alphabet stands in the name. It is read as the Latin one it looks like.';
    const fix = setCell(line.number, plan.designation, latin);
    findings.push(
      cellFinding(place, { rule: 37, severity: 'warning', cause: 'look_alike', message, expected: latin }, [
        fix,
      ]),
    );
  }
  return printed;
}

const SHAPES: ReadonlySet<string> = new Set(MEASURED_SHAPES);
const isShape = (text: string): text is SectionShape => SHAPES.has(text);
/** Families as suppliers name them. */
const SHAPE_WORDS: ReadonlyMap<string, SectionShape> = new Map<string, SectionShape>(
  Object.entries({
    h: 'i',
    beam: 'i',
    column: 'i',
    u: 'channel',
    c: 'channel',
    solid: 'rectangle',
    flat: 'rectangle',
    bar: 'round',
  } as const),
);

/** A file of tapered flanges says so once, not in every row. */
const TAPERED: Readonly<Partial<Record<SectionShape, SectionShape>>> = {
  i: 'tapered_i',
  channel: 'tapered_channel',
};

function readShape(line: FileLine, plan: Plan, printed: string, findings: Finding[]): SectionShape | null {
  const shape = shapeOf(line, plan, printed, findings);
  return plan.mapping.flanges === 'tapered' && shape !== null ? (TAPERED[shape] ?? shape) : shape;
}

function shapeOf(line: FileLine, plan: Plan, printed: string, findings: Finding[]): SectionShape | null {
  if (plan.shape === null) return plan.mapping.shape;
  const read = cellText(line.cells[plan.shape] ?? '').toLowerCase();
  if (isShape(read)) return read;
  const known = SHAPE_WORDS.get(read) ?? (read === '' ? plan.mapping.shape : null);
  if (known !== null) return known;
  const column = { index: plan.shape, heading: plan.headings[plan.shape] ?? 'shape' };
  const message = `"${read.slice(0, 40)}" is no shape. Give one of ${MEASURED_SHAPES.join(', ')}.`;
  const place = { line: line.number, printed, column, read };
  findings.push(cellFinding(place, { rule: 25, severity: 'error', cause: 'shape_unknown', message }));
  return null;
}

function cellFixes(fault: CellFault, line: number, column: NumberColumn): Finding['fixes'] {
  if (fault.suggestion !== undefined) {
    const every = `${fault.rule}|${fault.cause}|${column.index}`;
    return [
      setCell(line, column.index, fault.suggestion),
      {
        label: 'Read all such cells of the column so',
        reach: 'column',
        edit: { kind: 'take_every', group: every },
      },
    ];
  }
  if (fault.cause !== 'replacement_character') return [dropRow(line)];
  return [
    {
      label: 'Read the file as Windows-1252',
      reach: 'file',
      edit: { kind: 'set_encoding', value: 'windows-1252' },
    },
  ];
}

/** The cell in SI, as its suggestion reads where all of its kind are taken; null with a finding where it has no value. */
function readNumber(
  raw: string,
  line: FileLine,
  printed: string,
  column: NumberColumn,
  plan: Plan,
  findings: Finding[],
) {
  const ofLine = column.scaleOfLine?.get(line.number);
  const cell = ofLine === undefined ? column : { ...column, scale: ofLine };
  const read = readCell(raw, cell, plan.mark);
  if (typeof read === 'number') return read;
  if (read.suggestion !== undefined && plan.taken.has(`${read.rule}|${read.cause}|${column.index}`)) {
    const again = readCell(read.suggestion, cell, plan.mark);
    return typeof again === 'number' ? again : again.value;
  }
  const place = { line: line.number, printed, column, read: cellText(raw) };
  findings.push(cellFinding(place, read, cellFixes(read, line.number, column)));
  return read.value;
}

function readValues(
  line: FileLine,
  printed: string,
  shape: SectionShape,
  plan: Plan,
  findings: Finding[],
): Values {
  const values: Values = {};
  const needed: readonly NumberField[] = [...SIZES[shape], ...NEEDED];
  const faulty = new Set<NumberField>();
  for (const column of plan.numbers) {
    const { field, index } = column;
    const raw = line.cells[index] ?? '';
    if (raw === '' || isMissing(cellText(raw))) continue;
    const value = readNumber(raw, line, printed, column, plan, findings);
    if (value === null) faulty.add(field);
    else if (value > 0 || (value === 0 && MAY_BE_ZERO.has(field))) values[field] = value;
    else if (value < 0) {
      const place = { line: line.number, printed, column, read: cellText(raw) };
      const message = `${cellText(raw)} is less than 0. No section has such a value.`;
      findings.push(
        cellFinding(place, { rule: 15, severity: 'error', cause: 'negative', message }, [
          dropRow(line.number),
        ]),
      );
      faulty.add(field);
    }
  }
  for (const field of needed) {
    if (values[field] === undefined && !faulty.has(field))
      missingFinding(field, line, printed, plan, findings);
  }
  return values;
}

/** A size without a column is a fault of the whole file, which the first reading reports. */
function missingFinding(
  field: NumberField,
  line: FileLine,
  printed: string,
  plan: Plan,
  findings: Finding[],
): void {
  const column = columnOf(plan, field);
  if (!column) return;
  const read = cellText(line.cells[column.index] ?? '');
  const isZero = /^[0.,]+$/.test(read) && read.includes('0');
  const message = isZero
    ? `${FIELD_WORDS[field]}: ${read} stands for a value that is missing. It cannot be 0.`
    : `${FIELD_WORDS[field]}: the value is missing. Look it up in the source.`;
  const cause = isZero ? 'zero' : 'missing';
  const place = { line: line.number, printed, column, read };
  findings.push(cellFinding(place, { rule: 33, severity: 'error', cause, message }, [dropRow(line.number)]));
}

/** Formulas in columns that are no property: never worked out, made harmless where they are exported. */
function readOthers(line: FileLine, printed: string, plan: Plan, findings: Finding[]): void {
  for (const index of plan.others) {
    const text = line.cells[index] ?? '';
    if (text === '' || !isFormula(text)) continue;
    const column = { index, heading: plan.headings[index] ?? '' };
    const message =
      'The cell is a formula. It is kept as text, never worked out, and made harmless on export.';
    const place = { line: line.number, printed, column, read: text };
    findings.push(cellFinding(place, { rule: 38, severity: 'note', cause: 'formula_text', message }));
  }
}

/** Reads a line as a section. */
export function readRow(line: FileLine, plan: Plan): RowRead {
  const findings: Finding[] = [];
  const printed = readDesignation(line, plan, findings);
  const shape = readShape(line, plan, printed, findings);
  const values = shape === null ? {} : readValues(line, printed, shape, plan, findings);
  if (plan.others.length > 0) readOthers(line, printed, plan, findings);
  return { line, printed, name: designationParts(printed), shape, values, findings };
}

/** By its axis letters, or its sizes in inches: flanges and toes are rolled otherwise than in Europe. */
const isAmerican = ({ axes, columns }: Mapping): boolean =>
  axes === 'us' || columns.some(({ field, unit }) => field === 'h' && unit === 'in');

/**
 * Dimensions in m; NaN where a size is missing. A root radius that is missing is 0. Toes of angles are half the root (EN
 * 10056-1), square in American tables.
 */
export function dimensionsOf(shape: SectionShape, values: Values, mapping: Mapping): SectionDimensions {
  const { h = Number.NaN, b = h, tw = Number.NaN, tf = Number.NaN, r = 0, t = Number.NaN } = values;
  const standard = mapping.tubeStandard;
  const wall = designWall(t, standard);
  switch (shape) {
    case 'i':
    case 'channel':
    case 'tee':
      return { shape, h, b, tw, tf, r };
    case 'tapered_i':
    case 'tapered_channel':
      return taper(shape, { h, b, tw, tf, r }, isAmerican(mapping) ? 'american' : 'european');
    case 'angle':
      return { shape, h, b, t, r, toe: isAmerican(mapping) ? 0 : r / 2 };
    case 'rhs':
    case 'shs':
      return { shape, h, b, t: wall, ...cornerRadii(wall, standard) };
    case 'chs':
      return { shape, d: h, t: wall };
    case 'rectangle':
      return { shape, h, b };
    case 'round':
      return { shape, d: h };
    case 'outline':
    case 'values':
      throw new RangeError('such a section is drawn or given by its values, not read from a table of sizes');
  }
}
