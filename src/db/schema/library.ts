import { sql } from 'drizzle-orm';
import {
  check,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { CHANGE_CLASSES, CONSEQUENCES, DOCUMENT_KINDS, REVISION_STATES } from '@/features/review/review';
import { ofMember, practice } from './account';
import { id, moment, now, oneOf, practiceId, tenantPolicy } from './tenant';

export const documentKind = pgEnum('document_kind', DOCUMENT_KINDS);
export const revisionState = pgEnum('revision_state', REVISION_STATES);

/** What members depend on and people approve: its name in the library. What it says stands in its revisions. */
export const document = pgTable(
  'document',
  {
    practiceId: practiceId().references(() => practice.id),
    id: id(),
    kind: documentKind().notNull(),
    slug: text().notNull(),
    reference: text().notNull(),
    name: text().notNull(),
    /** To be looked at again by this day: a warning on use from then on, and no new use once the grace is over. */
    reviewBy: date({ mode: 'string' }),
    graceDays: integer().notNull().default(90),
    /** The revision of another document that this one was made from. */
    derivedFromId: uuid(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    uniqueIndex('document_slug').on(table.practiceId, table.kind, table.slug),
    uniqueIndex('document_reference').on(table.practiceId, table.reference),
    check('document_grace_days', sql`${table.graceDays} between 0 and 3650`),
    check('document_slug_kebab', sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$'`),
    tenantPolicy('document'),
  ],
);

/** One state of a document; a section table's are called editions. Frozen by a trigger once it has left the draft. */
export const revision = pgTable(
  'revision',
  {
    practiceId: practiceId(),
    id: id(),
    documentId: uuid().notNull(),
    number: integer().notNull(),
    state: revisionState().notNull().default('draft'),
    body: jsonb().$type<unknown>().notNull(),
    schemaVersion: integer().notNull(),
    engineVersion: text().notNull(),
    sha256: text().notNull(),
    /** Counts the edits of a draft: what an edit says it was made on. */
    version: integer().notNull().default(1),
    authorId: uuid().notNull(),
    reviewerId: uuid(),
    /** Who changed the draft besides its author. */
    editorIds: uuid().array().notNull().default([]),
    changeNote: text().notNull().default(''),
    /** Null while a draft does not say. */
    changeClass: text({ enum: CHANGE_CLASSES }),
    consequence: text({ enum: CONSEQUENCES }),
    createdAt: now(),
    /** A draft that nobody goes on with; saving it takes it up again. */
    abandonedAt: moment(),
    submittedAt: moment(),
    issuedAt: moment(),
    supersededAt: moment(),
    withdrawnAt: moment(),
    withdrawnById: uuid(),
    withdrawalReason: text(),
    withdrawalSeverity: text({ enum: CONSEQUENCES }),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'revision_document_fk',
      columns: [table.practiceId, table.documentId],
      foreignColumns: [document.practiceId, document.id],
    }),
    ofMember('revision_author_fk', table.practiceId, table.authorId),
    ofMember('revision_reviewer_fk', table.practiceId, table.reviewerId),
    ofMember('revision_withdrawn_by_fk', table.practiceId, table.withdrawnById),
    uniqueIndex('revision_number').on(table.practiceId, table.documentId, table.number),
    uniqueIndex('revision_one_issued').on(table.practiceId, table.documentId).where(sql`state = 'issued'`),
    index('revision_state').on(table.practiceId, table.state),
    check('revision_sha256', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
    check('revision_change_class', oneOf(table.changeClass, CHANGE_CLASSES)),
    check('revision_consequence', oneOf(table.consequence, CONSEQUENCES)),
    check(
      'revision_not_issued_by_author',
      sql`${table.state} in ('draft', 'in_review') or (${table.reviewerId} is not null and ${table.reviewerId} <> ${table.authorId} and ${table.reviewerId} <> all (${table.editorIds}))`,
    ),
    check(
      'revision_classed',
      sql`${table.state} = 'draft' or (${table.changeClass} is not null and ${table.consequence} is not null)`,
    ),
    check('revision_abandoned_draft', sql`${table.abandonedAt} is null or ${table.state} = 'draft'`),
    check(
      'revision_issued_with_note',
      sql`${table.state} in ('draft', 'in_review') or length(trim(${table.changeNote})) > 0`,
    ),
    check(
      'revision_withdrawn_with_reason',
      sql`(${table.state} = 'withdrawn') = (${table.withdrawalReason} is not null and ${table.withdrawalSeverity} is not null and ${table.withdrawnById} is not null)`,
    ),
    tenantPolicy('revision'),
  ],
);
