import { expect, test } from 'vitest';
import { sweepMail } from '@/features/notice/outbox-sweep.server';
import { foundPractice, owner } from '../support/practice';

const DAY = 86_400_000; // ms
const now = new Date('2027-01-01T00:00:00Z');

async function write(days: number, state: 'waiting' | 'sent' | 'failed', dedupe: string): Promise<void> {
  const [{ practiceId, personId }] = await foundPractice(['engineer']);
  const at = new Date(now.getTime() - days * DAY).toISOString();
  await owner.sql`insert into mail (practice_id, person_id, kind, data, mode, dedupe, state, created_at, sent_at)
    values (${practiceId}, ${personId}, 'issued', '{}', 'immediate', ${dedupe}, ${state}, ${at}, ${state === 'sent' ? at : null})`;
}

test('mail of every practice is removed 90 days after it was sent or given up, and never before it was', async () => {
  const mark = crypto.randomUUID();
  await write(91, 'sent', `${mark} old`);
  await write(91, 'failed', `${mark} hopeless`);
  await write(89, 'sent', `${mark} kept`);
  await write(400, 'waiting', `${mark} waiting`);
  expect(await sweepMail(now)).toBeGreaterThanOrEqual(2);
  const left = await owner.sql`select dedupe from mail where dedupe like ${`${mark}%`} order by dedupe`;
  expect(left.map(({ dedupe }) => dedupe)).toEqual([`${mark} kept`, `${mark} waiting`]);
});
