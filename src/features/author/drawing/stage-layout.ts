/** Where the parts of a drawn draft lie on the sheet, px. */
import type { NamedLength } from '@/components/drawing/geometry/dimensions';
import { combRows } from '@/components/drawing/geometry/stacking';
import { lengthRows, ROW, rowAt } from '@/components/drawing/schematic/NamedLengths';
import { type SchematicSize, spread } from '@/components/drawing/schematic/SchematicFrame';
import { drawnName } from '@/features/template/names';
import type { DrawnBeam, Part } from './parts';

/** What a part can be taken hold of by. */
export interface Grip {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export interface StageLayout {
  readonly width: number;
  readonly height: number;
  readonly size: SchematicSize;
  readonly loads: number;
  readonly toX: (metres: number) => number;
  readonly toMetres: (px: number) => number;
  readonly rows: readonly (readonly NamedLength[])[];
  /** Where dimensions begin, under the letters of the supports. */
  readonly below: number;
}

const LOADS = 1.5;
const NAME = 13;
const LETTERS = 74;

/** How high the rows of line loads stand, from the member upward: each row's foot and top. */
function combs(beam: DrawnBeam): { indexes: readonly number[]; foot: number; top: number }[] {
  const rows = combRows(beam.loads);
  const even = (rows.length > 1 ? 9 : 11) * LOADS;
  let foot = 2;
  return rows.map(({ loads }) => {
    const isEven = loads.every(({ load }) => load.w0 === load.w1);
    const top = foot + (isEven ? even : 18 * LOADS) + NAME;
    const row = { indexes: loads.map(({ index }) => index), foot, top };
    foot = top;
    return row;
  });
}

export function layStage(beam: DrawnBeam, width: number): StageLayout {
  const margin = width < 520 ? 30 : 52;
  const above = Math.max(26 * LOADS, ...combs(beam).map(({ top }) => top)) + 22;
  const size = { margin, base: above, support: 0.95, wall: { thick: 13, beyond: 22 } };
  const toX = spread(width, size, beam.length);
  const rows = lengthRows(
    beam.dimensions.map(({ from, to, tex }) => ({
      from: Math.min(from, to),
      to: Math.max(from, to),
      symbol: drawnName(tex),
    })),
    { toX, width },
  );
  const below = above + LETTERS - 18;
  return {
    width,
    height: rowAt(below, Math.max(1, rows.length) - 1) + ROW,
    size,
    loads: LOADS,
    toX,
    toMetres: (px) => ((px - margin) * beam.length) / (width - 2 * margin),
    rows,
    below,
  };
}

/** A narrow part is taken hold of by this much on either side. */
const HALF = 13;

/** Where each part is taken hold of, in the order of the parts. */
export function gripsOf(beam: DrawnBeam, parts: readonly Part[], layout: StageLayout): Grip[] {
  const { toX, size, rows, below } = layout;
  const { base } = size;
  const heights = combs(beam);
  const rowOf = (part: Part): number =>
    rows.findIndex((row) => row.some(({ from, to }) => from === part.from && to === part.to));
  const gripOf = (part: Part): Grip => {
    const [x1, x2] = [toX(part.from), toX(part.to)];
    const over = (y: number, height: number): Grip => ({ x: x1, y, width: Math.max(8, x2 - x1), height });
    const about = (y: number, height: number): Grip => ({ x: x1 - HALF, y, width: 2 * HALF, height });
    switch (part.kind) {
      case 'support':
        return about(base + 3, 50);
      case 'hinge':
        return about(base - 9, 18);
      case 'segment':
        return over(base - 9, 18);
      case 'point':
        return about(base - 28 * LOADS, 28 * LOADS - 3);
      case 'couple':
        return about(base - 12 * LOADS - 4, 12 * LOADS + 6);
      case 'curvature':
        return over(base - 22 * LOADS, 16 * LOADS);
      case 'line': {
        const { foot = 2, top = 20 } = heights.find(({ indexes }) => indexes.includes(part.nth)) ?? {};
        return over(base - top, top - foot);
      }
      case 'dimension':
        return over(rowAt(below, Math.max(0, rowOf(part))) - 15, 20);
    }
  };
  return parts.map(gripOf);
}
