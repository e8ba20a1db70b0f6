import { z } from 'zod';
import type { Benchmark } from '@/engine/template/proof-effect';
import { type Change, changesBetween } from '@/features/desk/changes';
import { DOCUMENT_KINDS, REVISION_STATES } from '@/features/review/review';
import { purposeOfSelector } from '@/features/template/lines';

/** What a difference is about. */
const PARTS = ['parameters', 'formulas', 'limits', 'beam', 'proof', 'sources', 'text'] as const;
type Part = (typeof PARTS)[number];

const revision = z.strictObject({ number: z.int(), state: z.enum(REVISION_STATES) });
const text = z.string().nullable();
/** SI. `expected`: what the formula or the print says; `got`: what the solver finds. */
const worked = z.strictObject({ expected: z.number(), got: z.number() }).nullable();

export const ComparisonView = z.strictObject({
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  from: revision,
  to: revision,
  changes: z.array(
    z.strictObject({
      part: z.enum(PARTS),
      /** Into the second document; of what is gone, into the first. */
      pointer: z.string(),
      /** What is called so: "Tip movement: expression". */
      name: z.string(),
      from: text,
      to: text,
    }),
  ),
  /** The proof cases of the first, worked by both; null where one of them cannot be worked. */
  benchmarks: z
    .strictObject({
      total: z.int(),
      moved: z.array(
        z.strictObject({
          case: z.string(),
          name: z.string(),
          against: z.string(),
          /** What its unit follows from: reaction, moment, deflection … */
          purpose: z.string(),
          from: worked,
          to: worked,
          /** Of what it was: 0.01 is 1 % more. Of the formula where that moved, else of what the solver finds. */
          share: z.number().nullable(),
        }),
      ),
    })
    .nullable(),
});
export type ComparisonView = z.output<typeof ComparisonView>;

const PART_OF: Readonly<Record<string, Part>> = {
  parameters: 'parameters',
  derived: 'formulas',
  results: 'formulas',
  rules: 'limits',
  beam: 'beam',
  stiffness: 'beam',
  proof_cases: 'proof',
  sources: 'sources',
  // Criteria.
  strength: 'limits',
  deflection: 'limits',
  patterns: 'limits',
};

/** A parameter's range is a limit of the template. */
const RANGE = ['min', 'max', 'least', 'most', 'options'];

function partOf([first = '', , field = '']: readonly string[]): Part {
  if (first === 'parameters' && RANGE.includes(field)) return 'limits';
  return PART_OF[first] ?? 'text';
}

const keysOf = (pointer: string): string[] =>
  pointer
    .split('/')
    .slice(1)
    .map((key) => key.replaceAll('~1', '/').replaceAll('~0', '~'));

const inside = (value: unknown, key: string): unknown =>
  typeof value === 'object' && value !== null
    ? Object.getOwnPropertyDescriptor(value, key)?.value
    : undefined;

const WORDS: Readonly<Record<string, string>> = {
  parameters: 'parameter',
  derived: 'derived value',
  results: 'formula',
  rules: 'rule',
  proof_cases: 'proof case',
  sources: 'source',
  supports: 'support',
  loads: 'load',
  hinges: 'hinge',
  segments: 'segment',
  redundants: 'redundant',
  dimensions: 'dimension',
};

/** "Formula Tip movement, expression": the list's entry by its name or number, then the fields below it. */
function nameOf(document: unknown, keys: readonly string[]): string {
  const words: string[] = [];
  let value = document;
  for (const [depth, key] of keys.entries()) {
    const list = value;
    value = inside(value, key);
    if (Array.isArray(list)) {
      const entry = Object(value);
      const called = [entry.name, entry.title, entry.symbol, entry.id].find((one) => typeof one === 'string');
      const kind = WORDS[keys[depth - 1] ?? ''] ?? keys[depth - 1] ?? '';
      words[words.length - 1] = `${kind} ${called ?? Number(key) + 1}`;
    } else words.push(key.replaceAll('_', ' '));
  }
  const [first = 'document', ...rest] = words.filter((word) => word !== 'beam' && word !== 'text');
  return [first.charAt(0).toUpperCase() + first.slice(1), ...rest].join(', ');
}

/** JSON text as a person reads it: a string without its quotes. */
const readable = (json: string | null): string | null => {
  if (json === null) return null;
  const value: unknown = JSON.parse(json);
  return typeof value === 'string' ? value : json;
};

/** Every difference of two documents as their authors write them, by what it is about. */
export function partsBetween(from: unknown, to: unknown): ComparisonView['changes'] {
  const changes = changesBetween(from, to).map(({ pointer, before, after }: Change) => {
    const keys = keysOf(pointer);
    const name = nameOf(after === null ? from : to, keys);
    return { part: partOf(keys), pointer, name, from: readable(before), to: readable(after) };
  });
  return PARTS.flatMap((part) => changes.filter((change) => change.part === part));
}

const shareOf = (a: number, b: number): number | null => (a === 0 ? null : (b - a) / a);

export function toBenchmarks(all: readonly Benchmark[]): NonNullable<ComparisonView['benchmarks']> {
  const moved = all.filter((one) => one.moved);
  return {
    total: all.length,
    moved: moved.map(({ proofCase, name, against, quantity, from, to }) => ({
      case: proofCase,
      name,
      against,
      purpose: purposeOfSelector(quantity),
      from,
      to,
      share:
        from && to
          ? from.expected === to.expected
            ? shareOf(from.got, to.got)
            : shareOf(from.expected, to.expected)
          : null,
    })),
  };
}
