import { describe, expect, test } from 'vitest';
import { Wide } from '../linear/index';
import { SingularStiffness, SymmetricBand } from './band';

describe('SymmetricBand', () => {
  const matrix = () => {
    const band = new SymmetricBand(7);
    for (let i = 0; i < 7; i++) band.set(i, i, Wide.of(10));
    for (let i = 4; i < 7; i++) band.set(i, i - 4, Wide.of(i));
    return band;
  };

  test('is symmetric, and zero beyond its band', () => {
    const band = matrix();
    expect(band.get(0, 4)).toEqual(Wide.of(4));
    expect(band.get(4, 0)).toEqual(Wide.of(4));
    expect(band.get(6, 0)).toEqual(Wide.ZERO);
    expect(band.get(0, 5)).toEqual(Wide.ZERO);
  });

  test('solves what it multiplies', () => {
    const band = matrix();
    const x = [1, -2, 3, -4, 5, -6, 7].map((value) => Wide.of(value));
    const solved = band.solve(band.times(x));
    expect(solved.map((value) => value.rounded())).toEqual([1, -2, 3, -4, 5, -6, 7]);
  });

  test('gives a prescribed unknown its value, and the others what is left', () => {
    const band = new SymmetricBand(2);
    band.set(0, 0, Wide.of(2));
    band.set(1, 0, Wide.of(3));
    band.set(1, 1, Wide.of(8));
    const right = [Wide.of(1), Wide.of(2)];
    band.prescribe(0, Wide.of(4), right);
    // 3 · 4 + 8 x = 2
    expect(band.solve(right).map((value) => value.rounded())).toEqual([4, -1.25]);
  });

  test('takes a pivot above n · 2⁻¹⁰⁰ of its diagonal, in any unit, and no other', () => {
    for (const unit of [1, 2 ** -90, 2 ** 90]) {
      const withPivot = (pivot: number) => {
        const band = new SymmetricBand(2);
        band.set(0, 0, Wide.of(unit));
        band.set(1, 0, Wide.of(unit));
        band.set(1, 1, Wide.pair(unit, pivot * unit));
        return () => band.solve([Wide.of(unit), Wide.of(unit)]);
      };
      expect(withPivot(2 ** -98)().map((value) => value.rounded())).toEqual([1, 0]);
      expect(withPivot(2 ** -99)).toThrow(SingularStiffness);
    }
  });

  test('names the unknown whose pivot vanishes', () => {
    const band = new SymmetricBand(2);
    band.set(0, 0, Wide.of(1));
    band.set(1, 0, Wide.of(1));
    band.set(1, 1, Wide.of(1));
    expect(() => band.solve([Wide.ONE, Wide.ONE])).toThrow(new SingularStiffness(1, 0, 1).message);
    expect(() => band.solve([Wide.ONE, Wide.ONE])).toThrow(SingularStiffness);
  });
});
