import { designationKey, designationParts } from '@/engine/section';
import { shapeGroupOf } from '../query';
import type { SectionItem } from '../section';
import type { Register } from './register';

/** As deep: within this share of the depth, as sections of one nominal depth are. */
const AS_DEEP = 0.03;

/** Rows of the register; null where nothing is lighter, or heavier. */
export interface NeighbourRows {
  readonly lighter: number | null;
  readonly heavier: number | null;
}

type Beside = Pick<SectionItem, 'table' | 'designation' | 'shape' | 'depth_mm' | 'mass_kg_m'>;

/** Next by mass of the sections about as deep and of the same kind of shape, in any table. */
export function nextInDepth(register: Register, item: Beside): NeighbourRows {
  const [min, max] = [item.depth_mm * (1 - AS_DEEP), item.depth_mm * (1 + AS_DEEP)];
  const ranges = [{ field: 'depth_mm', min, max } as const];
  return nextTo(register, item, register.meeting({ table: null, shapes: shapeGroupOf(item.shape), ranges }));
}

/**
 * Next by mass in its table of the same series: sections that differ in their last size alone (W12x26 and W12x30,
 * 100x100x8 and 100x100x10), or in the only one that they have (IPE 270 and IPE 300).
 */
export function nextInSeries(register: Register, item: Beside): NeighbourRows {
  const { family, sizes } = designationParts(item.designation);
  const alike = sizes
    .slice(0, -1)
    .map((one) => `${one}x`)
    .join('');
  const inTable = register.meeting({ table: item.table, shapes: null, ranges: [] });
  const inSeries = inTable.map((isThere, at) => {
    if (isThere === 0 || register.family(at) !== family) return 0;
    const given = register.sizes(at);
    return Number(given.startsWith(alike) && given.split('x').length === sizes.length);
  });
  return nextTo(register, item, inSeries);
}

/**
 * The first beyond the item's mass; of equal masses by their keys, so that every one is passed on the way. Of an item of a
 * former edition its own row in force is none of them.
 */
function nextTo(register: Register, item: Beside, marked: Uint8Array): NeighbourRows {
  const masses = register.values('mass_kg_m');
  const mass = (at: number) => masses[at] ?? Number.NaN;
  const turn = (at: number, [other, key]: readonly [number, string]) =>
    mass(at) - other || Number(register.key(at) > key) - Number(register.key(at) < key);
  const key = designationKey(item.designation);
  const found = { lighter: null as number | null, heavier: null as number | null };
  for (const [at, isMarked] of marked.entries()) {
    if (isMarked === 0 || (register.key(at) === key && register.table(at) === item.table)) continue;
    const side = turn(at, [item.mass_kg_m, key]);
    if (side === 0) continue;
    const way = side < 0 ? 'lighter' : 'heavier';
    const best = found[way];
    const isNearer = best === null || turn(at, [mass(best), register.key(best)]) * side < 0;
    if (isNearer) found[way] = at;
  }
  return found;
}
