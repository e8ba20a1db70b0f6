import { eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { session, signInAttempt } from '@/db/schema/account';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { foundPractice } from '../../../tests/support/practice';
import { sweepSignIns } from './sweep.server';

const HOUR = 3_600_000;
const now = new Date();
const ago = (hours: number) => new Date(now.getTime() - hours * HOUR);

test('a sweep removes the sessions of every practice that are over or lay idle, and leaves the others', async () => {
  const [[here], [there]] = [await foundPractice(['engineer']), await foundPractice(['reader'])];
  if (!here || !there) throw new Error('two people were founded');
  const begin = (who: typeof here, lastSeenAt: Date, expiresAt: Date) =>
    withPractice(who, (tx) =>
      tx.insert(session).values({
        practiceId: who.practiceId,
        personId: who.personId,
        tokenHash: crypto.randomUUID(),
        lastSeenAt,
        expiresAt,
      }),
    );
  await begin(here, ago(0), ago(-1));
  await begin(here, ago(1), ago(0.1));
  await begin(there, ago(3), ago(-8));
  const { sessions } = await sweepSignIns(now);
  expect(sessions).toBeGreaterThanOrEqual(2);
  const left = (who: typeof here) => withPractice(who, (tx) => tx.select().from(session));
  expect(await left(here)).toHaveLength(1);
  expect(await left(there)).toHaveLength(0);
});

test('a sweep removes attempts that no longer count', async () => {
  const accountHash = crypto.randomUUID();
  const attempt = (at: Date) => ({ accountHash, addressHash: 'x', succeeded: false, at });
  const db = withoutPractice();
  await db.insert(signInAttempt).values([attempt(ago(1)), attempt(ago(25))]);
  await sweepSignIns(now);
  const left = await db.select().from(signInAttempt).where(eq(signInAttempt.accountHash, accountHash));
  expect(left.map(({ at }) => at)).toEqual([ago(1)]);
});
