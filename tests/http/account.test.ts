import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { apiToken, session } from '@/db/schema/account';
import { auditEvent } from '@/db/schema/audit';
import { withPractice } from '@/db/tenancy';
import { createApiToken } from '@/features/account/token.server';
import { ask, signInAs } from '../support/app';
import { ORIGIN } from '../support/env';
import { foundPractice, letGo, type Member, PASSWORD } from '../support/practice';

let engineer: Member;
let checker: Member;
let stranger: Member;

beforeAll(async () => {
  [engineer, checker] = await foundPractice(['engineer'], ['checker', 'engineer']);
  [stranger] = await foundPractice(['principal']);
});

const actionsOf = (member: Member) =>
  withPractice(member, async (tx) => {
    const events = await tx.select().from(auditEvent).where(eq(auditEvent.subjectId, member.personId));
    return events.map(({ action }) => action);
  });

describe('signing in', () => {
  test('sets a cookie that scripts and other sites do not get, and says who came in', async () => {
    const { status, cookies, json } = await ask('POST', '/api/v1/session', {
      json: { email: ` ${engineer.email.toUpperCase()} `, password: PASSWORD },
    });
    expect([status, json.email, json.roles]).toEqual([200, engineer.email, ['engineer']]);
    expect(cookies).toHaveLength(1);
    expect(cookies[0]).toMatch(/^putlog=[\w-]{43}; Max-Age=43200; Path=\/; HttpOnly; SameSite=Lax$/);
  });

  test('keeps the token as a hash only', async () => {
    const token = (await signInAs(engineer.email, PASSWORD)).split('=')[1] ?? '';
    const rows = await withPractice(engineer, (tx) => tx.select().from(session));
    expect(rows.length).toBeGreaterThan(0);
    expect(JSON.stringify(rows)).not.toContain(token);
  });

  test('with a wrong password, an unknown address or as one who left gets one and the same answer', async () => {
    const [leaver] = await foundPractice(['engineer']);
    await letGo(leaver);
    const answers = await Promise.all(
      [
        { email: engineer.email, password: 'nine oak joist' },
        { email: 'nobody@nowhere.example', password: PASSWORD },
        { email: leaver.email, password: PASSWORD },
      ].map((json) => ask('POST', '/api/v1/session', { json })),
    );
    for (const { status, cookies, json } of answers) {
      expect([status, cookies]).toEqual([401, []]);
      expect(json).toEqual(answers[0]?.json);
    }
    expect(answers[0]?.json.errors).toEqual([
      {
        pointer: '/password',
        code: 'refused',
        message: 'The e-mail address or the password is wrong. Check both and try again.',
      },
    ]);
  });

  test('is put on record, refused or not, without what was typed', async () => {
    const [member] = await foundPractice(['engineer']);
    const json = { email: member.email, password: 'a-slip-of-the-keyboard' };
    await ask('POST', '/api/v1/session', { json });
    const cookie = await signInAs(member.email, PASSWORD);
    await ask('DELETE', '/api/v1/session', { cookie });
    expect(await actionsOf(member)).toEqual(['session.refuse', 'session.start', 'session.end']);
    const events = await withPractice(member, (tx) => tx.select().from(auditEvent));
    expect(JSON.stringify(events)).not.toContain('a-slip');
  });
});

describe('a session', () => {
  test('says who asks until it is signed out', async () => {
    const cookie = await signInAs(checker.email, PASSWORD);
    expect((await ask('GET', '/api/v1/me', { cookie })).json).toEqual({
      name: 'Person 1',
      initials: 'P',
      email: checker.email,
      practice: 'Practice under test',
      roles: ['checker', 'engineer'],
      unit_system: 'metric',
    });
    const { status, cookies } = await ask('DELETE', '/api/v1/session', { cookie });
    expect([status, cookies[0]]).toEqual([
      204,
      expect.stringMatching(/^putlog=deleted; Path=\/; Expires=Thu, 01 Jan 1970/),
    ]);
    expect((await ask('GET', '/api/v1/me', { cookie })).status).toBe(401);
  });

  test('is signed out by the page’s button as well', async () => {
    const cookie = await signInAs(checker.email, PASSWORD);
    const { status, headers } = await ask('POST', '/sign-out', { cookie });
    expect([status, headers.get('location')]).toEqual([303, '/sign-in']);
    expect((await ask('GET', '/api/v1/me', { cookie })).status).toBe(401);
  });

  test('dies at once when the person leaves', async () => {
    const [leaver] = await foundPractice(['engineer']);
    const cookie = await signInAs(leaver.email, PASSWORD);
    const token = await createApiToken(leaver.email);
    await letGo(leaver);
    expect((await ask('GET', '/api/v1/me', { cookie })).status).toBe(401);
    expect((await ask('GET', '/api/v1/me', { token })).status).toBe(401);
  });

  test('is listed with its device, and a forgotten one can be ended', async () => {
    const [member] = await foundPractice(['engineer']);
    const forgotten = await signInAs(member.email, PASSWORD, '198.51.100.7');
    const here = await signInAs(member.email, PASSWORD);
    const { json: before } = await ask('GET', '/api/v1/sessions', { cookie: here });
    expect(before).toMatchObject({ total: 2, next: null });
    const other = before.items.find((item: { current: boolean }) => !item.current);
    expect(other).toMatchObject({ device: 'Unknown device', address: '198.51.100.7' });

    expect((await ask('DELETE', `/api/v1/sessions/${other.id}`, { cookie: here })).status).toBe(204);
    expect((await ask('GET', '/api/v1/me', { cookie: forgotten })).status).toBe(401);
    expect((await ask('GET', '/api/v1/sessions', { cookie: here })).json.total).toBe(1);
  });

  test('of somebody else, in the same practice or another, is not there', async () => {
    const mine = await signInAs(engineer.email, PASSWORD);
    for (const other of [checker, stranger]) {
      const theirs = await signInAs(other.email, PASSWORD);
      const { json } = await ask('GET', '/api/v1/sessions', { cookie: theirs });
      expect((await ask('DELETE', `/api/v1/sessions/${json.items[0].id}`, { cookie: mine })).status).toBe(
        404,
      );
      expect((await ask('GET', '/api/v1/me', { cookie: theirs })).status).toBe(200);
    }
    expect((await ask('DELETE', '/api/v1/sessions/not-an-id', { cookie: mine })).status).toBe(404);
  });
});

test('signing out everywhere ends every session and no token', async () => {
  const [member] = await foundPractice(['engineer']);
  const cookies = [await signInAs(member.email, PASSWORD), await signInAs(member.email, PASSWORD)];
  const token = await createApiToken(member.email);
  expect((await ask('DELETE', '/api/v1/sessions', { cookie: cookies[0] })).json).toEqual({ ended: 2 });
  for (const cookie of cookies) expect((await ask('GET', '/api/v1/me', { cookie })).status).toBe(401);
  expect((await ask('GET', '/api/v1/tokens', { token })).json.total).toBe(1);
});

describe('a bearer token', () => {
  test('acts as its person and is kept as a hash', async () => {
    const token = await createApiToken(stranger.email);
    expect(token).toMatch(/^putlog_[\w-]{43}$/);
    expect((await ask('GET', '/api/v1/me', { token })).json.email).toBe(stranger.email);
    const rows = await withPractice(stranger, (tx) => tx.select().from(apiToken));
    expect(JSON.stringify(rows)).not.toContain(token.slice(7));
  });

  test('that is unknown is refused, even beside a good cookie', async () => {
    const cookie = await signInAs(engineer.email, PASSWORD);
    const { status, headers } = await ask('GET', '/api/v1/me', { cookie, token: 'putlog_unknown' });
    expect([status, headers.get('www-authenticate')]).toEqual([
      401,
      'Bearer realm="putlog", error="invalid_token"',
    ]);
  });

  test('is listed and withdrawn by its person alone', async () => {
    const [member] = await foundPractice(['librarian']);
    const token = await createApiToken(member.email, 'Nightly export');
    const { json } = await ask('GET', '/api/v1/tokens', { token });
    expect(json.items).toEqual([
      {
        id: json.items[0].id,
        name: 'Nightly export',
        created_at: expect.any(String),
        last_used_at: expect.any(String),
        ends_at: expect.any(String),
      },
    ]);
    const path = `/api/v1/tokens/${json.items[0].id}`;
    const intruder = await createApiToken(engineer.email);
    expect((await ask('DELETE', path, { token: intruder })).status).toBe(404);
    expect((await ask('DELETE', path, { token })).status).toBe(204);
    expect((await ask('GET', '/api/v1/me', { token })).status).toBe(401);
  });

  test('is not made for somebody unknown', async () => {
    await expect(createApiToken('nobody@nowhere.example')).rejects.toThrow(
      'No active person has the e-mail address nobody@nowhere.example.',
    );
  });
});

describe('changing one’s password', () => {
  const change = (cookie: string, current: string, password: string) =>
    ask('PUT', '/api/v1/me/password', { cookie, json: { current, password } });

  test('needs the current one and a strong new one', async () => {
    const [member] = await foundPractice(['engineer']);
    const cookie = await signInAs(member.email, PASSWORD);
    const faults = async (current: string, password: string) =>
      (await change(cookie, current, password)).json.errors.map(
        ({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`,
      );
    expect(await faults('not mine', 'ten green ledgers')).toEqual(['/current wrong']);
    expect(await faults(PASSWORD, 'too short')).toEqual(['/password out_of_range']);
    expect(await faults(PASSWORD, 'password-123456')).toEqual(['/password weak']);
    expect(await faults(PASSWORD, member.email)).toEqual(['/password weak']);
  });

  test('ends the other sessions and keeps this one', async () => {
    const [member] = await foundPractice(['engineer']);
    const elsewhere = await signInAs(member.email, PASSWORD);
    const here = await signInAs(member.email, PASSWORD);
    expect((await change(here, PASSWORD, 'ten green ledgers')).status).toBe(204);
    expect((await ask('GET', '/api/v1/me', { cookie: elsewhere })).status).toBe(401);
    expect((await ask('GET', '/api/v1/me', { cookie: here })).status).toBe(200);
    await expect(signInAs(member.email, PASSWORD)).rejects.toThrow('401');
    await signInAs(member.email, 'ten green ledgers');
    expect(await actionsOf(member)).toContain('password.change');
  });
});

test('every write with a cookie needs our own origin', async () => {
  const cookie = await signInAs(engineer.email, PASSWORD);
  for (const origin of [null, 'https://elsewhere.example', 'null'])
    for (const [method, path] of [
      ['DELETE', '/api/v1/session'],
      ['DELETE', '/api/v1/sessions'],
      ['PUT', '/api/v1/me/password'],
    ] as const)
      expect((await ask(method, path, { cookie, origin })).status).toBe(403);
  expect((await ask('GET', '/api/v1/me', { cookie, origin: 'https://elsewhere.example' })).status).toBe(200);
  expect((await ask('DELETE', '/api/v1/session', { cookie, origin: ORIGIN })).status).toBe(204);
});
