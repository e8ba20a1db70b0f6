import { describe, expect, test } from 'vitest';
import {
  askedOf,
  cleared,
  EMPTY,
  queryOf,
  readAddress,
  withBound,
  withoutRequired,
  withPin,
  withRequired,
  withSort,
  writeAddress,
} from './address';

test('an address is read as it was written', () => {
  const address =
    '?q=w12&shape=i&sort=-depth&depth_min=300&mass_max=45.5&columns=j+mass&pin=american-wide-flange%2FW12x26';
  expect(writeAddress(readAddress(address))).toBe(address);
  expect(writeAddress(EMPTY)).toBe('');
});

test('what cannot be read asks for nothing', () => {
  expect(readAddress('?depth_min=tall&sort=colour&shape=hexagon&mass_max=&nonsense=1')).toEqual(EMPTY);
});

test('the query is that of the endpoint', () => {
  const { q, ranges, sort } = queryOf(readAddress('?q=he&sort=-mass&depth_max=310'));
  expect([q, ranges, sort]).toEqual([
    'he',
    [{ field: 'depth_mm', max: 310 }],
    { field: 'mass_kg_m', descending: true },
  ]);
});

describe('a change', () => {
  test('sets and lifts a bound', () => {
    const bounded = withBound(EMPTY, 'depth_min', 300);
    expect(bounded.bounds).toEqual({ depth_min: 300 });
    expect(withBound(bounded, 'depth_min', null).bounds).toEqual({});
  });

  test('turns the order of a column round', () => {
    expect(withSort(EMPTY, 'mass').sort).toBe('-mass');
    expect(withSort(EMPTY, 'depth').sort).toBe('depth');
    expect(withSort({ ...EMPTY, sort: '-depth' }, 'depth').sort).toBe('depth');
  });

  test('pins four and no more', () => {
    const full = { ...EMPTY, pins: ['a/1', 'a/2', 'a/3', 'a/4'] };
    expect(withPin(full, 'a/5')).toBeNull();
    expect(withPin(full, 'a/2')?.pins).toEqual(['a/1', 'a/3', 'a/4']);
  });

  test('asks for another property in a line, and takes it out with its bounds', () => {
    const asked = withRequired(withRequired(EMPTY, 'j'), 'j');
    expect([asked.required, writeAddress(asked)]).toEqual([['j'], '']);
    const bounded = withBound(withBound(asked, 'j_min', 10), 'depth_max', 300);
    expect(withoutRequired(bounded, 'j')).toEqual({ ...EMPTY, bounds: { depth_max: 300 } });
  });

  test('clears what is asked, and leaves what is pinned and shown', () => {
    const state = readAddress('?q=w12&j_min=10&stock=1&columns=mass+j&pin=a%2F1');
    expect(writeAddress(cleared(state))).toBe('?columns=mass+j&pin=a%2F1');
  });
});

test('a bound without a field of its own has a line; the usual ends have none', () => {
  expect(readAddress('?depth_min=1&w_pl_min=900&width_max=260&i_major_min=5').required).toEqual([]);
  expect(readAddress('?i_major_max=5&iw_min=1&width_max=260').required).toEqual(['i_major', 'iw']);
});

test.each([
  ['columns=j+depth,mass', ['j', 'depth', 'mass']],
  ['columns=mass+colour+mass', ['mass']],
  ['columns=colour', null],
  ['columns=', null],
  ['', null],
])('“%s” shows these columns', (search, columns) => {
  expect(readAddress(search).columns).toEqual(columns);
});

test('columns change how an answer is shown, and nothing that is asked', () => {
  expect(askedOf(readAddress('?q=w12&columns=mass+j&pin=a%2F1'))).toBe('?q=w12');
});
