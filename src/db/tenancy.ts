import { connection, type Database, driverOf, type Tx } from './client';

export type Tenant = { readonly practiceId: string; readonly personId: string | null };

/**
 * Runs `work` in one transaction that sees one practice, as one person (null: a task of the worker's own).
 * The settings are queued on the transaction's connection before `work` starts and travel with its first query:
 * a transaction costs BEGIN, its queries and COMMIT, and no trip more.
 */
export function withPractice<T>(
  tenant: Tenant,
  work: (tx: Tx) => Promise<T>,
  database: Database = connection().db,
): Promise<T> {
  return database.transaction(async (tx) => {
    const settings = driverOf(tx)`select set_config('app.practice_id', ${tenant.practiceId}, true),
      set_config('app.person_id', ${tenant.personId ?? ''}, true)`.execute();
    const [value] = await Promise.all([work(tx), settings]);
    return value;
  });
}

/** The pool, for what comes before a practice is known: the lookup functions and the counting of sign-in attempts. */
export const withoutPractice = (): Database => connection().db;
