import type { Anchor } from '../geometry/labels';

/** A figure on the drawing. With `edits` it is a second way into that input. */
export type Figure = { x: number; y: number; text: string; anchor: Anchor; edits?: string | undefined };

/** How a load is named on the drawing: "w = 12.50 kN/m" by symbol, "snow 2.16 kN/m" by words. */
export type LoadName = {
  symbol?: string | undefined;
  words?: string | undefined;
  edits?: string | undefined;
};
