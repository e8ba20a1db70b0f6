import type { Geometry } from './geometry';

/** Entries of a row left of the diagonal: a sprung support ties together the moments at both ends of both its spans. */
const REACH = 3;
const ROW = REACH + 1;

/** A pivot below this part of its diagonal entry is rounding's: then 32 digits must decide. */
const FLOOR = 1e-12;

/**
 * The flexibility of a continuous beam whose unknowns are moments, released as simple spans with overhangs:
 *
 *   f = ∫ m_i m_j/EI dx + ∫ v_i v_j/GA dx + Σ r_i r_j/k        (unit-load theorem)
 *
 * Over an inner support that lets the beam turn there is one unknown, the moment just left of it; where rotation is held
 * there are two, just left and just right. Numbered from left to right, so that F is tridiagonal, or reaches three
 * entries to the side where supports are sprung. rad/(N·m).
 */
export class Flexibility {
  unknowns = 0;
  /** Of each support: the unknown that is the moment just left and just right of it; −1 where that is no unknown. */
  left = new Int32Array(0);
  right = new Int32Array(0);
  /** Of each span, as a simple one: rotation of each end for a unit moment at the same and at the other end. */
  near = new Float64Array(0);
  cross = new Float64Array(0);
  far = new Float64Array(0);
  /** F = L D Lᵀ, row by row: band[ROW·i + d] is D (d = 0) or L[i][i − d]. */
  private band = new Float64Array(0);

  /** False where doubles cannot factorise F: a redundant repeats others to within their digits. */
  take(geometry: Geometry): boolean {
    this.fit(geometry.supports);
    this.number(geometry);
    this.measureSpans(geometry);
    this.assemble(geometry);
    return this.factorise(geometry.sprung ? REACH : 1);
  }

  /** The unknowns of F x = b, in place. */
  solve(b: Float64Array, sprung: boolean): void {
    const { band, unknowns: n } = this;
    const reach = sprung ? REACH : 1;
    for (let i = 1; i < n; i++) {
      for (let d = Math.min(reach, i); d > 0; d--) b[i]! -= band[ROW * i + d]! * b[i - d]!;
    }
    for (let i = n - 1; i >= 0; i--) {
      b[i]! /= band[ROW * i]!;
      for (let d = Math.min(reach, n - 1 - i); d > 0; d--) b[i]! -= band[ROW * (i + d) + d]! * b[i + d]!;
    }
  }

  private number({ supports, held }: Geometry): void {
    const { left, right } = this;
    let next = 0;
    for (let j = 0; j < supports; j++) {
      const inner = j > 0 && j + 1 < supports;
      left[j] = j > 0 && (inner || held[j]) ? next++ : -1;
      right[j] = j + 1 < supports && (inner || held[j]) ? (inner && !held[j] ? left[j]! : next++) : -1;
    }
    this.unknowns = next;
  }

  private measureSpans({ supports, point, at, x, h, bending, shearing }: Geometry): void {
    for (let j = 0; j + 1 < supports; j++) {
      const length = at[j + 1]! - at[j]!;
      let [near, cross, far, shear] = [0, 0, 0, 0];
      for (let k = point[j]!; k < point[j + 1]!; k++) {
        // Ordinates at the piece's ends of the moments of 1 at the left and at the right end of the span.
        const q = (x[k]! - at[j]!) / length;
        const r = (x[k + 1]! - at[j]!) / length;
        const [p, o] = [1 - q, 1 - r];
        const sixth = (h[k]! * bending[k]!) / 6;
        near += 2 * sixth * (p * p + p * o + o * o);
        cross += sixth * (2 * p * q + p * r + o * q + 2 * o * r);
        far += 2 * sixth * (q * q + q * r + r * r);
        shear += h[k]! * shearing[k]!;
      }
      shear /= length * length;
      this.near[j] = near + shear;
      this.cross[j] = cross - shear;
      this.far[j] = far + shear;
    }
  }

  private assemble(geometry: Geometry): void {
    const { supports, held, turnGive, give } = geometry;
    const { left, right, band } = this;
    band.fill(0, 0, ROW * this.unknowns);
    for (let j = 0; j + 1 < supports; j++) {
      const [a, b] = [right[j]!, left[j + 1]!];
      if (a >= 0) band[ROW * a]! += this.near[j]!;
      if (b >= 0) band[ROW * b]! += this.far[j]!;
      if (a >= 0 && b >= 0) band[ROW * b + 1]! += this.cross[j]!;
    }
    for (let j = 0; j < supports; j++) {
      if (held[j] && turnGive[j]! > 0) this.addTurning(left[j]!, right[j]!, turnGive[j]!);
      if (give[j]! > 0) this.addYielding(geometry, j);
    }
  }

  /** A rotational spring turns with the difference of the moments beside it. */
  private addTurning(a: number, b: number, give: number): void {
    if (a >= 0) this.band[ROW * a]! += give;
    if (b >= 0) this.band[ROW * b]! += give;
    if (a >= 0 && b >= 0) this.band[ROW * b + 1]! -= give;
  }

  private addYielding({ at, supports, give }: Geometry, j: number): void {
    const { left, right, band } = this;
    for (let p = 0; p < 4; p++) {
      const [i, a] = [partnerOf(left, right, supports, j, p), reactionOf(at, supports, j, p)];
      for (let q = 0; q < 4 && i >= 0; q++) {
        const k = partnerOf(left, right, supports, j, q);
        if (k >= 0 && k <= i) band[ROW * i + (i - k)]! += a * reactionOf(at, supports, j, q) * give[j]!;
      }
    }
  }

  private factorise(reach: number): boolean {
    const { band, unknowns: n } = this;
    for (let i = 0; i < n; i++) {
      const row = ROW * i;
      const diagonal = band[row]!;
      for (let d = Math.min(reach, i); d > 0; d--) {
        const above = ROW * (i - d);
        let value = band[row + d]!;
        for (let e = Math.min(reach, i); e > d; e--) {
          if (e - d <= reach) value -= band[row + e]! * band[above + (e - d)]! * band[ROW * (i - e)]!;
        }
        const entry = value / band[above]!;
        band[row + d] = entry;
        band[row]! -= entry * value;
      }
      if (!(band[row]! > FLOOR * diagonal)) return false;
    }
    return true;
  }

  private fit(supports: number): void {
    if (supports <= this.left.length) return;
    const room = 2 * supports;
    this.left = new Int32Array(room);
    this.right = new Int32Array(room);
    this.near = new Float64Array(room);
    this.cross = new Float64Array(room);
    this.far = new Float64Array(room);
    this.band = new Float64Array(ROW * 2 * room);
  }
}

/**
 * The four end moments on which the reaction of support j depends: right of the support before it, left and right of
 * itself, left of the support after it.
 */
export function partnerOf(
  left: Int32Array,
  right: Int32Array,
  supports: number,
  j: number,
  p: number,
): number {
  if (p < 2) return j === 0 ? -1 : p === 0 ? right[j - 1]! : left[j]!;
  return j + 1 === supports ? -1 : p === 2 ? right[j]! : left[j + 1]!;
}

/** The upward reaction of support j for a unit value of the moment that `partnerOf` names, 1/m. */
export function reactionOf(at: Float64Array, supports: number, j: number, p: number): number {
  if (p < 2) return j === 0 ? 0 : (p === 0 ? 1 : -1) / (at[j]! - at[j - 1]!);
  return j + 1 === supports ? 0 : (p === 2 ? -1 : 1) / (at[j + 1]! - at[j]!);
}
