import { drizzle, PostgresJsSession } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';

/** A pool of connections. Numbers and dates come back as the schema says; `sql` is the driver under it. */
export function connect(url: string, connections = 10) {
  const sql = postgres(url, {
    max: connections,
    connect_timeout: 10,
    idle_timeout: 60,
    onnotice: () => undefined,
    connection: {
      application_name: 'putlog',
      // Row-level security makes the planner guess high, and compiling takes longer than any of our queries.
      jit: false,
      // A statement that hangs, or a transaction that was forgotten, frees its locks by itself.
      statement_timeout: 30_000,
      idle_in_transaction_session_timeout: 60_000,
    },
  });
  return { db: drizzle(sql, { casing: 'snake_case' }), sql, close: () => sql.end({ timeout: 5 }) };
}

export type Connection = ReturnType<typeof connect>;
export type Database = Connection['db'];
export type Tx = Parameters<Parameters<Database['transaction']>[0]>[0];

/**
 * The driver's transaction under the query builder's, made to prepare the builder's statements: without that the
 * driver asks the server for the types of the parameters before every query, which doubles its round trips.
 */
export function driverOf(tx: Tx): postgres.TransactionSql {
  const { session } = tx._;
  if (!(session instanceof PostgresJsSession))
    throw new TypeError('The transaction is not of the postgres.js driver');
  const driver: postgres.TransactionSql = session.client;
  const { unsafe } = driver;
  const prepared: typeof unsafe = (query, parameters) => unsafe(query, parameters, { prepare: true });
  return Object.assign(driver, { unsafe: prepared });
}

let shared: Connection | undefined;

/** The process's own pool, opened at its first use: DATABASE_URL, and DATABASE_POOL connections. */
export function connection(): Connection {
  if (shared) return shared;
  const url = process.env['DATABASE_URL'];
  if (!url) throw new Error('DATABASE_URL is not set: this process does not know its database');
  shared = connect(url, Number(process.env['DATABASE_POOL'] ?? 10));
  return shared;
}

export async function closeConnection(): Promise<void> {
  const open = shared;
  shared = undefined;
  await open?.close();
}
