import { expect, test } from 'vitest';
import { build, builtRow } from './build';
import { cornerLines, partsTable, sourceOf } from './parts';
import { toSectionItem } from './section';

const BEAM = {
  designation: 'IPE 300',
  dimensions: { shape: 'i', h: 0.3, b: 0.15, tw: 0.0071, tf: 0.0107, r: 0.015 },
} as const;

function item(kind: 'plated' | 'outline', fields: Readonly<Record<string, string>>) {
  const built = build(kind, (name) => fields[name] ?? '', BEAM, 'metric');
  if (!built.ok) throw new Error('not built');
  return toSectionItem(builtRow('Made', built.dimensions, 7850), 'made-sections', 1);
}

test('partsTable(item) of a beam with equal plates on both flanges is the hand calculation', () => {
  const plated = item('plated', {
    top_width: '200',
    top_thickness: '12',
    bottom_width: '200',
    bottom_thickness: '12',
  });
  const table = partsTable(plated, 'metric');
  // A plate: 24 cm², 20 · 1.2³/12 = 2.88 cm⁴, 156 mm from the middle: 24 · 15.6² = 5841 cm⁴
  const plate = { area: '24.00', own: '2.88', shifted: '5\u202f841' };
  expect(table?.lines).toMatchObject([
    { name: 'Plate below', offset: '−156.0', ...plate },
    { name: 'IPE 300', offset: '0.0' },
    { name: 'Plate on top', offset: '156.0', ...plate },
  ]);
  expect(partsTable(item('outline', { corners: '0 0\n9 0\n9 9\n0 9', thickness: '5' }), 'metric')).toBeNull();
});

test('cornerLines(item) gives an outline’s corners back as they were typed', () => {
  const drawn = item('outline', { corners: '0 0\n90 0 5\n90 9\n0 9', thickness: '5' });
  expect(cornerLines(drawn, 'metric')).toEqual([['0, 0', '90, 0, r 5', '90, 9', '0, 9']]);
});

test('sourceOf(item, notes) is the note of that very section', () => {
  const notes = ['2/IPE 300 A: Detail 2', '2/IPE 300: Detail 14: welded'];
  expect(sourceOf({ printed: '2/IPE 300' }, notes)).toBe('Detail 14: welded');
  expect(sourceOf({ printed: '3/IPE 300' }, notes)).toBeNull();
});
