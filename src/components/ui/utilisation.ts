/** The limit line's place across the cell, so that a failing tick has room beyond it. */
export const LIMIT_PLACE = 0.78;

export type UtilisationState = 'passes' | 'close' | 'fails';

export function utilisationState(ratio: number): UtilisationState {
  if (ratio > 1) return 'fails';
  return ratio > 0.95 ? 'close' : 'passes';
}

/** Place of the tick as a fraction of the cell's width; stays inside it whatever the ratio. */
export function tickPlace(ratio: number): number {
  return Math.min(0.975, Math.max(0, ratio) * LIMIT_PLACE);
}
