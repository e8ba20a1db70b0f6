import { expect, test } from 'vitest';
import { lastDay, reviewStanding } from './standing';

test.each([
  [null, 30, '2026-03-31', 'none'],
  ['2026-03-31', 30, '2026-03-31', 'current'],
  ['2026-03-31', 30, '2026-04-01', 'due'],
  ['2026-03-31', 30, '2026-04-30', 'due'],
  ['2026-03-31', 30, '2026-05-01', 'expired'],
  ['2026-03-31', 0, '2026-04-01', 'expired'],
  ['2024-02-28', 1, '2024-02-29', 'due'], // a leap year
] as const)('review by %s with a grace of %i days is on %s %s', (reviewBy, grace, today, standing) => {
  expect(reviewStanding(reviewBy, grace, today)).toBe(standing);
});

test('the last day for new members crosses a change of the clocks', () => {
  expect(lastDay('2026-03-28', 2)).toBe('2026-03-30');
});
