import { z } from 'zod';
import { MEASURES } from './query';

/** The measures that a person's schedules of sections show, in their order; null: the usual ones. */
export const ColumnChoice = z.strictObject({
  columns: z
    .array(z.enum(MEASURES))
    .min(1)
    .refine((columns) => new Set(columns).size === columns.length, 'Name each measure once.')
    .readonly()
    .nullable(),
});
export type ColumnChoice = z.output<typeof ColumnChoice>;
