import { sql } from 'drizzle-orm';
import {
  check,
  foreignKey,
  index,
  integer,
  jsonb,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { MEMBER_STATUSES } from '@/features/member/terms';
import { ofMember } from './account';
import { job } from './job';
import { revision } from './library';
import { section } from './section';
import { currentPractice, id, moment, now, oneOf, practiceId, web } from './tenant';

/** A beam of a job. It pins revisions and a section row, never names, and keeps what was typed beside what was found. */
export const member = pgTable(
  'member',
  {
    practiceId: practiceId(),
    id: id(),
    jobId: uuid().notNull(),
    mark: text().notNull(),
    title: text().notNull().default(''),
    purpose: text().notNull().default(''),
    templateRevisionId: uuid().notNull(),
    sectionId: uuid(),
    material: text(),
    /** The set that the material is read from; null in members older than the sets. */
    materialRevisionId: uuid(),
    criteriaRevisionId: uuid(),
    /** The combinations that the criteria are held against; null where the criteria have their own. */
    combinationRevisionId: uuid(),
    parameters: jsonb().$type<unknown>().notNull(),
    settings: jsonb().$type<unknown>().notNull(),
    status: text({ enum: MEMBER_STATUSES }).notNull().default('draft'),
    version: integer().notNull().default(1),
    result: jsonb().$type<unknown>(),
    fingerprint: text(),
    engineVersion: text(),
    evaluatedAt: moment(),
    evaluatedById: uuid(),
    createdById: uuid().notNull(),
    createdAt: now(),
    changedById: uuid().notNull(),
    changedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    foreignKey({
      name: 'member_job_fk',
      columns: [table.practiceId, table.jobId],
      foreignColumns: [job.practiceId, job.id],
    }),
    foreignKey({
      name: 'member_template_fk',
      columns: [table.practiceId, table.templateRevisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      name: 'member_criteria_fk',
      columns: [table.practiceId, table.criteriaRevisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      name: 'member_material_fk',
      columns: [table.practiceId, table.materialRevisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      name: 'member_combination_fk',
      columns: [table.practiceId, table.combinationRevisionId],
      foreignColumns: [revision.practiceId, revision.id],
    }),
    foreignKey({
      columns: [table.practiceId, table.sectionId],
      foreignColumns: [section.practiceId, section.id],
    }),
    ofMember('member_created_by_fk', table.practiceId, table.createdById),
    ofMember('member_changed_by_fk', table.practiceId, table.changedById),
    ofMember('member_evaluated_by_fk', table.practiceId, table.evaluatedById),
    uniqueIndex('member_mark').on(table.practiceId, table.jobId, table.mark),
    index('member_template').on(table.practiceId, table.templateRevisionId),
    index('member_section').on(table.practiceId, table.sectionId),
    index('member_criteria').on(table.practiceId, table.criteriaRevisionId),
    index('member_material').on(table.practiceId, table.materialRevisionId),
    index('member_combination').on(table.practiceId, table.combinationRevisionId),
    check('member_status', oneOf(table.status, MEMBER_STATUSES)),
    check('member_fingerprint', sql`${table.fingerprint} is null or ${table.fingerprint} ~ '^[0-9a-f]{64}$'`),
    check(
      'member_result_whole',
      sql`num_nonnulls(${table.result}, ${table.fingerprint}, ${table.engineVersion}, ${table.evaluatedAt}, ${table.evaluatedById}) in (0, 5)`,
    ),
    // The job's own policy applies inside the subquery: who may not see the job sees none of its members.
    pgPolicy('member_of_open_job', {
      for: 'all',
      to: web,
      using: sql`practice_id = ${currentPractice} and exists (select from job where job.practice_id = member.practice_id and job.id = member.job_id)`,
    }),
  ],
);
