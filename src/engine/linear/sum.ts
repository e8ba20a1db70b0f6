import { Wide } from './wide';

/** Part of the terms' magnitudes that rounding can leave of a sum that is zero: well above 2⁻¹⁰² per operation. */
export const CANCELLED = 2 ** -80;

/** A sum that knows what it is made of: where its terms cancel to rounding, the total is exactly zero. */
export class Sum {
  private value = Wide.ZERO;
  private magnitude = 0;

  add(term: Wide): void {
    this.value = this.value.plus(term);
    this.magnitude += Math.abs(term.hi);
  }

  subtract(term: Wide): void {
    this.add(term.negated());
  }

  total(): Wide {
    return Math.abs(this.value.hi) > CANCELLED * this.magnitude ? this.value : Wide.ZERO;
  }
}

/** Largest magnitude; 0 of none. */
export const largest = (...lists: readonly (readonly Wide[])[]): number =>
  lists.reduce((most, list) => list.reduce((m, { hi }) => Math.max(m, Math.abs(hi)), most), 0);

/** The values, exactly zero where they are not above the floor. */
export const settled = (values: readonly Wide[], floor: number): Wide[] =>
  values.map((value) => (Math.abs(value.hi) > floor ? value : Wide.ZERO));
