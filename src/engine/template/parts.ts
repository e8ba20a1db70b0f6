/** Schemas of a template's parts. Those that hold expressions are made with the schema of an expression. */
import { z } from 'zod';
import { SUPPORT_KINDS } from '../model/index';
import { DIMENSION_NAMES } from '../quantity/index';
import { isSymbol, NAMED_VALUE } from './tree';

export const SEVERITIES = ['block', 'warn', 'note'] as const;
export type Severity = (typeof SEVERITIES)[number];

export const symbol = z
  .string()
  .refine(isSymbol, 'Use a letter, then letters and digits, 8 at most, and no name of a function.');
export const tex = z.string().min(1).max(400);
export const words = (most: number) => z.string().trim().min(1).max(most);
export const kebab = z
  .string()
  .max(80)
  .regex(/^[a-z][a-z0-9]*(-[a-z0-9]+)*$/, 'Use small letters, digits and hyphens.');
/** G permanent, Q imposed, S snow, W wind, and others that a practice names. */
const group = z
  .string()
  .regex(/^[A-Z][A-Za-z0-9]{0,7}$/, 'A load group is a capital, then letters and digits.');
/** What a person would type: "7.2 m". Read by its dimension when the template is checked. */
export const quantityText = z.string().min(1).max(40);
const supportName = z.string().regex(/^[A-Z]$/, 'Supports are lettered A, B, C … from the left.');

const described = { symbol, tex, name: words(60), help: words(400) };

const measured = {
  dimension: z.enum(DIMENSION_NAMES),
  default: quantityText,
  min: quantityText,
  max: quantityText,
  /** What one press of an arrow key changes. */
  step: quantityText,
  /** The unit that a field shows, where it is not the unit system's usual one. */
  units: z.strictObject({ metric: words(20).optional(), us: words(20).optional() }).optional(),
  /** A load: the group that it belongs to unless a member says otherwise. */
  group: group.optional(),
};

const quantityParameter = z.strictObject({ kind: z.literal('quantity'), ...described, ...measured });
const namedValue = z.string().regex(NAMED_VALUE, 'Use small letters, digits and hyphens.');
const choiceParameter = z.strictObject({
  kind: z.literal('choice'),
  ...described,
  options: z
    .array(z.strictObject({ value: namedValue, name: words(60) }))
    .min(2)
    .max(12),
  default: namedValue,
});

const column = z.discriminatedUnion('kind', [
  quantityParameter,
  z.strictObject({ kind: z.literal('group'), ...described, default: group }),
]);
const rowsParameter = z.strictObject({
  kind: z.literal('rows'),
  ...described,
  columns: z.array(column).min(1).max(6),
  least: z.int().min(0),
  most: z.int().min(1).max(50),
  default: z.array(z.record(z.string(), z.string().max(40))),
});

export const parameter = z.discriminatedUnion('kind', [quantityParameter, choiceParameter, rowsParameter]);
export type Parameter = z.infer<typeof parameter>;
export type QuantityParameter = z.infer<typeof quantityParameter>;
export type ChoiceParameter = z.infer<typeof choiceParameter>;
export type RowsParameter = z.infer<typeof rowsParameter>;
export type Column = z.infer<typeof column>;

/** Values as a proof case or a rule's trial states them: what a person would type, by symbol. */
export const statedValues = z.record(
  z.string(),
  z.union([z.string().max(40), z.array(z.record(z.string(), z.string().max(40))).max(50)]),
);

/** The beam, each place and size an expression of the parameters. */
export function beamSchema<E extends z.ZodType>(expression: E) {
  const conditional = { when: expression.optional() };
  const each = { ...conditional, repeat: symbol.optional() };
  const support = z.strictObject({
    at: expression,
    kind: z.enum(SUPPORT_KINDS),
    kv: expression.optional(),
    kr: expression.optional(),
    rise: expression.optional(),
    rotation: expression.optional(),
    ...conditional,
  });
  const load = z.discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('point'), at: expression, p: expression, ...each }),
    z.strictObject({
      kind: z.literal('line'),
      from: expression,
      to: expression,
      w0: expression,
      w1: expression,
      ...each,
    }),
    z.strictObject({ kind: z.literal('couple'), at: expression, m: expression, ...each }),
    z.strictObject({
      kind: z.literal('curvature'),
      from: expression,
      to: expression,
      kappa: expression,
      ...each,
    }),
  ]);
  const redundant = z.union([
    z.strictObject({ support: supportName, component: z.enum(['vertical', 'rotation']), ...conditional }),
    z.strictObject({ at: expression, component: z.literal('moment'), ...conditional }),
  ]);
  return z.strictObject({
    length: expression,
    supports: z.array(support).min(1).max(20),
    hinges: z
      .array(z.strictObject({ at: expression, ...conditional }))
      .max(20)
      .optional(),
    /** `ei`: share of the member's EI. */
    segments: z
      .array(z.strictObject({ from: expression, to: expression, ei: expression }))
      .max(20)
      .optional(),
    /** None where the supports' movements are all that acts. */
    loads: z.array(load).max(20),
    /** Share of the section's own weight that acts across the beam, as cos α of a rafter; all of it without. */
    own_weight: expression.optional(),
    /** Released first; any other admissible set gives the same result. */
    redundants: z.array(redundant).max(20),
    /** Dimension lines of the drawing, inner row first; each is a parameter or derived length. */
    dimensions: z
      .array(z.strictObject({ from: expression, to: expression, symbol, ...conditional }))
      .min(1)
      .max(12),
  });
}

/** What can be read off a solved beam. Moments are sagging positive, reactions upward and anticlockwise positive. */
export function selectorSchema<E extends z.ZodType>(expression: E) {
  const side = z.enum(['left', 'right']).optional();
  /** The value, or its place, measured from `from` (the left end unless given). */
  const reading = { read: z.enum(['value', 'position']).optional(), from: expression.optional() };
  return z.union([
    z.strictObject({ reaction: supportName, component: z.enum(['vertical', 'moment']).optional() }),
    z.strictObject({ shear: expression, side }),
    z.strictObject({ moment: expression, side }),
    z.strictObject({ slope: expression, sense: z.enum(['anticlockwise', 'clockwise']) }),
    z.strictObject({ deflection: expression, sense: z.enum(['up', 'down']) }),
    z.strictObject({ largest: z.literal('moment'), sense: z.enum(['sagging', 'hogging']), ...reading }),
    z.strictObject({ largest: z.literal('deflection'), sense: z.enum(['up', 'down']), ...reading }),
    z.strictObject({ contraflexure: z.int().min(0), from: expression.optional() }),
    /** What the beam does not hold itself, of the parameters and reactions (RA, RB …): a rafter's vertical reaction. */
    z.strictObject({ figure: expression, dimension: z.enum(DIMENSION_NAMES) }),
  ]);
}
