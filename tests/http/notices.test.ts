import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeConnection, connection } from '@/db/client';
import { mail, notice, noticePreference } from '@/db/schema/notice';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { userOfToken } from '@/features/account/identity.server';
import { createApiToken } from '@/features/account/token.server';
import type { Told } from '@/features/notice/notice';
import { tell } from '@/features/notice/notice.server';
import { MOST_STREAMS, openStream } from '@/features/notice/stream.server';
import { publish } from '@/services/events';
import { ask } from '../support/app';
import { foundPractice, letGo, type Member, owner } from '../support/practice';

afterAll(async () => {
  await closeConnection();
  await owner.close();
});

const event = (people: readonly Member[], told: Partial<Told> = {}): Told => ({
  people: people.map(({ personId }) => personId),
  kind: 'recall',
  title: 'Prop 3, revision 2, was recalled',
  href: '/library/recalls/1',
  dedupe: 'recall:1',
  ...told,
});

const say = (by: Member, told: Told, now?: Date) => withPractice(by, (tx) => tell(tx, by, told, now));

const messagesTo = ({ practiceId, personId }: Member) =>
  withPractice({ practiceId, personId: null }, (tx) =>
    tx.select().from(mail).where(eq(mail.personId, personId)).orderBy(mail.createdAt),
  );

const choose = ({ practiceId, personId }: Member, kind: 'issued', mode: 'immediate' | 'digest' | 'none') =>
  withPractice({ practiceId, personId }, (tx) =>
    tx.insert(noticePreference).values({ practiceId, personId, kind, mode }),
  );

const read = async (token: string, query = '') =>
  (await ask('GET', `/api/v1/notices${query}`, { token })).json;
const titles = ({ items }: { items: { title: string }[] }) => items.map(({ title }) => title);

describe('what people are told', () => {
  let librarian: Member;
  let engineer: Member;
  beforeAll(async () => {
    [librarian, engineer] = await foundPractice(['librarian'], ['engineer']);
  });

  test('is a notice and a message for each, once, however often the event is told', async () => {
    await say(librarian, event([engineer, librarian, engineer]));
    await say(librarian, event([engineer]));
    const token = await createApiToken(engineer.email);
    expect(await read(token)).toMatchObject({
      total: 1,
      unread: 1,
      items: [{ kind: 'recall', title: 'Prop 3, revision 2, was recalled', read_at: null }],
    });
    expect(await messagesTo(engineer)).toMatchObject([{ mode: 'immediate', state: 'waiting', attempts: 0 }]);
    expect(await messagesTo(librarian)).toHaveLength(1);
  });

  test('is nothing when the transaction fails', async () => {
    const failing = withPractice(librarian, async (tx) => {
      await tell(tx, librarian, event([engineer], { dedupe: 'undone' }));
      throw new Error('changed my mind');
    });
    await expect(failing).rejects.toThrow('changed my mind');
    expect((await messagesTo(engineer)).map(({ dedupe }) => dedupe)).not.toContain('undone');
  });

  test('passes over whoever has left the practice, and nobody is no fault', async () => {
    const [left] = await foundPractice(['engineer']);
    await letGo(left);
    await say(left, event([left]));
    await say(left, event([]));
    expect(await messagesTo(left)).toEqual([]);
  });

  test('comes by e-mail as each has chosen: at once, at the next digest, or not', async () => {
    const people = await foundPractice(['engineer'], ['engineer'], ['engineer'], ['engineer']);
    const [quick, slow, never, unasked] = people;
    await choose(quick, 'issued', 'immediate');
    await choose(slow, 'issued', 'digest');
    await choose(never, 'issued', 'none');
    const now = new Date('2031-03-05T07:30:00Z');
    await say(quick, event(people, { kind: 'issued', dedupe: 'issue:1' }), now);
    const due = async (one: Member) => (await messagesTo(one)).map(({ dueAt }) => dueAt.toISOString());
    expect(await due(quick)).toEqual(['2031-03-05T07:30:00.000Z']);
    expect(await due(slow)).toEqual(['2031-03-06T06:00:00.000Z']);
    expect(await due(never)).toEqual([]);
    expect(await due(unasked)).toEqual(['2031-03-06T06:00:00.000Z']);
    expect(await read(await createApiToken(never.email))).toMatchObject({ unread: 1 });
  });
});

describe('the list', () => {
  let reader: Member;
  let token: string;
  beforeAll(async () => {
    [reader] = await foundPractice(['engineer']);
    token = await createApiToken(reader.email);
    for (const n of [1, 2, 3, 4, 5])
      await say(
        reader,
        event([reader], { title: `Event ${n}`, dedupe: `e${n}`, href: `/jobs/J-${n}#results` }),
      );
  });
  const mark = (json: unknown) => ask('POST', '/api/v1/notices/read', { token, json });

  test('has the unread before the read, each newest first, and goes on from page to page', async () => {
    const before = await read(token);
    const ids = before.items.filter(({ title }: { title: string }) => /[45]/.test(title));
    expect((await mark({ ids: ids.map(({ id }: { id: string }) => id) })).json).toEqual({ unread: 3 });
    const first = await read(token, '?limit=2');
    const second = await read(token, `?limit=2&cursor=${first.next}`);
    const third = await read(token, `?limit=2&cursor=${second.next}`);
    expect([first, second, third].map(titles)).toEqual([
      ['Event 3', 'Event 2'],
      ['Event 1', 'Event 5'],
      ['Event 4'],
    ]);
    expect(third.next).toBeNull();
  });

  test('is read by page, whatever the place on it, and up to a moment', async () => {
    expect((await mark({ href: '/jobs/J-3' })).json).toEqual({ unread: 2 });
    const { items } = await read(token);
    await say(reader, event([reader], { title: 'Event 6', dedupe: 'e6' }));
    expect((await mark({ until: items[0].created_at })).json).toEqual({ unread: 1 });
    expect(titles(await read(token, '?limit=1'))).toEqual(['Event 6']);
  });

  test('is nobody else’s to see or to mark', async () => {
    const [other] = await foundPractice(['engineer']);
    const theirs = await createApiToken(other.email);
    const { items } = await read(token);
    expect(await read(theirs)).toMatchObject({ total: 0, unread: 0 });
    await ask('POST', '/api/v1/notices/read', { token: theirs, json: { ids: [items[0].id] } });
    expect((await read(token)).unread).toBe(1);
    const [colleague] = await withPractice(reader, (tx) => tx.select().from(notice).limit(1));
    expect(colleague?.personId).toBe(reader.personId);
  });

  test('refuses what it cannot mark', async () => {
    expect((await mark({ ids: [] })).status).toBe(422);
    expect((await mark({ all: true })).status).toBe(422);
    expect((await ask('POST', '/api/v1/notices/read', { json: { ids: [] } })).status).toBe(401);
  });
});

describe('a stream', () => {
  let member: Member;
  let user: User;
  let token: string;
  beforeAll(async () => {
    [member] = await foundPractice(['engineer']);
    token = await createApiToken(member.email);
    user = await userOf(token);
  });

  async function userOf(secret: string): Promise<User> {
    const found = await userOfToken(secret);
    if (!found) throw new Error('the token is known');
    return found;
  }

  /** Reads a stream message by message. */
  async function follow(who: User) {
    const reader = (await openStream(who)).getReader();
    const decoder = new TextDecoder();
    let text = '';
    const next = async (): Promise<string | null> => {
      for (;;) {
        const end = text.indexOf('\n\n');
        if (end >= 0) {
          const message = text.slice(0, end);
          text = text.slice(end + 2);
          if (message.startsWith('event:')) return message.replace('\ndata: ', ' ').replace('event: ', '');
          continue;
        }
        const { done, value } = await reader.read();
        if (done) return null;
        text += decoder.decode(value);
      }
    };
    return { next, leave: () => reader.cancel() };
  }

  test('begins with the number of unread notices and has each change of it', async () => {
    const one = await follow(user);
    const other = await follow(user);
    expect([await one.next(), await other.next()]).toEqual(['unread {"unread":0}', 'unread {"unread":0}']);
    await say(member, event([member], { dedupe: 's1' }));
    expect([await one.next(), await other.next()]).toEqual(['unread {"unread":1}', 'unread {"unread":1}']);
    await ask('POST', '/api/v1/notices/read', { token, json: { href: '/library/recalls/1' } });
    expect([await one.next(), await other.next()]).toEqual(['unread {"unread":0}', 'unread {"unread":0}']);
    await Promise.all([one.leave(), other.leave()]);
  });

  test('counts a burst once', async () => {
    const stream = await follow(user);
    await stream.next();
    await withPractice(member, async (tx) => {
      for (const n of [1, 2, 3]) await tell(tx, member, event([member], { dedupe: `burst ${n}` }));
    });
    expect(await stream.next()).toBe('unread {"unread":3}');
    await stream.leave();
  });

  test('has the progress of a run, and nothing of anybody else', async () => {
    const [colleague, stranger] = [
      (await foundPractice(['engineer']))[0],
      (await foundPractice(['engineer']))[0],
    ];
    const stream = await follow(user);
    await stream.next();
    const { db } = connection();
    await publish(db, stranger.practiceId, null, { type: 'progress', id: 'theirs' });
    await publish(db, member.practiceId, colleague.personId, { type: 'progress', id: 'a colleague’s' });
    await publish(db, member.practiceId, member.personId, { type: 'progress', id: 'mine' });
    await publish(db, member.practiceId, null, { type: 'progress', id: 'everybody’s' });
    expect([await stream.next(), await stream.next()]).toEqual([
      'progress {"id":"mine"}',
      'progress {"id":"everybody’s"}',
    ]);
    await stream.leave();
  });

  test('reaches more people than one announcement holds', async () => {
    const stream = await follow(user);
    await stream.next();
    const crowd = [...Array.from({ length: 400 }, () => crypto.randomUUID()), member.personId];
    await publish(connection().db, member.practiceId, crowd, { type: 'progress', id: 'run' });
    expect(await stream.next()).toBe('progress {"id":"run"}');
    await stream.leave();
  });

  test('ends with the session or token that it was opened by, and with the membership', async () => {
    const [leaver] = await foundPractice(['engineer']);
    const first = await createApiToken(leaver.email);
    const second = await createApiToken(leaver.email);
    const kept = await follow(await userOf(second));
    const ended = await follow(await userOf(first));
    await Promise.all([kept.next(), ended.next()]);
    const { via } = await userOf(first);
    expect((await ask('DELETE', `/api/v1/tokens/${via.id}`, { token: first })).status).toBe(204);
    expect(await ended.next()).toBeNull();
    await say(leaver, event([leaver]));
    expect(await kept.next()).toBe('unread {"unread":1}');
    await letGo(leaver);
    expect(await kept.next()).toBeNull();
  });

  test('ends when what it hears with was away: whoever comes back begins anew', async () => {
    const stream = await follow(user);
    await stream.next();
    await owner.sql`select pg_terminate_backend(pid) from pg_stat_activity where query like 'listen%'`;
    expect(await stream.next()).toBeNull();
    const again = await follow(user);
    expect(await again.next()).toMatch(/^unread/);
    await publish(connection().db, member.practiceId, null, { type: 'progress', id: 'heard' });
    expect(await again.next()).toBe('progress {"id":"heard"}');
    await again.leave();
  });

  test('is refused beyond a number, until one is left', async () => {
    const open = await Promise.all(Array.from({ length: MOST_STREAMS }, () => follow(user)));
    const refused = await ask('GET', '/api/v1/events', { token });
    expect([refused.status, refused.headers.get('retry-after')]).toEqual([429, '60']);
    await open[0]?.leave();
    open[0] = await follow(user);
    await Promise.all(open.map(({ leave }) => leave()));
  });

  test('needs a sign-in', async () => {
    expect((await ask('GET', '/api/v1/events')).status).toBe(401);
  });
});

describe('the choice of e-mails', () => {
  test('begins with the usual, is kept, and changes what comes', async () => {
    const [chooser] = await foundPractice(['engineer']);
    const token = await createApiToken(chooser.email);
    const address = '/api/v1/notices/preferences';
    const { json: usual } = await ask('GET', address, { token });
    expect(usual).toMatchObject({ returned: 'immediate', issued: 'digest' });
    const chosen = { ...usual, returned: 'none', issued: 'immediate' };
    expect((await ask('PUT', address, { token, json: chosen })).json).toEqual(chosen);
    expect((await ask('GET', address, { token })).json).toEqual(chosen);
    await say(chooser, event([chooser], { kind: 'returned', dedupe: 'r' }));
    await say(chooser, event([chooser], { kind: 'issued', dedupe: 'i' }));
    expect((await messagesTo(chooser)).map(({ kind, mode }) => [kind, mode])).toEqual([
      ['issued', 'immediate'],
    ]);
  });

  test('cannot mute a recall: not here, and not in the database', async () => {
    const [chooser] = await foundPractice(['engineer']);
    const token = await createApiToken(chooser.email);
    const { json: usual } = await ask('GET', '/api/v1/notices/preferences', { token });
    const { status, json } = await ask('PUT', '/api/v1/notices/preferences', {
      token,
      json: { ...usual, recall: 'none' },
    });
    expect([status, json.errors[0].pointer]).toEqual([422, '/recall']);
    const { practiceId, personId } = chooser;
    const insert = withPractice(chooser, (tx) =>
      tx.insert(noticePreference).values({ practiceId, personId, kind: 'recall', mode: 'none' }),
    );
    await expect(insert).rejects.toMatchObject({
      cause: { constraint_name: 'notice_preference_not_recall' },
    });
  });
});
