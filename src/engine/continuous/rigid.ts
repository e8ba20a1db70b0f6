import type { Geometry } from './geometry';
import type { Piece, Span, Support } from './records';
import { releaseSpan } from './span';

/** A pivot below this part of its diagonal entry is rounding's: then 32 digits must decide. */
export const FLOOR = 1e-12;

/**
 * The three-moment equations, F x = −Δ, of a beam whose supports are rigid against vertical movement: one row for every
 * moment over an inner support, two where it holds rotation, one at an end that holds rotation. F is tridiagonal, and
 * factorised as L D Lᵀ. An outer support that lets the beam turn has a row whose unknown is 0.
 */
export class RigidEquations {
  /**
   * What a row passes to the next, while two rows of a support that holds rotation are worked on: 1/D and y, and the
   * rotations where the span before ends and the span after starts. Passed as arguments, doubles would become objects.
   */
  private inverse = NaN;
  private y = NaN;
  private arriving = NaN;
  private leaving = NaN;

  /** False where doubles cannot factorise F. */
  factorise({ supports, support, span }: Geometry): boolean {
    const last = supports - 1;
    let cross = 0; // of the span before
    let far = 0;
    let inverse = 0; // 1/D of the row before; 0 where that moment is known
    for (let j = 0; j <= last; j++) {
      const record = support[j]!;
      const own = span[j]!;
      if (record.held) {
        this.inverse = inverse;
        if (!this.factoriseHeld(record, j > 0 ? span[j - 1]! : null, j < last ? own : null)) return false;
        inverse = this.inverse;
      } else if (j === 0 || j === last) {
        inverse = 0;
      } else {
        const diagonal = far + own.near;
        const entry = cross * inverse;
        const pivot = diagonal - entry * cross;
        if (!(pivot > FLOOR * diagonal)) return false; // !(>) also catches NaN
        inverse = 1 / pivot;
        record.leftPivot = inverse;
        record.leftEntry = entry;
      }
      cross = own.cross;
      far = own.far;
    }
    return true;
  }

  /** The moments beside every support; those that equilibrium alone tells are there already. */
  solve(geometry: Geometry, moved: number): void {
    this.eliminate(geometry, moved);
    substitute(geometry, moved);
  }

  /** The rows of a support that holds rotation: left of it where a span comes before, right where one comes after. */
  private factoriseHeld(record: Support, before: Span | null, after: Span | null): boolean {
    const { turnGive } = record;
    record.leftPivot = 0;
    record.leftEntry = 0;
    if (before) {
      const diagonal = before.far + turnGive;
      const entry = before.cross * this.inverse;
      const pivot = diagonal - entry * before.cross;
      if (!(pivot > FLOOR * diagonal)) return false;
      record.leftPivot = 1 / pivot;
      record.leftEntry = entry;
    }
    if (after) {
      const diagonal = after.near + turnGive;
      const entry = -turnGive * record.leftPivot;
      const pivot = diagonal + entry * turnGive;
      if (!(pivot > FLOOR * diagonal)) return false;
      record.rightPivot = 1 / pivot;
      record.rightEntry = entry;
      this.inverse = record.rightPivot;
    }
    return true;
  }

  /**
   * L y = −Δ, where Δ is how far the released beam's ends turn apart over a support: it is made of simple spans that
   * carry their loads and the moments that are known. y stands in the place of its moment.
   */
  private eliminate({ supports, support, span, piece }: Geometry, moved: number): void {
    const last = supports - 1;
    let arriving = 0; // rotation where the span before ends
    let y = 0;
    for (let j = 0; j <= last; j++) {
      const record = support[j]!;
      let leaving = 0; // rotation where the span after starts
      let end = 0; // and where it ends
      if (j < last) {
        const next = support[j + 1]!;
        const own = span[j]!;
        releaseSpan(own, piece, record, next);
        const M = record.held ? 0 : j === 0 ? record.right : -piece[record.point]!.couple;
        const N = j + 1 === last && !next.held ? next.left : 0;
        const chord = moved === 0 ? 0 : (next.rise - record.rise) * own.inverse;
        leaving = chord - own.leftTurn - own.near * M - own.cross * N;
        end = chord + own.rightTurn + own.cross * M; // known moments at its right end are at the beam's
      }
      if (record.held) {
        this.arriving = arriving;
        this.leaving = leaving;
        this.y = y;
        this.eliminateHeld(record, piece[record.point]!, moved, j === 0, j === last);
        y = this.y;
      } else if (j > 0 && j < last) {
        y = leaving - arriving - record.leftEntry * y;
        record.left = y;
      } else y = 0;
      arriving = end;
    }
  }

  private eliminateHeld(
    record: Support,
    { couple }: Piece,
    moved: number,
    isFirst: boolean,
    isLast: boolean,
  ): void {
    const known = (isFirst ? record.left : 0) - (isLast ? record.right : 0);
    const turn = moved * record.turn + record.turnGive * (couple - known);
    let { y } = this;
    if (!isFirst) {
      y = turn - this.arriving - record.leftEntry * y;
      record.left = y;
    } else y = 0;
    if (!isLast) {
      y = this.leaving - turn - record.rightEntry * y;
      record.right = y;
    }
    this.y = y;
  }
}

/** x of D Lᵀ x = y, in place. */
function substitute({ supports, support, piece }: Geometry, moved: number): void {
  const last = supports - 1;
  let entry = 0;
  let x = 0;
  for (let j = last; j >= 0; j--) {
    const record = support[j]!;
    record.risen = moved * record.rise;
    if (record.held) {
      if (j < last) {
        x = record.right * record.rightPivot - entry * x;
        record.right = x;
        entry = record.rightEntry;
      }
      if (j > 0) {
        x = record.left * record.leftPivot - entry * x;
        record.left = x;
        entry = record.leftEntry;
      }
    } else if (j > 0 && j < last) {
      x = record.left * record.leftPivot - entry * x;
      record.left = x;
      record.right = x - piece[record.point]!.couple;
      entry = record.leftEntry;
    } else {
      x = 0;
      entry = 0;
    }
  }
}
