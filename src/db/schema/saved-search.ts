import { sql } from 'drizzle-orm';
import { boolean, index, pgPolicy, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { ofMember } from './account';
import { currentPerson, currentPractice, id, now, practiceId, web } from './tenant';

const ownOrShared = sql`practice_id = ${currentPractice} and (shared or person_id = ${currentPerson})`;

/** A search for sections under a name: the query of its address. Seen by who saved it, and by the practice where shared. */
export const savedSearch = pgTable(
  'saved_search',
  {
    practiceId: practiceId(),
    id: id(),
    personId: uuid().notNull(),
    name: text().notNull(),
    query: text().notNull(),
    shared: boolean().notNull().default(false),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.practiceId, table.id] }),
    ofMember('saved_search_person_fk', table.practiceId, table.personId),
    uniqueIndex('saved_search_name').on(table.practiceId, table.personId, sql`lower(${table.name})`),
    index('saved_search_shared').on(table.practiceId).where(sql`${table.shared}`),
    pgPolicy('saved_search_of_person', {
      for: 'all',
      to: web,
      using: ownOrShared,
      withCheck: ownOrShared,
    }),
  ],
);
