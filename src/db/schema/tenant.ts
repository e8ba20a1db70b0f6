import { sql } from 'drizzle-orm';
import { type AnyPgColumn, pgPolicy, pgRole, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { UnitSystemName } from '@/engine/quantity';

/** What the web and worker connections may do is granted to this role; a login role is a member of it. */
export const web = pgRole('putlog_web').existing();

export const now = () => timestamp({ withTimezone: true }).notNull().defaultNow();
export const moment = () => timestamp({ withTimezone: true });

export const UNIT_SYSTEM_NAMES = ['metric', 'us'] as const satisfies readonly UnitSystemName[];

/** The tenant key. It leads every primary key and index, so that the tables can be distributed by practice. */
export const practiceId = () => uuid('practice_id').notNull();
export const id = () => uuid('id').notNull().defaultRandom();

/** After a transaction that set it, the setting is '' and not NULL. */
export const currentPractice = sql`nullif(current_setting('app.practice_id', true), '')::uuid`;
export const currentPerson = sql`nullif(current_setting('app.person_id', true), '')::uuid`;

const ownRows = sql`practice_id = ${currentPractice}`;

/** Rows of the transaction's practice, and no others, to read and to write. */
export const tenantPolicy = (table: string) =>
  pgPolicy(`${table}_of_practice`, { for: 'all', to: web, using: ownRows, withCheck: ownRows });

/** A list of words as SQL literals; only for the constant lists of pure files. */
export const words = (list: readonly string[]) => sql.raw(list.map((word) => `'${word}'`).join(', '));

export const oneOf = (column: AnyPgColumn, list: readonly string[]) => sql`${column} in (${words(list)})`;
