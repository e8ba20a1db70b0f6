/** What the member's sheet works with, and the draft that a person makes of it before it is saved. Pure. */
import { type CriteriaDocument, resolveCriteria, unfitting } from '@/engine/check';
import type { CombinationSet } from '@/engine/combination';
import type { Redundant } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import type { Template } from '@/engine/template';
import { choiceOf, type MaterialChoice, materialKey, readMaterialKey } from '@/features/material/choice';
import type { SectionValues } from '@/features/section/resolve';
import type { RowOrigin } from '@/features/section/section';
import type { Supplier } from '@/features/stock/stock';
import { type Raw, toParameters, toRaw } from '@/features/template/raw';
import type { MemberInputs } from './evaluate';
import type { MemberView, SaveMember } from './member';

export interface CriteriaChoice {
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly revision: number;
  readonly document: CriteriaDocument;
}

export type CombinationChoice = Omit<CriteriaChoice, 'document'> & { readonly document: CombinationSet };

export interface HistoryLine {
  readonly at: string;
  readonly by: string;
  readonly version: string;
  readonly change: string;
}

export interface WorkspaceData {
  readonly member: MemberView;
  readonly job: { readonly number: string; readonly name: string; readonly unitSystem: UnitSystemName };
  readonly template: Template;
  readonly section: SectionValues | null;
  /** Where the pinned section's values stand. */
  readonly sectionOrigin?: RowOrigin | undefined;
  readonly materials: readonly MaterialChoice[];
  readonly criteria: readonly CriteriaChoice[];
  readonly sets: readonly CombinationChoice[];
  readonly history: readonly HistoryLine[];
  readonly mayEdit: boolean;
  /** Whose stock is known, and the day that it is held against. */
  readonly suppliers: readonly Supplier[];
  readonly today: string;
}

export interface DraftSection {
  readonly values: SectionValues;
  readonly table: string;
  readonly origin?: RowOrigin | undefined;
  readonly material: string;
}

/** The member as it stands in the fields. */
export interface Draft {
  readonly title: string;
  readonly purpose: string;
  readonly raw: Raw;
  readonly section: DraftSection | null;
  readonly criteria: string;
  /** The slug of a combination set; empty for criteria that have their own. */
  readonly combinations: string;
  readonly categories: SaveMember['categories'];
  readonly selfWeight: boolean;
  readonly selfWeightReason: string;
  readonly patterns: boolean;
  readonly patternsReason: string;
  readonly redundants: readonly Redundant[] | null;
}

/** How the member's material is named in the choices. */
const keyOf = ({ materials }: MemberView, { material }: { readonly material: string }): string =>
  materialKey(material, materials?.slug);

export const toDraft = (
  member: MemberView,
  template: Template,
  values: SectionValues | null,
  system: UnitSystemName,
): Draft => ({
  title: member.title,
  purpose: member.purpose,
  raw: toRaw(template, member.parameters, { system, byGroup: true }),
  section:
    member.section && values
      ? { values, table: member.section.table, material: keyOf(member, member.section) }
      : null,
  criteria: member.criteria?.slug ?? '',
  combinations: member.combinations?.slug ?? '',
  categories: member.categories,
  selfWeight: member.self_weight,
  selfWeightReason: member.self_weight_reason,
  patterns: member.patterns,
  patternsReason: member.patterns_reason,
  redundants: member.redundants,
});

/** The draft after it was saved: what the server named by its set is named so here, and is no difference. */
export function asSaved(draft: Draft, saved: MemberView): Draft {
  const { section } = draft;
  const { section: kept } = saved;
  return {
    ...draft,
    combinations: draft.combinations || (saved.combinations?.slug ?? ''),
    section:
      section && kept && readMaterialKey(section.material).id === kept.material
        ? { ...section, material: keyOf(saved, kept) }
        : section,
  };
}

/** The member with its parameters as its fields write them, a load by its groups, so that only a change is a difference. */
export const inFields = (member: MemberView, template: Template, system: UnitSystemName): MemberView => ({
  ...member,
  parameters: toParameters(template, toRaw(template, member.parameters, { system, byGroup: true })),
});

type Status = { readonly status: SaveMember['status']; readonly reason: string };

/** The draft as it is sent. */
export const toBody = (draft: Draft, template: Template, { status, reason }: Status): SaveMember => ({
  title: draft.title.trim(),
  purpose: draft.purpose.trim(),
  status,
  reason,
  parameters: toParameters(template, draft.raw),
  section: draft.section && {
    designation: draft.section.values.designation,
    table: draft.section.table,
    material: draft.section.material,
  },
  criteria: draft.criteria || null,
  combinations: draft.combinations || null,
  categories: draft.categories,
  self_weight: draft.selfWeight,
  self_weight_reason: draft.selfWeightReason.trim(),
  patterns: draft.patterns,
  patterns_reason: draft.patternsReason.trim(),
  redundants: draft.redundants ? [...draft.redundants] : null,
});

/** What the draft is evaluated from, in the browser as on the server. */
export function toInputs(
  draft: Draft,
  data: Pick<WorkspaceData, 'template' | 'materials' | 'criteria' | 'sets' | 'job'>,
): MemberInputs {
  const { template, materials, job } = data;
  const material = draft.section && choiceOf(materials, draft.section.material)?.material;
  return {
    template,
    parameters: toParameters(template, draft.raw),
    system: job.unitSystem,
    section: draft.section && material ? { values: draft.section.values, material } : null,
    criteria: judgedBy(draft, data),
    ownWeight: draft.selfWeight,
    patterns: draft.patterns,
    redundants: draft.redundants ?? undefined,
  };
}

/** The criteria with the combinations that are chosen; null where they do not go together, and the field says so. */
export function judgedBy(
  draft: Pick<Draft, 'criteria' | 'combinations' | 'categories'>,
  { criteria, sets }: Pick<WorkspaceData, 'criteria' | 'sets'>,
): MemberInputs['criteria'] {
  const document = criteria.find(({ slug }) => slug === draft.criteria)?.document;
  if (!document) return null;
  if (document.schema_version === 1) return resolveCriteria(document, null);
  const set = sets.find(({ slug }) => slug === draft.combinations)?.document;
  return set && unfitting(document, set).length === 0
    ? resolveCriteria(document, set, draft.categories)
    : null;
}

/** One field in which two versions differ, in words. */
export interface Difference {
  readonly field: string;
  readonly name: string;
  readonly theirs: string;
  readonly yours: string;
}

const words = (value: unknown): string => {
  if (value === null || value === undefined || value === '') return '–';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value !== 'object') return String(value);
  if (Array.isArray(value)) return value.map(words).join('; ');
  return Object.entries(value)
    .map(([key, part]) => `${key} ${words(part)}`)
    .join(', ');
};

const NAMES: Readonly<Record<string, string>> = {
  title: 'Title',
  purpose: 'Purpose',
  status: 'Status',
  reason: 'Reason of removal',
  section: 'Section',
  criteria: 'Criteria',
  combinations: 'Combinations',
  categories: 'Categories of loads',
  template: 'Template',
  self_weight: 'Own weight',
  self_weight_reason: 'Own weight left out because',
  patterns: 'Adverse patterns',
  patterns_reason: 'Adverse patterns left out because',
  redundants: 'Redundants',
};

/** Every field in which they differ; parameters each by its symbol. */
type Fields = { readonly [field: string]: unknown };

export function differencesOf(theirs: Fields, yours: Fields): Difference[] {
  const flat = ({ parameters, ...rest }: Fields): Map<string, unknown> =>
    new Map([
      ...Object.entries(Object(parameters)).map(([symbol, value]): [string, unknown] => [
        `parameters/${symbol}`,
        value,
      ]),
      ...Object.entries(rest),
    ]);
  const [left, right] = [flat(theirs), flat(yours)];
  return [...right.keys()].flatMap((field): Difference[] => {
    const [a, b] = [words(left.get(field)), words(right.get(field))];
    const name = NAMES[field] ?? field.replace('parameters/', '');
    return a === b || !(field in NAMES || field.startsWith('parameters/'))
      ? []
      : [{ field, name, theirs: a, yours: b }];
  });
}

/** A member as a body, so that it can be held against a draft. */
export const bodyOf = (member: MemberView): SaveMember => ({
  status: member.status,
  reason: member.reason,
  title: member.title,
  purpose: member.purpose,
  parameters: member.parameters,
  section: member.section && {
    designation: member.section.designation,
    table: member.section.table,
    material: keyOf(member, member.section),
  },
  criteria: member.criteria?.slug ?? null,
  combinations: member.combinations?.slug ?? null,
  categories: member.categories,
  self_weight: member.self_weight,
  self_weight_reason: member.self_weight_reason,
  patterns: member.patterns,
  patterns_reason: member.patterns_reason,
  redundants: member.redundants,
});

/** My body with the fields that are taken from theirs. */
export function settle(theirs: SaveMember, mine: SaveMember, taken: ReadonlySet<string>): SaveMember {
  const fields = Object.entries(theirs).filter(([field]) => taken.has(field));
  const parameters = Object.entries(theirs.parameters).filter(([symbol]) =>
    taken.has(`parameters/${symbol}`),
  );
  return {
    ...mine,
    ...Object.fromEntries(fields),
    parameters: { ...mine.parameters, ...Object.fromEntries(parameters) },
  };
}

/** What an event of the record says of the member, in a line. */
export function changesOf(action: string, data: unknown): { version: string; change: string } {
  const side = (name: 'before' | 'after'): Record<string, unknown> => ({ ...Object(Object(data)[name]) });
  const version = words(side('after')['version']);
  if (action === 'member.create') return { version, change: 'First placed.' };
  if (action === 'member.remove') return { version, change: `Removed: ${words(side('after')['reason'])}` };
  const changes = differencesOf(side('before'), side('after')).map(
    ({ name, theirs, yours }) => `${name}: ${theirs} → ${yours}`,
  );
  return { version, change: changes.join('; ') || 'Saved without a change.' };
}
