import type { MemberItem } from './member';
import { MEMBER_STATUSES } from './terms';

export const SCHEDULE_SORTS = {
  mark: 'Mark',
  template: 'Template',
  section: 'Section',
  ratio: 'Governing',
  changed: 'Changed',
} as const;
export type ScheduleSort = keyof typeof SCHEDULE_SORTS;

export interface ScheduleView {
  readonly sort: ScheduleSort;
  readonly status: MemberItem['status'] | null;
  readonly q: string;
}

/** How the schedule is asked for in the address; what is not understood is left at its usual. */
export function readSchedule(query: URLSearchParams): ScheduleView {
  const sort = Object.keys(SCHEDULE_SORTS).find((one): one is ScheduleSort => one === query.get('sort'));
  const status = MEMBER_STATUSES.find((one) => one === query.get('status'));
  return { sort: sort ?? 'mark', status: status ?? null, q: (query.get('q') ?? '').trim().slice(0, 60) };
}

const byMark = new Intl.Collator('en', { numeric: true });

const ORDERS: Record<ScheduleSort, (a: MemberItem, b: MemberItem) => number> = {
  mark: () => 0,
  template: (a, b) => byMark.compare(a.template.reference, b.template.reference),
  section: (a, b) => byMark.compare(a.section ?? '\uffff', b.section ?? '\uffff'),
  // The worst first; what has no result before everything that passes.
  ratio: (a, b) => (b.governing?.ratio ?? 1) - (a.governing?.ratio ?? 1),
  changed: (a, b) => b.changed_at.localeCompare(a.changed_at),
};

/** The members to show, in order; removed ones only where they are asked for. */
export function arrangeMembers(
  members: readonly MemberItem[],
  { sort, status, q }: ScheduleView,
): MemberItem[] {
  const words = q.toLowerCase();
  return members
    .filter((one) => (status === null ? one.status !== 'removed' : one.status === status))
    .filter((one) =>
      [one.mark, one.title, one.template.name, one.template.reference, one.section ?? ''].some((text) =>
        text.toLowerCase().includes(words),
      ),
    )
    .sort((a, b) => ORDERS[sort](a, b) || byMark.compare(a.mark, b.mark));
}

/** The address of the schedule with one choice changed. */
export function scheduleQuery(view: ScheduleView, change: Partial<ScheduleView>): string {
  const { sort, status, q } = { ...view, ...change };
  const query = new URLSearchParams({
    ...(sort !== 'mark' && { sort }),
    ...(status !== null && { status }),
    ...(q !== '' && { q }),
  }).toString();
  return query === '' ? '?' : `?${query}`;
}

/** The next free mark after those that are taken: LF4 after LF3, B1 where there is none. */
export function nextMark(members: readonly Pick<MemberItem, 'mark'>[]): string {
  const last = members.map(({ mark }) => /^(.*?)(\d+)$/.exec(mark)).filter((found) => found !== null);
  const [, prefix = 'B', number = '0'] = last.sort((a, b) => byMark.compare(a[0], b[0])).at(-1) ?? [];
  return `${prefix}${String(Number(number) + 1).padStart(number.startsWith('0') ? number.length : 1, '0')}`;
}
