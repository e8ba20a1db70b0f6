import { type Combination, named } from './combine';
import { LOAD_GROUPS, type LoadGroup } from './groups';

/** What a factor is multiplied by: a ψ of the group's category, or the reduction ξ of the set. */
export const REDUCTIONS = ['psi0', 'psi1', 'psi2', 'xi'] as const;
export type Reduction = (typeof REDUCTIONS)[number];

/** A factor of a group: a number, or one that is reduced. A variable group without reduction leads. */
export type SetFactor = number | { factor: number; by: Reduction };

export type SetCombination = {
  /** By which criteria name it: "characteristic-q". Unique in its list. */
  id: string;
  /** What it is in words: "6.10b, imposed leading". */
  name: string;
  factors: Partial<Record<LoadGroup, SetFactor>>;
  clause: string;
  when: string;
  from_memory: boolean;
};

/** What a variable group may be: a row of the ψ table. */
type SetCategory = {
  id: string;
  name: string;
  psi0: number;
  psi1: number;
  psi2: number;
  /** Groups that it is not combined with (EN 1991-1-1, 3.3.2: roofs of category H with snow or wind). */
  not_with?: LoadGroup[] | undefined;
  clause: string;
  from_memory: boolean;
};

export const LIMIT_STATES = ['strength', 'allowable', 'equilibrium'] as const;
type LimitState = (typeof LIMIT_STATES)[number];

/** How a group's loads stand on the member: each span and overhang only where adverse, or on the whole length at once. */
export type Pattern = {
  group: LoadGroup;
  where_adverse: boolean;
  /** Why, printed on the sheet. */
  basis: string;
  source: { publication: string; clause: string; from_memory: boolean };
};

/** Combinations of loads by a standard: a governed document of the practice. */
export type CombinationSet = {
  schema_version: 1;
  slug: string;
  reference: string;
  name: string;
  summary: string;
  publication: string;
  /** In words, printed on the sheet before what the criteria say. */
  basis: string;
  limit_state: LimitState;
  letters?: Partial<Record<LoadGroup, string>> | undefined;
  /** What snow loads must be before these factors: a map of another edition with them is dangerous. */
  snow: { basis: 'nominal' | 'strength_level'; caution: string };
  xi?: number | undefined;
  /** By group, the usual one first. */
  categories: Partial<Record<LoadGroup, SetCategory[]>>;
  strength: SetCombination[];
  service: SetCombination[];
  patterns: Pattern[];
  not_covered: string[];
};

/** The category that was chosen of each variable group, by its id; the usual one where none is. */
export type Categories = Readonly<Partial<Record<string, string>>>;

export function categoryOf(
  set: CombinationSet,
  group: LoadGroup,
  chosen: Categories,
): SetCategory | undefined {
  const known = set.categories[group] ?? [];
  return known.find(({ id }) => id === chosen[group]) ?? known[0];
}

/** Groups of which a category is chosen that the set does not know. */
export const unknownCategories = (set: CombinationSet, chosen: Categories): LoadGroup[] =>
  LOAD_GROUPS.filter((group) => {
    const id = chosen[group];
    return id !== undefined && !set.categories[group]?.some((one) => one.id === id);
  });

/** Factors are decimals: of 1.5 · 0.7 the product of two doubles is 1.0499999999999998. */
const decimal = (value: number): number => Number(value.toPrecision(12));

function factorIn(set: CombinationSet, group: LoadGroup, factor: SetFactor, chosen: Categories): number {
  if (typeof factor === 'number') return factor;
  const { by } = factor;
  const reduction = by === 'xi' ? set.xi : categoryOf(set, group, chosen)?.[by];
  if (reduction === undefined) throw new RangeError(`${set.slug} has no ${by} for ${group}`);
  return decimal(factor.factor * reduction);
}

type Given = { readonly group: LoadGroup; readonly factor: SetFactor; readonly value: number };

/**
 * A combination of a set with the numbers of the chosen categories, named in the letters of the set. It is two where
 * groups that are not combined with one another only accompany: the one without the one, and the one without the other.
 */
function combinationsIn(
  set: CombinationSet,
  { factors }: Pick<SetCombination, 'factors'>,
  chosen: Categories,
): Combination[] {
  const given = LOAD_GROUPS.flatMap((group): Given[] => {
    const factor = factors[group];
    return factor === undefined ? [] : [{ group, factor, value: factorIn(set, group, factor, chosen) }];
  });
  const acting = given.filter(({ value }) => value !== 0);
  return setApart(set, acting, chosen).map((kept) => {
    const numbers = kept.map(({ group, value }) => [group, value] as const);
    return { name: named(numbers, set.letters ?? {}), factors: Object.fromEntries(numbers) };
  });
}

/** Of two groups that are not combined the leading one stays; where none leads, or both do, each in turn. */
function setApart(set: CombinationSet, given: readonly Given[], chosen: Categories): (readonly Given[])[] {
  const leads = ({ factor }: Given): boolean => typeof factor === 'number';
  for (const one of given) {
    const barred = categoryOf(set, one.group, chosen)?.not_with ?? [];
    const others = given.filter(({ group }) => barred.includes(group));
    if (others.length === 0) continue;
    const isLed = leads(one);
    const areLed = others.some(leads);
    return [
      ...(isLed && !areLed ? [] : [given.filter((other) => other !== one)]),
      ...(areLed && !isLed ? [] : [given.filter((other) => !others.includes(other))]),
    ];
  }
  return [given];
}

/** Every strength combination of a set, as it is used. */
export const strengthOf = (set: CombinationSet, chosen: Categories): Combination[] =>
  set.strength.flatMap((combination) => combinationsIn(set, combination, chosen));

/** A service combination by its id, of some of its groups alone where they are named: of the imposed part, without G. */
export function serviceOf(
  set: CombinationSet,
  id: string,
  chosen: Categories,
  only: readonly string[] = LOAD_GROUPS,
): Combination | undefined {
  const found = set.service.find((combination) => combination.id === id);
  if (!found) return undefined;
  const entries = Object.entries(found.factors).filter(([group]) => only.includes(group));
  return combinationsIn(set, { factors: Object.fromEntries(entries) }, chosen)[0];
}
