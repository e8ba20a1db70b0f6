import type { Wide } from './wide';

/** Part of a diagonal entry, per row, that rounding alone may leave of a pivot: 2⁻¹⁰⁰ of the 2⁻¹⁰² that Wide keeps. */
const FLOOR = 2 ** -100;

/**
 * A pivot that is nothing beside its own diagonal entry: row `row` repeats rows before it. Against its own diagonal,
 * so that the verdict is the same in mm and in inches, and where forces stand beside moments.
 */
export class SingularMatrix extends Error {
  constructor(
    readonly pivot: number,
    readonly row: number,
    readonly floor: number,
  ) {
    super(`pivot ${pivot} of row ${row} is not above ${floor}`);
    this.name = 'SingularMatrix';
  }
}

/** The lower half of a symmetric matrix: row i holds the entries of columns first … i, those left of them being zero. */
export type LowerRow = { readonly first: number; readonly entries: readonly Wide[] };

/**
 * A symmetric positive definite matrix factorised as A = L D Lᵀ (Cholesky's method without square roots), within the
 * envelope of A: the work is linear in the rows where the rows are short, as those of support moments are.
 *
 * Fails with SingularMatrix where a pivot is not above n · 2⁻¹⁰⁰ of its diagonal entry, whatever the right side.
 * Source: G. H. Golub, C. F. Van Loan, Matrix Computations, section 4.1.2 (from memory).
 */
export class Cholesky {
  private readonly lower: readonly LowerRow[];
  private readonly diagonal: Wide[] = [];

  constructor(rows: readonly LowerRow[]) {
    const lower: LowerRow[] = [];
    for (let i = 0; i < rows.length; i++) lower.push(this.eliminate(lower, rows[i]!, i, rows.length));
    this.lower = lower;
  }

  private eliminate(lower: readonly LowerRow[], row: LowerRow, i: number, n: number): LowerRow {
    const scaled: Wide[] = []; // L[i][j] · D[j]
    const entries: Wide[] = []; // L[i][j]
    let pivot = row.entries.at(-1)!;
    for (let j = row.first; j < i; j++) {
      const { first, entries: above } = lower[j]!;
      let value = row.entries[j - row.first]!;
      for (let k = Math.max(first, row.first); k < j; k++) {
        value = value.minus(scaled[k - row.first]!.times(above[k - first]!));
      }
      const entry = value.over(this.diagonal[j]!);
      scaled.push(value);
      entries.push(entry);
      pivot = pivot.minus(value.times(entry));
    }
    const floor = n * FLOOR * row.entries.at(-1)!.rounded();
    if (!(pivot.rounded() > floor)) throw new SingularMatrix(pivot.rounded(), i, floor); // !(>) also catches NaN
    this.diagonal.push(pivot);
    return { first: row.first, entries };
  }

  /** x of A x = b. */
  solve(b: readonly Wide[]): Wide[] {
    const x = [...b];
    this.lower.forEach(({ first, entries }, i) => {
      for (let k = first; k < i; k++) x[i] = x[i]!.minus(entries[k - first]!.times(x[k]!));
    });
    for (let i = 0; i < x.length; i++) x[i] = x[i]!.over(this.diagonal[i]!);
    for (let i = x.length - 1; i >= 0; i--) {
      const { first, entries } = this.lower[i]!;
      for (let k = first; k < i; k++) x[k] = x[k]!.minus(entries[k - first]!.times(x[i]!));
    }
    return x;
  }
}
