import { sql } from 'drizzle-orm';
import {
  check,
  foreignKey,
  index,
  integer,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { JOB_ACCESS, JOB_STATUSES } from '@/features/job/terms';
import { ofMember, practice } from './account';
import {
  currentPerson,
  currentPractice,
  id,
  now,
  oneOf,
  practiceId,
  tenantPolicy,
  UNIT_SYSTEM_NAMES,
  web,
} from './tenant';

/** Uncorrelated, so that it is asked once in a statement and not for every job. */
const seesEveryJob = sql`(select exists (select from membership where membership.practice_id = ${currentPractice}
  and membership.person_id = ${currentPerson} and membership.active and membership.roles && array['principal', 'administrator']))`;

export const job = pgTable(
  'job',
  {
    practiceId: practiceId().references(() => practice.id),
    id: id(),
    number: text().notNull(),
    name: text().notNull(),
    client: text().notNull().default(''),
    area: text().notNull().default(''),
    basis: text().notNull().default(''),
    unitSystem: text({ enum: UNIT_SYSTEM_NAMES }).notNull().default('metric'),
    access: text({ enum: JOB_ACCESS }).notNull().default('practice'),
    status: text({ enum: JOB_STATUSES }).notNull().default('open'),
    version: integer().notNull().default(1),
    createdById: uuid().notNull(),
    createdAt: now(),
    changedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('job_created_by_fk', table.practiceId, table.createdById),
    uniqueIndex('job_number').on(table.practiceId, table.number),
    check('job_unit_system', oneOf(table.unitSystem, UNIT_SYSTEM_NAMES)),
    check('job_access', oneOf(table.access, JOB_ACCESS)),
    check('job_status', oneOf(table.status, JOB_STATUSES)),
    pgPolicy('job_open_to_person', {
      for: 'all',
      to: web,
      using: sql`practice_id = ${currentPractice} and (access = 'practice' or created_by_id = ${currentPerson} or ${seesEveryJob}
  or exists (select from job_person where job_person.practice_id = job.practice_id and job_person.job_id = job.id and job_person.person_id = ${currentPerson}))`,
      withCheck: sql`practice_id = ${currentPractice}`,
    }),
  ],
);

/** The named people of a job. */
export const jobPerson = pgTable(
  'job_person',
  {
    practiceId: practiceId(),
    jobId: uuid().notNull(),
    personId: uuid().notNull(),
    addedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.jobId, table.personId] }),
    foreignKey({
      name: 'job_person_job_fk',
      columns: [table.practiceId, table.jobId],
      foreignColumns: [job.practiceId, job.id],
    }),
    ofMember('job_person_person_fk', table.practiceId, table.personId),
    index('job_person_person').on(table.practiceId, table.personId),
    tenantPolicy('job_person'),
  ],
);
