import { setTimeout as sleep } from 'node:timers/promises';
import { and, eq } from 'drizzle-orm';
import { afterAll, afterEach, beforeEach, describe, expect, test } from 'vitest';
import { closeConnection } from '@/db/client';
import { mail } from '@/db/schema/notice';
import { withPractice } from '@/db/tenancy';
import type { Told } from '@/features/notice/notice';
import { tell } from '@/features/notice/notice.server';
import { type Mailing, sendDueMail } from '@/features/notice/outbox.server';
import { mailServer } from '@/services/mail';
import { startMailCatcher } from '../../scripts/support/mail-catcher.mjs';
import { ORIGIN } from '../support/env';
import { foundPractice, letGo, type Member, owner } from '../support/practice';
import { startWorker, type Worker } from '../support/worker';

type Catcher = Awaited<ReturnType<typeof startMailCatcher>>;

// What other tests have left in the outbox would be sent with ours.
beforeEach(async () => {
  await owner.sql`delete from mail`;
});
const ends: (() => Promise<unknown>)[] = [];
afterEach(async () => {
  for (const end of ends.splice(0).reverse()) await end();
});
afterAll(async () => {
  await closeConnection();
  await owner.close();
});

async function catcher(hooks: Parameters<typeof startMailCatcher>[0] = {}): Promise<Catcher> {
  const started = await startMailCatcher(hooks);
  ends.push(started.stop);
  return started;
}

async function worker(smtpUrl: string): Promise<Worker> {
  const started = await startWorker({ PUTLOG_SMTP_URL: smtpUrl });
  ends.push(started.stop);
  return started;
}

const through = (smtpUrl: string): Mailing => {
  const server = mailServer(smtpUrl);
  ends.push(async () => server.rest());
  return { server, from: { name: 'Putlog', address: 'putlog@localhost' }, origin: ORIGIN };
};
const sendAll = (mailing: Mailing) => sendDueMail(mailing, new AbortController().signal);

const recall = (people: readonly Member[], told: Partial<Told> = {}): Told => ({
  people: people.map(({ personId }) => personId),
  kind: 'recall',
  title: 'Prop 3, revision 2, is recalled',
  detail: 'The reaction at the prop is too small <by 4%>.',
  href: '/library/recalls/7f3c',
  dedupe: 'recall 7f3c',
  mailData: { reference: 'Prop 3', facts: [{ label: 'Your members', value: 'LF4 in Q-2417' }] },
  ...told,
});

const say = (by: Member, told: Told, now?: Date) => withPractice(by, (tx) => tell(tx, by, told, now));

const rowsOf = ({ practiceId }: Member) =>
  withPractice({ practiceId, personId: null }, (tx) => tx.select().from(mail).orderBy(mail.createdAt));

async function waitFor(what: () => boolean | Promise<boolean>, seconds = 100): Promise<void> {
  const deadline = Date.now() + seconds * 1000;
  while (!(await what())) {
    if (Date.now() > deadline) throw new Error('It did not come to it');
    await sleep(50);
  }
}

const makeDue = ({ practiceId }: Member, fields: Partial<typeof mail.$inferInsert> = {}, id?: string) =>
  withPractice({ practiceId, personId: null }, (tx) =>
    tx
      .update(mail)
      .set({ dueAt: new Date(), ...fields })
      .where(and(eq(mail.practiceId, practiceId), id === undefined ? undefined : eq(mail.id, id))),
  );

describe('a message', () => {
  test('says what happened and leads to the item; its subject names no job', async () => {
    const caught = await catcher();
    const [engineer] = await foundPractice(['engineer']);
    await say(engineer, recall([engineer]));
    expect(await sendAll(through(caught.smtpUrl))).toBe(true);
    const [message] = caught.messages;
    if (!message) throw new Error('it was sent');
    expect(message.recipients).toEqual([engineer.email]);
    expect(message.subject).toBe('Recalled: Prop 3. Your decision is needed');
    for (const part of [message.text, message.html]) {
      expect(part).toContain('Prop 3, revision 2, is recalled');
      expect(part).toContain('LF4 in Q-2417');
      expect(part).toContain(`${ORIGIN}/library/recalls/7f3c`);
    }
    expect(message.html).toContain('too small &lt;by 4%&gt;');
    expect(message.html).not.toMatch(/<script|<img|url\(/);
    const [row] = await rowsOf(engineer);
    expect(row).toMatchObject({ state: 'sent', attempts: 1, error: null });
    expect(message.messageId).toBe(`<${row?.id}@localhost>`);
  });

  test('of a digest has all that is due to its reader, and nothing to anybody else', async () => {
    const caught = await catcher();
    const [reader, other] = await foundPractice(['engineer'], ['engineer']);
    for (const n of [1, 2, 3])
      await say(reader, recall([reader], { kind: 'issued', title: `Prop ${n} is issued`, dedupe: `i${n}` }));
    await say(other, recall([other], { kind: 'issued', title: 'Beam 9 is issued', dedupe: 'other' }));
    const mailing = through(caught.smtpUrl);
    await sendAll(mailing);
    expect(caught.messages).toHaveLength(0);
    await makeDue(reader);
    await sendAll(mailing);
    const mine = caught.messages.filter(({ recipients }) => recipients.includes(reader.email));
    expect(mine.map(({ subject }) => subject)).toEqual(['Putlog: 3 notices']);
    for (const n of [1, 2, 3]) expect(mine[0]?.text).toContain(`Prop ${n} is issued`);
    expect(mine[0]?.text).not.toContain('Beam 9');
    expect((await rowsOf(reader)).map(({ state }) => state)).toEqual(Array(4).fill('sent'));
  });

  test('to whoever has left, and one that waited for days, is given up with the reason', async () => {
    const caught = await catcher();
    const [left, late] = await foundPractice(['engineer'], ['engineer']);
    await say(left, recall([left, late]));
    await letGo(left);
    const { practiceId, personId } = late;
    await withPractice(
      { practiceId, personId: null },
      (tx) =>
        tx
          .update(mail)
          .set({ createdAt: new Date(Date.now() - 6 * 86_400_000) })
          .where(and(eq(mail.practiceId, practiceId), eq(mail.personId, personId))),
      owner.db,
    );
    await sendAll(through(caught.smtpUrl));
    expect(caught.messages).toHaveLength(0);
    expect((await rowsOf(left)).map(({ state, error }) => `${state}: ${error}`).sort()).toEqual([
      'failed: It could not be sent for five days.',
      'failed: The person has left the practice.',
    ]);
  });
});

describe('a server', () => {
  const answering = (code: number) => ({
    onMessage: () => {
      throw Object.assign(new Error('so it says'), { responseCode: code });
    },
  });

  test('that puts a message off is asked again later, and then gets it', async () => {
    const putsOff = await catcher(answering(451));
    const [engineer] = await foundPractice(['engineer']);
    await say(engineer, recall([engineer]));
    expect(await sendAll(through(putsOff.smtpUrl))).toBe(true);
    const [row] = await rowsOf(engineer);
    expect(row).toMatchObject({
      state: 'waiting',
      attempts: 1,
      error: expect.stringContaining('so it says'),
    });
    expect(row?.dueAt.getTime()).toBeGreaterThan(Date.now() + 60_000);
    const takes = await catcher();
    await makeDue(engineer);
    await sendAll(through(takes.smtpUrl));
    expect(await rowsOf(engineer)).toMatchObject([{ state: 'sent', attempts: 2, error: null }]);
    expect(takes.messages.map(({ messageId }) => messageId)).toEqual([`<${row?.id}@localhost>`]);
  });

  test('that refuses a message is not asked again', async () => {
    const refuses = await catcher(answering(554));
    const [engineer, other] = await foundPractice(['engineer'], ['engineer']);
    await say(engineer, recall([engineer, other]));
    expect(await sendAll(through(refuses.smtpUrl))).toBe(true);
    expect((await rowsOf(engineer)).map(({ state }) => state)).toEqual(['failed', 'failed']);
  });

  test('that puts it off to the last is given up', async () => {
    const putsOff = await catcher(answering(451));
    const [engineer] = await foundPractice(['engineer']);
    await say(engineer, recall([engineer]));
    await makeDue(engineer, { attempts: 11 });
    await sendAll(through(putsOff.smtpUrl));
    expect(await rowsOf(engineer)).toMatchObject([{ state: 'failed', attempts: 12 }]);
  });

  test('that is not there delays one message, and the others stay due', async () => {
    const [engineer, other] = await foundPractice(['engineer'], ['engineer']);
    await say(engineer, recall([engineer, other]));
    expect(await sendAll(through('smtp://127.0.0.1:1'))).toBe(false);
    expect((await rowsOf(engineer)).map(({ state, attempts }) => [state, attempts]).sort()).toEqual([
      ['waiting', 0],
      ['waiting', 1],
    ]);
    await makeDue(engineer);
    const caught = await catcher();
    await sendAll(through(caught.smtpUrl));
    expect(caught.messages).toHaveLength(2);
  });

  test('gets a message once from several workers', async () => {
    const caught = await catcher();
    const people = await foundPractice(...Array.from({ length: 40 }, () => ['engineer' as const]));
    const [first] = people;
    if (!first) throw new Error('people were founded');
    await say(first, recall(people));
    await Promise.all([1, 2, 3].map(() => sendAll(through(caught.smtpUrl))));
    expect(caught.messages.flatMap(({ recipients }) => recipients).sort()).toEqual(
      people.map(({ email }) => email).sort(),
    );
  });
});

describe('a recall of 500 owners’ members, with the worker killed on the way', () => {
  const OWNERS = 500;
  const found = async () => {
    const people = await foundPractice(...Array.from({ length: OWNERS }, () => ['engineer' as const]));
    const [first] = people;
    if (!first) throw new Error('people were founded');
    await say(first, recall(people));
    return people;
  };
  const expectOneEach = (caught: Catcher, people: readonly Member[]) =>
    expect(caught.messages.flatMap(({ recipients }) => recipients).sort()).toEqual(
      people.map(({ email }) => email).sort(),
    );

  /** The worker is killed at the 200th call of the hook that `at` makes, and another takes its place. */
  async function sendKilledOnce(at: (call: () => Promise<void>) => Parameters<typeof startMailCatcher>[0]) {
    const people = await found();
    let count = 0;
    let killed = false;
    let kill: () => Promise<void> = async () => undefined;
    const caught = await catcher(
      at(async () => {
        count += 1;
        if (count !== 200) return;
        // What the worker has just written to the database is there by now.
        await sleep(200);
        await kill();
        killed = true;
      }),
    );
    kill = (await worker(caught.smtpUrl)).kill;
    await waitFor(() => killed);
    await sleep(300);
    expect(caught.messages.length).toBeLessThanOrEqual(200);
    await worker(caught.smtpUrl);
    await waitFor(() => caught.messages.length >= OWNERS);
    await sleep(500);
    expectOneEach(caught, people);
    return { people, caught };
  }

  test('while the server has a message and has not answered', async () => {
    const { people, caught } = await sendKilledOnce((call) => ({ onMessage: call }));
    const [anybody] = people;
    if (!anybody) throw new Error('people were founded');
    const open = (await rowsOf(anybody)).filter(({ state }) => state !== 'sent');
    expect(open.map(({ state }) => state)).toEqual(['sending']);
    // Ten minutes later it counts as sent, and is not sent again.
    await makeDue(anybody, {}, open[0]?.id);
    await waitFor(async () => (await rowsOf(anybody)).every(({ state }) => state === 'sent'));
    expectOneEach(caught, people);
  }, 240_000);

  test('while the server is told for whom a message is', async () => {
    const { people } = await sendKilledOnce((call) => ({ onRecipient: call }));
    const [anybody] = people;
    if (!anybody) throw new Error('people were founded');
    expect((await rowsOf(anybody)).every(({ state }) => state === 'sent')).toBe(true);
  }, 240_000);
});
