import { SECTION_SHAPES, type SectionShape } from '@/engine/section';
import { SimilarTexts } from '@/lib/similar';
import { SECTION_MEASURES, type SectionField, type SectionQuery } from '../query';

export const FIELDS: readonly SectionField[] = Object.values(SECTION_MEASURES);

export interface RegisterEdition {
  readonly revisionId: string;
  readonly table: string;
}

/** A section of a register as it is read; null where a table does not give a value. */
export interface RegisterRow extends RegisterEdition {
  readonly key: string;
  readonly shape: SectionShape;
  readonly values: Readonly<Record<SectionField, number | null>>;
}

/** A query with what the register itself does not know: 1 for the only rows that may answer. */
export interface Asked extends SectionQuery {
  readonly only?: Uint8Array;
}
type Meeting = Pick<Asked, 'table' | 'shapes' | 'ranges' | 'only'>;

/** Letters before the sizes of a key. */
const FAMILY = /^[a-z]*/;

/**
 * The sections of the issued editions of a practice in columns, some 400 bytes each, so that a search looks at every
 * one in a few milliseconds whatever it asks and sorts by. The rows stand in the order of their names.
 */
export class Register {
  private readonly columns: Readonly<Record<SectionField, Float64Array>>;
  private readonly tables: readonly string[];
  private readonly orders = new Map<string, Uint32Array>();
  private readonly masks = new WeakMap<ReadonlyMap<string, ReadonlySet<string>>, Uint8Array>();

  constructor(private readonly rows: RegisterRows) {
    const { values, editions } = rows;
    this.columns = fromEach((field) => Float64Array.from(values[field]));
    this.tables = editions.map(({ table }) => table);
  }

  get count(): number {
    return this.rows.keys.length;
  }

  get names(): SimilarTexts {
    return this.rows.names;
  }

  key = (at: number): string => this.rows.keys[at] ?? '';
  family = (at: number): string => this.rows.families[at] ?? '';
  /** The sizes as the key has them, x between. */
  sizes = (at: number): string => this.rows.sizes[at] ?? '';
  table = (at: number): string => this.edition(at).table;

  edition(at: number): RegisterEdition {
    const edition = this.rows.editions[this.rows.editionOf[at] ?? -1];
    if (!edition) throw new RangeError(`The register has no row ${at}`);
    return edition;
  }

  /** NaN where a table does not give it. */
  values = (field: SectionField): Float64Array => this.columns[field];

  /** 1 for every row whose key is among those given of its table; found once for the same names. */
  named(names: ReadonlyMap<string, ReadonlySet<string>>): Uint8Array {
    const before = this.masks.get(names);
    if (before) return before;
    const ofEdition = this.tables.map((table) => names.get(table));
    const mask = new Uint8Array(this.count);
    for (const [at, key] of this.rows.keys.entries())
      mask[at] = Number(ofEdition[this.rows.editionOf[at] ?? -1]?.has(key) ?? false);
    this.masks.set(names, mask);
    return mask;
  }

  /** 1 for every row of the table and shapes asked for that meets the ranges; a value that is not given meets none. */
  meeting({ table, shapes, ranges, only }: Meeting): Uint8Array {
    const met = only ? only.slice() : new Uint8Array(this.count).fill(1);
    if (table !== null)
      keepOnly(
        met,
        this.rows.editionOf,
        this.tables.map((one) => one === table),
      );
    if (shapes !== null)
      keepOnly(
        met,
        this.rows.shapeOf,
        SECTION_SHAPES.map((one) => shapes.includes(one)),
      );
    for (const { field, min = Number.NEGATIVE_INFINITY, max = Number.POSITIVE_INFINITY } of ranges) {
      const column = this.columns[field];
      for (let at = 0; at < met.length; at++) {
        const value = column[at] ?? Number.NaN;
        if (!(value >= min && value <= max)) met[at] = 0;
      }
    }
    return met;
  }

  /** How many rows stand before a name, and how many through it. */
  around(key: string, table: string): { readonly before: number; readonly through: number } {
    const place = nameOf(key, table);
    const before = this.countWhile((at) => compareNames(this.name(at), place) < 0);
    const isThere = before < this.count && compareNames(this.name(before), place) === 0;
    return { before, through: before + Number(isThere) };
  }

  private name = (at: number): Name => nameOf(this.key(at), this.table(at));

  /** How many of the first rows something is so of, which is so of no row after them. */
  private countWhile(isSo: (at: number) => boolean): number {
    let [from, to] = [0, this.count];
    while (from < to) {
      const middle = Math.floor((from + to) / 2);
      if (isSo(middle)) from = middle + 1;
      else to = middle;
    }
    return from;
  }

  /** Every row in the order of a value, by name where it is the same; what has none stands last either way. */
  order(field: SectionField, descending: boolean): Uint32Array {
    const name = `${descending ? '-' : ''}${field}`;
    const known = this.orders.get(name);
    if (known) return known;
    const column = this.columns[field];
    const sign = descending ? -1 : 1;
    const value = (at: number) => {
      const given = column[at] ?? Number.NaN;
      return Number.isNaN(given) ? Number.POSITIVE_INFINITY : sign * given;
    };
    const order = Uint32Array.from({ length: this.count }, (_, i) => i);
    order.sort((a, b) => compare(value(a), value(b)) || a - b);
    this.orders.set(name, order);
    return order;
  }
}

/** Takes the mark from the rows whose code is not asked for. */
function keepOnly(met: Uint8Array, codes: readonly number[], isAsked: readonly boolean[]): void {
  for (let at = 0; at < met.length; at++) if (!isAsked[codes[at] ?? -1]) met[at] = 0;
}

interface Name {
  readonly family: string;
  readonly sizes: readonly number[];
  readonly table: string;
}

function nameOf(key: string, table: string): Name {
  const family = familyOf(key);
  const sizes = key.slice(family.length);
  return { family, sizes: sizes === '' ? [] : sizes.split('x').map(Number), table };
}

const familyOf = (key: string): string => FAMILY.exec(key)?.[0] ?? '';

/** As the database orders them: family by its letters, then size by size, then table. */
function compareNames(a: Name, b: Name): number {
  const family = compare(a.family, b.family);
  if (family !== 0) return family;
  for (const [i, size] of a.sizes.entries()) {
    const difference = compare(size, b.sizes[i] ?? Number.NEGATIVE_INFINITY);
    if (difference !== 0) return difference;
  }
  return a.sizes.length - b.sizes.length || compare(a.table, b.table);
}

/** Infinity is the same as infinity, which a difference would not say. */
const compare = <T extends number | string>(a: T, b: T): number => Number(a > b) - Number(a < b);

const fromEach = <T>(of: (field: SectionField) => T): Record<SectionField, T> =>
  Object.fromEntries(FIELDS.map((field) => [field, of(field)])) as Record<SectionField, T>;

/** Takes the rows of a register one after the other, in the order of their names. */
export class RegisterRows {
  readonly editions: RegisterEdition[] = [];
  readonly editionOf: number[] = [];
  readonly shapeOf: number[] = [];
  readonly keys: string[] = [];
  readonly families: string[] = [];
  readonly sizes: string[] = [];
  readonly values = fromEach((): number[] => []);
  readonly names = new SimilarTexts();
  private readonly placeOf = new Map<string, number>();

  add({ revisionId, table, key, shape, values }: RegisterRow): void {
    const edition = this.placeOf.get(revisionId) ?? this.editions.push({ revisionId, table }) - 1;
    this.placeOf.set(revisionId, edition);
    this.editionOf.push(edition);
    this.shapeOf.push(SECTION_SHAPES.indexOf(shape));
    const family = familyOf(key);
    this.keys.push(key);
    this.families.push(family);
    this.sizes.push(key.slice(family.length));
    this.names.add(key);
    for (const field of FIELDS) this.values[field].push(values[field] ?? Number.NaN);
  }
}
