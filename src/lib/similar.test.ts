import { expect, test } from 'vitest';
import { SimilarTexts, similarTo } from './similar';

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

test('of many texts those are given that are alike enough, with how alike they are', () => {
  const texts = ['w12x26', 'w14x22', 'hea200', 'w12x279', ''];
  const many = new SimilarTexts();
  for (const text of texts) many.add(text);
  const like = similarTo('w12x27');
  const expected = texts.flatMap((text, at) => (like(text) >= 0.3 ? [[at, like(text)]] : []));
  expect([...many.like('w12x27', 0.3)]).toEqual(expected);
  expect(expected.length).toBeGreaterThan(1);
});
