import { describe, expect, test } from 'vitest';
import { lightestLike, sameDepth } from './actions';
import { readAddress, writeAddress } from './address';
import type { SectionItem } from './section';

/** W12x26 by its depth, I and Z, as the American tables print them: 12.2 in, 204 in⁴, 33.4 and 37.2 in³. */
const W12X26: SectionItem = {
  table: 'american-wide-flange',
  edition: 1,
  designation: 'W12x26',
  printed: 'W12X26',
  shape: 'i',
  depth_mm: 309.88,
  width_mm: 164.8,
  mass_kg_m: 38.7,
  area_cm2: 49.4,
  i_major_cm4: 8491,
  i_minor_cm4: 720,
  w_el_cm3: 547,
  w_pl_cm3: 610,
  j_cm4: 12.5,
  iw_cm6: 163000,
  computed: [],
  dimensions_mm: {},
};
const JOIST: SectionItem = { ...W12X26, table: 'sawn-timber', designation: '47x200', shape: 'rectangle' };

const asked = (search: string) => readAddress(search);

describe('lightestLike', () => {
  test('asks for its I and W among its shapes, the lightest first', () => {
    expect(writeAddress(lightestLike(asked(''), W12X26))).toBe(
      '?shape=i&sort=mass&i_major_min=8491&w_pl_min=610',
    );
  });

  test('asks timber for its elastic modulus, in a line of its own', () => {
    const state = lightestLike(asked(''), JOIST);
    expect(writeAddress(state)).toBe('?shape=timber&sort=mass&i_major_min=8491&w_el_min=547');
    expect(state.required).toEqual(['w_el']);
  });

  test('takes the elastic modulus where the table has no plastic one', () => {
    expect(lightestLike(asked(''), { ...W12X26, w_pl_cm3: null }).bounds).toEqual({
      i_major_min: 8491,
      w_el_min: 547,
    });
  });

  test('leaves what else is required, and takes out what would hide the lighter ones', () => {
    const before =
      '?q=w12&sort=-depth&stock=1&depth_max=310&mass_min=30&i_major_max=9000&j_min=5&columns=mass+j&pin=a%2F1';
    expect(writeAddress(lightestLike(asked(before), W12X26))).toBe(
      '?shape=i&sort=mass&stock=1&depth_max=310&i_major_min=8491&w_pl_min=610&j_min=5&columns=mass+j&pin=a%2F1',
    );
  });

  test('keeps a shape and a table that hold it, and no others', () => {
    const kept = lightestLike(asked('?shape=h&table=american-wide-flange'), W12X26);
    expect([kept.shape, kept.table]).toEqual(['h', 'american-wide-flange']);
    const left = lightestLike(asked('?shape=hollow&table=hollow-round'), W12X26);
    expect([left.shape, left.table]).toEqual(['i', '']);
  });
});

describe('sameDepth', () => {
  test('asks for 5 % about its depth, rounded out to whole millimetres', () => {
    // 0.95 × 309.88 = 294.39 and 1.05 × 309.88 = 325.37
    expect(writeAddress(sameDepth(asked('?depth_max=200&mass_max=30'), W12X26, 'metric'))).toBe(
      '?shape=i&sort=mass&depth_min=294&depth_max=326',
    );
  });

  test('to tenths of an inch for who reads inches', () => {
    // 0.95 × 12.2 in = 11.59 and 1.05 × 12.2 in = 12.81: 11.5 in is 292.1 mm, 12.9 in is 327.66 mm
    expect(sameDepth(asked(''), W12X26, 'us').bounds).toEqual({ depth_min: 292.1, depth_max: 327.66 });
  });
});
