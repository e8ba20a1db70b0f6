import { describe, expect, test } from 'vitest';
import type { MemberItem } from './member';
import { arrangeMembers, nextMark, readSchedule, scheduleQuery } from './schedule';

const item = (mark: string, ratio: number | null, status: MemberItem['status'] = 'draft'): MemberItem => ({
  mark,
  title: `Beam ${mark}`,
  template: { slug: 's', reference: 'Span 1', name: 'Simple span', revision: 1, state: 'issued' },
  section: ratio === null ? null : 'IPE 300',
  status,
  governing: ratio === null ? null : { title: 'Bending stress', place: 'at A', ratio },
  findings: [],
  unproven: false,
  recalled: false,
  version: 1,
  changed_by: 'A',
  changed_at: '2026-01-01T00:00:00.000Z',
});
const MEMBERS = [
  item('B10', 0.4),
  item('B2', 0.9),
  item('B1', null),
  item('B3', 1.2),
  item('B4', 0.1, 'removed'),
];
const marks = (query: string) =>
  arrangeMembers(MEMBERS, readSchedule(new URLSearchParams(query))).map(({ mark }) => mark);

describe('a schedule of members', () => {
  test('counts marks as people do, and leaves removed ones out', () => {
    expect(marks('')).toEqual(['B1', 'B2', 'B3', 'B10']);
  });
  test('by utilisation has the worst first, and what has none before what passes', () => {
    expect(marks('sort=ratio')).toEqual(['B3', 'B1', 'B2', 'B10']);
  });
  test('shows removed ones where they are asked for', () => {
    expect(marks('status=removed')).toEqual(['B4']);
  });
  test('is narrowed by words, and does not mind a sort that is none', () => {
    expect(marks('q=b1&sort=colour')).toEqual(['B1', 'B10']);
  });
  test('keeps its other choices when one changes', () => {
    const view = readSchedule(new URLSearchParams('q=roof&status=draft'));
    expect(scheduleQuery(view, { sort: 'ratio' })).toBe('?sort=ratio&status=draft&q=roof');
    expect(scheduleQuery(view, { q: '', status: null })).toBe('?');
  });
});

test('the next mark follows the last one, removed ones counted', () => {
  expect(nextMark(MEMBERS)).toBe('B11');
  expect(nextMark([{ mark: 'LF-09' }])).toBe('LF-10');
  expect(nextMark([])).toBe('B1');
});
