import { sql } from 'drizzle-orm';
import { withoutPractice } from '@/db/tenancy';
import { log } from '@/lib/log';
import type { Attempt, RunTask } from '@/services/queue';

/** Milliseconds that a task works on a run before others have their turn; a worker that is stopped waits so long. */
const TURN = 10_000;

/** How a run of the worker's is done: in chunks, each of them one transaction that keeps how far it has come. */
export interface Run {
  /** Does the next chunk. `over`: there is nothing left to do, or another worker is at it. */
  readonly chunk: () => Promise<'more' | 'over'>;
  /** Asks for another turn. */
  readonly again: () => Promise<void>;
  readonly fail: (error: string) => Promise<void>;
}

/** One turn of a run. What fails is tried again from the last chunk that was kept, and told at the last attempt. */
export async function takeTurn({ runId }: RunTask, run: Run, { isLast }: Attempt): Promise<void> {
  const end = Date.now() + TURN;
  try {
    while ((await run.chunk()) === 'more') if (Date.now() >= end) return await run.again();
  } catch (error) {
    log.error('a run failed', { runId, error, isLast });
    if (!isLast) throw error;
    await run.fail('The worker met an error, which its log tells. Ask again; if it comes back, report it.');
  }
}

/** Every practice in turn, for a task of the worker's own. */
export async function eachPractice(work: (practiceId: string) => Promise<void>): Promise<void> {
  const practices = await withoutPractice().execute<{ id: string }>(sql`select practice_ids() as id`);
  for (const { id } of practices) await work(id);
}

/** As nobody: sees what belongs to the practice, and of jobs those that are open to all of it. */
export const asWorker = (practiceId: string) => ({ practiceId, personId: null });
