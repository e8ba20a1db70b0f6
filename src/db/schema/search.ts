import { sql } from 'drizzle-orm';
import {
  check,
  customType,
  index,
  pgPolicy,
  pgTable,
  primaryKey,
  smallint,
  text,
  timestamp,
  uuid,
} from 'drizzle-orm/pg-core';
import { ENTRY_KINDS } from '@/features/search/terms';
import { currentPerson, currentPractice, id, oneOf, practiceId, tenantPolicy, web } from './tenant';

const lexemes = customType<{ data: string }>({ dataType: () => 'tsvector' });

/** Uncorrelated, so that it is asked once in a statement and not for every entry. */
const isLibrarian = sql`(select exists (select from membership where membership.practice_id = ${currentPractice}
  and membership.person_id = ${currentPerson} and membership.active and 'librarian' = any (membership.roles)))`;

/**
 * What a search looks through, but for sections: one entry for a job, a member, a document, a person or a note, written
 * by the triggers of their tables in the transaction of each change.
 */
export const searchEntry = pgTable(
  'search_entry',
  {
    practiceId: practiceId(),
    kind: text({ enum: ENTRY_KINDS }).notNull(),
    /** Of the row that it is about. */
    id: uuid().notNull(),
    /** As printed: Prop 3, Q-2417, LF4. */
    mark: text().notNull(),
    /** The same for however it is typed: prop3, q2417, lf4. */
    markKey: text().notNull(),
    title: text().notNull(),
    detail: text().notNull(),
    state: text().notNull(),
    /** 0 in use, 1 not yet, 2 no longer, 3 withdrawn or removed. */
    standing: smallint().notNull(),
    /** The parts of its page's address. */
    place: text().array().notNull(),
    /** What a note says. */
    body: text().notNull(),
    /** The words of mark and title. */
    names: lexemes().notNull(),
    /** These and every other word by which it is found. */
    words: lexemes().notNull(),
    /** Only who sees this job sees the entry. */
    jobId: uuid(),
    /** Only this person and the librarians see the entry. */
    readerId: uuid(),
    /** Who answers for it. */
    personId: uuid(),
    changedAt: timestamp({ withTimezone: true }).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.kind, table.id] }),
    // Row-level security keeps the planner from it, since @@ is not leakproof: search_matches() asks it.
    index('search_entry_words').using('gin', table.practiceId, table.words).with({ fastupdate: false }),
    index('search_entry_person').on(table.practiceId, table.personId),
    index('search_entry_job').on(table.practiceId, table.jobId),
    check('search_entry_kind', oneOf(table.kind, ENTRY_KINDS)),
    check('search_entry_standing', sql`${table.standing} between 0 and 3`),
    // The job's own policy applies inside the subquery.
    pgPolicy('search_entry_open_to_person', {
      for: 'all',
      to: web,
      using: sql`practice_id = ${currentPractice}
  and (job_id is null or job_id in (select job.id from job where job.practice_id = ${currentPractice}))
  and (reader_id is null or reader_id = ${currentPerson} or ${isLibrarian})`,
      withCheck: sql`practice_id = ${currentPractice}`,
    }),
  ],
);

/**
 * The words of all entries, from which a word that was mistyped is mended. Two transactions may add the same one: that
 * costs a row, where a unique key would have one wait for the other and could lock both.
 */
export const searchWord = pgTable(
  'search_word',
  { practiceId: practiceId(), id: id(), word: text().notNull() },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    index('search_word_word').on(table.practiceId, table.word),
    tenantPolicy('search_word'),
  ],
);
