import { describe, expect, test } from 'vitest';
import { commandGroups, countWords, hitGroups, readRecent, recentGroups, withRecent } from './options';
import { GRADES, type Hit, hrefOf, inOrder, type SearchView, stateWords } from './search';

const text = (words: string) => ({ text: words, marks: [] });
const hit = (kind: Hit['kind'], href: string): Hit => ({
  kind,
  mark: text(''),
  title: text(href),
  detail: text(''),
  excerpt: null,
  state: '',
  href,
});
const view = (more: Partial<SearchView>): SearchView => ({
  items: [],
  next: null,
  total: 0,
  kinds: [],
  instead: [],
  ...more,
});

describe('the groups', () => {
  test('stand by their best answer, else in one order', () => {
    const found = inOrder([
      { kind: 'note', total: 1, grade: GRADES.names },
      { kind: 'template', total: 1, grade: GRADES.names },
      { kind: 'member', total: 1, grade: GRADES.mark },
    ]);
    expect(found.map(({ kind }) => kind)).toEqual(['member', 'template', 'note']);
  });

  test('end with the way to all of a kind, where not all are shown', () => {
    const items = [hit('job', '/jobs/1'), ...[1, 2, 3, 4, 5].map((n) => hit('member', `/m/${n}`))];
    const kinds = [
      { kind: 'job', total: 1 },
      { kind: 'member', total: 9 },
    ] as const;
    const groups = hitGroups('a & b', view({ items, kinds: [...kinds], total: 10 }));
    expect(groups.map(({ title, options }) => [title, options.length])).toEqual([
      ['Jobs', 1],
      ['Members', 6],
    ]);
    expect(groups[1]?.options.at(-1)).toMatchObject({
      title: { text: 'All 9 members' },
      href: '/search?q=a+%26+b&kind=member',
    });
  });
});

describe('places to go to', () => {
  const commands = [
    { label: 'New job', href: '/jobs/new', keys: '' },
    { label: 'Zone B Loads', href: '#zone-B', keys: 'G B' },
  ];
  test.each([
    ['', 2],
    ['new', 1],
    ['job n', 1],
    ['loads', 1],
    ['new loads', 0],
  ])('answer to %j: %i', (q, count) => {
    expect(commandGroups(q, commands, 'Go to').flatMap(({ options }) => options)).toHaveLength(count);
  });
});

describe('searches made before', () => {
  test('have the newest first, each once and six at most', () => {
    expect(withRecent(['LF4', 'prop'], 'lf4')).toEqual(['lf4', 'prop']);
    expect(withRecent(['1', '2', '3', '4', '5', '6'], '7')).toHaveLength(6);
  });

  test.each([null, '', '{', '{"a":1}', '[1, null]'])('that cannot be read (%j) are none', (kept) => {
    expect(readRecent(kept)).toEqual([]);
  });

  test('are searched again when chosen', () => {
    expect(recentGroups(['prop'])[0]?.options[0]).toMatchObject({ again: 'prop', href: '/search?q=prop' });
    expect(recentGroups([])).toEqual([]);
  });
});

test('how many there are is said, and how a slip was read', () => {
  expect(countWords(view({}))).toBe('');
  expect(countWords(view({ total: 1 }))).toBe('1 found.');
  const instead = [{ typed: 'overhag', meant: ['overhang', 'overhangs'] }];
  expect(countWords(view({ total: 3, instead }))).toMatchInlineSnapshot(
    `"3 found. Nothing has it as typed: “overhag” read as “overhang” or “overhangs”."`,
  );
});

test.each([
  ['template', ['template', 'span'], 'issued', '/templates/span'],
  ['template', ['template', 'span'], 'draft', '/library/template/span'],
  ['document', ['criteria', 'steel'], 'issued', '/library/criteria/steel'],
  ['section', ['uk', 'UB 1x2'], '', '/sections/uk/UB%201x2'],
  ['member', ['Q-1', 'B/1'], 'draft', '/jobs/Q-1/members/B%2F1'],
  ['person', ['A B'], '', '/search?q=A+B'],
  ['note', ['request', '3'], 'open', '/library/requests/3'],
  ['note', ['method', 'template', 'span', '2'], 'issued', '/templates/span/revisions/2'],
  ['note', ['method', 'template', 'span', '2'], 'draft', '/library/template/span/revisions/2'],
  ['note', ['change', 'criteria', 'steel', '1'], 'issued', '/library/criteria/steel/revisions/1'],
] as const)('the page of a %s %j, %s, is %s', (kind, place, state, href) => {
  expect(hrefOf(kind, place, state)).toBe(href);
});

test('a state is named where it is not the usual one', () => {
  expect(stateWords('template', 'in_review')).toBe('in review');
  expect(stateWords('template', 'issued')).toBe('');
  expect(stateWords('template', 'draft')).toBe('draft');
  expect(stateWords('member', 'draft')).toBe('');
  expect(stateWords('member', 'removed')).toBe('removed');
});
