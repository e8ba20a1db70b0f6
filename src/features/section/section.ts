import { z } from 'zod';
import { depthOf, SECTION_SHAPES, type SectionDimensions, TUBE_STANDARDS, widthOf } from '@/engine/section';
import { sectionStockSchema } from '@/features/stock/stock';
import type { SectionValues } from './resolve';

const length = z.number().positive();
const radius = z.number().nonnegative();
const flanged = { h: length, b: length, tw: length, tf: length, r: radius };
const tapered = { ...flanged, toe: radius, slope: z.number().positive(), at: radius };
const MAX_CORNERS = 200; // of one ring, and of rings: more is a drawing, not a section
const MAX_RINGS = 24;
const ring = z.array(z.strictObject({ z: z.number(), y: z.number(), r: radius })).max(MAX_CORNERS);

/** Dimensions in m, as the engine takes them. */
const sectionDimensionsSchema = z.discriminatedUnion('shape', [
  z.strictObject({ shape: z.literal('i'), ...flanged }),
  z.strictObject({ shape: z.literal('channel'), ...flanged }),
  z.strictObject({ shape: z.literal('tee'), ...flanged }),
  z.strictObject({ shape: z.literal('tapered_i'), ...tapered }),
  z.strictObject({ shape: z.literal('tapered_channel'), ...tapered }),
  z.strictObject({ shape: z.literal('angle'), h: length, b: length, t: length, r: radius, toe: radius }),
  z.strictObject({ shape: z.enum(['rhs', 'shs']), h: length, b: length, t: length, ro: radius, ri: radius }),
  z.strictObject({ shape: z.literal('chs'), d: length, t: length }),
  z.strictObject({ shape: z.literal('rectangle'), h: length, b: length }),
  z.strictObject({ shape: z.literal('round'), d: length }),
  z.strictObject({
    shape: z.literal('outline'),
    rings: z.array(ring.readonly()).min(1).max(MAX_RINGS).readonly(),
    parts: z
      .array(z.strictObject({ name: z.string().min(1).max(100), rings: z.int().positive() }))
      .readonly()
      .optional(),
    t: length,
    j: radius,
    iw: radius,
  }),
  z.strictObject({
    shape: z.literal('values'),
    h: length,
    b: length,
    t: length,
    area: length,
    iMajor: length,
    iMinor: length,
    wElMajor: length,
    wElMinor: length,
    wPlMajor: length,
    wPlMinor: length,
    j: radius,
    iw: radius,
    shearArea: length,
  }),
]) satisfies z.ZodType<SectionDimensions>;

const positive = z.number().positive();

/** A row of a section table: what was supplied, or computed from the dimensions where `computed` names it. */
export const sectionRowSchema = z.strictObject({
  /** In ASCII, x between sizes. */
  designation: z.string().min(1),
  /** As supplied. */
  printed: z.string().min(1),
  /** One spelling for however it is typed: engine/section designationKey. */
  key: z.string().min(1),
  shape: z.enum(SECTION_SHAPES),
  depth_mm: positive,
  width_mm: positive,
  mass_kg_m: positive,
  area_cm2: positive,
  i_major_cm4: positive,
  i_minor_cm4: positive,
  w_el_cm3: positive,
  w_el_minor_cm3: positive,
  w_pl_cm3: positive,
  w_pl_minor_cm3: positive,
  j_cm4: positive,
  iw_cm6: z.number().nonnegative(),
  computed: z.array(z.string()),
  dimensions: sectionDimensionsSchema,
});
export type SectionRow = z.infer<typeof sectionRowSchema>;

/** A section as the endpoint gives it; dimensions in mm by their symbol. */
export const sectionItemSchema = sectionRowSchema
  .pick({
    designation: true,
    printed: true,
    shape: true,
    depth_mm: true,
    width_mm: true,
    mass_kg_m: true,
    area_cm2: true,
    i_major_cm4: true,
    i_minor_cm4: true,
    w_el_cm3: true,
    computed: true,
  })
  .extend({
    table: z.string(),
    edition: z.int().positive(),
    w_pl_cm3: positive.nullable(),
    j_cm4: positive.nullable(),
    iw_cm6: z.number().nonnegative().nullable(),
    /** Lengths by their symbol; of an outline and of values alone the sizes over all. */
    dimensions_mm: z.record(z.string(), z.number()),
    /** Where lengths by symbol do not describe it: in m, m², m³, m⁴ and m⁶. */
    dimensions_si: sectionDimensionsSchema.optional(),
    /** Who holds it; left out where nobody does. */
    stock: z.array(sectionStockSchema).optional(),
  });
export type SectionItem = z.infer<typeof sectionItemSchema>;

const FIGURES = 12; // a length in mm again, without the last bits of its metres

const toMm = (metres: number): number => Number((metres * 1000).toPrecision(FIGURES));

/** An item's dimensions: in mm by their symbol, {h: 300, b: 150, tw: 7.1, tf: 10.7, r: 15}, and as they are where that is not all. */
export function itemDimensions(d: SectionDimensions): Pick<SectionItem, 'dimensions_mm' | 'dimensions_si'> {
  switch (d.shape) {
    case 'outline':
    case 'values':
      return {
        dimensions_mm: { h: toMm(depthOf(d)), b: toMm(widthOf(d)) },
        dimensions_si: d,
      };
    case 'tapered_i':
    case 'tapered_channel': {
      const { slope: _slope, ...lengths } = d;
      return { dimensions_mm: lengthsMm(lengths), dimensions_si: d };
    }
    default:
      return { dimensions_mm: lengthsMm(d) };
  }
}

const lengthsMm = (lengths: Readonly<Record<string, string | number>>): Record<string, number> =>
  Object.fromEntries(
    Object.entries(lengths).flatMap(([symbol, value]) =>
      typeof value === 'number' ? [[symbol, toMm(value)]] : [],
    ),
  );

export function toSectionItem(row: SectionRow, table: string, edition: number): SectionItem {
  const { key: _key, dimensions, w_el_minor_cm3: _el, w_pl_minor_cm3: _pl, ...shown } = row;
  return { table, edition, ...shown, ...itemDimensions(dimensions) };
}

/** An item's dimensions in m again, as the engine takes them. */
export const dimensionsOf = ({ shape, dimensions_mm, dimensions_si }: SectionItem): SectionDimensions =>
  dimensions_si ??
  sectionDimensionsSchema.parse({
    shape,
    ...Object.fromEntries(Object.entries(dimensions_mm).map(([symbol, mm]) => [symbol, mm / 1000])),
  });

/** What a beam needs to know of an item to be made of it. */
export const toSectionValues = (item: SectionItem): SectionValues => ({
  designation: item.designation,
  dimensions: dimensionsOf(item),
  massKgM: item.mass_kg_m,
  iMajorCm4: item.i_major_cm4,
  wElCm3: item.w_el_cm3,
});

/** Where a section's values stand; the table's name where it is known. */
export interface RowOrigin {
  readonly tableName?: string | undefined;
  readonly edition: number;
  /** Columns that were computed from the dimensions, not supplied. */
  readonly computed: readonly string[];
}

/** Only that of an item or a row which has more. */
export const toRowOrigin = ({ tableName, edition, computed }: RowOrigin): RowOrigin => ({
  tableName,
  edition,
  computed,
});

/** What stands beside a section table's CSV: where it comes from and how it is read. */
export const sectionTableMetaSchema = z.strictObject({
  slug: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/),
  reference: z.string(),
  name: z.string(),
  /** Words by which the table is found. */
  words: z.array(z.string()),
  standard: z.string(),
  source: z.string(),
  edition: z.string(),
  catalogue_date: z.iso.date(),
  conventions: z.string(),
  licence: z.string(),
  notes: z.array(z.string()),
  /** Which letters the file gives the axes and moduli; none where its headings say major and minor. */
  axes: z.enum(['en', 'us', 'british']).optional(),
  /** Shape of every row, where the file has no column for it. */
  shape: z.enum(SECTION_SHAPES).optional(),
  /** Density that the masses stand for. */
  density_kg_m3: positive.default(7850),
  tube_standard: z.enum(TUBE_STANDARDS).default('EN 10210'),
});
export type SectionTableMeta = z.infer<typeof sectionTableMetaSchema>;
