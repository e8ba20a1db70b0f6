import { sql } from 'drizzle-orm';
import {
  check,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { MAIL_MODES, MAIL_STATES, NOTICE_KINDS } from '@/features/notice/terms';
import { ofMember } from './account';
import { id, moment, now, oneOf, practiceId, tenantPolicy } from './tenant';

/** Something that a person is told in the app. `dedupe` names the event: nobody is told of one twice. */
export const notice = pgTable(
  'notice',
  {
    practiceId: practiceId(),
    id: id(),
    personId: uuid().notNull(),
    kind: text({ enum: NOTICE_KINDS }).notNull(),
    title: text().notNull(),
    detail: text().notNull().default(''),
    /** Path of the page that it is about. */
    href: text().notNull(),
    dedupe: text().notNull(),
    createdAt: now(),
    readAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('notice_person_fk', table.practiceId, table.personId),
    uniqueIndex('notice_dedupe').on(table.practiceId, table.personId, table.dedupe),
    index('notice_newest').on(table.practiceId, table.personId, table.createdAt),
    index('notice_unread').on(table.practiceId, table.personId).where(sql`${table.readAt} is null`),
    check('notice_kind', oneOf(table.kind, NOTICE_KINDS)),
    tenantPolicy('notice'),
  ],
);

/** The outbox: a message is written in the transaction of what it tells of, and sent by a worker afterwards. */
export const mail = pgTable(
  'mail',
  {
    practiceId: practiceId(),
    id: id(),
    personId: uuid().notNull(),
    kind: text({ enum: NOTICE_KINDS }).notNull(),
    /** What the message says; its words are made when it is sent. */
    data: jsonb().$type<unknown>().notNull(),
    mode: text({ enum: MAIL_MODES }).notNull(),
    dedupe: text().notNull(),
    state: text({ enum: MAIL_STATES }).notNull().default('waiting'),
    attempts: integer().notNull().default(0),
    error: text(),
    createdAt: now(),
    /** Not before then: a digest's hour, or a while after an attempt that failed. */
    dueAt: now(),
    sentAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('mail_person_fk', table.practiceId, table.personId),
    uniqueIndex('mail_dedupe').on(table.practiceId, table.personId, table.dedupe),
    index('mail_due').on(table.practiceId, table.state, table.dueAt),
    index('mail_unsent').on(table.dueAt).where(sql`${table.state} in ('waiting', 'sending')`),
    check('mail_kind', oneOf(table.kind, NOTICE_KINDS)),
    check('mail_mode', oneOf(table.mode, MAIL_MODES)),
    check('mail_state', oneOf(table.state, MAIL_STATES)),
    check('mail_sent', sql`(${table.state} = 'sent') = (${table.sentAt} is not null)`),
    tenantPolicy('mail'),
  ],
);

/** How a person takes the e-mails of a kind; without a row, as the kind has it. A recall is never muted. */
export const noticePreference = pgTable(
  'notice_preference',
  {
    practiceId: practiceId(),
    personId: uuid().notNull(),
    kind: text({ enum: NOTICE_KINDS }).notNull(),
    mode: text({ enum: [...MAIL_MODES, 'none'] }).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.personId, table.kind] }),
    ofMember('notice_preference_person_fk', table.practiceId, table.personId),
    check('notice_preference_kind', oneOf(table.kind, NOTICE_KINDS)),
    check('notice_preference_not_recall', sql`${table.kind} <> 'recall'`),
    check('notice_preference_mode', oneOf(table.mode, [...MAIL_MODES, 'none'])),
    tenantPolicy('notice_preference'),
  ],
);
