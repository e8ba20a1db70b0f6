import { z } from 'zod';

export const ROW_CHANGES = ['changed', 'added', 'removed'] as const;
export type RowChange = (typeof ROW_CHANGES)[number];
export const isRowChange = (word: string): word is RowChange => ROW_CHANGES.some((one) => one === word);

/** The columns that are compared, as the search names them. */
export const COMPARED = [
  'mass_kg_m',
  'depth_mm',
  'width_mm',
  'area_cm2',
  'i_major_cm4',
  'i_minor_cm4',
  'w_el_cm3',
  'w_pl_cm3',
  'j_cm4',
  'iw_cm6',
] as const;
export type ComparedColumn = (typeof COMPARED)[number];

const value = z.number().nullable();

const RowDifference = z.strictObject({
  designation: z.string(),
  what: z.enum(ROW_CHANGES),
  values: z.array(
    z.strictObject({
      column: z.enum(COMPARED),
      from: value,
      to: value,
      /** (to − from)/from; null where there is none before or after. */
      share: value,
    }),
  ),
  /** Thickness or radius differs as well. */
  dimensions: z.boolean(),
  /** Members of the older edition that use it, as far as they are open to the reader. */
  members: z.int(),
});
export type RowDifference = z.output<typeof RowDifference>;

/** What an edition adds, removes and changes against another one of the table. */
export const EditionChangesView = z.strictObject({
  table: z.string(),
  from: z.int(),
  to: z.int(),
  counts: z.strictObject({ changed: z.int(), added: z.int(), removed: z.int(), same: z.int() }),
  what: z.enum(ROW_CHANGES),
  items: z.array(RowDifference),
  next: z.string().nullable(),
  total: z.int(),
});
export type EditionChangesView = z.output<typeof EditionChangesView>;

export type Compared = Readonly<Record<ComparedColumn, number | null>>;

const ROUNDING = 1e-9; // of the value: what binary leaves of a column that was written twice

/** The columns in which two rows differ, as the comparison of whole editions finds them. */
export const valuesChanged = (older: Compared, newer: Compared): RowDifference['values'] =>
  COMPARED.flatMap((column): RowDifference['values'] => {
    const [from, to] = [older[column], newer[column]];
    if (from === to) return [];
    if (from === null || to === null) return [{ column, from, to, share: null }];
    if (Math.abs(to - from) <= ROUNDING * Math.abs(from)) return [];
    return [{ column, from, to, share: from === 0 ? null : (to - from) / from }];
  });
