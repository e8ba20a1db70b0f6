import { bigint, index, jsonb, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import { practice } from './account';
import { now, practiceId, tenantPolicy } from './tenant';

/** What happened, for ever: each row's hash covers the row before it. */
export const auditEvent = pgTable(
  'audit_event',
  {
    practiceId: practiceId().references(() => practice.id),
    sequence: bigint({ mode: 'number' }).notNull(),
    // milliseconds, as the hash has them
    at: timestamp({ withTimezone: true, precision: 3 }).notNull(),
    actorId: uuid(),
    action: text().notNull(),
    subjectKind: text().notNull(),
    subjectId: text().notNull(),
    data: jsonb().$type<unknown>().notNull(),
    previousHash: text().notNull(),
    hash: text().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.sequence] }),
    index('audit_event_subject').on(table.practiceId, table.subjectKind, table.subjectId, table.sequence),
    tenantPolicy('audit_event'),
  ],
);

/** How far the chain was last found whole. Rows cut off its end show against this. */
export const auditCheck = pgTable(
  'audit_check',
  {
    practiceId: practiceId()
      .primaryKey()
      .references(() => practice.id),
    checkedAt: now(),
    sequence: bigint({ mode: 'number' }).notNull(),
    hash: text().notNull(),
    fault: text(),
  },
  () => [tenantPolicy('audit_check')],
);
