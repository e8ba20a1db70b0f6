import type { Extremes, Reaction } from '@/engine/beam';
import type { DeflectionLimit } from '@/engine/check';
import type { Combination } from '@/engine/combination';
import { type MemberResult, type StoredResult, storedResult } from './result';

/** A combination as engine 1.0.0 stored it: every load everywhere, solved as one arrangement. */
type Arrangement1 = {
  readonly combination: Combination;
  readonly reactions: readonly Reaction[];
  readonly extremes: Extremes;
};

type Result1 = Omit<
  MemberResult,
  'schema_version' | 'strength' | 'service' | 'patterning' | 'group_reactions'
> & {
  readonly strength: readonly Arrangement1[];
  readonly service: readonly (Arrangement1 & { readonly limit: DeflectionLimit })[];
};

/** A stored result as today's engine would have stored it. What is stored is never rewritten. */
export function readResult(stored: unknown): StoredResult {
  const result = storedResult.parse(stored);
  return result.kind === 'fault' || 'schema_version' in result ? result : migrated(result);
}

/** Patterns were not run: every combination is its only arrangement, and names no spans. */
const migrated = (result: Result1): MemberResult => ({
  ...result,
  schema_version: 2,
  group_reactions: result.beam.supports.map((_, support) =>
    Object.fromEntries(
      result.groups.flatMap(({ group, solution }) => {
        const own = solution.reactions[support];
        return own ? [[group, { vertical: own.vertical, moment: own.moment }]] : [];
      }),
    ),
  ),
  strength: result.strength.map(toEnvelope),
  service: result.service.map((one) => ({ ...toEnvelope(one), limit: one.limit })),
  patterning: { groups: [], arrangements: new Set([...result.strength, ...result.service].map(nameOf)).size },
});

const nameOf = ({ combination }: Arrangement1): string => combination.name;

function toEnvelope({ combination, reactions, extremes }: Arrangement1): MemberResult['strength'][number] {
  const by = { combination: combination.name, pattern: [] };
  const range = ({ max, min }: Extremes['moment']) => ({ max: { ...max, ...by }, min: { ...min, ...by } });
  return {
    combination,
    extremes: {
      shear: range(extremes.shear),
      moment: range(extremes.moment),
      slope: range(extremes.slope),
      deflection: range(extremes.deflection),
    },
    reactions: reactions.map(({ at, vertical, moment }) => {
      const one = { vertical: { value: vertical, ...by }, moment: { value: moment, ...by } };
      return { at, max: one, min: one };
    }),
  };
}
