import { lt, or, sql } from 'drizzle-orm';
import { session, signInAttempt } from '@/db/schema/account';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { KEPT as ATTEMPTS_KEPT } from './attempt.server';
import { SESSION_HOURS } from './session';

const HOUR = 3_600_000; // ms

/** Removes sessions that are over and attempts that no longer count. Answers how many of each. */
export async function sweepSignIns(now = new Date()): Promise<{ sessions: number; attempts: number }> {
  const before = (ms: number) => new Date(now.getTime() - ms);
  const attempts = await withoutPractice()
    .delete(signInAttempt)
    .where(lt(signInAttempt.at, before(ATTEMPTS_KEPT)))
    .returning({ id: signInAttempt.id });
  const over = or(lt(session.expiresAt, now), lt(session.lastSeenAt, before(SESSION_HOURS.idle * HOUR)));
  const practices = await withoutPractice().execute<{ id: string }>(sql`select practice_ids() as id`);
  let sessions = 0;
  for (const { id } of practices) {
    const ended = await withPractice({ practiceId: id, personId: null }, (tx) =>
      tx.delete(session).where(over).returning({ id: session.id }),
    );
    sessions += ended.length;
  }
  return { sessions, attempts: attempts.length };
}
