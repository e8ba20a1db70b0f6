import type { UnitSystemName } from '@/engine/quantity';
import {
  binOf,
  binsTo,
  type MeasureSpread,
  RANGED_FIELD,
  type Ranged,
  type Spread,
  withRangesOf,
} from '../spread';
import { answering } from './find';
import type { Asked, Register } from './register';

/** How the depth and mass of the rows that answer a query are spread; the axis is that of every row where none does. */
export function spreadIn(register: Register, query: Asked, system: UnitSystemName): Spread {
  const base = answering(register, { ...query, ranges: [] });
  const ranged = (ranges: Asked['ranges']) => register.meeting({ table: null, shapes: null, ranges });
  const meeting = ranged(query.ranges);
  const of = (measure: Ranged): MeasureSpread => {
    const column = register.values(RANGED_FIELD[measure]);
    const greatest = greatestOf(column, base) || greatestOf(column, null);
    const { bin, bins } = binsTo(greatest, measure, system);
    const own = ranged(withRangesOf(query, measure).ranges);
    const all = new Array<number>(bins).fill(0);
    const met = new Array<number>(bins).fill(0);
    let within = 0;
    for (const [at, isAnswer] of base.entries()) {
      if (isAnswer === 0) continue;
      const i = binOf(column[at] ?? 0, bin, bins);
      all[i] = (all[i] ?? 0) + 1;
      met[i] = (met[i] ?? 0) + (meeting[at] ?? 0);
      within += own[at] ?? 0;
    }
    return { bin, all, meeting: met, within };
  };
  return { depth: of('depth'), mass: of('mass') };
}

/** Of the rows that are marked, or of all. */
function greatestOf(column: Float64Array, marked: Uint8Array | null): number {
  let greatest = 0;
  for (const [at, value] of column.entries()) if (value > greatest && marked?.[at] !== 0) greatest = value;
  return greatest;
}
