import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { session } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import { foundPractice, type Member, PASSWORD } from '../../../tests/support/practice';
import { ATTEMPTS, admitAttempt, noteSuccess } from './attempt.server';
import { userOfSession, userOfToken } from './identity.server';
import { listSessions } from './session.server';
import { proveSignIn, signIn } from './sign-in.server';
import { createApiToken } from './token.server';

const MINUTE = 60_000; // ms
const HOUR = 60 * MINUTE;
const from = {
  address: '192.0.2.10',
  agent: 'Mozilla/5.0 (Windows NT 10.0) AppleWebKit/537.36 Chrome/130.0 Safari/537.36',
};

let member: Member;
beforeAll(async () => {
  [member] = await foundPractice(['engineer']);
});

async function begin(now: Date): Promise<string> {
  const result = await proveSignIn({ email: member.email, password: PASSWORD }, from, now);
  if (!result.ok) throw new Error('The sign-in was refused');
  return result.token;
}

describe('a session', () => {
  test('ends after two hours without use, and not before', async () => {
    const start = new Date();
    const token = await begin(start);
    const later = (ms: number) => new Date(start.getTime() + ms);
    expect(await userOfSession(token, later(2 * HOUR))).not.toBeNull();
    expect(await userOfSession(token, later(4 * HOUR))).not.toBeNull(); // the use before began the two hours anew
    expect(await userOfSession(token, later(6 * HOUR + 1))).toBeNull();
  });

  test('ends after twelve hours, however much it is used', async () => {
    const start = new Date();
    const token = await begin(start);
    for (let hour = 1; hour < 12; hour++)
      expect(await userOfSession(token, new Date(start.getTime() + hour * HOUR))).not.toBeNull();
    expect(await userOfSession(token, new Date(start.getTime() + 12 * HOUR))).toBeNull();
  });

  test('that the database holds to be over is over', async () => {
    const token = await begin(new Date(Date.now() - 12 * HOUR - MINUTE));
    expect(await userOfSession(token, new Date(Date.now() - 12 * HOUR))).toBeNull();
  });

  test('notes its use once a minute, not at every request', async () => {
    const start = new Date();
    const token = await begin(start);
    const user = await userOfSession(token, new Date(start.getTime() + 50_000));
    if (!user) throw new Error('The session has ended');
    const lastSeen = async () => {
      const [row] = await withPractice(user, (tx) =>
        tx.select().from(session).where(eq(session.id, user.via.id)),
      );
      return row?.lastSeenAt.getTime();
    };
    expect(await lastSeen()).toBe(start.getTime());
    await userOfSession(token, new Date(start.getTime() + 61_000));
    expect(await lastSeen()).toBe(start.getTime() + 61_000);
    const sessions = await listSessions(user);
    expect(sessions.find(({ current }) => current)?.device).toBe('Chrome on Windows');
  });

  test('does not come from a token that was made up', async () => {
    expect(await userOfSession('')).toBeNull();
    expect(await userOfSession("' or true --")).toBeNull();
  });
});

test('a bearer token ends after ninety days', async () => {
  const token = await createApiToken(member.email, 'Old', new Date(Date.now() - 90 * 24 * HOUR - MINUTE));
  expect(await userOfToken(token)).toBeNull();
});

describe('attempts', () => {
  const start = new Date('2026-03-02T09:00:00Z');
  const later = (ms: number) => new Date(start.getTime() + ms);
  const fail = async (email: string, address: string, times: number, now = start) => {
    for (let time = 0; time < times; time++) await admitAttempt(email, address, now);
  };

  test('of one account are limited, from wherever they come, until the window has passed', async () => {
    const email = `limited@${crypto.randomUUID()}.example`;
    for (let attempt = 0; attempt < ATTEMPTS.account; attempt++)
      expect((await admitAttempt(email, `203.0.113.${attempt}`, later(attempt * 1000))).admitted).toBe(true);
    const refused = await admitAttempt(email, '203.0.113.99', later(MINUTE));
    expect(refused).toEqual({ admitted: false, retryAfterSeconds: 14 * 60 });
    expect((await admitAttempt(email, '203.0.113.99', later(15 * MINUTE - 1))).admitted).toBe(false);
    expect((await admitAttempt(email, '203.0.113.99', later(15 * MINUTE))).admitted).toBe(true);
  });

  test('of one address are limited, whichever accounts they try', async () => {
    const address = crypto.randomUUID();
    for (let attempt = 0; attempt < ATTEMPTS.address; attempt++)
      await fail(`spray-${attempt}@${address}.example`, address, 1);
    expect((await admitAttempt(`one-more@${address}.example`, address, later(MINUTE))).admitted).toBe(false);
    expect((await admitAttempt(`one-more@${address}.example`, 'elsewhere', later(MINUTE))).admitted).toBe(
      true,
    );
  });

  test('count anew for an account once one succeeds, and not for its address', async () => {
    const [email, address] = [`slip@${crypto.randomUUID()}.example`, crypto.randomUUID()];
    await fail(email, address, ATTEMPTS.account - 1);
    const admission = await admitAttempt(email, address, later(1000));
    if (!admission.admitted) throw new Error('The last attempt was refused');
    await noteSuccess(admission.attemptId, later(1000));
    await fail(email, address, ATTEMPTS.account - 1, later(2000));
    expect((await admitAttempt(email, address, later(3000))).admitted).toBe(true);
    await fail('others@nowhere.example', address, 0);
    for (let other = 0; other < ATTEMPTS.address - 2 * ATTEMPTS.account + 1; other++)
      await fail(`${other}@${address}.example`, address, 1, later(4000));
    expect((await admitAttempt(`new@${address}.example`, address, later(5000))).admitted).toBe(false);
  });

  test('that come at once do not pass the count together', async () => {
    const email = `burst@${crypto.randomUUID()}.example`;
    const admissions = await Promise.all(
      Array.from({ length: 3 * ATTEMPTS.account }, (_, index) =>
        admitAttempt(email, `203.0.113.${index}`, start),
      ),
    );
    expect(admissions.filter(({ admitted }) => admitted)).toHaveLength(ATTEMPTS.account);
  });
});

describe('the sign-in form', () => {
  const submit = async (fields: Record<string, string>) => {
    const cookies = new Map<string, string>();
    const form = new FormData();
    for (const [name, value] of Object.entries(fields)) form.set(name, value);
    const result = await signIn(
      {
        request: new Request('http://localhost:4321/sign-in', { method: 'POST' }),
        clientAddress: from.address,
        locals: { origin: 'https://putlog.quillmere.example' },
        cookies: {
          get: (name) => {
            const value = cookies.get(name);
            return value === undefined ? undefined : { value };
          },
          set: (name, value, options) => cookies.set(name, `${value} ${JSON.stringify(options)}`),
          delete: (name) => cookies.delete(name),
        },
      },
      form,
    );
    return { result, cookies };
  };

  test('goes on to where the person wanted to go, with a cookie for this host over https alone', async () => {
    const { result, cookies } = await submit({
      email: member.email,
      password: PASSWORD,
      next: '/jobs/Q-2417',
    });
    expect(result).toEqual({ ok: true, redirect: '/jobs/Q-2417' });
    expect(cookies.get('__Host-putlog')).toMatch(
      /^[\w-]{43} {"path":"\/","httpOnly":true,"sameSite":"lax","secure":true,"maxAge":43200}$/,
    );
  });

  test('never goes on to another site', async () => {
    const { result } = await submit({ email: member.email, password: PASSWORD, next: '//elsewhere.example' });
    expect(result).toEqual({ ok: true, redirect: '/' });
  });

  test('says at each field what is missing', async () => {
    const { result, cookies } = await submit({});
    expect(result).toEqual({
      ok: false,
      status: 422,
      fieldErrors: { email: 'Give your e-mail address.', password: 'Give your password.' },
      retryAfter: null,
    });
    expect(cookies.size).toBe(0);
  });

  test('says how long to wait after too many attempts', async () => {
    const email = `locked@${crypto.randomUUID()}.example`;
    for (let attempt = 0; attempt < ATTEMPTS.account; attempt++) await admitAttempt(email, 'x', new Date());
    const { result } = await submit({ email, password: 'anything' });
    expect(result).toMatchObject({
      ok: false,
      status: 429,
      fieldErrors: { form: 'Too many attempts did not succeed. Try again in 15 minutes.' },
    });
  });
});
