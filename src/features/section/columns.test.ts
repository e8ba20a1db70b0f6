import { describe, expect, test } from 'vitest';
import { asChoice, columnsOf, USUAL_COLUMNS } from './columns';
import { SECTION_MEASURES } from './query';

const onPhone = (chosen: Parameters<typeof columnsOf>[0]) =>
  columnsOf(chosen, 'us').flatMap(({ phoneName = '', phoneUnit }) =>
    phoneUnit ? [`${phoneName} ${phoneUnit}`.trim()] : [],
  );
const isWide = ({ className }: { className: string }) => className.includes('hidden');

describe('columnsOf', () => {
  test('nothing chosen shows every measure, some on wide screens alone', () => {
    const usual = columnsOf(null, 'metric');
    expect(usual.map(({ measure }) => measure).sort()).toEqual(Object.keys(SECTION_MEASURES).sort());
    expect(usual.some(isWide)).toBe(true);
  });

  test('what was chosen is shown in its order, at every width', () => {
    const chosen = columnsOf(['j', 'mass', 'tw'], 'metric');
    expect(chosen.map(({ measure }) => measure)).toEqual(['j', 'mass', 'tw']);
    expect(chosen.some(isWide)).toBe(false);
  });

  test('a phone shows the mass beside the name and one other below it', () => {
    expect(onPhone(null)).toEqual(['lb/ft', 'plastic modulus, major axis in³']);
    expect(onPhone(['j', 'mass', 'tw'])).toEqual(['torsion constant in⁴', 'lb/ft']);
    expect(onPhone(['mass'])).toEqual(['lb/ft']);
    expect(onPhone(['tw', 'tf'])).toEqual(['web or wall in']);
  });
});

test('the usual columns in their order are nobody’s choice', () => {
  expect(asChoice([...USUAL_COLUMNS])).toBeNull();
  expect(asChoice([...USUAL_COLUMNS].reverse())).not.toBeNull();
  expect(asChoice(['mass'])).toEqual(['mass']);
});
