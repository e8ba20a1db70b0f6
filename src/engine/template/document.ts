/**
 * The template document: one schema, made once for documents as they are stored (expressions as text and tree) and
 * once for what an author writes (expressions as text). The server's entry beside parse.ts; the browser is given
 * documents that were read already and needs their types only.
 */
import { z } from 'zod';
import {
  beamSchema,
  kebab,
  parameter,
  quantityText,
  SEVERITIES,
  selectorSchema,
  statedValues,
  symbol,
  tex,
  words,
} from './parts';
import { type Expression, isTree } from './tree';

export { SEVERITIES } from './parts';

export const ARRANGEMENTS = [
  'simple-span',
  'cantilever',
  'propped-cantilever',
  'fixed-ends',
  'overhang',
  'multi-span',
] as const;
export type Arrangement = (typeof ARRANGEMENTS)[number];

export const LOAD_KINDS = ['uniform', 'point', 'triangular', 'couple', 'settlement', 'temperature'] as const;
export type LoadKind = (typeof LOAD_KINDS)[number];

const AFFECTED = ['reactions', 'shear', 'moment', 'slope', 'deflection'] as const;

const LONGEST_EXPRESSION = 300; // as parse.ts
const expression = z.strictObject({
  text: z.string().max(LONGEST_EXPRESSION),
  tree: z.custom<Expression['tree']>((value) => isTree(value), 'This is no expression tree.'),
});

const source = z.strictObject({
  id: kebab,
  publication: words(200),
  edition: words(80).optional(),
  table: words(80).optional(),
  case: words(80).optional(),
  /** Typed from memory: to be compared with the print before it is relied on. */
  from_memory: z.boolean(),
  /** For a formula of the practice's own: how it follows, in Markdown. */
  derivation: words(4000).optional(),
});

function ruleSchema<E extends z.ZodType>(expression: E) {
  return z.strictObject({
    id: kebab,
    /** The rule when it holds, as a sentence. */
    title: words(120),
    expression,
    severity: z.enum(SEVERITIES),
    /** What is wrong and what to do, with {symbols} filled in. */
    message: words(300),
    /** Each row of this list must hold. */
    repeat: symbol.optional(),
    /** A figure beside the rule, such as a/L. */
    shown: z.strictObject({ tex, expression }).optional(),
    /** Values that break it: every rule proves that it can. */
    trial: z.strictObject({
      parameters: statedValues,
      ei: quantityText.optional(),
      depth: quantityText.optional(),
    }),
  });
}

function resultSchema<E extends z.ZodType>(expression: E) {
  return z.strictObject({
    id: kebab,
    name: words(120),
    /** Left and right side of the formula; the right side says what `expression` calculates. */
    tex,
    formula: tex,
    quantity: selectorSchema(expression),
    expression,
    /** Where the formula holds. */
    when: expression.optional(),
    source: kebab,
  });
}

function proofCaseSchema<E extends z.ZodType>(expression: E) {
  const quantity = selectorSchema(expression);
  const printed = words(40);
  const expectation = z.union([
    /** A closed form of this template, by its id. */
    z.strictObject({ result: kebab }),
    z.strictObject({ quantity, exact: expression, tolerance: z.number().positive().max(0.01).optional() }),
    /** A printed coefficient: quantity = printed · times, or quantity = over / printed. */
    z.strictObject({ quantity, printed, times: expression }),
    z.strictObject({ quantity, printed, over: expression }),
    /** A printed quantity, with its unit. */
    z.strictObject({ quantity, printed }),
  ]);
  return z.strictObject({
    name: words(120),
    parameters: statedValues,
    ei: quantityText.optional(),
    source: kebab,
    expect: z.array(expectation).min(1).max(30),
  });
}

/** The template schema over a schema of its expressions. */
export function templateSchema<E extends z.ZodType>(expression: E) {
  return z.strictObject({
    schema_version: z.literal(1),
    slug: kebab,
    reference: z
      .string()
      .regex(/^[A-Z][a-z]+ [1-9]\d?$/, 'A reference is a word and a number, such as Prop 3.'),
    name: words(120),
    arrangement: z.enum(ARRANGEMENTS),
    load_kinds: z.array(z.enum(LOAD_KINDS)).min(1),
    tags: z.array(kebab).max(12),
    summary: words(300),
    you_give: words(200),
    you_get: words(200),
    use: z.array(words(300)).min(1).max(10),
    do_not_use: z.array(words(300)).min(1).max(10),
    /** How it is solved, in Markdown. */
    method: words(8000),
    parameters: z.array(parameter).min(1).max(20),
    derived: z.array(z.strictObject({ symbol, tex, name: words(60), expression })).max(20),
    beam: beamSchema(expression),
    stiffness: z.strictObject({
      /** EI of a page without a section; echoed with every answer. */
      default_ei: quantityText,
      /** What changes with EI. */
      affects: z.array(z.enum(AFFECTED)).min(1),
    }),
    rules: z.array(ruleSchema(expression)).max(20),
    results: z.array(resultSchema(expression)).max(30),
    sources: z.array(source).min(1).max(12),
    proof_cases: z.array(proofCaseSchema(expression)).min(3).max(40),
  });
}

/** A template as it is stored, sent and evaluated. */
export const templateDocument = templateSchema(expression);

export type Template = z.infer<typeof templateDocument>;
export type Rule = Template['rules'][number];
type Result = Template['results'][number];
export type Selector = Result['quantity'];
export type ProofCase = Template['proof_cases'][number];
export type Expectation = ProofCase['expect'][number];
export type Source = Template['sources'][number];
