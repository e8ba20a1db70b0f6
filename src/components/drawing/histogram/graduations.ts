import { roundStep } from '@/lib/round-step';

type Graduation = { y: number; label: string };
export type Graduations = { ticks: number[]; marks: Graduation[] };

/** y of row i on a rule that runs from top to bottom over all rows. */
export const rowY = (row: number, rows: number, top: number, bottom: number): number =>
  rows < 2 ? top : top + ((bottom - top) * row) / (rows - 1);

/**
 * A tick for each row (thinned to one in 2 px) and a labelled mark where the sorted column passes a round value; marks
 * are at least 16 px apart.
 */
export function graduationsOf(column: readonly number[], top: number, bottom: number): Graduations {
  const rows = column.length;
  const y = (row: number) => rowY(row, rows, top, bottom);
  const ticks: number[] = [];
  for (let row = 0; row < rows; row++) {
    if (ticks.length === 0 || y(row) - (ticks.at(-1) ?? 0) >= 2) ticks.push(y(row));
  }
  const [first = 0, last = 0] = [column[0], column.at(-1)];
  const span = Math.abs(last - first);
  if (!(span > 0)) return { ticks, marks: [] };
  const step = roundStep((span * 30) / Math.max(30, bottom - top));
  const band = (value: number) => Math.floor(value / step + 1e-9);
  const marks: Graduation[] = [];
  column.forEach((value, row) => {
    const before = column[row - 1];
    if (before === undefined || band(before) === band(value)) return;
    if (y(row) - (marks.at(-1)?.y ?? Number.NEGATIVE_INFINITY) < 16) return;
    const passed = Math.max(band(before), band(value)) * step;
    marks.push({ y: y(row), label: String(Number(passed.toPrecision(6))) });
  });
  return { ticks, marks };
}

/** The first row of a window of `size` rows whose middle is put at y. */
export function firstRowAt(y: number, rows: number, size: number, top: number, bottom: number): number {
  const middle = ((y - top) / (bottom - top)) * (rows - 1);
  return Math.max(0, Math.min(rows - size, Math.round(middle - (size - 1) / 2)));
}
