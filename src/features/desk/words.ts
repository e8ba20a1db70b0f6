import type { RequestState } from '@/features/review/review';

export const KIND_LABELS = {
  template: 'Template',
  'section-table': 'Section table',
  criteria: 'Criteria',
  'combination-set': 'Combination set',
  'material-set': 'Material set',
} as const;

export const REQUEST_STATE_WORDS: Readonly<Record<RequestState, string>> = {
  open: 'Open',
  accepted: 'Accepted',
  declined: 'Declined',
  done: 'Done',
};

const DAY = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeZone: 'UTC' });
const MOMENT = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short', timeZone: 'UTC' });

/** A day in UTC: "1 Dec 2026". */
export const dayWords = (at: string): string => DAY.format(new Date(at));
/** A moment in UTC: "1 Dec 2026, 13:05". */
export const momentWords = (at: string): string => MOMENT.format(new Date(at));

/** "3 uses", "1 use". */
export const counted = (count: number, one: string, many = `${one}s`): string =>
  `${count} ${count === 1 ? one : many}`;

/** A word of the product as it begins a line: "code edition" gives "Code edition". */
export const capital = (word: string): string => word.charAt(0).toUpperCase() + word.slice(1);

/** Choices of a field, after one that stands for none. */
export const choicesOf = (words: readonly string[], none?: string) => [
  ...(none === undefined ? [] : [{ value: '', label: none }]),
  ...words.map((value) => ({ value, label: capital(value) })),
];
