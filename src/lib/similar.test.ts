import { expect, test } from 'vitest';
import { similarTo } from './similar';

test('a text is wholly like itself and not like one that shares nothing', () => {
  expect(similarTo('w12x26')('w12x26')).toBe(1);
  expect(similarTo('w12x26')('hea')).toBe(0);
});

test('a slip leaves more in common than another word', () => {
  const like = similarTo('w12x27');
  expect(like('w12x26')).toBeGreaterThan(like('w14x22'));
});

// “  a ”, “ ab”, “ab ” against “  a ”, “ ac”, “ac ”: one of five
test('the share counts what either has once', () => {
  expect(similarTo('ab')('ac')).toBeCloseTo(1 / 5, 12);
});
