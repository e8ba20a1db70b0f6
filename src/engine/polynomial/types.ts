/**
 * A piecewise polynomial on [breaks[0], breaks[n]]. Piece k covers breaks[k]…breaks[k+1] and is
 * Σ coefficients[k·(degree+1) + j] · (x − breaks[k])^j. Jumps between pieces are allowed.
 */
export type Piecewise = {
  readonly breaks: Float64Array;
  readonly degree: number;
  readonly coefficients: Float64Array;
};

/** `at`: ascending, every position where the extreme is attained; a constant piece gives its two ends. */
export type Extreme = { value: number; at: number[] };
