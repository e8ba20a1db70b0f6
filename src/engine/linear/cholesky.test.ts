import { describe, expect, test } from 'vitest';
import { Cholesky, type LowerRow, SingularMatrix } from './cholesky';
import { Wide } from './wide';

/** Rows up to the diagonal, without the zeros before the first entry. */
function lower(matrix: readonly (readonly number[])[]): LowerRow[] {
  return matrix.map((row, i) => {
    const first = Math.max(
      0,
      row.findIndex((value) => value !== 0),
    );
    return { first, entries: row.slice(first, i + 1).map((value) => Wide.of(value)) };
  });
}

const solve = (matrix: readonly (readonly number[])[], b: readonly number[]) =>
  new Cholesky(lower(matrix)).solve(b.map((value) => Wide.of(value))).map((value) => value.rounded());

describe('Cholesky', () => {
  test('solves a full system', () => {
    const matrix = [
      [4, 2, 2],
      [2, 5, 3],
      [2, 3, 6],
    ];
    expect(solve(matrix, [4 + 4 + 6, 2 + 10 + 9, 2 + 6 + 18])).toEqual([1, 2, 3]);
  });

  test('solves within the envelope of rows that start late', () => {
    const matrix = [
      [2, 1, 0, 0],
      [1, 4, 1, 0],
      [0, 1, 4, 1],
      [0, 0, 1, 2],
    ];
    expect(solve(matrix, [3, 6, 6, 3])).toEqual([1, 1, 1, 1]);
    expect(solve([], [])).toEqual([]);
  });

  test('keeps sixteen digits where doubles keep two (Hilbert’s matrix of order 10, condition 10¹³)', () => {
    const n = 10;
    const rows = Array.from({ length: n }, (_, i) => ({
      first: 0,
      entries: Array.from({ length: i + 1 }, (_, j) => Wide.ONE.over(i + j + 1)),
    }));
    const entry = (i: number, j: number) => Wide.ONE.over(i + j + 1);
    const ones = rows.map((_, i) => rows.reduce((sum, _, j) => sum.plus(entry(i, j)), Wide.ZERO));
    for (const x of new Cholesky(rows).solve(ones)) expect(Math.abs(x.rounded() - 1)).toBeLessThan(1e-15);
  });

  test('refuses a matrix that is singular up to rounding, whatever the right side', () => {
    const third = Wide.ONE.over(3);
    const rows = [
      { first: 0, entries: [third] },
      { first: 0, entries: [third.times(0.1), third.times(0.1).times(0.1)] },
    ];
    expect(() => new Cholesky(rows)).toThrow(SingularMatrix);
  });

  test.each([1, 1e-9, 1e9])('gives its verdict alike where the second unknown is scaled by %d', (scale) => {
    const singular = lower([
      [1, scale],
      [scale, scale * scale],
    ]);
    try {
      new Cholesky(singular);
      expect.unreachable();
    } catch (error) {
      expect(error).toMatchObject({ name: 'SingularMatrix', row: 1 });
    }
    const regular = lower([
      [1, scale / 2],
      [scale / 2, scale * scale],
    ]);
    expect(() => new Cholesky(regular)).not.toThrow();
  });

  test('refuses what is not positive or not a number', () => {
    expect(() => solve([[-1]], [1])).toThrow(SingularMatrix);
    expect(() => solve([[0]], [1])).toThrow(SingularMatrix);
    expect(() => solve([[Number.NaN]], [1])).toThrow(SingularMatrix);
  });
});
