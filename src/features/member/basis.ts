/** What a member is made of and judged by, as its draft has it. Pure. */
import { type CriteriaOfSet, unfitting } from '@/engine/check';
import { LOAD_GROUPS } from '@/engine/combination';
import { letterOf } from '@/features/combination/combination';
import { choiceOf, namedChoices } from '@/features/material/choice';
import type { FieldFaults } from '@/features/template/faults';
import { isMadeOf } from '@/features/template/section-pick';
import type { MemberInputs } from './evaluate';
import { type CombinationChoice, type Draft, judgedBy, type WorkspaceData } from './workspace';

export type BasisData = Pick<WorkspaceData, 'criteria' | 'sets' | 'materials'>;

/** The materials that the draft's section may be made of. */
export const materialChoices = ({ section }: Draft, { materials }: BasisData) =>
  section ? namedChoices(materials.filter(({ material }) => isMadeOf(section.values, material))) : [];

/** The criteria's combinations, where they are held against a set: the sets that fit, and the one that is chosen. */
export function combinationsOf(draft: Draft, { criteria, sets }: BasisData) {
  const document = criteria.find(({ slug }) => slug === draft.criteria)?.document;
  if (document?.schema_version !== 2) return null;
  const fitting = sets.filter((set) => unfitting(document, set.document).length === 0);
  return { criteria: document, fitting, set: fitting.find(({ slug }) => slug === draft.combinations) };
}

/** What each variable group is, where the set has a choice of ψ: as the draft says, else as the criteria do. */
export const categoriesOf = (draft: Draft, { document }: CombinationChoice, criteria: CriteriaOfSet) =>
  LOAD_GROUPS.flatMap((group) => {
    const choices = document.categories[group] ?? [];
    if (choices.length < 2) return [];
    const wanted = draft.categories[group] ?? criteria.categories?.[group];
    const chosen = choices.find(({ id }) => id === wanted) ?? choices[0];
    return [{ group, letter: letterOf(document, group), choices, chosen }];
  });

/** The groups that act only where adverse, with the ground for it. */
const patternedOf = (judged: MemberInputs['criteria']) =>
  (judged?.patterns ?? [])
    .filter(({ where_adverse }) => where_adverse)
    .map(({ group, basis }) => ({ letter: judged?.letters?.[group] ?? group, basis }));

/** The choice to take loads only where they are adverse; null where no load is, and none was taken otherwise. */
export function patternWords({ patterns }: Pick<Draft, 'patterns'>, judged: MemberInputs['criteria']) {
  const patterned = patternedOf(judged);
  if (patterned.length > 0)
    return {
      label: `${letters(patterned)} only on the spans where adverse`,
      note: patterned.map(({ letter, basis }) => `${letter}: ${basis}.`).join(' '),
    };
  if (patterns) return null;
  return {
    label: 'Loads only on the spans where adverse',
    note: 'No load of the chosen criteria acts only where adverse: tick it, or keep the reason.',
  };
}

const letters = (groups: readonly { letter: string }[]): string =>
  groups.map(({ letter }) => letter).join(' and ');

/** The basis in a line: the criteria, then all else. */
export function basisWords(draft: Draft, data: BasisData): { criteria: string; rest: string } {
  const named = data.criteria.find(({ slug }) => slug === draft.criteria)?.name;
  const material = draft.section && choiceOf(data.materials, draft.section.material);
  const combinations = combinationsOf(draft, data);
  const set = combinations?.set;
  const patterned = patternedOf(judgedBy(draft, data));
  const rest = [
    material && materialChoices(draft, data).find(({ value }) => value === material.key)?.label,
    set?.name,
    ...(set
      ? categoriesOf(draft, set, combinations.criteria).map(
          ({ letter, chosen }) => `${letter} ${chosen?.name}`,
        )
      : []),
    draft.selfWeight ? 'own weight in G' : 'own weight left out',
    patterned.length > 0 &&
      `${letters(patterned)} ${draft.patterns ? 'where adverse' : 'on the whole length'}`,
  ];
  return { criteria: named ?? 'No criteria chosen', rest: rest.filter(Boolean).join('; ') };
}

/** Whether something in the basis keeps the member from being judged or saved: then it stands open. */
export function isBasisAmiss(draft: Draft, data: BasisData, faults: FieldFaults): boolean {
  const combinations = combinationsOf(draft, data);
  return (
    draft.criteria === '' ||
    (combinations !== null && !combinations.set) ||
    (!draft.selfWeight && draft.selfWeightReason.trim() === '') ||
    (!draft.patterns && draft.patternsReason.trim() === '') ||
    ['criteria', 'combinations', 'section', 'section/material'].some((place) => faults.has(place))
  );
}
