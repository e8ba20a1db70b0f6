import { type PreparedBeam, prepareBeam, type Solution } from '@/engine/beam';
import type { Criteria, DeflectionLimit } from '@/engine/check';
import {
  type ArrangementNamer,
  actingCombinations,
  arrangementNamer,
  type Combination,
  groupsOf,
  supportsMove,
} from '@/engine/combination';
import {
  arrangementCount,
  arrangementLoads,
  type CombinationEnvelope,
  envelopeTask,
  type GroupReaction,
  type SolvedCase,
  type Source,
  SuperposedBeam,
  solveSources,
} from '@/engine/envelope';
import type { Beam, Redundant } from '@/engine/model';

/** The group of what the supports do by themselves. */
export const MOVEMENTS = 'movements';

/** One combination with the loads of the spans in its pattern, all at once. */
export type MemberArrangement = { readonly combination: Combination; readonly pattern: readonly number[] };

type ServiceEnvelope = CombinationEnvelope & { readonly limit: DeflectionLimit };

/** Which groups act only where adverse, and how many arrangements of loads that makes. */
export type Patterning = { readonly groups: readonly string[]; readonly arrangements: number };

export type MemberSolution = {
  /** All groups together, unfactored. */
  readonly total: Solution;
  /** Each group alone, unfactored; supports' own movements as a group of their own where there are any. */
  readonly groups: readonly { readonly group: string; readonly solution: Solution }[];
  /** Support by support, of every group: of a patterned one the most and the least. */
  readonly groupReactions: readonly Readonly<Record<string, GroupReaction>>[];
  /** Every combination that differs on these loads, over all patterns. */
  readonly strength: readonly CombinationEnvelope[];
  /** One for each limit whose combination acts; the limit names what acts of it. */
  readonly service: readonly ServiceEnvelope[];
  readonly patterning: Patterning;
  readonly superposed: SuperposedBeam;
  readonly nameOf: ArrangementNamer;
  /** The beam under the loads of an arrangement only, and the same solved. */
  readonly arrangementBeam: (of: MemberArrangement) => Beam;
  readonly solveArrangement: (of: MemberArrangement) => Solution;
  /** Everything that was solved, none of it twice: the rest are sums. */
  readonly solved: readonly SolvedCase[];
};

/** The groups that act only where adverse. */
const patternedGroups = (criteria: Criteria | null): string[] =>
  (criteria?.patterns ?? []).flatMap(({ group, where_adverse }) => (where_adverse ? [group] : []));

/**
 * Solves a member's load cases, each once: the groups, a patterned one span by span, and all loads together. The
 * combinations are sums of them, with the spans that are adverse and no others.
 */
export function solveMember(
  beam: Beam,
  redundants: readonly Redundant[] | undefined,
  criteria: Criteria | null,
  patterns: boolean,
): MemberSolution {
  const present = groupsOf(beam.loads);
  const patterned = patterns ? patternedGroups(criteria).filter((group) => present.includes(group)) : [];
  const { beam: cut, sources } = envelopeTask(beam, { combinations: [], patterns: patterned, redundants });
  const prepared = prepareBeam(cut, redundants);
  const cases = solveSources(prepared, sources);
  const superposed = new SuperposedBeam(
    sources,
    cases.map(({ solution }) => solution),
  );
  const groups = groupCases(beam, present, prepared, sources, cases);
  const total = { beam, solution: prepared.solve(beam.loads) };
  const { strength, service, combinations } = combined(superposed, criteria, present);
  const loadsOf = ({ combination, pattern }: MemberArrangement) =>
    arrangementLoads({ sources, combinations: [combination] }, { combination: combination.name, pattern });
  return {
    total: total.solution,
    groups: groups.map(({ group, solved }) => ({ group, solution: solved.solution })),
    groupReactions: superposed.groupReactions(),
    strength,
    service,
    patterning: { groups: patterned, arrangements: arrangementCount({ sources, combinations }) },
    superposed,
    nameOf: arrangementNamer(beam, patterned, combinations),
    arrangementBeam: (of) => ({ ...beam, loads: loadsOf(of) }),
    solveArrangement: (of) => prepared.solve(loadsOf(of)),
    solved: [...new Set([...cases, ...groups.map(({ solved }) => solved), total])],
  };
}

/** Every group on its whole length. One that is not patterned, or stands in one span only, is solved already. */
function groupCases(
  beam: Beam,
  present: readonly string[],
  prepared: PreparedBeam,
  sources: readonly Source[],
  cases: readonly SolvedCase[],
): { group: string; solved: SolvedCase }[] {
  const whole = (group: string): SolvedCase[] => {
    const own = cases.filter((_, i) => sources[i]?.group === group);
    const loads = beam.loads.filter((load) => load.group === group);
    return own.length === 1 ? own : solveSources(prepared, [{ group, span: null, loads }]);
  };
  const moved = supportsMove(beam) ? cases.filter((_, i) => sources[i]?.group === null) : [];
  return [
    ...present.flatMap((group) => whole(group).map((solved) => ({ group, solved }))),
    ...moved.map((solved) => ({ group: MOVEMENTS, solved })),
  ];
}

/** Every combination that acts, each once: a strength combination and a limit may ask for the same. */
function combined(superposed: SuperposedBeam, criteria: Criteria | null, present: readonly string[]) {
  const acting = (combinations: readonly Combination[]) =>
    actingCombinations(combinations, present, criteria?.letters);
  const strength = acting(criteria?.strength.combinations ?? []);
  const limits = (criteria?.deflection ?? []).flatMap((limit) =>
    acting([limit.combination]).map((combination) => ({ ...limit, combination })),
  );
  const all = [...strength, ...limits.map(({ combination }) => combination)];
  const combinations = [...new Map(all.map((one) => [one.name, one])).values()];
  const envelopes = new Map(superposed.combined(combinations).map((one) => [one.combination.name, one]));
  const envelopesOf = ({ name }: Combination) => envelopes.get(name) ?? [];
  return {
    strength: strength.flatMap(envelopesOf),
    service: limits.flatMap((limit) =>
      [envelopesOf(limit.combination)].flat().map((envelope): ServiceEnvelope => ({ ...envelope, limit })),
    ),
    combinations,
  };
}
