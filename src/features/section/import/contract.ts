import type { SectionShape, Severity, TabulatedName } from '@/engine/section';
import type { SectionRow, SectionTableMeta } from '../section';

/**
 * The import of a section table, as its callers see it. Four steps, each pure:
 *
 * 1. `recognise(head, file)`: what the first bytes say; a `Recognition` with a proposed `Mapping` and its open questions.
 * 2. The person answers with `answer(mapping, …)`; `openQuestions(mapping)` is empty when the file can be checked.
 * 3. `new Survey(mapping, edits)` is given the whole file in pieces and gives the `FileFacts`.
 * 4. `new RowCheck(mapping, edits, facts, { fromRow })` is given the whole file again and gives findings and rows in batches; once more with `isSettled` for the rows that are kept.
 *
 * Everything is exported by `features/section/import`: also `RULES` (words of the rules), `applyFix`, `emptyReport`,
 * `addFindings(report, findings)`, `openCount(report, acceptances)`, `mayAccept(finding)`, `identityFindings` (rule 40).
 * Facts, mapping, edits, report and findings are JSON. A survey that was cut short is begun again (it takes a third of the
 * time); a row check is begun again at the row that the last kept batch ended with.
 */

export type Encoding =
  | 'utf-8'
  | 'utf-16le'
  | 'utf-16be'
  | 'windows-1252'
  | 'windows-1251'
  | 'iso-8859-2'
  | 'macintosh';
export type Delimiter = ',' | ';' | '\t' | '|';
export type DecimalMark = '.' | ',';
export type Axes = NonNullable<SectionTableMeta['axes']>;
export type HeadingLanguage = 'en' | 'de' | 'fr' | 'it' | 'es' | 'nl' | 'sv';

type SizeName = 'h' | 'b' | 'tw' | 'tf' | 'r' | 't';
/** What a column of numbers holds; `dClear` is the clear depth of the web between the root radii. */
export type NumberField = SizeName | TabulatedName | 'dClear';
type TextField = 'designation' | 'shape' | 'computed';
export type Field = NumberField | TextField;

export type MappedColumn = {
  index: number;
  /** As in the file. */
  heading: string;
  /** Null: left out. */
  field: Field | null;
  /** As written; null where there is none, or it has to be asked. */
  unit: string | null;
  /** Multiplier that stands beside the unit: 1000 of "10³ cm⁶". */
  factor: number;
  /** What the heading means by each convention, where they differ. `answer` takes `field` from here. */
  byAxes?: { readonly [A in Axes]: Field | null };
};

/** How a file is read. Remembered per supplier; `remember` puts it onto a new file of the same headings. */
export type Mapping = {
  version: 1;
  /** Null: to be asked. After an answer the file is recognised again with it, since headings may read otherwise. */
  encoding: Encoding | null;
  delimiter: Delimiter;
  /** Null: to be asked. */
  decimalMark: DecimalMark | null;
  /** Which letters the file gives axes and moduli. Null where it has none, or is still to be asked: see openQuestions. */
  axes: Axes | null;
  columns: MappedColumn[];
  /** Line of the headings and, if there is one, of the units under them; lines count from 1. */
  headingLine: number;
  unitLine: number | null;
  /** Shape of every row where no column has it. */
  shape: SectionShape | null;
  flanges: 'parallel' | 'tapered';
  density: number;
  tubeStandard: SectionTableMeta['tube_standard'];
};

export type Refusal = { code: RefusalCode; message: string };
export type RefusalCode =
  | 'empty'
  | 'archive'
  | 'spreadsheet'
  | 'document'
  | 'image'
  | 'binary'
  | 'too_large'
  | 'no_rows'
  | 'no_headings'
  | 'one_column'
  | 'too_many_columns'
  | 'cell_too_long'
  | 'unclosed_quote'
  | 'too_many_rows'
  | 'markup';

export type Confidence = 'certain' | 'likely' | 'unsure';

/** A column as recognised: what it is proposed to be, how sure that is, and the first three cells. */
export type RecognisedColumn = {
  index: number;
  heading: string;
  samples: string[];
  confidence: Confidence;
  reason: string;
};

/** What only a person can say. `choices` are what `answer` takes, the likeliest first; none is taken by itself. */
export type Question =
  | { kind: 'encoding'; message: string; choices: { value: Encoding; samples: string[] }[] }
  | {
      kind: 'decimal_mark';
      message: string;
      samples: string[];
      choices: { value: DecimalMark; samples: string[] }[];
    }
  | { kind: 'axes'; message: string; headings: string[]; choices: { value: Axes; meaning: string }[] }
  | {
      kind: 'unit';
      message: string;
      column: number;
      heading: string;
      choices: { value: string; sample: string }[];
    }
  | { kind: 'shape'; message: string; choices: { value: SectionShape }[] }
  | { kind: 'column'; message: string; field: Field };

export type Recognition =
  | { ok: false; refusal: Refusal }
  | {
      ok: true;
      mapping: Mapping;
      columns: RecognisedColumn[];
      questions: Question[];
      language: HeadingLanguage | null;
      bom: boolean;
      thousandsMarks: string[];
      /** The first rows as they would be read, for the screen. */
      preview: string[][];
    };

/** What `answer` changes of a mapping. */
export type Answer =
  | { kind: 'encoding'; value: Encoding }
  | { kind: 'decimal_mark'; value: DecimalMark }
  | { kind: 'axes'; value: Axes }
  | { kind: 'unit'; column: number; value: string }
  | { kind: 'field'; column: number; value: Field | null }
  | { kind: 'shape'; value: SectionShape | null }
  | { kind: 'flanges'; value: Mapping['flanges'] }
  | { kind: 'density'; value: number }
  | { kind: 'tube_standard'; value: Mapping['tubeStandard'] };

/** Numbers of the rules as the practice knows them; `RULES` has their words. */
export type RuleNumber = number;

/**
 * A change layered over the file, whose bytes stay as they are. Lines are those of the file, columns count from 0. A
 * heading is changed by `set_cell` in its line.
 */
export type Edit =
  | { kind: 'set_cell'; line: number; column: number; value: string }
  | { kind: 'swap_cells'; line: number; columns: readonly [number, number] }
  | { kind: 'shift_row'; line: number; from: number; by: 1 | -1 }
  | { kind: 'drop_row'; line: number }
  | { kind: 'alias'; line: number; of: string }
  /** Every cell of a group is read as its finding suggests; every row of it is left out. */
  | { kind: 'take_every'; group: string }
  | { kind: 'drop_every'; group: string }
  | { kind: 'set_cells_unit'; column: number; lines: readonly number[]; unit: string; factor: number };

/** A change of the mapping: it touches every row. */
export type MappingEdit =
  | { kind: 'set_column_unit'; column: number; unit: string; factor: number }
  | { kind: 'swap_columns'; columns: readonly [number, number] }
  | { kind: 'set_decimal_mark'; value: DecimalMark }
  | { kind: 'set_encoding'; value: Encoding }
  | { kind: 'set_density'; value: number }
  | { kind: 'set_tube_standard'; value: Mapping['tubeStandard'] }
  | { kind: 'leave_out_column'; column: number };

/** Words for the button, and what it does. `every` does the same to all rows of the group. */
export type Fix = { label: string; reach: 'cell' | 'row' | 'column' | 'file'; edit: Edit | MappingEdit };

export type Finding = {
  /** The same for the same fault in every run over the same file: what a reason is kept under. */
  key: string;
  /** Findings of one cause in one column share it. */
  group: string;
  rule: RuleNumber;
  severity: Severity;
  cause: Cause;
  /** Null: of the file, or of a whole column. */
  line: number | null;
  designation: string;
  /** Null: of the row as a whole. */
  column: number | null;
  heading: string;
  /** As printed. */
  read: string;
  /** As it would be printed, with its unit. */
  expected: string | null;
  /** With its numbers: "2·90·7.6 + 162.8·5.0 + 0.858·8² = 22.4 cm²". */
  formula: string | null;
  /** The likely cause in words, and what to do. */
  message: string;
  fixes: Fix[];
};

export type Cause =
  | 'replacement_character'
  | 'byte_order_mark'
  | 'unreadable'
  | 'unanswered'
  | 'ragged_row'
  | 'row_shift'
  | 'summary_row'
  | 'repeated_header'
  | 'remark'
  | 'missing'
  | 'column_missing'
  | 'column_unknown'
  | 'column_repeated'
  | 'axis_letter'
  | 'zero'
  | 'negative'
  | 'not_a_number'
  | 'decimal_mark'
  | 'thousands'
  | 'date'
  | 'scientific'
  | 'zeros_lost'
  | 'hidden_apostrophe'
  | 'formula'
  | 'formula_text'
  | 'control_character'
  | 'look_alike'
  | 'letter_for_digit'
  | 'fraction'
  | 'unit_unknown'
  | 'unit_wrong'
  | 'unit_missing'
  | 'cell_unit'
  | 'shape_unknown'
  | 'power_of_ten'
  | 'inches'
  | 'mass_units'
  | 'column_slip'
  | 'size_column_slip'
  | 'mixed_units'
  | 'size_slip'
  | 'axes_swapped'
  | 'moduli_swapped'
  | 'columns_swapped'
  | 'mass'
  | 'nominal_wall'
  | 'area'
  | 'second_moment'
  | 'gyration'
  | 'elastic_modulus'
  | 'plastic_modulus'
  | 'shape_factor'
  | 'shape_factor_minor'
  | 'torsion'
  | 'warping'
  | 'geometry'
  | 'proportions'
  | 'clear_depth'
  | 'name_mass'
  | 'name_depth'
  | 'series'
  | 'not_rising'
  | 'duplicate'
  | 'duplicate_differs'
  | 'near_duplicate'
  | 'key_clash'
  | 'nominal_size'
  | 'name_size'
  | 'same_file'
  | 'many_changed'
  | 'density'
  | 'tube_standard';

/** What the first reading finds of the file as a whole; JSON, bounded but for the lines. */
export type FileFacts = {
  version: 1;
  /** Rows that are sections, without blank lines, headings and remarks. */
  rowCount: number;
  lineCount: number;
  /** Sum of each column in SI: the file's identity beside its SHA-256. */
  columnSums: { readonly [F in NumberField]?: number };
  /** Findings of the file, its columns, and of rows against each other. */
  findings: Finding[];
  /** How many findings there were of each group, also those that are not listed. */
  counts: Readonly<Record<string, number>>;
  /** What the second reading multiplies a column by, so that one slip is not found in every row again. */
  corrections: { column: number; factor: number; lines: number[] | null }[];
  /** Columns whose contents the second reading exchanges, for the same reason. */
  swaps: [number, number][];
  /** What the rows are judged by where the mapping says otherwise, for the same reason. */
  assumed: Partial<Pick<Mapping, 'density' | 'tubeStandard'>>;
  /** What the names of the sections carry, as most of them do. */
  names: NameFacts;
  /** Lines that no row is made of: refused for a fault above, or said twice. */
  heldLines: number[];
};

/**
 * What most names of the file carry: the mass as their last size, the sizes of tubes and solids; and by family how deep
 * sections usually are over the first size of their name.
 */
export type NameFacts = { mass: boolean; sizes: boolean; depths: Readonly<Record<string, number>> };

/** The row is worked out when it is asked for: a first edition is checked against none. */
export type CheckedRow = { line: number; readonly row: SectionRow };
/** `rowsDone` counts from the start of the file: where to go on from. */
export type CheckBatch = { rowsDone: number; rows: CheckedRow[]; findings: Finding[] };

/** Findings by cause, capped, with their counts; grows batch by batch with `addFindings`. JSON. */
export type Report = { groups: FindingGroup[]; errors: number; warnings: number; notes: number };
export type FindingGroup = {
  group: string;
  rule: RuleNumber;
  severity: Severity;
  cause: Cause;
  column: number | null;
  heading: string;
  count: number;
  /** The first ones; no more than MOST_FINDINGS. */
  findings: Finding[];
};

/** A warning taken as it is: of one finding by its key, or of all by their group. Errors cannot be accepted. */
export type Acceptance = { key: string; reason: string };

/** What an edition keeps of the file it came from, for rule 40. */
export type FileIdentity = Pick<FileFacts, 'rowCount' | 'columnSums'> & {
  sha256: string;
  source: string;
  date: string;
};

/** `encoding`: the answer to an encoding that had to be asked. */
export type RecognisedFile = { name: string; size: number; encoding?: Encoding };
/** What `recognise` is given of a file: so much, or all of it. */
export const RECOGNISED_BYTES = 64 * 1024;
export const MOST_BYTES = 50 * 1024 * 1024;
export const MOST_FINDINGS = 100;

/** Both readings take the file in pieces of any size. A refusal ends the reading. */
export interface SurveyReading {
  push(bytes: Uint8Array): Refusal | null;
  finish(): { ok: true; facts: FileFacts } | { ok: false; refusal: Refusal };
}
export interface RowReading {
  push(bytes: Uint8Array): CheckBatch;
  finish(): CheckBatch;
}

/** What a fix changes. */
export type ImportState = { mapping: Mapping; edits: readonly Edit[] };
