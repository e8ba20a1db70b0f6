import PgBoss from 'pg-boss';

/** What runs by the clock, in UTC. */
const SCHEDULE = {
  'sweep-sign-ins': '7 * * * *',
  'verify-audit-chains': '23 2 * * *',
} as const;

export type Task = keyof typeof SCHEDULE;
const TASKS = Object.keys(SCHEDULE) as readonly Task[];

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
    for (const name of [CLOCK_QUEUE, ...TASKS]) await boss.createQueue(name);
    for (const name of TASKS) await boss.schedule(name, SCHEDULE[name]);
    await boss.getDb().executeSql(GRANTS, []);
  } finally {
    await boss.stop({ graceful: false });
  }
}

const GRANTS = `
  grant usage on schema ${SCHEMA} to putlog_web;
  grant select, insert, update, delete on all tables in schema ${SCHEMA} to putlog_web;`;

export interface Queue {
  /** Lets the task at hand end, for some seconds, and takes no other. */
  readonly stop: () => Promise<void>;
}

/** Takes tasks from the queue, each with its handler, until it is stopped. What a handler throws is tried again. */
export async function workQueue(
  url: string,
  handlers: Readonly<Record<Task, () => Promise<void>>>,
  onError: (error: Error) => void,
): Promise<Queue> {
  const boss = new PgBoss({ connectionString: url, max: CONNECTIONS, migrate: false });
  boss.on('error', onError);
  await boss.start();
  for (const name of TASKS) await boss.work(name, () => handlers[name]());
  return { stop: () => boss.stop({ timeout: 20_000 }) };
}
