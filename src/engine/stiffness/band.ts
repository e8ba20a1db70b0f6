import { Wide } from '../linear/index';

/** Entries of one row left of the diagonal: a piece couples (v, ψ) at its ends, and a hinge adds one rotation between. */
const HALF_BANDWIDTH = 4;

/** A pivot that vanished: the beam moves without resistance. Carries the unknown's number, for whoever has to look. */
export class SingularStiffness extends Error {
  constructor(
    readonly unknown: number,
    readonly pivot: number,
    readonly diagonal: number,
  ) {
    super(`pivot ${pivot} of unknown ${unknown} is nothing beside its diagonal ${diagonal}`);
    this.name = 'SingularStiffness';
  }
}

/**
 * A symmetric banded matrix of n unknowns, rows[i][k] = A[i][i − HALF_BANDWIDTH + k], so the diagonal is the last entry.
 */
export class SymmetricBand {
  readonly rows: Wide[][];

  constructor(readonly size: number) {
    this.rows = Array.from({ length: size }, () =>
      Array.from({ length: HALF_BANDWIDTH + 1 }, () => Wide.ZERO),
    );
  }

  get(i: number, j: number): Wide {
    if (i < j) return this.get(j, i);
    const k = j - i + HALF_BANDWIDTH;
    return k < 0 ? Wide.ZERO : this.rows[i]![k]!;
  }

  set(i: number, j: number, value: Wide): void {
    if (i < j) this.set(j, i, value);
    else this.rows[i]![j - i + HALF_BANDWIDTH] = value;
  }

  add(i: number, j: number, value: Wide): void {
    this.set(i, j, this.get(i, j).plus(value));
  }

  /** Unknown i takes the given value: its row and column leave the equations, and `right` bears their effect. */
  prescribe(i: number, value: Wide, right: Wide[]): void {
    for (let j = Math.max(0, i - HALF_BANDWIDTH); j <= Math.min(this.size - 1, i + HALF_BANDWIDTH); j++) {
      if (j !== i) {
        right[j] = right[j]!.minus(this.get(i, j).times(value));
        this.set(i, j, Wide.ZERO);
      }
    }
    this.set(i, i, Wide.ONE);
    right[i] = value;
  }

  times(x: readonly Wide[]): Wide[] {
    return x.map((_, i) => {
      let total = Wide.ZERO;
      const last = Math.min(this.size - 1, i + HALF_BANDWIDTH);
      for (let j = Math.max(0, i - HALF_BANDWIDTH); j <= last; j++)
        total = total.plus(this.get(i, j).times(x[j]!));
      return total;
    });
  }

  /**
   * x of A x = b by A = L D Lᵀ, refined once against the residual b − A x.
   * Fails with SingularStiffness where a pivot is not above n · 2⁻¹⁰⁰ of its own diagonal entry.
   */
  solve(b: readonly Wide[]): Wide[] {
    const factors = this.factorise();
    const x = substitute(factors, b);
    const product = this.times(x);
    const correction = substitute(
      factors,
      b.map((value, i) => value.minus(product[i]!)),
    );
    return x.map((value, i) => value.plus(correction[i]!));
  }

  /** L below the diagonal, D on it. */
  private factorise(): SymmetricBand {
    const factors = new SymmetricBand(this.size);
    for (let i = 0; i < this.size; i++) {
      const first = Math.max(0, i - HALF_BANDWIDTH);
      for (let j = first; j <= i; j++) {
        let value = this.get(i, j); // L[i][j] D[j] until divided below
        for (let k = Math.max(first, j - HALF_BANDWIDTH); k < j; k++) {
          const [a, b] = [factors.get(i, k), factors.get(j, k)];
          if (a.hi !== 0 && b.hi !== 0) value = value.minus(a.times(b).times(factors.get(k, k)));
        }
        factors.set(i, j, j < i ? value.over(factors.get(j, j)) : value);
      }
      const pivot = factors.get(i, i).rounded();
      const diagonal = this.get(i, i).rounded();
      if (!(pivot > this.size * 2 ** -100 * diagonal)) throw new SingularStiffness(i, pivot, diagonal);
    }
    return factors;
  }
}

function substitute(factors: SymmetricBand, b: readonly Wide[]): Wide[] {
  const x = [...b];
  const n = factors.size;
  for (let i = 0; i < n; i++) {
    for (let k = Math.max(0, i - HALF_BANDWIDTH); k < i; k++)
      x[i] = x[i]!.minus(factors.get(i, k).times(x[k]!));
  }
  for (let i = 0; i < n; i++) x[i] = x[i]!.over(factors.get(i, i));
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k <= Math.min(n - 1, i + HALF_BANDWIDTH); k++) {
      x[i] = x[i]!.minus(factors.get(k, i).times(x[k]!));
    }
  }
  return x;
}
