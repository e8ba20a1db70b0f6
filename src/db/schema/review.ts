import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { RECALL_DECISIONS, REQUEST_KINDS, REQUEST_STATES, RUN_STATES } from '@/features/review/review';
import { ofMember } from './account';
import { document, revision } from './library';
import { member } from './member';
import { id, moment, now, oneOf, practiceId, tenantPolicy } from './tenant';

/** What a reviewer says about a part of a revision; a JSON Pointer names the part, '' the whole. */
export const revisionComment = pgTable(
  'revision_comment',
  {
    practiceId: practiceId(),
    id: id(),
    revisionId: uuid().notNull(),
    /** The comment that this one answers. */
    parentId: uuid(),
    pointer: text().notNull(),
    body: text().notNull(),
    authorId: uuid().notNull(),
    createdAt: now(),
    resolvedAt: moment(),
    resolvedById: uuid(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'revision_comment_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      name: 'revision_comment_parent_fk',
      columns: [table.practiceId, table.parentId],
      foreignColumns: [table.practiceId, table.id],
    }),
    ofMember('revision_comment_author_fk', table.practiceId, table.authorId),
    ofMember('revision_comment_resolved_by_fk', table.practiceId, table.resolvedById),
    index('revision_comment_revision').on(table.practiceId, table.revisionId, table.createdAt),
    check('revision_comment_body', sql`length(trim(${table.body})) between 1 and 4000`),
    tenantPolicy('revision_comment'),
  ],
);

/** A librarian of the practice has compared what a revision says with its printed source. */
export const revisionConfirmation = pgTable(
  'revision_confirmation',
  {
    practiceId: practiceId(),
    revisionId: uuid().notNull(),
    personId: uuid().notNull(),
    note: text().notNull().default(''),
    at: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.revisionId] }),
    foreignKey({
      name: 'revision_confirmation_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    ofMember('revision_confirmation_person_fk', table.practiceId, table.personId),
    tenantPolicy('revision_confirmation'),
  ],
);

/** The proof of a revision as it stood (`sha256`): its cases, the sweep of its parameter box, limits and symmetries. */
export const proofRun = pgTable(
  'proof_run',
  {
    practiceId: practiceId(),
    id: id(),
    revisionId: uuid().notNull(),
    sha256: text().notNull(),
    engineVersion: text().notNull(),
    state: text({ enum: RUN_STATES }).notNull().default('queued'),
    done: integer().notNull().default(0),
    total: integer().notNull().default(0),
    /** Null until it is finished. */
    passed: boolean(),
    report: jsonb().$type<unknown>(),
    error: text(),
    askedById: uuid().notNull(),
    createdAt: now(),
    finishedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'proof_run_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    ofMember('proof_run_asked_by_fk', table.practiceId, table.askedById),
    index('proof_run_revision').on(table.practiceId, table.revisionId, table.createdAt),
    check('proof_run_state', oneOf(table.state, RUN_STATES)),
    tenantPolicy('proof_run'),
  ],
);

/** Every member that pins `againstId`, evaluated with `revisionId` in its place. */
export const impactRun = pgTable(
  'impact_run',
  {
    practiceId: practiceId(),
    id: id(),
    revisionId: uuid().notNull(),
    sha256: text().notNull(),
    /** The issued revision that members pin. */
    againstId: uuid().notNull(),
    engineVersion: text().notNull(),
    state: text({ enum: RUN_STATES }).notNull().default('queued'),
    done: integer().notNull().default(0),
    total: integer().notNull().default(0),
    error: text(),
    askedById: uuid().notNull(),
    createdAt: now(),
    finishedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'impact_run_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      name: 'impact_run_against_fk',
      columns: [table.practiceId, table.againstId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    ofMember('impact_run_asked_by_fk', table.practiceId, table.askedById),
    index('impact_run_revision').on(table.practiceId, table.revisionId, table.createdAt),
    check('impact_run_state', oneOf(table.state, RUN_STATES)),
    tenantPolicy('impact_run'),
  ],
);

/** What a run found of one member: which results change, which checks flip. */
export const impactMember = pgTable(
  'impact_member',
  {
    practiceId: practiceId(),
    runId: uuid().notNull(),
    memberId: uuid().notNull(),
    /** Checks that pass with one revision and fail with the other. */
    flips: integer().notNull(),
    /** Largest relative change of any result. */
    largestChange: doublePrecision().notNull(),
    report: jsonb().$type<unknown>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.runId, table.memberId] }),
    foreignKey({
      name: 'impact_member_run_fk',
      columns: [table.practiceId, table.runId],
      foreignColumns: [impactRun.practiceId, impactRun.id],
    }),
    foreignKey({
      name: 'impact_member_member_fk',
      columns: [table.practiceId, table.memberId],
      foreignColumns: [member.practiceId, member.id],
    }),
    index('impact_member_rank').on(table.practiceId, table.runId, table.flips, table.largestChange),
    tenantPolicy('impact_member'),
  ],
);

/** An open case on a withdrawn revision, until every use of it has a decision by name. */
export const recall = pgTable(
  'recall',
  {
    practiceId: practiceId(),
    id: id(),
    revisionId: uuid().notNull(),
    openedById: uuid().notNull(),
    openedAt: now(),
    closedById: uuid(),
    closedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'recall_revision_fk',
      columns: [table.practiceId, table.revisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    ofMember('recall_opened_by_fk', table.practiceId, table.openedById),
    ofMember('recall_closed_by_fk', table.practiceId, table.closedById),
    uniqueIndex('recall_revision').on(table.practiceId, table.revisionId),
    tenantPolicy('recall'),
  ],
);

/** A member that pinned the withdrawn revision when it was recalled, and what its owner decided. */
export const recallUse = pgTable(
  'recall_use',
  {
    practiceId: practiceId(),
    recallId: uuid().notNull(),
    memberId: uuid().notNull(),
    ownerId: uuid().notNull(),
    decision: text({ enum: RECALL_DECISIONS }),
    note: text().notNull().default(''),
    decidedById: uuid(),
    decidedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.recallId, table.memberId] }),
    foreignKey({
      name: 'recall_use_recall_fk',
      columns: [table.practiceId, table.recallId],
      foreignColumns: [recall.practiceId, recall.id],
    }),
    foreignKey({
      name: 'recall_use_member_fk',
      columns: [table.practiceId, table.memberId],
      foreignColumns: [member.practiceId, member.id],
    }),
    ofMember('recall_use_owner_fk', table.practiceId, table.ownerId),
    ofMember('recall_use_decided_by_fk', table.practiceId, table.decidedById),
    index('recall_use_owner').on(table.practiceId, table.ownerId),
    index('recall_use_member').on(table.practiceId, table.memberId),
    check(
      'recall_use_decision',
      sql`${table.decision} is null or ${oneOf(table.decision, RECALL_DECISIONS)}`,
    ),
    check(
      'recall_use_decided_by_name',
      sql`num_nonnulls(${table.decision}, ${table.decidedById}, ${table.decidedAt}) in (0, 3)`,
    ),
    tenantPolicy('recall_use'),
  ],
);

/** Who is told of every step of a document. */
export const watch = pgTable(
  'watch',
  {
    practiceId: practiceId(),
    documentId: uuid().notNull(),
    personId: uuid().notNull(),
    since: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.documentId, table.personId] }),
    foreignKey({
      name: 'watch_document_fk',
      columns: [table.practiceId, table.documentId],
      foreignColumns: [document.practiceId, document.id],
    }),
    ofMember('watch_person_fk', table.practiceId, table.personId),
    index('watch_person').on(table.practiceId, table.personId),
    tenantPolicy('watch'),
  ],
);

/** What somebody asks of the librarians: a template that is missing, or a fault in what is there. */
export const request = pgTable(
  'request',
  {
    practiceId: practiceId(),
    id: id(),
    number: integer().notNull(),
    kind: text({ enum: REQUEST_KINDS }).notNull(),
    title: text().notNull(),
    body: text().notNull().default(''),
    /** Where it was raised: the address, and what stood on the screen. */
    context: jsonb().$type<unknown>().notNull(),
    documentId: uuid(),
    state: text({ enum: REQUEST_STATES }).notNull().default('open'),
    answer: text().notNull().default(''),
    version: integer().notNull().default(1),
    raisedById: uuid().notNull(),
    createdAt: now(),
    handledById: uuid(),
    changedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'request_document_fk',
      columns: [table.practiceId, table.documentId],
      foreignColumns: [document.practiceId, document.id],
    }),
    ofMember('request_raised_by_fk', table.practiceId, table.raisedById),
    ofMember('request_handled_by_fk', table.practiceId, table.handledById),
    uniqueIndex('request_number').on(table.practiceId, table.number),
    index('request_state').on(table.practiceId, table.state, table.createdAt),
    check('request_kind', oneOf(table.kind, REQUEST_KINDS)),
    check('request_state_known', oneOf(table.state, REQUEST_STATES)),
    tenantPolicy('request'),
  ],
);
