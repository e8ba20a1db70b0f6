import { sql } from 'drizzle-orm';
import { processBeat } from '@/db/schema/process';
import { withoutPractice } from '@/db/tenancy';
import { store } from '@/services/store';
import journal from '../../../drizzle/meta/_journal.json';

/** Seconds between two signs of life of the worker, and after how many it counts as gone. */
export const BEAT = { every: 5, late: 30 } as const;

/** Each part that a request depends on: null when it is well, else what is wrong. */
export interface Readiness {
  readonly database: string | null;
  readonly migrations: string | null;
  readonly queue: string | null;
  /** Of the place for files; well where none is set up. Without it only imports wait. */
  readonly store: string | null;
}

export const isReady = ({ database, migrations, queue }: Readiness): boolean =>
  database === null && migrations === null && queue === null;

/** Whether this process could serve a request from end to end, now. */
export async function readiness(now = new Date()): Promise<Readiness> {
  const [kept, fault] = await Promise.all([databaseReadiness(now), store()?.fault() ?? null]);
  return { ...kept, store: fault };
}

async function databaseReadiness(now: Date): Promise<Omit<Readiness, 'store'>> {
  try {
    const db = withoutPractice();
    const [applied] = await db.execute<{ at: string }>(
      sql`select coalesce(max(created_at), 0) as at from drizzle.__drizzle_migrations`,
    );
    const [beat] = await db.select().from(processBeat);
    return {
      database: null,
      migrations: migrationFault(Number(applied?.at)),
      queue: beat ? beatFault(beat.beatAt, now) : 'no worker has run yet',
    };
  } catch (error) {
    const reason = error instanceof Error && error.cause instanceof Error ? error.cause.message : 'unknown';
    return { database: `does not answer: ${reason}`, migrations: 'not known', queue: 'not known' };
  }
}

function migrationFault(appliedAt: number): string | null {
  const waiting = journal.entries.filter(({ when }) => when > appliedAt);
  return waiting.length === 0 ? null : `${waiting.map(({ tag }) => tag).join(', ')} not applied`;
}

function beatFault(at: Date, now: Date): string | null {
  const seconds = Math.round((now.getTime() - at.getTime()) / 1000);
  return seconds <= BEAT.late ? null : `no sign of a worker for ${seconds} s`;
}

/** The worker's sign of life. */
export async function beat(startedAt: Date, now = new Date()): Promise<void> {
  await withoutPractice()
    .insert(processBeat)
    .values({ name: 'worker', startedAt, beatAt: now })
    .onConflictDoUpdate({ target: processBeat.name, set: { startedAt, beatAt: now } });
}
