import { describe, expect, test } from 'vitest';
import { asciiDesignation, designationKey, designationRank } from './index';

describe('designationKey', () => {
  test.each([
    ['W12x26', ['W12X26', 'W12×26', 'w 12 x 26', 'W 12*26', 'w12 26', 'W12х26', '  W12✕26 ']],
    ['HE 200 A', ['hea200', 'HEA 200', 'he200a', 'HE-A 200', 'ＨＥ ２００ Ａ', 'IPBL 200']],
    ['533x210x92 UB', ['UB 533x210x92', 'UB533X210X92', 'ub 533 × 210 × 92', '533*210*92.0 ub']],
    ['IPE A 100', ['ipea100', 'IPE 100 A']],
    ['CHS 21.3x2.6', ['chs21,3x2,6', 'CHS 21.30 × 2.60']],
    ['RHS 100x100x5', ['SHS 100x100x5']],
    ['2x10', ['2x10in', '2 × 10', '2"x10"', '2 by 10'.replace('by', 'x')]],
    ['47x200', ['47 x 200 mm']],
    ['HSS6x4x1/4', ['HSS 6×4×0.25', 'hss6x4x¼']],
    ['5-1/8x18', ['5 1/8 x 18', '5⅛×18', '5.125x18']],
  ])('%s is the same as %j', (one, others) => {
    expect(others.map(designationKey)).toEqual(others.map(() => designationKey(one)));
  });

  test('different sections keep different keys', () => {
    const keys = [
      'HE 200 A',
      'HE 200 AA',
      'HE 200 B',
      'IPE 200',
      'IPE O 200',
      'IPE A 200',
      'W12x26',
      'W122x6',
    ];
    expect(new Set(keys.map(designationKey)).size).toBe(keys.length);
  });
});

test('asciiDesignation writes a printed name with x', () => {
  expect(asciiDesignation(' OV 180×90 × 18 ')).toBe('OV 180x90x18');
  expect(asciiDesignation('HE\u00a0200\u00a0A')).toBe('HE 200 A');
});

describe('designationRank', () => {
  const names = [
    'W12x26',
    'W12x260',
    'W14x26',
    'W12x14',
    'HE 200 A',
    'HE 200 AA',
    '533x210x92 UB',
    'IPE 200',
  ];
  const ranked = (query: string) =>
    names
      .map((name) => ({ name, rank: designationRank(query, name) }))
      .filter(({ rank }) => rank !== null)
      .sort((a, b) => (a.rank ?? 0) - (b.rank ?? 0))
      .map(({ name }) => name);

  test.each([
    ['w12x26', ['W12x26', 'W12x260']],
    ['12x26', ['W12x26', 'W12x260']],
    ['w12', ['W12x26', 'W12x260', 'W12x14']],
    ['hea200', ['HE 200 A', 'HE 200 AA']],
    ['UB 533', ['533x210x92 UB']],
    ['533 92', ['533x210x92 UB']],
    ['ipe', ['IPE 200']],
    ['', []],
    ['qq', []],
  ])('"%s" finds %j, the exact one first', (query, expected) => {
    expect(ranked(query)).toEqual(expected);
  });
});
