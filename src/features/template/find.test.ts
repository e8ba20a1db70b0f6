import { describe, expect, test } from 'vitest';
import { shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { isNarrowed, readCatalogueQuery, toggled, writeCatalogueQuery } from './catalogue-address';
import { countBy, createFinder, EVERYTHING, narrow } from './find';
import { searchTexts, toTemplateRow } from './template';

const entries = [...writtenTemplates.keys()].map((slug, at) => {
  const template = shippedTemplate(slug);
  const date = new Date(0);
  const revision = { number: 1, state: 'issued', date, author: 'A', reviewer: 'B' } as const;
  const row = toTemplateRow(template, revision, { members: at % 3, jobs: 1 });
  return { row, texts: searchTexts(row, template) };
});
const find = createFinder(entries);
const namesOf = (q: string) => find(q).map(({ entry }) => entry.row.name);

describe('a search of the catalogue', () => {
  test.each(['propped', 'proped', 'propepd', 'PROPPED'])('%s finds the propped cantilevers', (q) => {
    expect(
      namesOf(q)
        .slice(0, 5)
        .every((name) => name.startsWith('Propped')),
    ).toBe(true);
  });

  test('needs every word, with or without a slip', () => {
    const found = namesOf('unifrm pt load');
    expect(found.length).toBeGreaterThan(0);
    for (const name of found) expect(name.toLowerCase()).toMatch(/uniform.*point|point.*uniform/);
    expect(namesOf('overhang settlement arch')).toEqual([]);
  });

  test('puts a name before a mere mention', () => {
    expect(namesOf('two spans')[0]).toMatch(/^Two/);
    expect(namesOf('Prop 5')[0]).toContain('overhang');
  });

  test('marks the words of the name that it meant', () => {
    const [first] = find('cantilver unifrm');
    const name = first?.entry.row.name ?? '';
    expect(first?.marks.map(([from, to]) => name.slice(from, to).toLowerCase())).toEqual(
      expect.arrayContaining(['cantilever', 'uniform']),
    );
  });

  test('without words is everything, the most used first', () => {
    const uses = find('  ').map(({ entry }) => entry.row.uses.members);
    expect(uses).toHaveLength(entries.length);
    expect(uses).toEqual([...uses].sort((a, b) => b - a));
  });
});

describe('the filters', () => {
  const query = { ...EVERYTHING, arrangements: ['cantilever', 'simple-span'], loadKinds: ['point'] } as const;

  test('leave any of the arrangements, with all of the loads', () => {
    const rows = narrow(find(''), query).map(({ entry }) => entry.row);
    expect(rows.length).toBeGreaterThan(0);
    for (const row of rows) {
      expect(['cantilever', 'simple-span']).toContain(row.arrangement);
      expect(row.loadKinds).toContain('point');
    }
  });

  test('count what each value would leave', () => {
    const counts = countBy(find(''), query, 'arrangements');
    for (const [arrangement, count] of counts) {
      const left = narrow(find(''), { ...query, arrangements: [arrangement as 'cantilever'] });
      expect(left).toHaveLength(count);
    }
  });

  test('stand in the address and read back', () => {
    const address = writeCatalogueQuery({ ...query, q: 'span' });
    expect(readCatalogueQuery(new URLSearchParams(address))).toEqual({ ...query, q: 'span' });
    expect(isNarrowed(query)).toBe(true);
    expect(writeCatalogueQuery(EVERYTHING)).toBe('');
  });

  test('come off as they went on', () => {
    const on = toggled(EVERYTHING, 'tags', 'roof');
    expect(on.tags).toEqual(['roof']);
    expect(toggled(on, 'tags', 'roof')).toEqual(EVERYTHING);
  });
});
