import { LIGHTEST, type SectionPlace, type SectionQuery } from '../query';
import type { Register } from './register';

/** The grade of a row that is not in the answer. */
export const NO_ANSWER = 255;
/** designationRank of the engine, 0 the best. */
const RANKS = [0, 1, 2, 3, 4];
/** Where a list is sorted, an exact designation still comes first; how well others answer is all one. */
const RANKS_SORTED = [0, 1];

export interface Page {
  /** Where the page before ended; null for the first. */
  readonly place: SectionPlace | null;
  readonly limit: number;
}

export interface RowsFound {
  /** Rows of the register, in order. */
  readonly at: readonly number[];
  readonly next: SectionPlace | null;
  readonly total: number;
}

/** One page of the graded rows: the better grade first, then as sorted, ties by designation and table. */
export function pageOf(
  register: Register,
  { sort }: Pick<SectionQuery, 'sort'>,
  grades: Uint8Array,
  { place, limit }: Page,
): RowsFound {
  const by = sort ?? LIGHTEST;
  const ranks = sort ? RANKS_SORTED : RANKS;
  const worst = ranks.length - 1;
  const order = orderOf(register, by);
  const isAfter = place ? afterPlace(register, by, place) : () => true;
  const at: number[] = [];
  let total = 0;
  for (const grade of grades) if (grade !== NO_ANSWER) total++;
  for (const rank of ranks) {
    if (place && rank < place[0]) continue;
    const isPlaced = rank === place?.[0];
    for (const row of order) {
      const grade = grades[row] ?? NO_ANSWER;
      if (grade === NO_ANSWER || Math.min(grade, worst) !== rank || (isPlaced && !isAfter(row))) continue;
      if (at.length === limit)
        return { at, next: placeOf(register, by, at.at(-1) ?? 0, grades, worst), total };
      at.push(row);
    }
  }
  return { at, next: null, total };
}

type By = NonNullable<SectionQuery['sort']>;

function orderOf(register: Register, { field, descending }: By): Iterable<number> {
  if (field !== 'designation') return register.order(field, descending);
  const last = register.count - 1;
  return Uint32Array.from({ length: register.count }, (_, i) => (descending ? last - i : i));
}

function placeOf(
  register: Register,
  { field }: By,
  at: number,
  grades: Uint8Array,
  worst: number,
): SectionPlace {
  const value = field === 'designation' ? Number.NaN : (register.values(field)[at] ?? Number.NaN);
  const rank = Math.min(grades[at] ?? worst, worst);
  return [rank, Number.isNaN(value) ? null : value, register.key(at), register.table(at)];
}

/** Whether a row of the same grade stands after a place, though the row of that place be gone meanwhile. */
function afterPlace(
  register: Register,
  { field, descending }: By,
  [, placeValue, key, table]: SectionPlace,
): (at: number) => boolean {
  const { before, through } = register.around(key, table);
  if (field === 'designation') return (at) => (descending ? at < before : at >= through);
  const column = register.values(field);
  return (at) => {
    const value = column[at] ?? Number.NaN;
    if (Number.isNaN(value)) return placeValue !== null || at >= through;
    if (placeValue === null) return false;
    return value === placeValue ? at >= through : descending ? value < placeValue : value > placeValue;
  };
}
