import postgres from 'postgres';
import { migrate } from '@/db/migrate';
import { installQueue } from '@/services/queue';

/**
 * As the database's owner (DATABASE_URL): migrations, the queue's tables, and the role of APP_DATABASE_URL, which web
 * and worker sign in with.
 */
async function main(): Promise<void> {
  const owner = process.env['DATABASE_URL'];
  const app = process.env['APP_DATABASE_URL'];
  if (!owner) throw new Error('DATABASE_URL is not set: give the connection of the database’s owner');
  await migrate(owner);
  await installQueue(owner);
  if (app) await letIn(owner, new URL(app));
}

async function letIn(owner: string, app: URL): Promise<void> {
  const name = decodeURIComponent(app.username);
  const secret = decodeURIComponent(app.password).replaceAll("'", "''");
  const sql = postgres(owner, { max: 1, onnotice: () => undefined });
  try {
    const [found] = await sql`select from pg_roles where rolname = ${name}`;
    if (!found) await sql`create role ${sql(name)}`;
    await sql`alter role ${sql(name)} login password ${sql.unsafe(`'${secret}'`)}`;
    await sql`grant putlog_web to ${sql(name)}`;
  } finally {
    await sql.end();
  }
}

await main();
