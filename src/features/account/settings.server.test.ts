import { beforeEach, describe, expect, test } from 'vitest';
import { foundPractice, PASSWORD } from '../../../tests/support/practice';
import type { User } from './account';
import { userOfSession, userOfToken } from './identity.server';
import { takeAccountForm } from './settings.server';
import { proveSignIn } from './sign-in.server';
import { createApiToken, listTokens } from './token.server';

const from = { address: '192.0.2.20', agent: null };

let token: string;
let user: User;
beforeEach(async () => {
  const [member] = await foundPractice(['engineer']);
  const result = await proveSignIn({ email: member.email, password: PASSWORD }, from);
  if (!result.ok) throw new Error('The sign-in was refused');
  token = result.token;
  user = await present();
});

async function present(): Promise<User> {
  const found = await userOfSession(token);
  if (!found) throw new Error('The session has ended');
  return found;
}

function take(fields: Record<string, string>) {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.set(name, value);
  return takeAccountForm(user, form, from);
}

describe('settings', () => {
  test('units are kept with the person', async () => {
    const outcome = await take({ act: 'settings', units: 'us', theme: 'night', keys: 'on' });
    expect(outcome).toEqual({
      kind: 'done',
      done: 'settings',
      settings: { units: 'us', theme: 'night', keys: 'on' },
    });
    expect((await present()).unitSystem).toBe('us');
  });

  test('a box that is not ticked turns the keys off', async () => {
    const outcome = await take({ act: 'settings', units: 'metric', theme: 'device' });
    expect(outcome).toMatchObject({ settings: { keys: 'off' } });
  });

  test('a unit system that is none is refused at its field', async () => {
    const outcome = await take({ act: 'settings', units: 'cubits', theme: 'day' });
    expect(outcome).toMatchObject({ kind: 'refused', status: 422, errors: { units: expect.any(String) } });
    expect((await present()).unitSystem).toBe('metric');
  });
});

describe('a new password', () => {
  const fresh = 'gravel under the third purlin';

  test('typed twice alike replaces the old one', async () => {
    const outcome = await take({ act: 'password', current: PASSWORD, password: fresh, again: fresh });
    expect(outcome).toEqual({ kind: 'done', done: 'password' });
    expect(await proveSignIn({ email: user.email, password: fresh }, from)).toMatchObject({ ok: true });
  });

  test('typed differently the second time is refused there', async () => {
    const outcome = await take({ act: 'password', current: PASSWORD, password: fresh, again: `${fresh}s` });
    expect(outcome).toMatchObject({
      kind: 'refused',
      status: 422,
      errors: { again: 'The two new passwords differ. Type the same one twice.' },
    });
  });

  test('with a wrong current one is refused at that field', async () => {
    const outcome = await take({
      act: 'password',
      current: 'eight oak joists',
      password: fresh,
      again: fresh,
    });
    expect(outcome).toMatchObject({ kind: 'refused', errors: { current: expect.any(String) } });
  });
});

test('signing out everywhere ends this session too', async () => {
  expect(await take({ act: 'end-all' })).toEqual({ kind: 'signed-out' });
  expect(await userOfSession(token)).toBeNull();
});

test('a form that is not known is refused and changes nothing', async () => {
  expect(await take({ act: 'promote' })).toMatchObject({ kind: 'refused', status: 422 });
  await present();
});

describe('a token for programs', () => {
  const ofToken = async (outcome: Awaited<ReturnType<typeof take>>) => {
    if (outcome.kind !== 'token') throw new Error(JSON.stringify(outcome));
    return userOfToken(outcome.token);
  };

  test('is shown once, acts as its person, and stands in the list without itself', async () => {
    const outcome = await take({ act: 'make-token', name: ' Weekly export ' });
    expect(outcome).toMatchObject({ kind: 'token', name: 'Weekly export' });
    expect((await ofToken(outcome))?.personId).toBe(user.personId);
    const [listed, ...others] = await listTokens(user);
    expect([listed?.name, others]).toEqual(['Weekly export', []]);
    expect(JSON.stringify(listed)).not.toContain(outcome.kind === 'token' ? outcome.token.slice(7) : '');
  });

  test.each(['', '   ', 'x'.repeat(61)])('named “%s” is refused at its field', async (name) => {
    expect(await take({ act: 'make-token', name })).toMatchObject({
      kind: 'refused',
      status: 422,
      errors: { name: expect.any(String) },
    });
  });

  test('that is withdrawn works no longer; another person’s is not found', async () => {
    const outcome = await take({ act: 'make-token', name: 'Script' });
    const [{ id } = { id: '' }] = await listTokens(user);
    const [stranger] = await foundPractice(['engineer']);
    await createApiToken(stranger.email);
    expect(await take({ act: 'revoke-token', id: crypto.randomUUID() })).toMatchObject({ status: 404 });
    expect(await take({ act: 'revoke-token', id: 'none' })).toMatchObject({ kind: 'refused', status: 404 });
    expect(await take({ act: 'revoke-token', id })).toEqual({ kind: 'done', done: 'token' });
    expect(await ofToken(outcome)).toBeNull();
  });

  test('is one of twenty at most', async () => {
    for (let count = 0; count < 20; count += 1) await take({ act: 'make-token', name: `No. ${count}` });
    expect(await take({ act: 'make-token', name: 'One more' })).toMatchObject({
      status: 409,
      errors: { form: expect.stringContaining('20 tokens') },
    });
  });
});
