/** Where the baseline of a strip lies and how far one unit rises above it, in px. */
export type OrdinateScale = { base: number; perUnit: number };

/**
 * Fits ordinates least…most (up positive) between y = top and y = bottom. Zero is always inside, so the baseline is never
 * hidden or cut off. A strip with nothing in it keeps its baseline in the middle.
 */
export function fitOrdinates(least: number, most: number, top: number, bottom: number): OrdinateScale {
  const high = Math.max(0, most);
  const low = Math.min(0, least);
  const span = high - low;
  if (!(span > 0)) return { base: (top + bottom) / 2, perUnit: 0 };
  const perUnit = (bottom - top) / span;
  return { base: top + high * perUnit, perUnit };
}

/** The member's drawn depth: to the scale of its length, but never so thin or thick that the drawing stops working. */
export function drawnDepth(depth: number, perMetre: number, most: number): number {
  return Math.min(most, Math.max(5, depth * perMetre));
}

/** "44", "4.4" or "0.44": how many times larger than the member a diagram of lengths is drawn. */
export function timesDrawn(perMetreOfOrdinate: number, perMetre: number): string {
  const times = perMetreOfOrdinate / perMetre;
  if (!(times > 0)) return '1';
  return times >= 10 ? String(Math.round(times)) : times.toPrecision(2);
}
