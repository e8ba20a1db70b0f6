import {
  type DesignationParts,
  dimensionFaults,
  keyOfParts,
  SECTION_SHAPES,
  type SectionDimensions,
  type SectionShape,
} from '@/engine/section';
import type { Mapping, NumberField } from './contract';
import { dimensionsOf, isRolled, type RowRead, SIZES, type Values } from './reading';

const FIRST = 1024; // rows; doubled whenever they are full

/** A column of numbers that grows; what was not given is NaN. */
class GrowingColumn {
  values = new Float64Array(FIRST).fill(Number.NaN);
  set(at: number, value: number): void {
    if (at >= this.values.length) {
      const larger = new Float64Array(2 * Math.max(this.values.length, at)).fill(Number.NaN);
      larger.set(this.values);
      this.values = larger;
    }
    this.values[at] = value;
  }
}

/** "ub 533x210" of UB 533×210×92, "ipe" of IPE 300; null of a name without sizes. */
function serialOf({ family, sizes }: DesignationParts): string | null {
  if (sizes.length === 0) return null;
  return sizes.length === 1 ? family : `${family} ${sizes.slice(0, -1).join('x')}`;
}

/** The rows of a file in columns of numbers: some 150 bytes a row, so that all can be compared with each other. */
export class RowStore {
  readonly printed: string[] = [];
  readonly lines: number[] = [];
  readonly keys: string[] = [];
  /** Family and sizes but the last, which is the mass or the wall; null of what is no rolled series. */
  readonly serials: (string | null)[] = [];
  private readonly shapes: number[] = [];
  private readonly columns: ReadonlyMap<NumberField, GrowingColumn>;

  constructor(readonly fields: readonly NumberField[]) {
    this.columns = new Map(fields.map((field) => [field, new GrowingColumn()]));
  }

  get count(): number {
    return this.lines.length;
  }

  add({ line, printed, name, shape, values }: RowRead): void {
    const at = this.lines.length;
    this.lines.push(line.number);
    this.printed.push(printed);
    this.keys.push(keyOfParts(name));
    this.serials.push(isRolled(shape) ? serialOf(name) : null);
    this.shapes.push(shape === null ? -1 : SECTION_SHAPES.indexOf(shape));
    for (const field of this.fields) {
      const value = values[field];
      if (value !== undefined) this.columns.get(field)?.set(at, value);
    }
  }

  shape(at: number): SectionShape | null {
    return SECTION_SHAPES[this.shapes[at] ?? -1] ?? null;
  }

  /** NaN where the row has none. */
  value(field: NumberField, at: number): number {
    return this.columns.get(field)?.values[at] ?? Number.NaN;
  }

  values(at: number): Values {
    const values: Values = {};
    for (const field of this.fields) {
      const value = this.value(field, at);
      if (!Number.isNaN(value)) values[field] = value;
    }
    return values;
  }

  sum(field: NumberField): number {
    let sum = 0;
    for (let at = 0; at < this.count; at++) {
      const value = this.value(field, at);
      if (!Number.isNaN(value)) sum += value;
    }
    return sum;
  }

  /** Multiplies a column, or single rows of it: where it was read in a wrong unit. */
  scale(field: NumberField, by: number, rows: readonly number[] | null): void {
    const column = this.columns.get(field);
    if (!column) return;
    if (rows) for (const at of rows) column.set(at, this.value(field, at) * by);
    else for (let at = 0; at < this.count; at++) column.set(at, this.value(field, at) * by);
  }

  swap(one: NumberField, other: NumberField): void {
    const [first, second] = [this.columns.get(one), this.columns.get(other)];
    if (!first || !second) return;
    [first.values, second.values] = [second.values, first.values];
  }
}

/** Dimensions of a row where they are possible. */
export function possible(store: RowStore, at: number, mapping: Mapping): SectionDimensions | null {
  const shape = store.shape(at);
  if (shape === null) return null;
  for (const field of SIZES[shape]) if (Number.isNaN(store.value(field, at))) return null;
  const dimensions = dimensionsOf(shape, store.values(at), mapping);
  return dimensionFaults(dimensions).length === 0 ? dimensions : null;
}
