const LIMIT = 0.78; // the limit line's place across the cell, so that a failing tick has room beyond it

export type UtilisationState = 'passes' | 'close' | 'fails';

/**
 * A utilisation as it is shown: rounded up to two places, so that no ratio above 1 ever reads 1.00.
 * The small allowance is for sums that should be exact (0.85 stored as 0.8500000000000001).
 */
export function utilisationFigure(ratio: number): string {
  if (ratio > 99) return '> 99';
  const up = Math.ceil(ratio * 100 - 1e-9) / 100;
  return (ratio > 1 ? Math.max(up, 1.01) : up).toFixed(2);
}

export function utilisationState(ratio: number): UtilisationState {
  if (ratio > 1) return 'fails';
  return ratio > 0.95 ? 'close' : 'passes';
}

/** Place of the tick as a fraction of the cell's width; stays inside it whatever the ratio. */
export function tickPlace(ratio: number): number {
  return Math.min(0.975, Math.max(0, ratio) * LIMIT);
}

export const LIMIT_PLACE = LIMIT;
