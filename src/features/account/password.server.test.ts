import { describe, expect, test } from 'vitest';
import { hashPassword, verifyPassword } from './password.server';

describe('a password', () => {
  test('is stored as Argon2id with a salt of its own', async () => {
    const [first, second] = await Promise.all([
      hashPassword('nine oak joists'),
      hashPassword('nine oak joists'),
    ]);
    expect(first).toMatch(/^\$argon2id\$/);
    expect(first).not.toBe(second);
  });

  test('matches its own hash and no other', async () => {
    const hash = await hashPassword('nine oak joists');
    expect(await verifyPassword(hash, 'nine oak joists')).toBe(true);
    expect(await verifyPassword(hash, 'nine oak joist')).toBe(false);
  });

  test('matches in whichever Unicode form it is typed', async () => {
    expect(await verifyPassword(await hashPassword('caf\u00e9 beam 1234'), 'cafe\u0301 beam 1234')).toBe(
      true,
    );
  });

  test('never matches an account that has none', async () => {
    expect(await verifyPassword(null, 'nine oak joists')).toBe(false);
  });
});
