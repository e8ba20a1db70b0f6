/** Entries of a row left of the diagonal: an element couples v and ψ of two neighbouring nodes. */
const REACH = 3;
const ROW = REACH + 1;
/** A pivot below this part of its diagonal entry is rounding's. */
const FLOOR = 1e-14;

/** A symmetric banded matrix in plain doubles, A = L D Lᵀ. Entry (i, j ≤ i) stands at ROW·i + i − j. */
export class PlainBand {
  private size = 0;
  private entries = new Float64Array(ROW * 16);

  clear(size: number): void {
    this.size = size;
    const end = ROW * size;
    if (end > this.entries.length) this.entries = new Float64Array(2 * end);
    const { entries } = this;
    for (let i = 0; i < end; i++) entries[i] = 0;
  }

  /** Adds to the entry of rows i and j in either order; a row of −1 is none. */
  couple(i: number, j: number, value: number): void {
    if (i >= 0 && j >= 0) this.entries[i > j ? ROW * i + i - j : ROW * j + j - i]! += value;
  }

  /** L below the diagonal, D on it; false where the matrix is not positive definite but for rounding. */
  factorise(): boolean {
    const { entries, size } = this;
    for (let i = 0; i < size; i++) {
      const diagonal = entries[ROW * i]!;
      const first = i > REACH ? i - REACH : 0;
      for (let j = first; j < i; j++) {
        let value = entries[ROW * i + i - j]!; // L[i][j] D[j] until divided below
        for (let k = first; k < j; k++) {
          if (j - k <= REACH) {
            value -= entries[ROW * i + i - k]! * entries[ROW * j + j - k]! * entries[ROW * k]!;
          }
        }
        const entry = value / entries[ROW * j]!;
        entries[ROW * i + i - j] = entry;
        entries[ROW * i]! -= entry * value;
      }
      if (!(entries[ROW * i]! > FLOOR * diagonal)) return false; // !(>) also catches NaN
    }
    return true;
  }

  /** x of A x = b, in place. */
  solve(b: Float64Array): void {
    const { entries, size } = this;
    for (let i = 1; i < size; i++) {
      for (let k = i > REACH ? i - REACH : 0; k < i; k++) b[i]! -= entries[ROW * i + i - k]! * b[k]!;
    }
    for (let i = size - 1; i >= 0; i--) {
      b[i]! /= entries[ROW * i]!;
      const last = i + REACH < size ? i + REACH : size - 1;
      for (let k = i + 1; k <= last; k++) b[i]! -= entries[ROW * k + k - i]! * b[k]!;
    }
  }
}
