/*
 * The records that a continuous beam is solved in: classes of numbers, made once and written over by every solve. Read
 * by name they are as fast as one packed Float64Array, and nearly twice as fast as an array for each quantity.
 * Numbers start as NaN, which no solve leaves, and which V8 stores as a double from the first.
 */

/** A support that holds the beam up. */
export class Support {
  /** Its number in the document, and its point. */
  number = 0;
  point = 0;
  at = NaN;
  /** 1/k against vertical movement (0: rigid), and the prescribed rise. */
  give = NaN;
  rise = NaN;
  /** Whether it holds rotation, 1/k against it (0: rigid), and the prescribed rotation. */
  held = false;
  turnGive = NaN;
  turn = NaN;

  /**
   * F = L D Lᵀ of the unknown moments, row by row: 1/D, and the entry left of the diagonal. An inner support has one
   * row, of the moment just left of it, and another, of the moment just right of it, where it holds rotation.
   */
  leftPivot = NaN;
  leftEntry = NaN;
  rightPivot = NaN;
  rightEntry = NaN;

  /** Moment just left and just right of it, N·m, sagging. */
  left = NaN;
  right = NaN;
  /** Reaction, N, up; moment reaction, N·m, anticlockwise; rise of the beam, m. */
  up = NaN;
  couple = NaN;
  risen = NaN;
}

/** From a support to the next; of the last support the overhang to its right, which has no flexibility. */
export class Span {
  /** 1/length, and how far its ends, as those of a simple span, turn inwards for unit moments at them. */
  inverse = NaN;
  near = NaN;
  cross = NaN;
  far = NaN;

  /** As a simple span under its loads: shears just inside its ends, and how far its ends turn inwards from the chord. */
  leftShear = NaN;
  rightShear = NaN;
  leftTurn = NaN;
  rightTurn = NaN;
  /** Shear, N, and rotation, rad, just right of its left support. */
  shear = NaN;
  rotation = NaN;
}

/** Between two neighbouring points. */
export class Piece {
  from = NaN;
  length = NaN;
  /** 1/EI, and 1/GA (0 where it does not shear). */
  bending = NaN;
  shearing = NaN;

  /** At s from its left end the downward load is start + rate·s; free curvature; force and couple at its left end. */
  start = NaN;
  rate = NaN;
  curvature = NaN;
  force = NaN;
  couple = NaN;
}
