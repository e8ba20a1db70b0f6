/** The combinations of a set as they are used, of a draft of which some may be missing or wrong still. */
import {
  type Categories,
  type CombinationSet,
  LOAD_GROUPS,
  type LoadGroup,
  REDUCTIONS,
  type SetCombination,
  type SetFactor,
  strengthOf,
} from '@/engine/combination';
import { listAt, type Pointer, textAt, valueAt } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';

export const LISTS = ['/strength', '/service'] as const;
export type List = (typeof LISTS)[number];

export interface PreviewLine {
  /** Its row in the document. */
  readonly at: Pointer;
  readonly id: string;
  readonly name: string;
  readonly clause: string;
  readonly fromMemory: boolean;
  /** "1.35 G + 1.5 Q": several where groups are not combined with one another; none while `missing` says why. */
  readonly combinations: readonly string[];
  readonly missing: string | null;
}

type MadeWith = Pick<CombinationSet, 'xi' | 'letters' | 'categories'>;

/** Of each document once: every row of the form asks for it at every key. */
const known = new WeakMap<Written, MadeWith>();

function madeWith(document: Written): MadeWith {
  const made = known.get(document) ?? readParts(document);
  known.set(document, made);
  return made;
}

/** What of the draft combinations are made with, as far as it can be read. */
function readParts(document: Written): MadeWith {
  const xi = valueAt(document, '/xi');
  const letters = LOAD_GROUPS.flatMap((group) => {
    const letter = textAt(document, `/letters/${group}`).trim();
    return letter === '' ? [] : [[group, letter] as const];
  });
  const categories = LOAD_GROUPS.map((group) => [group, categoriesOf(document, group)] as const);
  return {
    ...(typeof xi === 'number' && { xi }),
    letters: Object.fromEntries(letters),
    categories: Object.fromEntries(categories),
  };
}

type Category = NonNullable<CombinationSet['categories'][LoadGroup]>[number];

/** The categories of a group whose ψ are numbers. */
export function categoriesOf(document: Written, group: LoadGroup): Category[] {
  return listAt(document, `/categories/${group}`).flatMap((one) => {
    const [psi0, psi1, psi2] = (['psi0', 'psi1', 'psi2'] as const).map((key) => valueAt(one, `/${key}`));
    if (typeof psi0 !== 'number' || typeof psi1 !== 'number' || typeof psi2 !== 'number') return [];
    const barred = listAt(one, '/not_with').flatMap((other) =>
      LOAD_GROUPS.filter((known) => known === other),
    );
    return [
      {
        id: textAt(one, '/id'),
        name: textAt(one, '/name'),
        psi0,
        psi1,
        psi2,
        ...(barred.length > 0 && { not_with: barred }),
        clause: textAt(one, '/clause'),
        from_memory: valueAt(one, '/from_memory') === true,
      },
    ];
  });
}

/** Every combination of a list with the categories that are chosen, the usual ones where none are. */
export function previewOf(document: Written, list: List, chosen: Categories): PreviewLine[] {
  const set = madeWith(document);
  return listAt(document, list).map((one, index) => ({
    at: `${list}/${index}`,
    id: textAt(one, '/id'),
    name: textAt(one, '/name'),
    clause: textAt(one, '/clause'),
    fromMemory: valueAt(one, '/from_memory') === true,
    ...expanded(set, one, chosen),
  }));
}

/** What one row comes to with the usual categories, or what it lacks. */
export function usualText(document: Written, at: Pointer): string {
  const { missing, combinations } = expanded(madeWith(document), valueAt(document, at), {});
  return missing ?? joined(combinations);
}

/** Combinations of which each is run: of groups that are not combined with one another. */
export const joined = (combinations: readonly string[]): string => combinations.join('; or ');

function expanded(set: MadeWith, one: unknown, chosen: Categories) {
  const factors = factorsOf(one);
  const missing = typeof factors === 'string' ? factors : missingFrom(set, factors);
  if (typeof factors === 'string' || missing !== null) return { combinations: [], missing };
  const strength = [{ id: '', name: '', factors, clause: '', when: '', from_memory: false }];
  return {
    combinations: strengthOf({ ...EMPTY, ...set, strength }, chosen).map(({ name }) => name),
    missing,
  };
}

/** The factors of a row as they are written, or what is wrong with them. */
export function factorsOf(one: unknown): SetCombination['factors'] | string {
  const given = LOAD_GROUPS.flatMap((group) => {
    const value = valueAt(one, `/factors/${group}`);
    return value === undefined ? [] : [[group, value] as const];
  });
  if (given.length === 0) return 'No factor yet.';
  const wrong = given.find(([, value]) => !isFactor(value));
  if (wrong) return `The factor of ${wrong[0]} cannot be read yet.`;
  return Object.fromEntries(given) as SetCombination['factors'];
}

const isFactor = (value: unknown): value is SetFactor =>
  typeof value === 'number' ||
  (typeof valueAt(value, '/factor') === 'number' && REDUCTIONS.some((by) => by === valueAt(value, '/by')));

function missingFrom(set: MadeWith, factors: SetCombination['factors']): string | null {
  for (const group of LOAD_GROUPS) {
    const factor = factors[group];
    if (factor === undefined || typeof factor === 'number') continue;
    if (factor.by === 'xi' && set.xi === undefined) return 'ξ has no value yet.';
    if (factor.by !== 'xi' && (set.categories[group] ?? []).length === 0) return `${group} has no ψ yet.`;
  }
  return null;
}

/** What else the engine asks of a set; combinations are not made with it. */
const EMPTY: CombinationSet = {
  schema_version: 1,
  slug: 'draft',
  reference: '',
  name: '',
  summary: '',
  publication: '',
  basis: '',
  limit_state: 'strength',
  snow: { basis: 'nominal', caution: '' },
  categories: {},
  strength: [],
  service: [],
  patterns: [],
  not_covered: [],
};

/** Lines by the id of their combination, as one text each. */
export const textsById = (lines: readonly PreviewLine[]): ReadonlyMap<string, string> =>
  new Map(lines.map(({ id, combinations }) => [id, joined(combinations)]));
