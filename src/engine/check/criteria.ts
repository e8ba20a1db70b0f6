import { z } from 'zod';
import {
  type Categories,
  type Combination,
  type CombinationSet,
  categoryOf,
  LIMIT_STATES,
  LOAD_GROUPS,
  type Pattern,
  serviceOf,
  strengthOf,
  unknownCategories,
} from '../combination/index';

const factors = z.partialRecord(z.enum(LOAD_GROUPS), z.number());
const combination = z.strictObject({ name: z.string().min(1), factors });
const source = z.strictObject({
  publication: z.string().min(1),
  clause: z.string().min(1),
  /** Typed from memory: a librarian of the practice confirms it against the print before relying on it. */
  from_memory: z.boolean(),
});

const pattern = z.strictObject({
  group: z.enum(LOAD_GROUPS),
  where_adverse: z.boolean(),
  basis: z.string().min(1),
  source,
});

const limits = {
  /** In words, printed on the sheet: what the factors are and what they stand for. */
  basis: z.string().min(1),
  /** Greatest bending stress as a share of the material's bending strength (yield for steel). */
  bending: z.number().positive(),
  /** Greatest shear stress as a share of the material's shear strength (f_y/√3 of steel, f_v of timber). */
  shear: z.number().positive(),
  source,
};

/** A limit on a deflection: span/ratio, and an absolute cap where one is given; the lower governs. */
const deflection = {
  name: z.string().min(1),
  span_ratio: z.number().positive(),
  /** The overhang's length is multiplied by this before the ratio: 2 where the source says so. */
  overhang_factor: z.number().positive(),
  overhang_ratio: z.number().positive(),
  /** m */
  cap: z.number().positive().optional(),
  source,
};
const deflectionLimit = z.strictObject({ ...deflection, combination });

const named = {
  slug: z.string().regex(/^[a-z0-9-]+$/),
  reference: z.string().min(1),
  name: z.string().min(1),
  summary: z.string().min(1),
  families: z.array(z.enum(['steel', 'timber'])).min(1),
  not_checked: z.array(z.string().min(1)).min(1),
};

/** Criteria of before there were combination sets: they hold their own. Lengths m; factors dimensionless. */
const ownCombinations = z.strictObject({
  ...named,
  schema_version: z.literal(1),
  /** What the loads' groups are called in combinations, where not by their own letters: D and L for G and Q. */
  letters: z.partialRecord(z.enum(LOAD_GROUPS), z.string().min(1)).optional(),
  strength: z.strictObject({ ...limits, combinations: z.array(combination).min(1) }),
  deflection: z.array(deflectionLimit).min(1),
  /** Groups that are not named stand on the whole length. */
  patterns: z.array(pattern).optional(),
});

/** Criteria that refer to a revision of a combination set. */
export const criteriaOfSet = z.strictObject({
  ...named,
  schema_version: z.literal(2),
  /** What the limits of stress are made for; combinations for another are not taken. */
  limit_state: z.enum(LIMIT_STATES),
  combinations: z.strictObject({ set: z.string().min(1), revision: z.int().positive() }),
  /** What the variable groups are, where not the usual of the set. A member may choose others. */
  categories: z.partialRecord(z.enum(LOAD_GROUPS), z.string().min(1)).optional(),
  strength: z.strictObject(limits),
  deflection: z
    .array(
      z.strictObject({
        ...deflection,
        /** A service combination of the set by its id, of some of its groups alone where they are named. */
        combination: z.strictObject({
          id: z.string().min(1),
          groups: z.array(z.enum(LOAD_GROUPS)).min(1).optional(),
        }),
      }),
    )
    .min(1),
});
export type CriteriaOfSet = z.infer<typeof criteriaOfSet>;

/** What a member is judged by: a governed document of the practice. */
export const criteriaDocument = z.discriminatedUnion('schema_version', [ownCombinations, criteriaOfSet]);
export type CriteriaDocument = z.infer<typeof criteriaDocument>;

export type DeflectionLimit = z.infer<typeof deflectionLimit>;

/** Criteria with the combinations that a member is held against, in numbers. */
export type Criteria = {
  readonly name: string;
  readonly reference: string;
  readonly summary: string;
  readonly letters?: Readonly<Partial<Record<string, string>>> | undefined;
  readonly strength: z.infer<typeof ownCombinations>['strength'];
  readonly deflection: readonly DeflectionLimit[];
  readonly patterns?: readonly Pattern[] | undefined;
  readonly not_checked: readonly string[];
};

/** Why criteria cannot be held against a set, by what of them; empty where they can. */
export function unfitting(
  criteria: CriteriaOfSet,
  set: CombinationSet,
): { readonly path: readonly (string | number)[]; readonly message: string }[] {
  const { limit_state: made, categories = {}, deflection: asked } = criteria;
  const isMade = set.limit_state === made || (set.limit_state === 'equilibrium' && made === 'strength');
  const known = set.service.map(({ id }) => id);
  return [
    ...(isMade
      ? []
      : [
          {
            path: ['limit_state'],
            message: `${set.reference} is made for ${LIMIT_NAMES[set.limit_state]}, and these limits of stress for ${LIMIT_NAMES[made]}.`,
          },
        ]),
    ...asked.flatMap(({ combination: { id } }, index) =>
      known.includes(id)
        ? []
        : [
            {
              path: ['deflection', index, 'combination', 'id'],
              message: `${set.reference} has no service combination “${id}”. It has ${known.join(', ')}.`,
            },
          ],
    ),
    ...unknownCategories(set, categories).map((group) => ({
      path: ['categories', group],
      message: `${set.reference} has no category “${categories[group]}” of ${group}.`,
    })),
  ];
}

export const LIMIT_NAMES = {
  strength: 'design strengths',
  allowable: 'allowable stresses',
  equilibrium: 'static equilibrium',
} as const;

/**
 * Criteria as a member is held against them. Those that refer to a set need one that fits (`unfitting`); categories that
 * the set does not know are the usual ones. Throws RangeError without a set, or where it has no such combination.
 */
export function resolveCriteria(
  criteria: CriteriaDocument,
  set: CombinationSet | null,
  chosen: Categories = {},
): Criteria {
  if (criteria.schema_version === 1) return criteria;
  if (!set)
    throw new RangeError(`${criteria.slug} is held against ${criteria.combinations.set}, which is not given`);
  const categories = { ...criteria.categories, ...chosen };
  const { strength, deflection: asked, name, reference, summary, not_checked } = criteria;
  return {
    name,
    reference,
    summary,
    letters: set.letters,
    strength: {
      ...strength,
      basis: `${set.basis}${categoriesText(set, categories)}; ${strength.basis}`,
      combinations: strengthOf(set, categories).map(writable),
    },
    deflection: asked.map(({ combination: { id, groups }, ...limit }) => {
      const found = serviceOf(set, id, categories, groups);
      if (!found) throw new RangeError(`${set.slug} has no service combination ${id}`);
      return { ...limit, combination: writable(found) };
    }),
    patterns: set.patterns,
    not_checked,
  };
}

/** Which rows of the ψ table were taken, where there is a choice: " (Q as B: offices)". */
function categoriesText(set: CombinationSet, chosen: Categories): string {
  const named = LOAD_GROUPS.flatMap((group) => {
    const category = categoryOf(set, group, chosen);
    return category && (set.categories[group]?.length ?? 0) > 1 ? [`${group} as ${category.name}`] : [];
  });
  return named.length === 0 ? '' : ` (${named.join(', ')})`;
}

const writable = ({ name, factors: given }: Combination) => ({ name, factors: { ...given } });
