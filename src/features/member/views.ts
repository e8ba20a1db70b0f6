/** What the member's drawing shows: all loads unfactored, a group alone, the envelope, or loads that act at once. */
import type { Solution } from '@/engine/beam';
import {
  type Combination,
  factoredLoads,
  LOAD_GROUP_NAMES,
  LOAD_GROUPS,
  regionsOf,
} from '@/engine/combination';
import type { Beam, Load } from '@/engine/model';
import type { Piecewise } from '@/engine/polynomial';
import type { NamedLoad } from '@/engine/template';
import type { MemberEvaluation } from './evaluate';
import { type MemberArrangement, MOVEMENTS } from './solve';

/** The most and the least all along the beam, engine signs, with what gives its peaks. */
interface DrawnEnvelope {
  readonly upper: Piecewise;
  readonly lower: Piecewise;
  readonly peaks: readonly { readonly x: number; readonly value: number; readonly of: string }[];
  readonly note: string;
}

interface Drawn {
  readonly solution: Solution;
  readonly envelopes?: { readonly [Q in 'shear' | 'moment' | 'deflection']?: DrawnEnvelope };
  readonly reactions?: readonly {
    readonly at: number;
    readonly vertical: number;
    readonly moment: number;
    readonly least: { readonly vertical: number; readonly moment: number };
  }[];
}

export interface StripView {
  readonly id: string;
  readonly name: string;
  readonly beam: Beam;
  readonly loadNames: readonly NamedLoad[];
  /** Of loads that act at once: which. */
  readonly of?: MemberArrangement;
  /** Worked out when it is shown. */
  readonly draw: () => Drawn;
}

export function groupName(group: string): string {
  if (group === MOVEMENTS) return 'supports moving';
  const known = LOAD_GROUPS.find((one) => one === group);
  return known ? `${known}, ${LOAD_GROUP_NAMES[known]}` : group;
}

/** The loads that `keep` keeps, with the names that they have on the whole beam. */
function part(beam: Beam, names: readonly NamedLoad[], keep: (load: Load) => boolean) {
  const kept = beam.loads
    .map((load, index) => ({ load, name: names[index] }))
    .filter(({ load }) => keep(load));
  return {
    loads: kept.map(({ load }) => load),
    loadNames: kept.flatMap(({ name }) => (name ? [name] : [])),
  };
}

/** A load that is given by its groups is drawn once for each: "w G". */
const withGroup = (name: NamedLoad): NamedLoad =>
  name.symbol === '' ? name : { ...name, tex: `${name.tex}\\text{ ${name.group}}` };

export function stripViews(evaluation: MemberEvaluation): StripView[] {
  const { beam, instance, total, groups, strength } = evaluation;
  const loadNames = instance.loadNames.map(withGroup);
  const whole = { beam, loadNames };
  return [
    { ...whole, id: 'total', name: 'All loads, unfactored', draw: () => ({ solution: total }) },
    ...groups.map(({ group, solution }): StripView => {
      const { loads, loadNames: names } = part(beam, loadNames, (load) => load.group === group);
      const own = { beam: { ...beam, loads }, loadNames: names };
      return { ...own, id: `group ${group}`, name: groupName(group), draw: () => ({ solution }) };
    }),
    ...(strength.length > 0
      ? [
          {
            ...whole,
            id: 'envelope',
            name: 'Envelope of all combinations',
            draw: () => envelopeOf(evaluation),
          },
        ]
      : []),
    ...governingViews(evaluation),
    ...combinationViews(evaluation),
  ];
}

/** A factored load is no longer what its parameter says: it has no name, and is not edited there. */
const UNNAMED: readonly NamedLoad[] = [];

/** Loads that act at once and govern a check, the worst first, where that is not every span. */
function governingViews(evaluation: MemberEvaluation): StripView[] {
  const { beam, checks, strength, service, nameOf } = evaluation;
  const all = regionsOf(beam).map((_, span) => span);
  const combinations = new Map(
    [...strength, ...service].map(({ combination }) => [combination.name, combination]),
  );
  const views = new Map<string, StripView>();
  for (const { title, combination: name, pattern } of [
    ...(checks?.rows ?? []),
    ...(checks?.findings ?? []),
  ]) {
    const combination = combinations.get(name ?? '');
    if (!combination || !pattern) continue;
    const words = nameOf({ combination: combination.name, pattern });
    if (views.has(words) || words === nameOf({ combination: combination.name, pattern: all })) continue;
    views.set(words, arrangementView(evaluation, `${title}: ${words}`, { combination, pattern }));
  }
  return [...views.values()];
}

/** Every combination with all of its loads. */
function combinationViews(evaluation: MemberEvaluation): StripView[] {
  const { beam, strength, service, nameOf } = evaluation;
  const pattern = regionsOf(beam).map((_, span) => span);
  const view = (kind: string, combination: Combination): StripView => ({
    ...arrangementView(evaluation, `${kind}: ${nameOf({ combination: combination.name, pattern })}`, {
      combination,
      pattern,
    }),
    // As they were given: nothing is cut where everything is loaded.
    beam: { ...beam, loads: factoredLoads(beam.loads, combination) },
  });
  return [
    ...strength.map(({ combination }) => view('Strength', combination)),
    ...service.map(({ limit, combination }) => view(limit.name, combination)),
  ];
}

function arrangementView(
  { arrangementBeam, solveArrangement }: MemberEvaluation,
  name: string,
  of: MemberArrangement,
): StripView {
  const draw = () => ({ solution: solveArrangement(of) });
  return { id: name, name, beam: arrangementBeam(of), loadNames: UNNAMED, of, draw };
}

/** Forces of the strength combinations and deflections of the service combinations, over all patterns. */
function envelopeOf(evaluation: MemberEvaluation): Drawn {
  const { total, strength, service } = evaluation;
  const factored = strength.map(({ combination }) => combination);
  const served = service.map(({ combination }) => combination);
  return {
    solution: total,
    envelopes: {
      shear: drawnEnvelope(evaluation, 'shear', factored, 'strength'),
      moment: drawnEnvelope(evaluation, 'moment', factored, 'strength'),
      ...(served.length > 0 && {
        deflection: drawnEnvelope(evaluation, 'deflection', served, 'service'),
      }),
    },
    reactions: (strength[0]?.reactions ?? []).map(({ at }, support) => {
      const each = strength.flatMap(({ reactions }) => reactions[support] ?? []);
      const most = (component: 'vertical' | 'moment') =>
        Math.max(...each.map(({ max }) => max[component].value));
      const least = (component: 'vertical' | 'moment') =>
        Math.min(...each.map(({ min }) => min[component].value));
      return {
        at,
        vertical: most('vertical'),
        moment: most('moment'),
        least: { vertical: least('vertical'), moment: least('moment') },
      };
    }),
  };
}

/** Below this part of the largest value a peak is not worth its label. */
const SMALL = 0.02;

function drawnEnvelope(
  { beam, superposed, nameOf }: MemberEvaluation,
  quantity: 'shear' | 'moment' | 'deflection',
  combinations: readonly Combination[],
  note: string,
): DrawnEnvelope {
  const found = regionsOf(beam).flatMap(({ from, to }) => {
    const { max, min } = superposed.extremesBetween(quantity, [from, to], combinations);
    return [...(max.value > 0 ? [max] : []), ...(min.value < 0 ? [min] : [])];
  });
  const size = Math.max(0, ...found.map(({ value }) => Math.abs(value)));
  const peaks = new Map(
    found
      .filter(({ value }) => Math.abs(value) > SMALL * size)
      // Two spans meet in one peak over the support between them.
      .map(({ value, at: [x = 0], ...by }) => [
        `${x.toPrecision(9)} ${value.toPrecision(9)}`,
        { x, value, of: nameOf(by) },
      ]),
  );
  return { ...superposed.outline(quantity, combinations), peaks: [...peaks.values()], note };
}
