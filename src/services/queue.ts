import PgBoss from 'pg-boss';
import { driverOf, type Tx } from '@/db/client';

/** What runs by the clock, in UTC. */
const SCHEDULE = {
  'sweep-sign-ins': '7 * * * *',
  'verify-audit-chains': '23 2 * * *',
  'prove-issued': '41 * * * *',
  'remind-of-reviews': '11 5 * * *',
} as const;

/** A run of the worker's for a practice; its row says the rest. */
export interface RunTask {
  readonly practiceId: string;
  readonly runId: string;
}

/** What is asked for, with what it is about. */
export interface Asked {
  readonly 'run-proof': RunTask;
  readonly 'run-impact': RunTask;
  readonly 'run-import': RunTask;
}

type ClockTask = keyof typeof SCHEDULE;
type AskedTask = keyof Asked;
const CLOCK_TASKS = Object.keys(SCHEDULE) as readonly ClockTask[];
const ASKED_TASKS = ['run-proof', 'run-impact', 'run-import'] as const satisfies readonly AskedTask[];

/** The library's own, from which it sends what is due by the clock. */
const CLOCK_QUEUE = '__pgboss__send-it';
const SCHEMA = 'pgboss';
/** Connections that the queue keeps for itself. */
const CONNECTIONS = 2;

/** Makes the queue's tables and queues as the database's owner; the worker's own role may only use them. */
export async function installQueue(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerUrl, max: 1, supervise: false, schedule: false });
  boss.on('error', () => undefined); // a failure rejects the call that met it as well
  await boss.start();
  try {
    for (const name of [CLOCK_QUEUE, ...CLOCK_TASKS, ...ASKED_TASKS]) await boss.createQueue(name);
    for (const name of CLOCK_TASKS) await boss.schedule(name, SCHEDULE[name]);
    await boss.getDb().executeSql(GRANTS, []);
  } finally {
    await boss.stop({ graceful: false });
  }
}

const GRANTS = `
  grant usage on schema ${SCHEMA} to putlog_web;
  grant select, insert, update, delete on all tables in schema ${SCHEMA} to putlog_web;`;

/** A task's handler gives up after so long and the task is tried again; a handler of ours is done long before. */
const EXPIRES = 120; // s
const ATTEMPTS = 4;

/** Only writes its statements: every call brings the connection of its transaction. */
const writer = new PgBoss({ db: { executeSql: () => Promise.reject(new Error('No transaction')) } });

export interface Sending {
  /** Tasks of a higher number go first; 0 without. */
  readonly priority?: number;
}

/** Asks the worker for a task, once the transaction is committed. */
export async function send<K extends AskedTask>(
  tx: Tx,
  task: K,
  data: Asked[K],
  { priority = 0 }: Sending = {},
): Promise<void> {
  const driver = driverOf(tx);
  // The query builder has the driver take JSON as text; what the queue leaves out is null.
  const written = (value: unknown) =>
    typeof value === 'object' && value !== null ? JSON.stringify(value) : (value ?? null);
  const db = {
    executeSql: async (text: string, values: unknown[]) => ({
      rows: await driver.unsafe(text, values.map(written) as never[]),
    }),
  };
  const id = await writer.send(task, data, {
    db,
    priority,
    expireInSeconds: EXPIRES,
    retryLimit: ATTEMPTS - 1,
    retryDelay: 2,
    retryBackoff: true,
  });
  if (id === null) throw new Error(`The queue has no place for ${task}`);
}

export type Handlers = { readonly [K in ClockTask]: () => Promise<void> } & {
  readonly [K in AskedTask]: (data: Asked[K], attempt: Attempt) => Promise<void>;
};

export interface Attempt {
  /** If it fails now, it is not tried again. */
  readonly isLast: boolean;
}

export interface Queue {
  /** Lets the task at hand end, for some seconds, and takes no other. */
  readonly stop: () => Promise<void>;
}

/** Seconds between two looks for what somebody waits for. */
const LOOK_EVERY = 0.5;

/** Takes tasks from the queue, each with its handler, until it is stopped. What a handler throws is tried again. */
export async function workQueue(
  url: string,
  handlers: Handlers,
  onError: (error: Error) => void,
): Promise<Queue> {
  const boss = new PgBoss({ connectionString: url, max: CONNECTIONS, migrate: false });
  boss.on('error', onError);
  await boss.start();
  for (const name of CLOCK_TASKS) await boss.work(name, () => handlers[name]());
  for (const name of ASKED_TASKS)
    await boss.work<RunTask>(
      name,
      { includeMetadata: true, pollingIntervalSeconds: LOOK_EVERY },
      async ([job]) => job && handlers[name](job.data, { isLast: job.retryCount >= job.retryLimit }),
    );
  return { stop: () => boss.stop({ timeout: 20_000 }) };
}
