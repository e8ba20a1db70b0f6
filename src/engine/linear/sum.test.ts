import { expect, test } from 'vitest';
import { largest, Sum, settled } from './sum';
import { Wide } from './wide';

const third = Wide.ONE.over(3);

test('a sum whose terms cancel to rounding is exactly zero', () => {
  const sum = new Sum();
  for (let i = 0; i < 3; i++) sum.add(third);
  sum.subtract(Wide.ONE);
  expect(sum.total()).toBe(Wide.ZERO);
});

test('a small total of terms that do not cancel is kept', () => {
  const sum = new Sum();
  sum.add(Wide.ONE);
  sum.subtract(Wide.pair(1, 2 ** -70));
  expect(sum.total().rounded()).toBe(-(2 ** -70));
  expect(new Sum().total()).toBe(Wide.ZERO);
});

test('values that are not above the floor are exactly zero', () => {
  const values = [Wide.of(1e-30), Wide.of(-3), Wide.of(2)];
  expect(largest(values, [Wide.of(2.5)])).toBe(3);
  expect(largest()).toBe(0);
  expect(settled(values, 1e-20).map((value) => value.rounded())).toEqual([0, -3, 2]);
});
