/** Equal bins over from…to. */
export type Bins = { from: number; to: number; bin: number };

export type Range = { low: number; high: number };
export type Cursor = keyof Range;

/** The range with one cursor moved: on its step, within the bins, and never past the other cursor. */
export function movedTo(
  range: Range,
  cursor: Cursor,
  value: number,
  { from, to }: Bins,
  step: number,
): Range {
  const onStep = Math.round(value / step) * step;
  const exact = Number(onStep.toPrecision(12));
  return cursor === 'low'
    ? { ...range, low: Math.min(Math.max(exact, from), range.high) }
    : { ...range, high: Math.max(Math.min(exact, to), range.low) };
}

/** Both cursors moved together, stopping at the ends without changing the width. */
export function shifted({ low, high }: Range, by: number, { from, to }: Bins): Range {
  const within = Math.min(Math.max(by, from - low), to - high);
  return { low: low + within, high: high + within };
}

/** What a key does to a cursor; null for other keys. Shift takes ten steps, [ and ] move the whole range. */
export function keyedRange(
  { key, shiftKey }: { key: string; shiftKey: boolean },
  range: Range,
  cursor: Cursor,
  bins: Bins,
  step: number,
): Range | null {
  const by = shiftKey ? 10 * step : step;
  const move = (value: number) => movedTo(range, cursor, value, bins, step);
  if (key === 'ArrowLeft' || key === 'ArrowDown') return move(range[cursor] - by);
  if (key === 'ArrowRight' || key === 'ArrowUp') return move(range[cursor] + by);
  if (key === 'Home') return move(bins.from);
  if (key === 'End') return move(bins.to);
  if (key === '[' || key === '{') return shifted(range, -by, bins);
  if (key === ']' || key === '}') return shifted(range, by, bins);
  return null;
}
