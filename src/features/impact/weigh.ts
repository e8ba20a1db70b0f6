/** A member held against itself with another revision in place of one that it pins. Pure. */
import { type CriteriaDocument, resolveCriteria, unfitting } from '@/engine/check';
import type { Categories, CombinationSet } from '@/engine/combination';
import { type Material, materialIn } from '@/engine/section';
import { judgeRules, type Template } from '@/engine/template';
import { carryOver, parameterChanges } from '@/features/member/carry';
import { evaluateMember, instanceOf, type MemberInputs } from '@/features/member/evaluate';
import type { SectionValues } from '@/features/section/resolve';
import { type Changes, type Compared, changesBetween, isSame } from './figures';
import type { Weighed } from './impact';

/** What takes the place of what a member pins. */
export type Replacement =
  | { readonly kind: 'template'; readonly template: Template }
  /** With the set that the criteria refer to; a member that pins another one keeps it. */
  | { readonly kind: 'criteria'; readonly criteria: CriteriaDocument; readonly set: CombinationSet | null }
  | { readonly kind: 'combination-set'; readonly set: CombinationSet }
  | { readonly kind: 'material-set'; readonly materials: readonly Material[] }
  /** By the section's designation key; what is not there is not in the edition. */
  | { readonly kind: 'section-table'; readonly sections: Pick<ReadonlyMap<string, SectionValues>, 'get'> };

/** What the member pins, as its documents say it: what a replacement is put in place of. */
export interface Held {
  readonly sectionKey: string | null;
  readonly criteria: CriteriaDocument | null;
  readonly set: CombinationSet | null;
  readonly categories: Categories;
}

/** The figures that are compared, or why there are none. */
export type Found =
  | { readonly ok: true; readonly compared: Compared }
  | { readonly ok: false; readonly message: string };

export function findFigures(inputs: MemberInputs): Found {
  const reading = evaluateMember(inputs);
  if (!reading.ok) return { ok: false, message: reading.faults.map(({ message }) => message).join(' ') };
  const { total, checks, proof } = reading.evaluation;
  return proof.proven
    ? { ok: true, compared: { total, checks } }
    : { ok: false, message: 'The two methods do not agree: there is no result that can be trusted.' };
}

const NOTHING: Weighed['changes'] = { figures: [], checks: [], findings: { come: [], go: [] } };

/** As stored, with what it is ranked by. */
export interface Ranked {
  readonly report: Weighed;
  readonly flips: number;
  readonly largestChange: number;
}

const lost = (message: string, parts: Partial<Weighed> = {}): Ranked => ({
  report: { outcome: 'lost', message, changes: NOTHING, gone: [], taken: [], ...parts },
  flips: 0,
  largestChange: Number.POSITIVE_INFINITY,
});

export const unread = (message: string): Ranked => ({
  report: { outcome: 'unread', message, changes: NOTHING, gone: [], taken: [] },
  flips: 0,
  largestChange: 0,
});

/** What a member comes to with the replacement, beside what it came to before. */
export function weigh(inputs: MemberInputs, before: Found, replacement: Replacement, held: Held): Ranked {
  const changed =
    replacement.kind === 'template'
      ? parameterChanges(inputs.template, replacement.template)
      : { gone: [], taken: [] };
  const unfit = unfitFor(replacement, held);
  if (unfit) return lost(unfit);
  const after = replaced(inputs, replacement, held);
  if (!after)
    return lost(
      `${missingPart(inputs, replacement)} is not in the new ${replacement.kind === 'section-table' ? 'edition' : 'revision'}.`,
    );
  if (before.ok && replacement.kind === 'template' && isSameBeam(inputs, after, before.compared))
    return unchanged(changed);
  const found = findFigures(after);
  if (!found.ok) return lost(found.message, changed);
  const changes = before.ok ? changesBetween(before.compared, found.compared) : fromNothing(found.compared);
  const { figures, checks, findings } = changes;
  const isUnchanged = isSame(changes) && changed.gone.length + changed.taken.length === 0;
  return {
    report: {
      outcome: isUnchanged ? 'unchanged' : 'changed',
      message: before.ok ? null : `It had no result before: ${before.message}`,
      changes: { figures, checks, findings },
      ...changed,
    },
    flips: changes.flips,
    largestChange: changes.largest,
  };
}

const missingPart = ({ section }: MemberInputs, { kind }: Replacement): string =>
  kind === 'material-set'
    ? `Its material ${section?.material.name ?? ''}`
    : `Its section ${section?.values.designation ?? ''}`;

/**
 * Whether both revisions make the same beam of the member, and no block rule of the new one refuses what is known of it:
 * then its results are the same without being found again.
 */
function isSameBeam(inputs: MemberInputs, after: MemberInputs, { total }: Compared): boolean {
  const [was, is] = [instanceOf(inputs), instanceOf(after)];
  if (!was.ok || !is.ok || JSON.stringify(was.instance.beam) !== JSON.stringify(is.instance.beam))
    return false;
  const known = { depth: is.section?.depth, ga: null, solution: total };
  return judgeRules(after.template, is.instance.scope, known, after.system).every(
    ({ state, severity }) => state !== 'broken' || severity !== 'block',
  );
}

const unchanged = (changed: Pick<Weighed, 'gone' | 'taken'>): Ranked => {
  const { gone, taken } = changed;
  const outcome = gone.length + taken.length > 0 ? 'changed' : 'unchanged';
  return {
    report: { outcome, message: null, changes: NOTHING, ...changed },
    flips: 0,
    largestChange: 0,
  };
};

/** A member that had no result has changed, whatever it comes to. */
const fromNothing = (compared: Compared): Changes => ({
  ...NOTHING,
  checks: [],
  flips: compared.checks?.rows.filter(({ ratio }) => ratio > 1).length ?? 0,
  largest: 1,
});

/** Criteria and combinations with the replacement in its place. */
function basisWith(replacement: Replacement, { criteria, set }: Held) {
  if (replacement.kind === 'criteria') return { criteria: replacement.criteria, set: set ?? replacement.set };
  return replacement.kind === 'combination-set' ? { criteria, set: replacement.set } : null;
}

/** Why the new criteria and combinations do not go together; null where they do. */
function unfitFor(replacement: Replacement, held: Held): string | null {
  const basis = basisWith(replacement, held);
  if (basis?.criteria?.schema_version !== 2) return null;
  return basis.set
    ? (unfitting(basis.criteria, basis.set)[0]?.message ?? null)
    : `The combination set ${basis.criteria.combinations.set} is not there.`;
}

function replaced(inputs: MemberInputs, replacement: Replacement, held: Held): MemberInputs | null {
  switch (replacement.kind) {
    case 'template': {
      const { template } = replacement;
      // What was typed is of the member's schema, which the server has read.
      const parameters = carryOver(
        inputs.template,
        template,
        inputs.parameters as Parameters<typeof carryOver>[2],
      );
      return { ...inputs, template, parameters };
    }
    case 'criteria':
    case 'combination-set': {
      const basis = basisWith(replacement, held);
      const criteria = basis?.criteria && resolveCriteria(basis.criteria, basis.set, held.categories);
      return { ...inputs, criteria: criteria ?? null };
    }
    case 'material-set': {
      const { section } = inputs;
      const material = section && materialIn(replacement.materials, section.material.id);
      return material ? { ...inputs, section: { ...section, material } } : null;
    }
    case 'section-table': {
      const { sectionKey: key } = held;
      const values = key === null ? undefined : replacement.sections.get(key);
      return inputs.section && values ? { ...inputs, section: { ...inputs.section, values } } : null;
    }
  }
}
