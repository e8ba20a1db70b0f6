import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { applyEdits, listAt, textAt, valueAt } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import { SET_READERS } from '@/features/review/read-set';
import { grown, pasteEdits } from './cells';
import { duplication } from './combinations';
import {
  bandsOf,
  columnOf,
  KINDS,
  type Kind,
  LIST,
  moveAmongKind,
  newBand,
  newMaterial,
  orderBands,
  rowsOf,
  usualUnit,
  VALUES,
} from './materials';

const shipped = (slug: string): Written => JSON.parse(readFileSync(`data/materials/${slug}.json`, 'utf8'));
const steel = shipped('en-10025-2004');
const timber = shipped('en-338-2016');
const faultsOf = (document: Written) => {
  const reading = SET_READERS['material-set'](document);
  return reading.ok ? [] : reading.faults.map(({ pointer, code }) => `${pointer} ${code}`);
};

describe('rows of a kind', () => {
  const mixed = {
    materials: [...listAt(steel, LIST).slice(0, 2), ...listAt(timber, LIST), ...listAt(steel, LIST).slice(2)],
  };

  test('are found wherever they stand, with the steps of the steels', () => {
    const { length } = listAt(timber, LIST);
    expect(rowsOf(mixed, 'steel')).toEqual([0, 1, length + 2, length + 3].map((index) => `${LIST}/${index}`));
    expect(rowsOf(mixed, 'timber_nds')).toEqual([]);
    expect(bandsOf(steel)).toHaveLength(
      listAt(steel, LIST).flatMap((one) => listAt(one, '/strength')).length,
    );
  });

  test('are moved past those of other kinds', () => {
    const { length } = listAt(timber, LIST);
    expect(moveAmongKind(mixed, `${LIST}/1`, 'steel', 1)).toBe(length + 2);
    expect(moveAmongKind(mixed, `${LIST}/${length + 2}`, 'steel', -1)).toBe(1);
    expect(moveAmongKind(mixed, `${LIST}/0`, 'steel', -1)).toBeNull();
  });
});

describe('a new material', () => {
  test.each(KINDS)(
    'of %s has every field of its kind, and faults only where its author must write',
    (kind: Kind) => {
      const document = {
        schema_version: 1,
        slug: 'x',
        reference: 'X',
        name: 'X',
        summary: 'X',
        materials: [newMaterial({}, kind)],
      };
      const at = faultsOf(document).map((one) => one.split(' ')[0]?.replace('/materials/0/', ''));
      const required = VALUES[kind].filter(({ isOptional }) => !isOptional).map(({ key }) => key);
      const rest = ['name', 'standard', 'edition', 'clause', 'note', 'expansion'];
      const bands = kind === 'steel' ? ['strength/0/fy', 'strength/0/fu'] : [];
      expect(new Set(at)).toEqual(new Set([...required, ...rest, ...bands]));
    },
  );

  test('goes on from the last of its kind where that does not go by the class', () => {
    expect(newMaterial(steel, 'steel')).toMatchObject({
      standard: 'EN 10025-3',
      e: '210000 N/mm2',
      from_memory: true,
    });
    expect(newMaterial(timber, 'timber_en')).toMatchObject({ standard: 'EN 338', e: '', product: 'solid' });
  });
});

test('a material is duplicated with its strengths, under an id of its own', () => {
  const { document } = applyEdits(steel, duplication(steel, '/materials/0'));
  expect(textAt(document, '/materials/1/id')).toBe('s235-2');
  expect(valueAt(document, '/materials/1/strength')).toEqual(valueAt(steel, '/materials/0/strength'));
  expect(faultsOf(document)).toEqual([]);
});

describe('thickness steps', () => {
  test('a further one has the strengths of the last, and asks for its limit by the order', () => {
    const { document } = applyEdits(steel, newBand(steel, '/materials/0'));
    expect(listAt(document, '/materials/0/strength').at(-1)).not.toHaveProperty('up_to');
    expect(faultsOf(document)).toEqual([]);
  });

  test('are put in order, thin first and the one without limit last', () => {
    expect(orderBands(steel, '/materials/0')).toEqual([]);
    const bands = [{ fy: 'c' }, { up_to: '1 in', fy: 'b' }, { up_to: '16 mm', fy: 'a' }];
    const mixed = { materials: [{ kind: 'steel', strength: bands }] };
    const { document } = applyEdits(mixed, orderBands(mixed, '/materials/0'));
    expect(listAt(document, '/materials/0/strength').map((one) => textAt(one, '/fy'))).toEqual([
      'a',
      'b',
      'c',
    ]);
  });
});

test('a column is in the unit of its values, else in the usual one of its kind', () => {
  const [first] = VALUES.steel;
  if (!first) throw new Error('steel has values');
  const american = shipped('astm-steel');
  const unit = (document: Written) =>
    columnOf(document, rowsOf(document, 'steel'), first, usualUnit('steel', 'modulus'));
  expect(unit(american)).toMatchObject({ unit: 'ksi' });
  expect(unit({})).toMatchObject({ unit: 'N/mm2' });
});

// EN 338:2016, Table 1, from memory: C35 and C40.
test('classes pasted beyond the last row become rows, in the units of their columns', () => {
  const rows = rowsOf(timber, 'timber_en');
  const columns = VALUES.timber_en
    .slice(0, 2)
    .map((one) => columnOf(timber, rows, one, usualUnit('timber_en', one.dimension)));
  const growth = { list: LIST, most: 200, blank: (document: Written) => newMaterial(document, 'timber_en') };
  const more = grown(timber, growth, 2);
  const pasted = [
    ['35', '22.5'],
    ['40', '26'],
  ];
  expect(grown(timber, { ...growth, most: rows.length + 1 }, 9).rows).toHaveLength(1);
  const { document } = applyEdits(timber, [...more.edits, ...pasteEdits(pasted, more.rows, columns).edits]);
  expect(listAt(document, LIST).slice(-2)).toMatchObject([
    { id: 'class', fm: '35 N/mm2', ft0: '22.5 N/mm2' },
    { id: 'class-2', fm: '40 N/mm2', ft0: '26 N/mm2' },
  ]);
});
