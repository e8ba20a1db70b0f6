import type { Geometry } from './geometry';
import type { Support } from './records';
import { releaseSpan } from './span';

/** A pivot below this part of its diagonal entry is rounding's: then 32 digits must decide. */
export const FLOOR = 1e-12;

/**
 * The three-moment equations, F x = −Δ, of a beam whose supports are rigid against vertical movement: one row for every
 * moment over an inner support, two where it holds rotation, one at an end that holds rotation. F is tridiagonal.
 * False where doubles cannot factorise it. An outer support that lets the beam turn has a row whose unknown is 0.
 */
export function factoriseRigid({ supports, support, span }: Geometry): boolean {
  const last = supports - 1;
  let cross = 0; // of the span to the left
  let far = 0;
  let inverse = 0; // 1/D of the row before; 0 where that moment is known
  for (let j = 0; j <= last; j++) {
    const record = support[j]!;
    const { near, cross: nextCross, far: nextFar } = span[j]!;
    if (record.held) {
      inverse = factoriseHeld(record, far, near, cross, inverse, j === 0, j === last);
      if (!(inverse >= 0)) return false;
    } else if (j === 0 || j === last) {
      record.leftPivot = 0;
      record.leftEntry = 0;
      inverse = 0;
    } else {
      const diagonal = far + near;
      const entry = cross * inverse;
      const pivot = diagonal - entry * cross;
      if (!(pivot > FLOOR * diagonal)) return false; // !(>) also catches NaN
      inverse = 1 / pivot;
      record.leftPivot = inverse;
      record.leftEntry = entry;
    }
    cross = nextCross;
    far = nextFar;
  }
  return true;
}

/** The two rows of a support that holds rotation; 1/D of the latter, −1 where there is none to be had. */
function factoriseHeld(
  record: Support,
  far: number,
  near: number,
  cross: number,
  before: number,
  isFirst: boolean,
  isLast: boolean,
): number {
  const { turnGive } = record;
  record.leftPivot = 0;
  record.leftEntry = 0;
  if (!isFirst) {
    const entry = cross * before;
    const pivot = far + turnGive - entry * cross;
    if (!(pivot > FLOOR * (far + turnGive))) return -1;
    record.leftPivot = 1 / pivot;
    record.leftEntry = entry;
  }
  if (isLast) return record.leftPivot;
  const entry = -turnGive * record.leftPivot;
  const pivot = near + turnGive + entry * turnGive;
  if (!(pivot > FLOOR * (near + turnGive))) return -1;
  record.rightPivot = 1 / pivot;
  record.rightEntry = entry;
  return record.rightPivot;
}

/** The moments beside every support; those that equilibrium alone tells are there already. */
export function solveRigid(geometry: Geometry, moved: number): void {
  eliminate(geometry, moved);
  substitute(geometry, moved);
}

/**
 * L y = −Δ, where Δ is how far the released beam's ends turn apart over a support: it is made of simple spans that carry
 * their loads and the moments that are known. y stands in the place of its moment.
 */
function eliminate({ supports, support, span, piece }: Geometry, moved: number): void {
  const last = supports - 1;
  let turned = 0; // rotation at the right end of the span before
  let y = 0;
  for (let j = 0; j <= last; j++) {
    const record = support[j]!;
    const known = j === last && !record.held;
    let left = 0; // rotation at the left end of this span
    let right = 0; // and at its right end
    if (j < last) {
      const next = support[j + 1]!;
      const own = span[j]!;
      releaseSpan(own, piece, record, next);
      const M = record.held ? 0 : j === 0 ? record.right : -piece[record.point]!.couple;
      const N = j + 1 === last && !next.held ? next.left : 0;
      const chord = moved === 0 ? 0 : (next.rise - record.rise) * own.inverse;
      left = chord - own.leftTurn - own.near * M - own.cross * N;
      right = chord + own.rightTurn + own.cross * M + own.far * N;
    }
    if (record.held)
      y = eliminateHeld(record, piece[record.point]!.couple, turned, left, y, moved, j === 0, j === last);
    else if (j > 0 && !known) {
      y = left - turned - record.leftEntry * y;
      record.left = y;
    } else y = 0;
    turned = right;
  }
}

function eliminateHeld(
  record: Support,
  couple: number,
  turned: number,
  left: number,
  before: number,
  moved: number,
  isFirst: boolean,
  isLast: boolean,
): number {
  const known = (isFirst ? record.left : 0) - (isLast ? record.right : 0);
  const turn = moved * record.turn + record.turnGive * (couple - known);
  let y = 0;
  if (!isFirst) {
    y = turn - turned - record.leftEntry * before;
    record.left = y;
  }
  if (!isLast) {
    y = left - turn - record.rightEntry * y;
    record.right = y;
  }
  return y;
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
