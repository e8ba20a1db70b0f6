/** Where a document stands against the day by which it is to be looked at again. */
export const REVIEW_STANDINGS = ['none', 'current', 'due', 'expired'] as const;
export type ReviewStanding = (typeof REVIEW_STANDINGS)[number];

const DAY = 86_400_000; // ms

/** The day, as the database writes one: 2026-03-31, in UTC. */
export const dayOf = (moment: Date): string => moment.toISOString().slice(0, 10);

/** The last day on which new members may use it; null where no review is asked for. */
export const lastDay = (reviewBy: string | null, graceDays: number): string | null =>
  reviewBy === null ? null : dayOf(new Date(Date.parse(reviewBy) + graceDays * DAY));

/** Due from the day after `reviewBy` on: a warning on use. Expired after the grace: no new use, old ones untouched. */
export function reviewStanding(reviewBy: string | null, graceDays: number, today: string): ReviewStanding {
  const last = lastDay(reviewBy, graceDays);
  if (reviewBy === null || last === null) return 'none';
  if (today <= reviewBy) return 'current';
  return today <= last ? 'due' : 'expired';
}
