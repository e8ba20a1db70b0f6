import { z } from 'zod';

/** A is the cheapest; what a band costs is the practice's own scale. */
export const PRICE_BANDS = ['A', 'B', 'C', 'D', 'E'] as const;

/** In m. Nothing longer is carried on a road. */
export const LENGTH = { least: 0.5, most: 60 } as const;
export const MOST_LENGTHS = 20;
export const MOST_LEAD_DAYS = 730;
export const MOST_NOTE = 200;

/** From this age on a stock list is said to be old wherever it is used. */
export const OLD_AFTER_DAYS = 90;

/** What a supplier holds of one section. */
export const Holding = z.strictObject({
  /** In m, the shortest first; none where the supplier did not say. */
  lengths_m: z
    .array(z.number().min(LENGTH.least).max(LENGTH.most))
    .max(MOST_LENGTHS)
    .refine((lengths) => lengths.every((one, at) => at === 0 || one > (lengths[at - 1] ?? 0)), {
      error: 'Give each length once, the shortest first.',
    }),
  /** 0: off the shelf. Null: not said. */
  lead_time_days: z.int().min(0).max(MOST_LEAD_DAYS).nullable(),
  price_band: z.enum(PRICE_BANDS).nullable(),
  note: z.string().trim().max(MOST_NOTE),
});
export type Holding = z.output<typeof Holding>;

/** The stock of a section as the list of sections gives it: `supplier` is the address of the stock list. */
export const sectionStockSchema = Holding.pick({
  lengths_m: true,
  lead_time_days: true,
  price_band: true,
}).extend({ supplier: z.string() });
export type SectionStock = z.output<typeof sectionStockSchema>;

/** A supplier, and how old what is said of its stock is. */
export interface Supplier {
  readonly slug: string;
  readonly name: string;
  /** Day, as 2026-11-19. */
  readonly asOf: string;
}

export const StockLine = Holding.extend({
  id: z.uuid(),
  table: z.string(),
  designation: z.string(),
  /** False: no issued edition of the table has the section any more. */
  in_library: z.boolean(),
});
export type StockLine = z.output<typeof StockLine>;

const supplier = z
  .string()
  .trim()
  .min(1, 'Give the supplier’s name.')
  .max(100, 'A name has at most 100 characters.')
  .regex(/[a-z0-9]/i, 'Give the supplier’s name in letters.');
const listNote = z.string().trim().max(2000, 'A note has at most 2000 characters.');
const asOf = z.iso.date('Give the day that the stock was true of, as 2026-11-19.');

/** POST /api/v1/stock. */
export const NewStockList = z.strictObject({ supplier, as_of: asOf, note: listNote.default('') });
export type NewStockList = z.output<typeof NewStockList>;

/** PATCH /api/v1/stock/{supplier}: what is left out stays. */
export const StockListChange = z
  .strictObject({
    supplier: supplier.optional(),
    as_of: asOf.optional(),
    note: listNote.optional(),
  })
  .refine((change) => Object.keys(change).length > 0, { error: 'Say what changes.' });
export type StockListChange = z.output<typeof StockListChange>;

export const StockListView = z.strictObject({
  slug: z.string(),
  supplier: z.string(),
  note: z.string(),
  as_of: z.iso.date(),
  lines: z.int(),
  version: z.int(),
  changed_by: z.string(),
  changed_at: z.iso.datetime(),
});
export type StockListView = z.output<typeof StockListView>;

/** A line that is added by hand; the table may be left out where only one has the section. */
export const NewStockLine = Holding.extend({
  designation: z.string().trim().min(1, 'Give the designation.').max(100),
  table: z.string().trim().max(100).optional(),
});
export type NewStockLine = z.output<typeof NewStockLine>;

/** The decimal mark of a CSV's lengths, as a query names it. Null: a comma may be meant either way, and is refused. */
export const MARKS = { none: null, point: '.', comma: ',' } as const;
export type MarkName = keyof typeof MARKS;

/** Of POST …/check and PUT …/lines: without a mark, the CSV's own is recognised. */
export const readingQuery = { mark: z.enum(['none', 'point', 'comma']).optional() };

export function markNameOf(mark: '.' | ',' | null): MarkName {
  if (mark === null) return 'none';
  return mark === '.' ? 'point' : 'comma';
}

const named = z.strictObject({ table: z.string(), designation: z.string() });

/** What a CSV of lines comes to, with nothing kept of it. */
export const StockCheck = z.strictObject({
  rows: z.int(),
  /** Rows that can be kept as they are. */
  good: z.int(),
  fault_count: z.int(),
  /** The first of them. */
  faults: z.array(
    z.strictObject({
      /** Of the file, from 1. */
      line: z.int(),
      field: z.string(),
      value: z.string(),
      code: z.string(),
      message: z.string(),
      /** Sections that may be meant. */
      suggestions: z.array(named),
    }),
  ),
  read_as: z.strictObject({
    delimiter: z.string(),
    /** Null: the file does not tell. */
    decimal_mark: z.enum(['.', ',']).nullable(),
    encoding: z.string(),
    length_unit: z.string(),
    /** Null: left out. */
    columns: z.array(z.strictObject({ heading: z.string(), field: z.string().nullable() })),
  }),
});
export type StockCheck = z.output<typeof StockCheck>;

const DAY_MS = 86_400_000;

/** Whole days from a day to another, both as 2026-11-19. */
export const daysBetween = (from: string, to: string): number =>
  Math.round((Date.parse(to) - Date.parse(from)) / DAY_MS);

export const isOld = (asOf: string, today: string): boolean => daysBetween(asOf, today) > OLD_AFTER_DAYS;

/** A slug of a supplier's name, as it stands in addresses. */
export const slugOf = (name: string): string =>
  name
    .normalize('NFKD')
    .toLowerCase()
    .replaceAll(/\p{M}/gu, '')
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replaceAll(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-$/, '');
