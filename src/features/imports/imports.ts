import { z } from 'zod';
import { SECTION_SHAPES, TUBE_STANDARDS } from '@/engine/section';
import { CHANGE_CLASSES, CONSEQUENCES, LONGEST_SLUG, REVISION_STATES, SLUG } from '@/features/review/review';
import type {
  Answer,
  Delimiter,
  Edit,
  Encoding,
  Field,
  Finding,
  Mapping,
  MappingEdit,
  Question,
  Recognition,
  Report,
} from '@/features/section/import/contract';
import { FIELD_NAMES } from './fields';
import { IMPORT_PHASES, IMPORT_STATES } from './state';

/** What recognition found in a file that can be read, as it is kept. */
export type Recognised = Extract<Recognition, { ok: true }> & {
  /** The supplier whose file of the same headings was read last, and when: the mapping is proposed as it was then. */
  readonly remembered: { readonly supplier: string; readonly at: string } | null;
};

/** Rows of the issued edition that the file has again, and those of them that have other values. */
export interface Against {
  readonly matched: number;
  readonly changed: number;
}

/** A report, with the version of the import that it is of. */
export type CheckedReport = Report & { readonly version: number; readonly against: Against | null };

/** A change that was made, for the record. */
export interface FixRecord {
  readonly label: string;
  /** The findings that it answers, as they were: for the report. */
  readonly findings: readonly Finding[];
  readonly edit: Edit | MappingEdit;
  readonly by: string;
  readonly at: string;
}

const text = (most: number) => z.string().trim().min(1, 'Fill this in.').max(most);

/** What stands beside the section tables in addresses. */
const RESERVED_TABLES: readonly string[] = ['stock', 'build', 'searches', 'spread'];

/** What a librarian says of the table that a file holds. */
export const About = z.strictObject({
  table: z
    .string()
    .max(LONGEST_SLUG)
    .regex(SLUG, 'Use small letters, digits and hyphens.')
    .refine(
      (slug) => !RESERVED_TABLES.includes(slug),
      'This is the address of another page. Choose another for the section table.',
    ),
  /** Of a new table; a table that is there keeps its own. */
  name: text(120),
  reference: text(40),
  supplier: text(120),
  standard: text(200),
  source: text(400).describe('The document that the values are from'),
  catalogue_date: z.iso.date('Give the day of the catalogue.'),
  licence: text(600),
  conventions: z.string().trim().max(600).default(''),
  notes: z.string().trim().max(4000).default(''),
});
export type About = z.output<typeof About>;

const column = z.int().min(0).max(9999);
const ENCODINGS = [
  'utf-8',
  'utf-16le',
  'utf-16be',
  'windows-1252',
  'windows-1251',
  'iso-8859-2',
  'macintosh',
] as const satisfies readonly Encoding[];
const field = z
  .string()
  .refine((name): name is Field => FIELD_NAMES.some((one) => one === name), 'This is no property.');

const AnswerBody = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('encoding'), value: z.enum(ENCODINGS) }),
  z.strictObject({ kind: z.literal('decimal_mark'), value: z.enum(['.', ',']) }),
  z.strictObject({ kind: z.literal('axes'), value: z.enum(['en', 'us', 'british']) }),
  z.strictObject({ kind: z.literal('unit'), column, value: z.string().max(20) }),
  z.strictObject({ kind: z.literal('field'), column, value: field.nullable() }),
  z.strictObject({ kind: z.literal('shape'), value: z.enum(SECTION_SHAPES).nullable() }),
  z.strictObject({ kind: z.literal('flanges'), value: z.enum(['parallel', 'tapered']) }),
  z.strictObject({ kind: z.literal('density'), value: z.number().positive() }),
  z.strictObject({ kind: z.literal('tube_standard'), value: z.enum(TUBE_STANDARDS) }),
]) satisfies z.ZodType<Answer>;

/** What is typed so far: kept whole or not, and asked for whole when the file is to be checked. */
const AboutSoFar = z.strictObject(
  Object.fromEntries(
    Object.keys(About.shape).map((key) => [key, z.string().trim().max(4000).optional()]),
  ) as {
    [K in keyof typeof About.shape]: z.ZodOptional<z.ZodString>;
  },
);

/** PUT …/mapping: answers are put on what was recognised and said before, in order. */
export const SaveMapping = z.strictObject({
  about: AboutSoFar.optional().describe(
    'Which table it is, and where its values are from; left out, it stays',
  ),
  answers: z.array(AnswerBody).max(500).default([]).describe('Where the guesses are wrong, or leave it open'),
  check: z
    .boolean()
    .default(true)
    .describe('Whether the check begins at once, where nothing is left to be said'),
});
export type SaveMapping = z.output<typeof SaveMapping>;

/** POST …/fixes: fixes that the report offers, or a cell as a person types it, or rows that are left out. */
export const Fixes = z.strictObject({
  /** Of each finding, the fix of this place in its list. */
  apply: z
    .array(z.strictObject({ finding: z.string().max(300), fix: z.int().min(0).max(50) }))
    .max(1000)
    .default([]),
  cells: z
    .array(z.strictObject({ line: z.int().positive(), column, value: z.string().max(500) }))
    .max(1000)
    .default([]),
  leave_out: z.array(z.int().positive()).max(100_000).default([]).describe('Lines of the file'),
});
export type Fixes = z.output<typeof Fixes>;

/** POST …/accept: warnings by the key of a finding, or of a group for all of one cause. */
export const Accept = z.strictObject({
  keys: z.array(z.string().min(1).max(300)).min(1).max(1000),
  reason: z
    .string()
    .trim()
    .min(3, 'Say why it is right as it stands, for whoever reads the report.')
    .max(2000),
});
export type Accept = z.output<typeof Accept>;

/** POST …/commit. */
export const Commit = z.strictObject({
  change_note: z.string().trim().min(1, 'Say what is new in this edition and why.').max(2000),
  change_class: z.enum(CHANGE_CLASSES),
  consequence: z.enum(CONSEQUENCES),
});
export type Commit = z.output<typeof Commit>;

const as = <T>() => z.custom<T>(() => true);

/** An import in a list. */
const line = {
  id: z.uuid(),
  state: z.enum(IMPORT_STATES),
  file: z.strictObject({ name: z.string(), bytes: z.int(), sha256: z.string() }),
  supplier: z.string().nullable(),
  table: z.strictObject({ slug: z.string(), name: z.string(), reference: z.string() }).nullable(),
  edition: z.strictObject({ number: z.int(), state: z.enum(REVISION_STATES) }).nullable(),
  by: z.string(),
  created_at: z.iso.datetime(),
  changed_at: z.iso.datetime(),
};
export const ImportLine = z.strictObject(line);
export type ImportLine = z.output<typeof ImportLine>;

const Guess = z.strictObject({
  column: z.int().describe('Its index'),
  field: field.nullable().describe('The property that it holds; null: none, or open'),
  unit: z.string().nullable(),
  factor: z.number().describe('Stands beside the unit: 1000 of 10³ cm⁶'),
  confidence: z.enum(['certain', 'likely', 'unsure']),
  reason: z.string(),
  open: z.array(z.enum(['axes', 'unit'])).describe('What of it only a person can say'),
});

export const ImportView = z.strictObject({
  ...line,
  version: z.int(),
  columns: z
    .array(z.strictObject({ index: z.int(), heading: z.string(), samples: z.array(z.string()) }))
    .describe('As they stand in the file, with their first cells'),
  guesses: z.array(Guess).describe('What each column is proposed to be'),
  source_document: z.strictObject({ name: z.string(), sha256: z.string() }).nullable(),
  recognised: z.strictObject({
    questions: as<Question[]>().describe('What only a person can say'),
    language: z.string().nullable(),
    bom: z.boolean(),
    thousands_marks: z.array(z.string()),
    preview: z.array(z.array(z.string())),
    delimiter: as<Delimiter>(),
    remembered: z.strictObject({ supplier: z.string(), at: z.string() }).nullable(),
  }),
  mapping: as<Mapping>().describe('How the file is read: the guesses, with what was answered put on them'),
  /** Kinds of question that nobody has answered. */
  open_questions: z.array(z.string()),
  about: AboutSoFar,
  phase: z.enum(IMPORT_PHASES).nullable(),
  done: z.int(),
  total: z.int(),
  rows: z.int().nullable(),
  report: as<CheckedReport>().nullable(),
  /** What was put right since the report was made. */
  unchecked: z.boolean(),
  /** Errors, and warnings that nobody has answered for; null before the first check. */
  open: z.int().nullable(),
  acceptances: z.array(
    z.strictObject({ key: z.string(), reason: z.string(), by: z.string(), at: z.iso.datetime() }),
  ),
  fixes: z.array(z.strictObject({ label: z.string(), place: z.string(), by: z.string(), at: z.string() })),
  error: z.string().nullable(),
  /** Another import of the very same file, the newest. */
  twin: z
    .strictObject({ id: z.uuid(), state: z.enum(IMPORT_STATES), created_at: z.iso.datetime() })
    .nullable(),
  /** Whether the reader may act on it. */
  may_act: z.boolean(),
});
export type ImportView = z.output<typeof ImportView>;

export interface TableChoice {
  readonly slug: string;
  readonly name: string;
  readonly reference: string;
}

/** How far the worker is, without the rest. */
export const ImportProgress = ImportView.pick({
  id: true,
  state: true,
  phase: true,
  done: true,
  total: true,
  version: true,
});
export type ImportProgress = z.output<typeof ImportProgress>;

export const ImportReport = ImportView.omit({ fixes: true }).extend({
  fixes: z.array(
    z.strictObject({
      label: z.string(),
      findings: as<Finding[]>().describe('What it answers, as it was found'),
      edit: as<Edit | MappingEdit>(),
      by: z.string(),
      at: z.string(),
    }),
  ),
  /** Rules of the checks that found something. */
  rules: z.array(z.strictObject({ number: z.int(), words: z.string() })),
  /** Lines that no row is made of. */
  left_out: z.array(z.int()),
});
