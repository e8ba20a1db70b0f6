/** From what an author writes to a template document: the server's entry beside parse.ts. */
import { z } from 'zod';
import { checkTemplate, type TemplateFault } from './check';
import { type Template, templateSchema } from './document';
import { parseExpression } from './parse';
import type { Expression } from './tree';

export { type Expected, expressionFaults } from './check-expression';
export { type Kinds, nameKind } from './dimension';
export {
  columnKinds,
  type Declared,
  figureKinds,
  isReserved,
  kindsOf,
  ruleKinds,
  type Spoken,
} from './scope';
export { isSymbol } from './tree';
export { checkTemplate };

const writtenExpression = z.string().transform((text, context): Expression => {
  const parsing = parseExpression(text);
  if (parsing.ok) return { text, tree: parsing.tree };
  const { code, message, at } = parsing;
  context.addIssue({ code: 'custom', message, params: { code, at } });
  return z.NEVER;
});

/** A template as an author writes it, and as data/templates holds it: every expression is text. */
export const writtenTemplate = templateSchema(writtenExpression);

/**
 * The template with a tree beside every expression, or every fault at its place: of form and syntax first, and of
 * meaning (dimensions, ranges, sources, trials, the beam at the defaults) once the form is right.
 */
export function authorTemplate(
  input: unknown,
): { ok: true; template: Template } | { ok: false; faults: TemplateFault[] } {
  const reading = writtenTemplate.safeParse(input);
  if (!reading.success)
    return { ok: false, faults: reading.error.issues.flatMap((issue) => toFaults(issue, [])) };
  const faults = checkTemplate(reading.data);
  return faults.length > 0 ? { ok: false, faults } : { ok: true, template: reading.data };
}

function toFaults(issue: z.core.$ZodIssue, base: readonly PropertyKey[]): TemplateFault[] {
  const path = [...base, ...issue.path];
  if (issue.code === 'invalid_union') {
    const meant = meantBranch(issue.errors);
    if (meant) return meant.flatMap((inner) => toFaults(inner, path));
  }
  const code = issue.code === 'custom' ? String(issue.params?.['code'] ?? 'not_allowed') : issue.code;
  return [
    { path: path.map((key) => (typeof key === 'symbol' ? String(key) : key)), code, message: issue.message },
  ];
}

/** Of a union's alternatives the one with the fewest faults: its expression is wrong, the others' form is. */
function meantBranch(branches: readonly z.core.$ZodIssue[][]): z.core.$ZodIssue[] | undefined {
  const misfits = (issues: readonly z.core.$ZodIssue[]) =>
    issues.filter((issue) => issue.code !== 'custom').length;
  return [...branches].sort((a, b) => misfits(a) - misfits(b) || a.length - b.length)[0];
}
