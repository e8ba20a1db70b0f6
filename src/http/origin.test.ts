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

  test.each(['PUT', 'PATCH', 'DELETE'])('may be a %s as well', (method) => {
    expect(check('session', 'https://elsewhere.example', method)).toThrow();
  });
});

test('reading is free of it', () => {
  expect(check('session', 'https://elsewhere.example', 'GET')).not.toThrow();
});
