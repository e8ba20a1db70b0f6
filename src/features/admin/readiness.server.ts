import { sql } from 'drizzle-orm';
import { withoutPractice } from '@/db/tenancy';
import journal from '../../../drizzle/meta/_journal.json';

/** Seconds since the worker's last beat after which the queue counts as dead. */
const BEAT_LIMIT = 60;

export interface Readiness {
  readonly ready: boolean;
  readonly database: 'reachable' | 'unreachable';
  readonly migrations: 'current' | 'behind' | 'unknown';
  readonly queue: 'alive' | 'silent' | 'unknown';
}

/** Whether this process can serve: its database answers, has the tables of this build, and a worker takes tasks. */
export async function readiness(): Promise<Readiness> {
  const newest = Math.max(...journal.entries.map(({ when }) => when));
  try {
    const [found] = await withoutPractice().execute<{ migrated: string | null; silent: number | null }>(sql`
      select (select max(created_at) from drizzle.__drizzle_migrations) as migrated,
        (select extract(epoch from now() - max(beat_at))::float8 from process_beat) as silent`);
    const current = Number(found?.migrated ?? 0) >= newest;
    const alive = typeof found?.silent === 'number' && found.silent < BEAT_LIMIT;
    return {
      ready: current && alive,
      database: 'reachable',
      migrations: current ? 'current' : 'behind',
      queue: alive ? 'alive' : 'silent',
    };
  } catch {
    return { ready: false, database: 'unreachable', migrations: 'unknown', queue: 'unknown' };
  }
}
