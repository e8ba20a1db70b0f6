import { describe, expect, test } from 'vitest';
import { EMPTY, queryOf, readAddress, withBound, withPin, withSort, writeAddress } from './address';

test('an address is read as it was written', () => {
  const address = '?q=w12&shape=i&sort=-depth&depth_min=300&mass_max=45.5&pin=american-wide-flange%2FW12x26';
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
});
