import { z } from 'zod';
import { LOAD_GROUPS } from '../combination/index';

const factors = z.partialRecord(z.enum(LOAD_GROUPS), z.number());
const combination = z.strictObject({ name: z.string().min(1), factors });
const source = z.strictObject({
  publication: z.string().min(1),
  clause: z.string().min(1),
  /** Typed from memory: a librarian of the practice confirms it against the print before relying on it. */
  from_memory: z.boolean(),
});

/** How a group's loads stand on the member: each span and overhang only where adverse, or on the whole length at once. */
const pattern = z.strictObject({
  group: z.enum(LOAD_GROUPS),
  where_adverse: z.boolean(),
  /** Why, printed on the sheet. */
  basis: z.string().min(1),
  source,
});

const strength = z.strictObject({
  /** In words, printed on the sheet: what the factors are and what they stand for. */
  basis: z.string().min(1),
  combinations: z.array(combination).min(1),
  /** Greatest bending stress as a share of the material's bending strength (yield for steel). */
  bending: z.number().positive(),
  /** Greatest shear stress as a share of the material's shear strength (f_y/√3 of steel, f_v of timber). */
  shear: z.number().positive(),
  source,
});

/** A limit on a deflection: span/ratio, and an absolute cap where one is given; the lower governs. */
const deflectionLimit = z.strictObject({
  name: z.string().min(1),
  combination,
  span_ratio: z.number().positive(),
  /** The overhang's length is multiplied by this before the ratio: 2 where the source says so. */
  overhang_factor: z.number().positive(),
  overhang_ratio: z.number().positive(),
  /** m */
  cap: z.number().positive().optional(),
  source,
});

/** What a member is judged by: a governed document of the practice. Lengths m; factors dimensionless. */
export const criteriaDocument = z.strictObject({
  schema_version: z.literal(1),
  slug: z.string().regex(/^[a-z0-9-]+$/),
  reference: z.string().min(1),
  name: z.string().min(1),
  summary: z.string().min(1),
  families: z.array(z.enum(['steel', 'timber'])).min(1),
  /** What the loads' groups are called in combinations, where not by their own letters: D and L for G and Q. */
  letters: z.partialRecord(z.enum(LOAD_GROUPS), z.string().min(1)).optional(),
  strength,
  deflection: z.array(deflectionLimit).min(1),
  /** Groups that are not named stand on the whole length. */
  patterns: z.array(pattern).optional(),
  not_checked: z.array(z.string().min(1)).min(1),
});
export type Criteria = z.infer<typeof criteriaDocument>;
export type Pattern = z.infer<typeof pattern>;
export type DeflectionLimit = z.infer<typeof deflectionLimit>;
