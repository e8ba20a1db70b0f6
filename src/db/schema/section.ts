import { sql } from 'drizzle-orm';
import {
  check,
  doublePrecision,
  foreignKey,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { SECTION_SHAPES, type SectionDimensions } from '@/engine/section';
import { revision } from './library';
import { id, oneOf, practiceId, tenantPolicy } from './tenant';

/**
 * A row of one edition of a section table. Written while the edition is a draft, frozen with it. Searches do not come here:
 * features/section/register holds the issued editions in memory.
 */
export const section = pgTable(
  'section',
  {
    practiceId: practiceId(),
    id: id(),
    revisionId: uuid().notNull(),
    tableSlug: text().notNull(),
    designation: text().notNull(),
    /** The designation as it is searched for: one spelling for however it is typed. */
    designationKey: text().notNull(),
    /** Its letters and its sizes, by which designations are sorted. */
    family: text().generatedAlwaysAs(sql`substring(designation_key from '^[a-z]*')`),
    sizes: doublePrecision()
      .array()
      .generatedAlwaysAs(sql`string_to_array(regexp_replace(designation_key, '^[a-z]*', ''), 'x')::float8[]`),
    printed: text().notNull(),
    shape: text({ enum: SECTION_SHAPES }).notNull(),
    depthMm: doublePrecision().notNull(),
    widthMm: doublePrecision().notNull(),
    massKgM: doublePrecision().notNull(),
    areaCm2: doublePrecision('area_cm2').notNull(),
    iMajorCm4: doublePrecision('i_major_cm4').notNull(),
    iMinorCm4: doublePrecision('i_minor_cm4').notNull(),
    wElCm3: doublePrecision('w_el_cm3').notNull(),
    wElMinorCm3: doublePrecision('w_el_minor_cm3'),
    wPlCm3: doublePrecision('w_pl_cm3'),
    wPlMinorCm3: doublePrecision('w_pl_minor_cm3'),
    jCm4: doublePrecision('j_cm4'),
    iwCm6: doublePrecision('iw_cm6'),
    /** Names of the columns that were computed from the dimensions, not supplied. */
    computed: text().array().notNull().default([]),
    dimensions: jsonb().$type<SectionDimensions>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'section_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    uniqueIndex('section_designation').on(table.practiceId, table.revisionId, table.designationKey),
    check('section_shape', oneOf(table.shape, SECTION_SHAPES)),
    tenantPolicy('section'),
  ],
);
