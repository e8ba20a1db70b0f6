import { z } from 'zod';
import {
  type CombinationSet,
  LIMIT_STATES,
  LOAD_GROUPS,
  type LoadGroup,
  REDUCTIONS,
  type SetCombination,
} from '@/engine/combination';

const words = (most: number) => z.string().trim().min(1).max(most);
const key = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'Use small letters, digits and hyphens.');
const group = z.enum(LOAD_GROUPS);

/** Of loads, in codes of practice: none is above 3, and none is negative. */
const factor = z.number().min(0).max(3);
const share = z.number().min(0).max(1);

/** Typed from memory: a librarian of the practice confirms it against the print before relying on it. */
const cited = { clause: words(120), from_memory: z.boolean() };

const setFactor = z.union([factor, z.strictObject({ factor, by: z.enum(REDUCTIONS) })], {
  error: 'Give a number, 1.5, or one that is reduced, 1.5 ψ0.',
});

/** Of one list, and of one group. */
export const MOST_COMBINATIONS = 60;
export const MOST_CATEGORIES = 20;

const combination = z.strictObject({
  id: key.max(60),
  name: words(120),
  factors: z
    .partialRecord(group, setFactor)
    .refine((factors) => Object.keys(factors).length > 0, 'Give the factor of one group at least.'),
  when: words(300),
  ...cited,
});

const category = z.strictObject({
  id: key.max(40),
  name: words(120),
  psi0: share,
  psi1: share,
  psi2: share,
  not_with: z.array(group).min(1).optional(),
  ...cited,
});

type Issues = { code: 'custom'; input: unknown; path: (string | number)[]; message: string }[];

/** Ids that stand twice, at their places. */
function twice(
  list: readonly { readonly id: string }[],
  at: readonly (string | number)[],
  issues: Issues,
): void {
  list.forEach(({ id }, index) => {
    if (list.findIndex((other) => other.id === id) === index) return;
    const message = `“${id}” stands twice. Give each its own.`;
    issues.push({ code: 'custom', input: id, path: [...at, index, 'id'], message });
  });
}

/** Reductions that the set does not give: ψ without a table, ξ without its value. */
function unreduced(
  set: Pick<CombinationSet, 'xi' | 'categories'>,
  list: SetCombination[],
  at: string,
  issues: Issues,
): void {
  list.forEach(({ factors }, index) => {
    for (const name of LOAD_GROUPS) {
      const given = factors[name];
      if (given === undefined || typeof given === 'number') continue;
      const isKnown = given.by === 'xi' ? set.xi !== undefined : (set.categories[name]?.length ?? 0) > 0;
      if (isKnown) continue;
      const message =
        given.by === 'xi' ? 'Give the value of ξ in “xi”.' : `Give the ψ of ${name} in “categories”.`;
      issues.push({ code: 'custom', input: given, path: [at, index, 'factors', name], message });
    }
  });
}

/** Combinations of loads by a standard: a governed document of the practice. */
export const combinationSetDocument: z.ZodType<CombinationSet> = z
  .strictObject({
    schema_version: z.literal(1),
    slug: key.max(80),
    reference: words(40),
    name: words(120),
    summary: words(500),
    publication: words(120),
    basis: words(300),
    limit_state: z.enum(LIMIT_STATES),
    letters: z.partialRecord(group, words(4)).optional(),
    snow: z.strictObject({ basis: z.enum(['nominal', 'strength_level']), caution: words(500) }),
    xi: z.number().min(0.5).max(1).optional(),
    categories: z.partialRecord(group, z.array(category).min(1).max(MOST_CATEGORIES)),
    strength: z.array(combination).min(1).max(MOST_COMBINATIONS),
    service: z.array(combination).min(1).max(MOST_COMBINATIONS),
    patterns: z
      .array(
        z.strictObject({
          group,
          where_adverse: z.boolean(),
          basis: words(300),
          source: z.strictObject({ publication: words(120), ...cited }),
        }),
      )
      .max(LOAD_GROUPS.length),
    not_covered: z.array(words(300)).max(20),
  })
  .check(({ value, issues }) => {
    const found: Issues = [];
    twice(value.strength, ['strength'], found);
    twice(value.service, ['service'], found);
    for (const name of LOAD_GROUPS) twice(value.categories[name] ?? [], ['categories', name], found);
    unreduced(value, value.strength, 'strength', found);
    unreduced(value, value.service, 'service', found);
    issues.push(...found);
  });

export const SNOW_NAMES: Readonly<Record<CombinationSet['snow']['basis'], string>> = {
  nominal: 'nominal: with its load factor still to come',
  strength_level: 'at strength level: its load factor is in it',
};

/** What a group is called in a set. */
export const letterOf = (set: Pick<CombinationSet, 'letters'>, name: LoadGroup): string =>
  set.letters?.[name] ?? name;
