/** The putlog of the sign-in drawing as statics: a simple span with boards over a part of it. Metres and kilonewtons. */
export interface BoardedSpan {
  /** Centre of the bearing in the wall to the centre of the ledger. */
  readonly span: number;
  readonly boardsFrom: number;
  readonly boardsTo: number;
  /** Boards, people and bricks, kN/m. */
  readonly load: number;
}

export interface SpanMoments {
  readonly reactionA: number;
  readonly reactionB: number;
  /** Where the boards begin and end, and where the tangents there meet: the moment's parabola as a quadratic curve. */
  readonly knots: readonly (readonly [x: number, moment: number])[];
  readonly largest: { readonly x: number; readonly moment: number };
}

/**
 * Moments of a simple span under a partial uniform load, sagging positive: straight, a parabola under the boards,
 * straight. R_A = w b (2c + b) / 2L, and the largest moment R_A (a + R_A / 2w) stands where the shear is zero.
 */
export function spanMoments({ span, boardsFrom, boardsTo, load }: BoardedSpan): SpanMoments {
  const loaded = boardsTo - boardsFrom;
  const beyond = span - boardsTo;
  const reactionA = (load * loaded * (2 * beyond + loaded)) / (2 * span);
  const reactionB = load * loaded - reactionA;
  const middle = (boardsFrom + boardsTo) / 2;
  const atZeroShear = boardsFrom + reactionA / load;
  return {
    reactionA,
    reactionB,
    knots: [
      [boardsFrom, reactionA * boardsFrom],
      [middle, reactionA * middle],
      [boardsTo, reactionB * beyond],
    ],
    largest: { x: atZeroShear, moment: reactionA * (boardsFrom + reactionA / (2 * load)) },
  };
}
