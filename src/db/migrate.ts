import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate as applyMigrations } from 'drizzle-orm/postgres-js/migrator';
import postgres from 'postgres';

const MIGRATIONS = fileURLToPath(new URL('../../drizzle', import.meta.url));
/** Any number, the same in every process: whoever holds its lock works on the database, the others wait. */
const LOCK = 7_358_451;

/**
 * Brings the owner's database up to date, then does `more` before anybody else may. Of several processes at once the
 * others find nothing left to do.
 */
export async function migrate(
  ownerUrl: string,
  more: () => Promise<void> = async () => undefined,
): Promise<void> {
  // One connection, since the lock belongs to the connection that took it.
  const sql = postgres(ownerUrl, { max: 1, idle_timeout: 0, max_lifetime: null, onnotice: () => undefined });
  try {
    await sql`select pg_advisory_lock(${LOCK})`;
    await applyMigrations(drizzle(sql), { migrationsFolder: MIGRATIONS });
    await more();
  } finally {
    await sql.end();
  }
}
