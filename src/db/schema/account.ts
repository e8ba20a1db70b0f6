import { sql } from 'drizzle-orm';
import {
  type AnyPgColumn,
  boolean,
  check,
  foreignKey,
  index,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  timestamp,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { ROLES, type Role } from '@/features/account/roles';
import {
  currentPerson,
  currentPractice,
  id,
  moment,
  now,
  oneOf,
  practiceId,
  tenantPolicy,
  UNIT_SYSTEM_NAMES,
  web,
  words,
} from './tenant';

export const practice = pgTable(
  'practice',
  {
    id: id().primaryKey(),
    slug: text().notNull().unique(),
    name: text().notNull(),
    offices: text().array().notNull().default([]),
    createdAt: now(),
  },
  () => [pgPolicy('practice_itself', { for: 'all', to: web, using: sql`id = ${currentPractice}` })],
);

/** People stand outside the practices: one person may work for two. A practice sees those who are its members. */
export const person = pgTable(
  'person',
  {
    id: id().primaryKey(),
    email: text().notNull().unique(),
    name: text().notNull(),
    initials: text().notNull(),
    unitSystem: text({ enum: UNIT_SYSTEM_NAMES }).notNull().default('metric'),
    /** Measures that her schedules of sections show, in their order; null: the usual ones. */
    sectionColumns: text().array(),
    createdAt: now(),
  },
  (table) => [
    check('person_email_lower_case', sql`${table.email} = lower(${table.email})`),
    check('person_unit_system', oneOf(table.unitSystem, UNIT_SYSTEM_NAMES)),
    pgPolicy('person_of_practice', {
      for: 'select',
      to: web,
      using: sql`exists (select from membership where membership.practice_id = ${currentPractice} and membership.person_id = person.id)`,
    }),
    // Only the database's owner is granted INSERT; a person is let in before she is anybody's member.
    pgPolicy('person_new', { for: 'insert', to: web, withCheck: sql`true` }),
    pgPolicy('person_herself', { for: 'update', to: web, using: sql`id = ${currentPerson}` }),
  ],
);

/** The secret apart from the person, so that no list of people can carry it along. */
export const credential = pgTable(
  'credential',
  {
    personId: uuid()
      .primaryKey()
      .references(() => person.id),
    passwordHash: text().notNull(),
    changedAt: now(),
  },
  () => [
    pgPolicy('credential_of_herself', { for: 'all', to: web, using: sql`person_id = ${currentPerson}` }),
  ],
);

export const membership = pgTable(
  'membership',
  {
    practiceId: practiceId().references(() => practice.id),
    personId: uuid()
      .notNull()
      .references(() => person.id),
    roles: text().array().$type<Role[]>().notNull(),
    title: text().notNull().default(''),
    active: boolean().notNull().default(true),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.personId] }),
    check(
      'membership_roles',
      sql`cardinality(${table.roles}) > 0 and ${table.roles} <@ array[${words(ROLES)}]`,
    ),
    tenantPolicy('membership'),
  ],
);

/** A row about a person of the practice: the pair of keys, so that it cannot name a stranger. */
export const ofMember = (name: string, practiceId: AnyPgColumn, personId: AnyPgColumn) =>
  foreignKey({
    name,
    columns: [practiceId, personId],
    foreignColumns: [membership.practiceId, membership.personId],
  });

/** The token is kept as a hash. Its index stands alone: it is what a request has before its practice is known. */
export const session = pgTable(
  'session',
  {
    practiceId: practiceId(),
    id: id(),
    personId: uuid().notNull(),
    tokenHash: text().notNull(),
    createdAt: now(),
    lastSeenAt: now(),
    expiresAt: timestamp({ withTimezone: true }).notNull(),
    address: text(),
    agent: text(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('session_person_fk', table.practiceId, table.personId),
    uniqueIndex('session_token_hash').on(table.tokenHash),
    index('session_person').on(table.practiceId, table.personId),
    tenantPolicy('session'),
  ],
);

export const apiToken = pgTable(
  'api_token',
  {
    practiceId: practiceId(),
    id: id(),
    personId: uuid().notNull(),
    name: text().notNull(),
    tokenHash: text().notNull(),
    createdAt: now(),
    lastUsedAt: moment(),
    expiresAt: moment(),
    revokedAt: moment(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('api_token_person_fk', table.practiceId, table.personId),
    uniqueIndex('api_token_hash').on(table.tokenHash),
    index('api_token_person').on(table.practiceId, table.personId),
    tenantPolicy('api_token'),
  ],
);

/** Of every sign-in, told or refused: who and from where only as hashes, enough to count by. */
export const signInAttempt = pgTable(
  'sign_in_attempt',
  {
    id: id().primaryKey(),
    accountHash: text().notNull(),
    addressHash: text().notNull(),
    succeeded: boolean().notNull(),
    at: now(),
  },
  (table) => [
    index('sign_in_attempt_account').on(table.accountHash, table.at),
    index('sign_in_attempt_address').on(table.addressHash, table.at),
  ],
);
