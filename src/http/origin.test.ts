import { describe, expect, test } from 'vitest';
import { checkOrigin } from './origin';

const OURS = 'https://putlog.quillmere.example';

const check =
  (signedBy: 'session' | 'token' | null, origin: string | null, method = 'POST') =>
  () =>
    checkOrigin(new Request(OURS, { method, headers: origin === null ? {} : { origin } }), OURS, signedBy);

describe('a write', () => {
  test('with a session needs our own origin', () => {
    expect(check('session', OURS)).not.toThrow();
    for (const origin of [
      null,
      'null',
      'https://elsewhere.example',
      `${OURS}:8443`,
      OURS.replace('https', 'http'),
    ])
      expect(check('session', origin)).toThrow(expect.objectContaining({ status: 403 }));
  });

  test('with a bearer token needs none', () => {
    expect(check('token', null)).not.toThrow();
    expect(check('token', 'https://elsewhere.example')).not.toThrow();
  });

  test('by nobody, such as a sign-in, may come from a program but not from another site', () => {
    expect(check(null, null)).not.toThrow();
    expect(check(null, OURS)).not.toThrow();
    expect(check(null, 'https://elsewhere.example')).toThrow(expect.objectContaining({ status: 403 }));
  });

  test('on the machine itself may call it by another name', () => {
    const from = (origin: string) => () =>
      checkOrigin(
        new Request(OURS, { method: 'POST', headers: { origin } }),
        'http://localhost:4321',
        'session',
      );
    for (const origin of ['http://localhost:4321', 'http://127.0.0.1:4321', 'http://[::1]:4321'])
      expect(from(origin)).not.toThrow();
    for (const origin of [
      'http://127.0.0.1:4000',
      'https://127.0.0.1:4321',
      'http://127.0.0.1.elsewhere.example:4321',
    ])
      expect(from(origin)).toThrow();
  });

  test.each(['PUT', 'PATCH', 'DELETE'])('may be a %s as well', (method) => {
    expect(check('session', 'https://elsewhere.example', method)).toThrow();
  });
});

test('reading is free of it', () => {
  expect(check('session', 'https://elsewhere.example', 'GET')).not.toThrow();
});
