/** A dimension from x1 to x2 whose figure is `width` wide, px. `kept`: it has a name, and stands wherever there is room. */
export type DimensionWish = { x1: number; x2: number; width: number; kept: boolean };

/**
 * Where its figure stands: centred over the line, or outside, under the line at the end of a leader. The leader leaves the line
 * at `from` and ends over the figure at `to`.
 */
export type DimensionPlace = { wish: number; x: number; leader: { from: number; to: number } | null };

/** Beside a figure that stands between its ticks, and between figures that stand outside. */
const BESIDE = 3;
const BETWEEN = 8;
/** How far a figure without a name may be from its dimension. */
const NEAR = 60;
/** How near to its own ends a leader comes to a figure. */
const INSIDE = 6;

/** Beyond a tick, where a letter stands beside its dimension. */
const BEYOND = 7;

/** Where a short dimension's letters stand: centred over the line, or on a level with it beyond its right or left tick. */
export type LetterPlace = { x: number; anchor: 'start' | 'middle' | 'end'; covers: [number, number] };

/** The place of letters `width` px wide; `right` is the edge of the sheet. `covers` is what dimension and letters take together. */
export function placeLetters([x1, x2]: readonly [number, number], width: number, right: number): LetterPlace {
  if (width + 2 * BESIDE <= x2 - x1) return { x: (x1 + x2) / 2, anchor: 'middle', covers: [x1, x2] };
  const reach = BEYOND + width;
  return x2 + reach <= right
    ? { x: x2 + BEYOND, anchor: 'start', covers: [x1, x2 + reach] }
    : { x: x1 - BEYOND, anchor: 'end', covers: [x1 - reach, x2] };
}

type Outside = DimensionWish & { wish: number; middle: number };

/**
 * Places the figures of one row of dimensions, so that none prints over another: over the line where they fit between their ticks,
 * the others outside, side by side in the order of their dimensions. Figures with a name come first, then the longer dimensions;
 * what finds no room within `bounds` is left out.
 */
export function placeDimensionFigures(
  wishes: readonly DimensionWish[],
  bounds: { left: number; right: number },
): DimensionPlace[] {
  const over: DimensionPlace[] = [];
  const narrow: Outside[] = [];
  wishes.forEach((each, wish) => {
    const middle = (each.x1 + each.x2) / 2;
    if (each.width + 2 * BESIDE <= each.x2 - each.x1) over.push({ wish, x: middle, leader: null });
    else narrow.push({ ...each, wish, middle });
  });
  const order = narrow.toSorted((a, b) => Number(b.kept) - Number(a.kept) || b.x2 - b.x1 - (a.x2 - a.x1));
  let row: Outside[] = [];
  let centres: number[] = [];
  for (const each of order) {
    const wider = [...row, each].sort((a, b) => a.middle - b.middle);
    const spread = spreadOut(wider, bounds);
    if (!spread || wider.some((one, i) => !one.kept && Math.abs(spread[i]! - one.middle) > NEAR)) continue;
    row = wider;
    centres = spread;
  }
  const outside = row.map(({ wish, middle, width }, i): DimensionPlace => {
    const x = centres[i]!;
    const reach = Math.max(0, width / 2 - INSIDE);
    return { wish, x, leader: { from: middle, to: Math.min(Math.max(middle, x - reach), x + reach) } };
  });
  return [...over, ...outside].sort((a, b) => a.wish - b.wish);
}

/**
 * Centres of figures side by side, ascending by their middles, each as near to its middle as all together can be (least
 * squares, by pooling those that press on one another); null where they are wider than the bounds.
 */
function spreadOut(
  figures: readonly Outside[],
  { left, right }: { left: number; right: number },
): number[] | null {
  let shift = 0;
  const shifts = figures.map(({ width }, i) => {
    if (i > 0) shift += (figures[i - 1]!.width + width) / 2 + BETWEEN;
    return shift;
  });
  const least = left + (figures[0]?.width ?? 0) / 2;
  const most = right - (figures.at(-1)?.width ?? 0) / 2 - shift;
  if (most < least) return null;
  const pools: { sum: number; count: number }[] = [];
  figures.forEach(({ middle }, i) => {
    let pool = { sum: middle - shifts[i]!, count: 1 };
    for (
      let last = pools.at(-1);
      last && last.sum / last.count > pool.sum / pool.count;
      last = pools.at(-1)
    ) {
      pool = { sum: last.sum + pool.sum, count: last.count + pool.count };
      pools.pop();
    }
    pools.push(pool);
  });
  const starts = pools.flatMap(({ sum, count }) => new Array<number>(count).fill(sum / count));
  return starts.map((start, i) => Math.min(Math.max(start, least), most) + shifts[i]!);
}
