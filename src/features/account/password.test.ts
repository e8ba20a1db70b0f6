import { describe, expect, test } from 'vitest';
import { read } from '@/lib/read';
import { ChangePassword, weakness } from './password';

const owner = { email: 'ansel.thornquay@quillmere.example', name: 'Ansel Thornquay' };

describe('a new password', () => {
  test.each([
    ['123456789012', 'It has no letters.'],
    ['aaaabbbbcccc1', 'It repeats a few letters.'],
    ['ansel.thornquay', 'It is your name or your e-mail address.'],
    ['Thornquay-2026!', 'It is your name or your e-mail address.'],
    ['ansel.thornquay@quillmere.example', 'It is your name or your e-mail address.'],
    ['Password123456', 'It is among the passwords that are tried first.'],
    ['summer-winter-2026', 'It is among the passwords that are tried first.'],
  ])('%s is refused', (password, said) => {
    expect(weakness(password, owner)).toMatch(new RegExp(`^${said}`));
  });

  test.each(['nine oak joists', 'correct ledger tile soup', 'ansel buys green slate'])(
    '%s will do',
    (password) => {
      expect(weakness(password, owner)).toBeNull();
    },
  );

  test('has at least twelve characters and at most two hundred', () => {
    const said = (password: string) => {
      const reading = read(ChangePassword, { current: 'x', password });
      return reading.ok ? null : reading.faults[0]?.message;
    };
    expect(said('eleven char')).toBe('Use at least 12 characters.');
    expect(said('x'.repeat(201))).toBe('Use at most 200 characters.');
    expect(said('twelve chars')).toBeNull();
  });
});
