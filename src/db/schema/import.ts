import { sql } from 'drizzle-orm';
import {
  check,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { IMPORT_PHASES, IMPORT_STATES } from '@/features/imports/state';
import { ofMember } from './account';
import { revision } from './library';
import { id, moment, now, oneOf, practiceId, tenantPolicy } from './tenant';

/** A file of a section table on its way to be an edition. Once it is one, nothing of it changes. */
export const sectionImport = pgTable(
  'section_import',
  {
    practiceId: practiceId(),
    id: id(),
    state: text({ enum: IMPORT_STATES }).notNull().default('mapping'),
    /** Where the file lies in the object store. */
    fileKey: text().notNull(),
    fileName: text().notNull(),
    bytes: integer().notNull(),
    sha256: text().notNull(),
    /** The document that the file was made from, where it was brought along. */
    sourceKey: text(),
    sourceName: text(),
    sourceSha256: text(),
    /** What its beginning shows: delimiter, decimal mark, encoding, headings, samples. */
    recognition: jsonb().$type<unknown>().notNull(),
    /** What the librarian says of the table: number, source, catalogue date, licence. Null until said. */
    about: jsonb().$type<unknown>(),
    /** What the librarian says of the columns. Null until said. */
    mapping: jsonb().$type<unknown>(),
    /** Changes layered over the file, whose bytes stay as they are. */
    edits: jsonb().$type<unknown>().notNull().default([]),
    /** What was put right, in order, each with who and when: for the report. */
    fixes: jsonb().$type<unknown>().notNull().default([]),
    phase: text({ enum: IMPORT_PHASES }),
    /** Of the phase: bytes read, or rows; and of how many. */
    done: integer().notNull().default(0),
    total: integer().notNull().default(0),
    /** What the first reading found of the file as a whole. */
    facts: jsonb().$type<unknown>(),
    /** What was found, by cause. */
    report: jsonb().$type<unknown>(),
    error: text(),
    /** Counts what was said of it; the worker drops what it found for an older one. */
    version: integer().notNull().default(1),
    /** The draft that its rows go into. */
    revisionId: uuid(),
    createdById: uuid().notNull(),
    createdAt: now(),
    changedAt: now(),
    finishedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'section_import_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    ofMember('section_import_created_by_fk', table.practiceId, table.createdById),
    index('section_import_newest').on(table.practiceId, table.createdAt),
    index('section_import_revision').on(table.practiceId, table.revisionId),
    index('section_import_file').on(table.practiceId, table.sha256),
    check('section_import_state', oneOf(table.state, IMPORT_STATES)),
    check('section_import_phase', sql`${table.phase} is null or ${oneOf(table.phase, IMPORT_PHASES)}`),
    check('section_import_sha256', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
    check('section_import_key', sql`starts_with(${table.fileKey}, ${table.practiceId}::text || '/')`),
    check(
      'section_import_committed_edition',
      sql`${table.state} <> 'committed' or ${table.revisionId} is not null`,
    ),
    tenantPolicy('section_import'),
  ],
);

/** A warning, or all of one cause, that somebody answers for, with the reason. */
export const importAcceptance = pgTable(
  'import_acceptance',
  {
    practiceId: practiceId(),
    importId: uuid().notNull(),
    /** Of the finding, or of its group. */
    key: text().notNull(),
    reason: text().notNull(),
    personId: uuid().notNull(),
    at: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.importId, table.key] }),
    foreignKey({
      name: 'import_acceptance_import_fk',
      columns: [table.practiceId, table.importId],
      foreignColumns: [sectionImport.practiceId, sectionImport.id],
    }),
    ofMember('import_acceptance_person_fk', table.practiceId, table.personId),
    check('import_acceptance_reason', sql`length(trim(${table.reason})) between 3 and 2000`),
    tenantPolicy('import_acceptance'),
  ],
);

/** How a supplier's files are read: what was last said of columns of these headings. */
export const importMapping = pgTable(
  'import_mapping',
  {
    practiceId: practiceId(),
    /** The supplier's name in small letters. */
    supplier: text().notNull(),
    /** SHA-256 of the headings. */
    headings: text().notNull(),
    mapping: jsonb().$type<unknown>().notNull(),
    about: jsonb().$type<unknown>().notNull(),
    personId: uuid().notNull(),
    usedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.supplier, table.headings] }),
    ofMember('import_mapping_person_fk', table.practiceId, table.personId),
    index('import_mapping_headings').on(table.practiceId, table.headings, table.usedAt),
    tenantPolicy('import_mapping'),
  ],
);
