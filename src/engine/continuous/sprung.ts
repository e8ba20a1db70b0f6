import type { Geometry } from './geometry';
import type { Support } from './records';
import { FLOOR } from './rigid';
import { releaseSpan } from './span';

/** Entries of a row left of the diagonal: a sprung support ties together the moments at both ends of both its spans. */
const REACH = 3;
const ROW = REACH + 1;

/**
 * The same equations where supports are springs against vertical movement: f_ij gains Σ r_i r_j/k of their reactions, so
 * that a row reaches three entries to either side. Every support has a row for the moment just left of it, an inner one
 * that holds rotation another for the moment just right of it; those of moments that equilibrium tells are left out.
 */
export class SprungEquations {
  private count = 0;
  /** F = L D Lᵀ by rows: band[ROW·i] is 1/D, band[ROW·i + d] is L[i][i − d]. */
  private band = new Float64Array(ROW * 16);
  private values = new Float64Array(16);
  /** Of each support: the rows of the moments just left and just right of it. */
  private leftRow = new Int32Array(8);
  private rightRow = new Int32Array(8);

  /** False where doubles cannot factorise F. */
  factorise(geometry: Geometry): boolean {
    this.number(geometry);
    this.assemble(geometry);
    return this.eliminate();
  }

  /** The moments beside every support. */
  solve(geometry: Geometry, moved: number): void {
    this.closeGaps(geometry, moved);
    for (let j = 0; j < geometry.supports; j++) this.lift(geometry, j, moved);
    this.leaveOutKnown(geometry);
    this.substitute();
    const { supports, support } = geometry;
    for (let j = 0; j < supports; j++) {
      if (j > 0) support[j]!.left += this.values[this.leftRow[j]!]!;
      if (j + 1 < supports) support[j]!.right += this.values[this.rightRow[j]!]!;
    }
    for (let j = 0; j < supports; j++) {
      const { give, rise } = support[j]!;
      support[j]!.risen = moved * rise - give * reactionAt(geometry, j);
    }
  }

  private number({ supports, support }: Geometry): void {
    this.fit(supports);
    let next = 0;
    for (let j = 0; j < supports; j++) {
      this.leftRow[j] = next;
      if (support[j]!.held && j > 0 && j + 1 < supports) next++;
      this.rightRow[j] = next++;
    }
    this.count = next;
  }

  private fit(supports: number): void {
    if (supports <= this.leftRow.length) return;
    this.leftRow = new Int32Array(2 * supports);
    this.rightRow = new Int32Array(2 * supports);
    this.values = new Float64Array(4 * supports);
    this.band = new Float64Array(ROW * 4 * supports);
  }

  private assemble({ supports, support, span }: Geometry): void {
    const { band, leftRow, rightRow } = this;
    band.fill(0, 0, ROW * this.count);
    for (let j = 0; j + 1 < supports; j++) {
      const { near, cross, far } = span[j]!;
      band[ROW * rightRow[j]!]! += near;
      band[ROW * leftRow[j + 1]!]! += far;
      band[ROW * leftRow[j + 1]! + 1]! += cross;
    }
    for (let j = 0; j < supports; j++) {
      this.addTurning(support[j]!, j);
      this.addYielding(support[j]!.give, span, j, supports - 1);
    }
    if (!support[0]!.held) this.leaveOut(0);
    if (!support[supports - 1]!.held) this.leaveOut(this.count - 1);
  }

  /** A rotational spring turns with the difference of the moments beside it. */
  private addTurning({ held, turnGive }: Support, j: number): void {
    if (!held) return;
    const [a, b] = [this.leftRow[j]!, this.rightRow[j]!];
    this.band[ROW * a]! += turnGive;
    if (a === b) return;
    this.band[ROW * b]! += turnGive;
    this.band[ROW * b + 1]! -= turnGive;
  }

  /** A spring yields with its reaction, to which the moments at both ends of both spans beside it add. */
  private addYielding(give: number, span: Geometry['span'], j: number, last: number): void {
    const { band } = this;
    const from = j === 0 ? 2 : 0;
    const to = j === last ? 2 : 4;
    for (let p = from; p < to; p++) {
      const i = this.partner(j, p);
      for (let q = from; q < to; q++) {
        const k = this.partner(j, q);
        if (k <= i) band[ROW * i + i - k]! += reaction(span, j, p) * reaction(span, j, q) * give;
      }
    }
  }

  /**
   * The four rows that the reaction of support j depends on: right of the support before it (0), left (1) and right (2)
   * of itself, left of the support after it (3).
   */
  private partner(j: number, p: number): number {
    if (p < 2) return p === 0 ? this.rightRow[j - 1]! : this.leftRow[j]!;
    return p === 2 ? this.rightRow[j]! : this.leftRow[j + 1]!;
  }

  private leaveOut(i: number): void {
    const { band, count } = this;
    band[ROW * i] = 1;
    for (let d = 1; d <= REACH; d++) {
      band[ROW * i + d] = 0;
      if (i + d < count) band[ROW * (i + d) + d] = 0;
    }
  }

  private eliminate(): boolean {
    const { band, count } = this;
    for (let i = 0; i < count; i++) {
      const row = ROW * i;
      const diagonal = band[row]!;
      const reach = Math.min(REACH, i);
      let pivot = diagonal;
      for (let d = reach; d > 0; d--) {
        const above = row - ROW * d;
        let value = band[row + d]!;
        // L[i][k] D[k] L[j][k] of the columns k = i − e left of j = i − d
        for (let e = reach; e > d; e--)
          value -= (band[row + e]! * band[above + e - d]!) / band[row - ROW * e]!;
        const entry = value * band[above]!;
        band[row + d] = entry;
        pivot -= entry * value;
      }
      if (!(pivot > FLOOR * diagonal)) return false; // !(>) also catches NaN
      band[row] = 1 / pivot;
    }
    return true;
  }

  /** How far the ends of the simple spans turn apart under their loads and the moments that are known, turned round. */
  private closeGaps({ supports, support, span, piece }: Geometry, moved: number): void {
    const { values, leftRow, rightRow } = this;
    const last = supports - 1;
    values.fill(0, 0, this.count);
    for (let j = 0; j <= last; j++) {
      const record = support[j]!;
      const { couple } = piece[record.point]!;
      if (j > 0 && (j < last || record.held)) record.left = 0;
      if (j < last && (j > 0 || record.held)) record.right = record.held ? 0 : -couple;
      if (record.held) {
        const turn = moved * record.turn + record.turnGive * (couple - record.left + record.right);
        if (j > 0) values[leftRow[j]!]! += turn;
        if (j < last) values[rightRow[j]!]! -= turn;
      }
    }
    for (let j = 0; j < last; j++) {
      const [from, to, own] = [support[j]!, support[j + 1]!, span[j]!];
      releaseSpan(own, piece, from, to);
      values[rightRow[j]!]! -= own.leftTurn + own.near * from.right + own.cross * to.left;
      values[leftRow[j + 1]!]! -= own.rightTurn + own.cross * from.right; // to.left is known only where its row is left out
    }
  }

  /** What the rise of support j, prescribed and by its reaction to the loads, does to the gaps. */
  private lift(geometry: Geometry, j: number, moved: number): void {
    const { support, span } = geometry;
    const last = geometry.supports - 1;
    const { give, rise } = support[j]!;
    const risen = moved * rise - give * reactionAt(geometry, j);
    for (let p = j === 0 ? 2 : 0; p < (j === last ? 2 : 4); p++) {
      this.values[this.partner(j, p)]! += risen * reaction(span, j, p);
    }
  }

  private leaveOutKnown({ supports, support }: Geometry): void {
    if (!support[0]!.held) this.values[0] = 0;
    if (!support[supports - 1]!.held) this.values[this.count - 1] = 0;
  }

  private substitute(): void {
    const { band, values: b, count } = this;
    for (let i = 1; i < count; i++) {
      for (let d = Math.min(REACH, i); d > 0; d--) b[i]! -= band[ROW * i + d]! * b[i - d]!;
    }
    for (let i = count - 1; i >= 0; i--) {
      b[i]! *= band[ROW * i]!;
      for (let d = Math.min(REACH, count - 1 - i); d > 0; d--) b[i]! -= band[ROW * (i + d) + d]! * b[i + d]!;
    }
  }
}

/** The upward reaction of support j for a unit value of its partner p, 1/m. */
function reaction(span: Geometry['span'], j: number, p: number): number {
  const { inverse } = span[p < 2 ? j - 1 : j]!;
  return p === 0 || p === 3 ? inverse : -inverse;
}

/** The upward reaction of support j with the moments beside the supports as they are so far. */
function reactionAt({ supports, support, span, piece, hanging }: Geometry, j: number): number {
  const { left, right, point } = support[j]!;
  let before = hanging;
  let after = span[j]!.shear;
  if (j > 0) before = span[j - 1]!.rightShear + (left - support[j - 1]!.right) * span[j - 1]!.inverse;
  if (j + 1 < supports) after = span[j]!.leftShear + (support[j + 1]!.left - right) * span[j]!.inverse;
  return after - before + piece[point]!.force;
}
