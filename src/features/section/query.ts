import { z } from 'zod';
import {
  designationKey,
  designationParts,
  designationRank,
  SECTION_SHAPES,
  type SectionShape,
} from '@/engine/section';
import { similarTo } from '@/lib/similar';
import type { SectionItem } from './section';

/** What a list may be narrowed and sorted by: the short name in the query, and the field that it means. */
export const SECTION_MEASURES = {
  depth: 'depth_mm',
  width: 'width_mm',
  mass: 'mass_kg_m',
  area: 'area_cm2',
  i_major: 'i_major_cm4',
  i_minor: 'i_minor_cm4',
  w_el: 'w_el_cm3',
  w_pl: 'w_pl_cm3',
  j: 'j_cm4',
  iw: 'iw_cm6',
  tw: 'tw_mm',
  tf: 'tf_mm',
  r: 'r_mm',
  r_major: 'r_major_cm',
  r_minor: 'r_minor_cm',
} as const;
export type SectionMeasure = keyof typeof SECTION_MEASURES;
export type SectionField = (typeof SECTION_MEASURES)[SectionMeasure];

type Measured = Pick<SectionItem, Extract<SectionField, keyof SectionItem> | 'dimensions_mm'>;

/** A field's value; of a tube tw is its wall and r its outer corner. Null where the section has none. */
export function measureOf(item: Measured, field: SectionField): number | null {
  const { dimensions_mm: size } = item;
  switch (field) {
    case 'tw_mm':
      return size['tw'] ?? size['t'] ?? null;
    case 'tf_mm':
      return size['tf'] ?? null;
    case 'r_mm':
      return size['r'] ?? size['ro'] ?? null;
    case 'r_major_cm':
      return Math.sqrt(item.i_major_cm4 / item.area_cm2);
    case 'r_minor_cm':
      return Math.sqrt(item.i_minor_cm4 / item.area_cm2);
    default:
      return item[field];
  }
}

export const MEASURES = Object.keys(SECTION_MEASURES) as SectionMeasure[];

/** Shapes as people name them, in groups where they do. */
const SHAPE_NAMES: Readonly<Record<string, readonly SectionShape[]>> = {
  ...Object.fromEntries(SECTION_SHAPES.map((shape) => [shape, [shape]])),
  i: ['i', 'tapered_i'],
  h: ['i'],
  channel: ['channel', 'tapered_channel'],
  u: ['channel', 'tapered_channel'],
  c: ['channel', 'tapered_channel'],
  t: ['tee'],
  l: ['angle'],
  other: ['round', 'outline', 'values'],
  hollow: ['rhs', 'shs', 'chs'],
  timber: ['rectangle'],
};

/** The groups that every shape stands in once, as the filter draws them. */
const SHAPE_GROUPS = ['i', 'channel', 'tee', 'angle', 'hollow', 'timber', 'other'] as const;

/** The group of a shape, by the name that the search takes. */
export const shapeGroup = (shape: SectionShape): string =>
  SHAPE_GROUPS.find((group) => SHAPE_NAMES[group]?.includes(shape)) ?? shape;

/** The shapes that people take for one kind with this one. */
export const shapeGroupOf = (shape: SectionShape): readonly SectionShape[] =>
  SHAPE_NAMES[shapeGroup(shape)] ?? [shape];

const emptyIsNone = (value: unknown) =>
  typeof value === 'string' && value.trim() === '' ? undefined : value;
const bound = z.preprocess(emptyIsNone, z.coerce.number().optional());
const word = (most: number) => z.preprocess(emptyIsNone, z.string().trim().max(most).optional());

/** "depth_min" and, with the unit in its name, "depth_mm_min". */
const boundFields = Object.fromEntries(
  MEASURES.flatMap((measure) => [measure, SECTION_MEASURES[measure]]).flatMap((name) => [
    [`${name}_min`, bound],
    [`${name}_max`, bound],
  ]),
);

const SORTS = [...MEASURES.flatMap((measure) => [measure, SECTION_MEASURES[measure]]), 'designation'];

/** The query fields of the section list. Spread them, with a list's own, into a strict schema. */
export const sectionQueryFields = {
  ...boundFields,
  q: word(100),
  table: word(100),
  shape: z.preprocess(
    (value) => (typeof value === 'string' ? value.toLowerCase() || undefined : value),
    z.enum(Object.keys(SHAPE_NAMES)).optional(),
  ),
  sort: z.preprocess(emptyIsNone, z.enum(SORTS.flatMap((name) => [name, `-${name}`])).optional()),
  /** 1: only what a supplier holds. */
  stock: z.preprocess(emptyIsNone, z.literal('1').optional()),
  /** The address of a stock list: only what it holds. */
  supplier: word(100),
};

/** Where a page of a list ended: grade and value of the sort (null: it has none), key and table. */
export const sectionPlace = z.tuple([z.int(), z.number().nullable(), z.string(), z.string()]).readonly();
export type SectionPlace = z.output<typeof sectionPlace>;

type SectionRange = { field: SectionField; min?: number; max?: number };
export type SectionQuery = {
  q: string;
  table: string | null;
  shapes: readonly SectionShape[] | null;
  ranges: readonly SectionRange[];
  inStock: boolean;
  /** Whose stock; null for anybody's. */
  supplier: string | null;
  /** Null: best answer to q first, then the lightest. */
  sort: { field: SectionField | 'designation'; descending: boolean } | null;
};

/** The query as the schema of sectionQueryFields gives it, made plain. */
export function toSectionQuery(fields: Readonly<Record<string, unknown>>): SectionQuery {
  const number = (name: string) => {
    const value = fields[name];
    return typeof value === 'number' ? value : undefined;
  };
  const text = (name: string) => {
    const value = fields[name];
    return typeof value === 'string' && value !== '' ? value : null;
  };
  const ranges = MEASURES.flatMap((measure): SectionRange[] => {
    const field = SECTION_MEASURES[measure];
    const min = number(`${measure}_min`) ?? number(`${field}_min`);
    const max = number(`${measure}_max`) ?? number(`${field}_max`);
    if (min === undefined && max === undefined) return [];
    return [{ field, ...(min === undefined ? {} : { min }), ...(max === undefined ? {} : { max }) }];
  });
  return {
    q: text('q') ?? '',
    table: text('table'),
    shapes: SHAPE_NAMES[text('shape') ?? ''] ?? null,
    ranges,
    inStock: text('stock') !== null || text('supplier') !== null,
    supplier: text('supplier'),
    sort: readSort(text('sort')),
  };
}

function readSort(text: string | null): SectionQuery['sort'] {
  if (text === null) return null;
  const name = text.replace(/^-/, '');
  const measure = MEASURES.find((one) => one === name || SECTION_MEASURES[one] === name);
  return { field: measure ? SECTION_MEASURES[measure] : 'designation', descending: text.startsWith('-') };
}

type Searchable = Measured & Pick<SectionItem, 'designation' | 'shape' | 'table' | 'stock'>;

const isStocked = ({ stock = [] }: Pick<SectionItem, 'stock'>, supplier: string | null): boolean =>
  stock.some((held) => supplier === null || held.supplier === supplier);

/** Ranges are inclusive; a value that a table does not give meets none. */
export function meetsQuery(item: Searchable, query: SectionQuery): boolean {
  if (query.table !== null && item.table !== query.table) return false;
  if (query.shapes !== null && !query.shapes.includes(item.shape)) return false;
  if (query.inStock && !isStocked(item, query.supplier)) return false;
  return query.ranges.every(({ field, min, max }) => {
    const value = measureOf(item, field);
    return (
      value !== null &&
      value >= (min ?? Number.NEGATIVE_INFINITY) &&
      value <= (max ?? Number.POSITIVE_INFINITY)
    );
  });
}

const compareText = (a: string, b: string): number => Number(a > b) - Number(a < b);

/** Family by its letters, then size by size: W4x13 stands before W12x14. */
function compareDesignations(a: Searchable, b: Searchable): number {
  const [left, right] = [designationParts(a.designation), designationParts(b.designation)];
  const family = compareText(left.family, right.family);
  if (family !== 0) return family;
  for (const [i, size] of left.sizes.entries()) {
    const difference = Number(size) - Number(right.sizes[i] ?? Number.NaN);
    if (difference !== 0) return Number.isNaN(difference) ? 1 : difference;
  }
  return left.sizes.length - right.sizes.length || compareText(a.table, b.table);
}

function compareBy(a: Searchable, b: Searchable, { field, descending }: NonNullable<SectionQuery['sort']>) {
  const sign = descending ? -1 : 1;
  if (field === 'designation') return sign * compareDesignations(a, b);
  const [left, right] = [measureOf(a, field), measureOf(b, field)];
  if (left === null || right === null) return Number(left === null) - Number(right === null);
  return sign * (left - right);
}

export const LIGHTEST = { field: 'mass_kg_m', descending: false } as const;

/** Fewer letters in common than this and a designation is not offered for the one that was typed. */
export const ALIKE = 0.35;
export const OFFERED = 20;

/** Of designations of which none answers what was typed, the few most like it, the most alike first. */
export function nearestDesignations<T extends { readonly designation: string }>(
  q: string,
  items: readonly T[],
): T[] {
  const like = similarTo(designationKey(q));
  return items
    .map((item) => ({ item, alike: like(designationKey(item.designation)) }))
    .filter(({ alike }) => alike >= ALIKE)
    .sort((a, b) => b.alike - a.alike)
    .slice(0, OFFERED)
    .map(({ item }) => item);
}

/**
 * The items that answer a query, in its order: an exact designation first, then as sorted, else the better answer
 * before the lighter section. Ties go by designation, so that the order is always the same. Where nothing at all is
 * called as was typed, the nearest are offered.
 */
export function selectSections<T extends Searchable>(items: readonly T[], query: SectionQuery): T[] {
  const called = items.flatMap((item) => {
    const rank = query.q === '' ? 1 : designationRank(query.q, item.designation);
    return rank === null ? [] : [{ item, rank }];
  });
  if (called.length === 0)
    return nearestDesignations(
      query.q,
      items.filter((item) => meetsQuery(item, query)),
    );
  const ranked = called.filter(({ item }) => meetsQuery(item, query));
  const order = (rank: number) => (query.sort ? Math.min(rank, 1) : rank);
  ranked.sort(
    (a, b) =>
      order(a.rank) - order(b.rank) ||
      compareBy(a.item, b.item, query.sort ?? LIGHTEST) ||
      compareDesignations(a.item, b.item),
  );
  return ranked.map(({ item }) => item);
}
