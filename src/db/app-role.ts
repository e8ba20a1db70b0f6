import postgres from 'postgres';

/** Lets web and worker in: a role with the name and password of their URL, which may do what `putlog_web` may. */
export async function letIn(ownerUrl: string, appUrl: string): Promise<void> {
  const app = new URL(appUrl);
  const name = decodeURIComponent(app.username);
  const secret = decodeURIComponent(app.password).replaceAll("'", "''");
  const sql = postgres(ownerUrl, { max: 1, onnotice: () => undefined });
  try {
    const [found] = await sql`select from pg_roles where rolname = ${name}`;
    if (!found) await sql`create role ${sql(name)}`;
    await sql`alter role ${sql(name)} login password ${sql.unsafe(`'${secret}'`)}`;
    await sql`grant putlog_web to ${sql(name)}`;
  } finally {
    await sql.end();
  }
}
