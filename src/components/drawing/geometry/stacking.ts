import type { LineLoad, Load } from '@/engine/model/index';

/** Where a load stands in the document, kept so that its name and its figure can be found again. */
export type Placed<T> = { index: number; load: T };

/** One row of combs: distributed loads of one group, none over another. `most` is the largest intensity, N/m. */
export type CombRow = { group: string | undefined; loads: Placed<LineLoad>[]; most: number };

const acts = (load: LineLoad): boolean => (load.w0 !== 0 || load.w1 !== 0) && load.to > load.from;

const meet = (a: LineLoad, b: LineLoad): boolean => a.from < b.to && b.from < a.to;

/** Rows from the member upward: groups in the order in which they first appear, overlapping loads of a group above one another. */
export function combRows(loads: readonly Load[]): CombRow[] {
  const groups = new Map<string | undefined, CombRow[]>();
  loads.forEach((load, index) => {
    if (load.kind !== 'line' || !acts(load)) return;
    const rows = groups.get(load.group) ?? [];
    groups.set(load.group, rows);
    const most = Math.max(Math.abs(load.w0), Math.abs(load.w1));
    const row = rows.find((each) => each.loads.every((other) => !meet(other.load, load)));
    if (row) {
      row.loads.push({ index, load });
      row.most = Math.max(row.most, most);
    } else rows.push({ group: load.group, loads: [{ index, load }], most });
  });
  return [...groups.values()].flat();
}

/** A load whose sense changes along its length, cut where it changes, so that every part points one way. */
export function oneWayParts({ from, to, w0, w1 }: LineLoad): Pick<LineLoad, 'from' | 'to' | 'w0' | 'w1'>[] {
  if (w0 * w1 >= 0) return [{ from, to, w0, w1 }];
  const zero = from + ((to - from) * w0) / (w0 - w1);
  return [
    { from, to: zero, w0, w1: 0 },
    { from: zero, to, w0: 0, w1 },
  ];
}

/** The lowest level for each interval at which it meets no earlier one, with `clear` between them. */
export function levels(intervals: readonly (readonly [from: number, to: number])[], clear: number): number[] {
  const ends: number[] = [];
  return intervals.map(([from, to]) => {
    const free = ends.findIndex((end) => end + clear <= from);
    const level = free < 0 ? ends.length : free;
    ends[level] = to;
    return level;
  });
}
