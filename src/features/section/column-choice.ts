import { z } from 'zod';
import { SECTION_MEASURES, type SectionMeasure } from './query';

const measure = z.enum(Object.keys(SECTION_MEASURES) as [SectionMeasure, ...SectionMeasure[]]);

/** The measures that a person's schedules of sections show, in their order; null: the usual ones. */
export const ColumnChoice = z.strictObject({
  columns: z
    .array(measure)
    .min(1)
    .refine((columns) => new Set(columns).size === columns.length, 'Name each measure once.')
    .readonly()
    .nullable(),
});
export type ColumnChoice = z.output<typeof ColumnChoice>;
