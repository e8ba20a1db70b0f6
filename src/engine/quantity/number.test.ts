import { describe, expect, test } from 'vitest';
import { plainText, readNumber } from './number';

describe('readNumber', () => {
  test.each([
    ['12 345', 12345],
    ["12'345.5", 12345.5],
    ['1 1/2', 1.5],
    ['3,8', 3.8],
  ])('reads %j', (text, value) => {
    expect(readNumber(text)).toEqual({ ok: true, value });
  });

  test.each(['12 34', "1'2", '1 23.5', ''])('does not guess what %j is', (text) => {
    expect(readNumber(text)).toMatchObject({ ok: false, code: 'not_a_number' });
  });

  test('asks which of two numbers 1,234 is', () => {
    expect(readNumber('1,234')).toEqual({ ok: false, code: 'ambiguous_number', values: ['1234', '1.234'] });
  });
});

test('plainText has one spelling of fractions, minus signs, primes and spaces', () => {
  expect(plainText('\u22126\u2032\u20113\u00bd\u2033')).toBe(`-6'-3 1/2"`);
  expect(plainText('  12\u202f345\u00a0 ')).toBe('12 345');
});
