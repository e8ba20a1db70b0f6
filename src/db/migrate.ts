import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate as applyMigrations } from 'drizzle-orm/postgres-js/migrator';
import postgres from 'postgres';

const MIGRATIONS = fileURLToPath(new URL('../../drizzle', import.meta.url));
/** Any number, the same in every process: whoever holds its lock migrates, the others wait and find nothing to do. */
const MIGRATION_LOCK = 7_358_451;

/** Brings the owner's database up to date. One connection, since the lock belongs to the connection that took it. */
export async function migrate(ownerUrl: string): Promise<void> {
  const sql = postgres(ownerUrl, { max: 1, onnotice: () => undefined });
  try {
    await sql`select pg_advisory_lock(${MIGRATION_LOCK})`;
    await applyMigrations(drizzle(sql), { migrationsFolder: MIGRATIONS });
  } finally {
    await sql.end();
  }
}
