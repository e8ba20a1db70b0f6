import type { Pattern } from '../check/index';
import {
  type ArrangementNamer,
  actingCombinations,
  arrangementNamer,
  type Combination,
  groupsOf,
} from '../combination/index';
import { arrangementCount, envelopeTask } from '../envelope/index';
import { groupText } from './givens';
import type { SheetBlock, SheetInput, SheetRow } from './types';

/** How the groups stand on the member, what was run, and what was not, with the reason of each. */
export function combinationBlocks(input: SheetInput): SheetBlock[] {
  const { criteria, result } = input;
  if (!criteria) return [{ kind: 'text', tone: 'warning', text: 'None: no criteria are chosen.' }];
  const { strength, service, patterning } = result;
  const arrangements = countIn(result);
  const row = (purpose: string, combination: Combination): SheetRow => ({
    cells: [purpose, combination.name, String(arrangements(combination))],
  });
  const run = [
    ...strength.map(({ combination }) => row('Strength', combination)),
    ...service.map(({ combination, limit }) => row(limit.name, combination)),
  ];
  const idle = notRun(criteria, result.beam);
  return [
    groupTable(input, criteria.patterns),
    {
      kind: 'table',
      name: 'Combinations run',
      columns: [{ title: 'For' }, { title: 'Combination' }, { title: 'Arrangements', figures: true }],
      rows: run,
    },
    { kind: 'text', tone: 'note', text: standingText(patterning) },
    ...(idle.length > 0
      ? [
          {
            kind: 'table',
            name: 'Combinations not run',
            columns: [{ title: 'Combination of the criteria' }, { title: 'Not run because' }],
            rows: idle,
          } as const,
        ]
      : []),
  ];
}

/** Names the loads behind the figures of a stored result. */
export const namerOf = ({ beam, patterning, strength, service }: SheetInput['result']): ArrangementNamer =>
  arrangementNamer(
    beam,
    patterning.groups,
    [...strength, ...service].map(({ combination }) => combination),
  );

/** How many arrangements of loads stand behind a combination: every set of the spans that carry what it patterns. */
function countIn({ beam, patterning }: SheetInput['result']) {
  const { sources } = envelopeTask(beam, { combinations: [], patterns: patterning.groups });
  return (combination: Combination) => arrangementCount({ sources, combinations: [combination] });
}

const standingText = ({ groups, arrangements }: SheetInput['result']['patterning']): string =>
  groups.length === 0
    ? 'Every group stands on its whole length in every combination.'
    : `${arrangements} arrangements in all. Of each force, moment, reaction and deflection the adverse spans are loaded and no others${groups.length > 1 ? `; ${groups.join(' and ')} load the same spans together` : ''}. Spans run between vertical supports, overhangs are spans of their own.`;

function groupTable(
  { result, patterns }: SheetInput,
  rules: readonly Pattern[],
): Extract<SheetBlock, { kind: 'table' }> {
  const rows = groupsOf(result.beam.loads).map((group): SheetRow => {
    const rule = rules.find((one) => one.group === group);
    const isPatterned = result.patterning.groups.includes(group);
    const cells = [
      groupText(group),
      isPatterned ? 'On each span and overhang where adverse' : 'On its whole length',
    ];
    if (!rule) return { cells: [...cells, 'The criteria say nothing of it'] };
    if (rule.where_adverse && !isPatterned)
      return { cells: [...cells, `Patterns are switched off: ${patterns.reason}`], strong: true };
    const { publication, clause, from_memory: fromMemory } = rule.source;
    return {
      cells: [...cells, `${rule.basis} (${publication}, ${clause}${fromMemory ? ', from memory' : ''})`],
    };
  });
  return {
    kind: 'table',
    name: 'Groups',
    columns: [{ title: 'Group' }, { title: 'Acts' }, { title: 'Because' }],
    rows,
  };
}

/** Strength combinations that come to another one, or to nothing, with the groups that are on the member. */
function notRun(
  { combinations, letters }: NonNullable<SheetInput['criteria']>,
  { loads }: SheetInput['result']['beam'],
): SheetRow[] {
  const present = groupsOf(loads);
  const seen = new Set<string>();
  return combinations.flatMap((combination): SheetRow[] => {
    const [acting] = actingCombinations([combination], present, letters);
    if (!acting) return [{ cells: [combination.name, 'None of its groups is on the member'] }];
    if (seen.has(acting.name)) return [{ cells: [combination.name, `The same as ${acting.name} here`] }];
    seen.add(acting.name);
    return [];
  });
}
