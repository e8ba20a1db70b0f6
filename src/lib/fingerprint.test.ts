import { expect, test } from 'vitest';
import { contentHash, fingerprint } from './fingerprint';

test('a fingerprint does not depend on the order of the keys', () => {
  expect(fingerprint({ a: 1, b: [2, { c: 3, d: 4 }] }, '1')).toBe(
    fingerprint({ b: [2, { d: 4, c: 3 }], a: 1 }, '1'),
  );
});

test('a fingerprint depends on the engine’s version, a value and the order of a list', () => {
  const prints = [
    fingerprint({ list: [1, 2] }, '1'),
    fingerprint({ list: [1, 2] }, '2'),
    fingerprint({ list: [2, 1] }, '1'),
    fingerprint({ list: [1, 2.0000000000000004] }, '1'),
  ];
  expect(new Set(prints).size).toBe(4);
});

// RFC 8785, section 3.2.4: the canonical form of the example of section 3.2.2, hashed with sha256sum.
test('canonical JSON is that of RFC 8785', () => {
  const example = {
    numbers: [JSON.parse('333333333.33333329'), 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
    string: '\u20ac$\u000F\u000aA\'\u0042\u0022\u005c\\"/',
    literals: [null, true, false],
  };
  expect(contentHash(example)).toBe('2d5e01a318d0f0879ab568c4be289c8b1f64ef8921a53c6277d5e069978baacb');
});

test('what has no JSON form has no fingerprint', () => {
  expect(() => contentHash(undefined)).toThrow(TypeError);
  expect(() => contentHash({ value: Number.NaN })).toThrow();
});
