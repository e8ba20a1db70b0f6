import { z } from 'zod';
import { type DimensionName, readQuantity } from '@/engine/quantity';
import type { MaterialSet } from '@/engine/section';

/** A quantity string of a dimension, greater than nothing: "210000 N/mm2". */
const quantity = (dimension: DimensionName) =>
  z.string().check(({ value, issues }) => {
    const reading = readQuantity(value, dimension);
    const fault = reading.ok
      ? reading.value > 0
        ? null
        : { code: 'out_of_range', message: 'Give a value above 0.' }
      : reading;
    if (fault)
      issues.push({
        code: 'custom',
        input: value,
        message: fault.message,
        params: { code: fault.code },
      });
  });

/** Of one set. */
export const MOST_MATERIALS = 200;

const stress = quantity('stress');
const words = (most: number) => z.string().trim().min(1).max(most);
const key = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'Use small letters, digits and hyphens.');

const common = {
  /** By which members name it: "s355". Unique in the set. */
  id: key.max(40),
  name: words(80),
  standard: words(80),
  edition: words(20),
  clause: words(80),
  /** Typed from memory: a librarian of the practice confirms it against the print before relying on it. */
  from_memory: z.boolean(),
  note: words(500),
  /** Mean moduli, and mean density for self-weight. */
  e: quantity('modulus'),
  g: quantity('modulus'),
  density: quantity('density'),
  /** Coefficient of thermal expansion. */
  expansion: quantity('expansion'),
};

/** Strength of steel by thickness, thin first; only the last band may be without limit. */
const bands = z
  .array(z.strictObject({ up_to: quantity('length').optional(), fy: stress, fu: stress }))
  .min(1)
  .max(12)
  .check(({ value, issues }) => {
    const limits = value.map(({ up_to: limit }) =>
      limit === undefined ? Number.POSITIVE_INFINITY : metres(limit),
    );
    limits.forEach((limit, index) => {
      if (index === 0 || limit > (limits[index - 1] ?? 0)) return;
      const message = 'Give the bands by growing thickness; only the last may be without limit.';
      issues.push({ code: 'custom', input: value, path: [index, 'up_to'], message });
    });
  });

const steel = z.strictObject({ ...common, kind: z.literal('steel'), strength: bands });

const europeanTimber = z.strictObject({
  ...common,
  kind: z.literal('timber_en'),
  product: z.enum(['solid', 'glulam']),
  fm: stress,
  ft0: stress,
  fc0: stress,
  fc90: stress,
  fv: stress,
  e05: quantity('modulus'),
  density_k: quantity('density'),
});

const americanTimber = z.strictObject({
  ...common,
  kind: z.literal('timber_nds'),
  product: z.enum(['sawn', 'glulam']),
  fb: stress,
  /** Tension on the weaker side of a glulam; as `fb` where it is left out. */
  fb_reversed: stress.optional(),
  ft: stress,
  fv: stress,
  fc_perp: stress,
  fc: stress,
  e_min: quantity('modulus'),
  size_factor: z.boolean(),
});

const entry = z.discriminatedUnion('kind', [steel, europeanTimber, americanTimber]);

/** The materials of a standard and edition: a governed document of the practice, values as they are printed. */
export const materialSetDocument: z.ZodType<MaterialSet> = z.strictObject({
  schema_version: z.literal(1),
  slug: key.max(80),
  reference: words(40),
  name: words(120),
  summary: words(500),
  materials: z
    .array(entry)
    .min(1)
    .max(MOST_MATERIALS)
    .check(({ value, issues }) => {
      value.forEach(({ id }, index) => {
        if (value.findIndex((other) => other.id === id) === index) return;
        const message = `“${id}” names two materials of this set. Give each its own.`;
        issues.push({
          code: 'custom',
          input: id,
          path: [index, 'id'],
          message,
          params: { code: 'duplicate' },
        });
      });
    }),
});

const metres = (text: string): number => {
  const reading = readQuantity(text, 'length');
  return reading.ok ? reading.value : Number.NaN;
};
