import { expect, test } from 'vitest';
import { commonScale, type OutlinedSection, scaleBarOf } from './outlined';

const section = (width: number, height: number): OutlinedSection => ({
  name: '',
  outline: { path: '', width, height },
  axes: { major: 'y', minor: 'z' },
});

test('commonScale(sections) lets the tallest and the widest fit', () => {
  expect(commonScale([section(100, 400), section(300, 200)], 380, 200, 80)).toBe(0.5);
  expect(commonScale([section(100, 400), section(300, 200)], 200, 200, 80)).toBe(0.4);
});

test("scaleBarOf(scale) has round divisions of the practice's unit", () => {
  expect(scaleBarOf(0.5, 1, 24)).toEqual({ value: 50, division: 25 });
  expect(scaleBarOf(0.5, 25.4, 24).value).toBe(2);
});
