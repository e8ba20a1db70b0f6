import katex from 'katex';
import { type Solution, solveBeam, stationsAt } from '@/engine/beam';
import { readBeam } from '@/engine/model';
import { type InstanceOptions, readParameters, type Template } from '@/engine/template';
import { type Key, numbersTex, recompute, type Subject, symbolsTex, type Trace, Traces } from '@/engine/why';
import { instanceAt } from './templates';

const ALL = { kind: 'all' } as const;
const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;

/** A template at some values, as its page asks about it. */
export function subjectOf(
  template: Template,
  typed: Readonly<Record<string, unknown>> = {},
  options: InstanceOptions = {},
  more: Partial<Subject> = {},
): Subject {
  const instance = instanceAt(template, typed, options);
  const reading = readBeam({ ...instance.beam, horizontal: 'ignore' });
  const values = readParameters(template, typed);
  if (!reading.ok || !values.ok) throw new Error('there is no beam at these values');
  return {
    template,
    revision: 1,
    instance,
    beam: reading.value,
    typed,
    values: values.values,
    system: 'metric',
    section: null,
    typedEi: null,
    patterned: [],
    criteria: null,
    ...more,
  };
}

export type Asked = { readonly key: Key; readonly value: number };

/** What a page shows of a beam, with the solver's own values: all of it, and stations between. */
export function askedOf({ beam, instance }: Subject): Asked[] {
  const solution = solveBeam(beam, instance.beam.redundants);
  const { forceMethod, contraflexure } = solution;
  return [
    ...shownOf(solution),
    ...forceMethod.values.map((value, index) => ({ key: { kind: 'redundant', index } as const, value })),
    ...forceMethod.gaps.map((value, index) => ({ key: { kind: 'gap', index } as const, value })),
    ...forceMethod.flexibility.flatMap((row, r) =>
      row.map((value, column) => ({ key: { kind: 'flexibility', row: r, column } as const, value })),
    ),
    ...contraflexure.map((x) => ({ key: { kind: 'contraflexure', x, acting: ALL } as const, value: x })),
    ...[0, 0.37, 0.5, 1].flatMap((t) => stationOf(solution, t * beam.length)),
  ];
}

function shownOf({ reactions, extremes }: Solution): Asked[] {
  return [
    ...reactions.flatMap(({ vertical, moment }, support): Asked[] => [
      { key: { kind: 'reaction', support, component: 'vertical', acting: ALL }, value: vertical },
      { key: { kind: 'reaction', support, component: 'moment', acting: ALL }, value: moment },
    ]),
    ...QUANTITIES.flatMap((quantity) =>
      (['max', 'min'] as const).flatMap((sense): Asked[] => {
        const { value, at } = extremes[quantity][sense];
        return at.flatMap((x): Asked[] => [
          { key: { kind: 'extreme', quantity, sense, x, acting: ALL }, value },
          { key: { kind: 'place', quantity, sense, x, acting: ALL }, value: x },
        ]);
      }),
    ),
  ];
}

function stationOf(solution: Solution, x: number): Asked[] {
  const [station] = stationsAt(solution, [x]);
  return QUANTITIES.flatMap((quantity) =>
    (['left', 'right'] as const).map((side): Asked => {
      const value = station![quantity];
      const shown = typeof value === 'number' ? value : value[side === 'left' ? 0 : 1];
      return { key: { kind: 'value', quantity, x, side, acting: ALL }, value: shown };
    }),
  );
}

/** Everything that is wrong with the answers to some questions. */
export function wrongIn(subject: Subject, asked: readonly Asked[]): string[] {
  const traces = new Traces(subject);
  // What several numbers come from is looked at once.
  const seen = new Set<Trace>();
  const answers = asked.map(({ key, value }) => {
    const trace = traces.why(key);
    return { name: JSON.stringify(key), value, trace, numbers: [...numbersOf(trace, seen)] };
  });
  const scales = scalesOf([...seen]);
  return answers.flatMap(({ name, value, trace, numbers }) => {
    const scale = scales.get(kindOf(trace)) ?? 0;
    // Slopes, deflections and some redundants are told in another sense than the solver's.
    const isSame = Math.abs(Math.abs(trace.value) - Math.abs(value)) <= SAME * scale;
    return [
      ...(isSame ? [] : [`${name}: ${trace.value}, solved as ${value}`]),
      ...numbers.flatMap((one) => faultsOf(one, scales).map((fault) => `${name}: ${fault}`)),
    ];
  });
}

/** Every number of a trace that was not seen yet. */
function* numbersOf(trace: Trace, seen: Set<Trace>): Generator<Trace> {
  if (seen.has(trace)) return;
  seen.add(trace);
  yield trace;
  for (const part of trace.parts) yield* numbersOf(part.trace, seen);
}

/** Measures that are of one dimension. */
const ALIKE: Readonly<Record<string, string>> = {
  reaction: 'force',
  length: 'position',
  section_size: 'position',
};

const kindOf = ({ measure }: Pick<Trace, 'measure'>): string => ALIKE[measure] ?? measure;

/** The largest value of each kind: what rounding is measured against. */
function scalesOf(numbers: readonly Trace[]): ReadonlyMap<string, number> {
  const scales = new Map<string, number>();
  for (const one of numbers)
    scales.set(kindOf(one), Math.max(scales.get(kindOf(one)) ?? 0, Math.abs(one.value)));
  return scales;
}

const LEAVES = ['input', 'station', 'row', 'material', 'criteria', 'constant'];
const SAME = 1e-9;

/** A number that its parts do not come to, a chain that ends in the air, a formula that cannot be set. */
function faultsOf(one: Trace, scales: ReadonlyMap<string, number>): string[] {
  const where = `${one.label} (${one.how.kind})`;
  const scale = Math.max(scales.get(kindOf(one)) ?? 0, Number.MIN_VALUE);
  const again = recompute(one);
  const isLeaf = LEAVES.includes(one.how.kind);
  const faults = [
    [!(Math.abs(again - one.value) <= SAME * scale), `${one.value}, but its parts come to ${again}`],
    [!Number.isFinite(one.value), 'not finite'],
    [one.label === '', 'no label'],
    [isLeaf && one.parts.length > 0, 'a leaf with parts'],
    [!isLeaf && one.parts.length === 0 && Math.abs(one.value) > SAME * scale, 'nothing is behind it'],
    [isAmbiguous(one), 'two parts have one letter'],
    ['source' in one.how && one.how.source.text === '', 'no source'],
  ] as const;
  return [
    ...faults.flatMap(([isWrong, words]) => (isWrong ? [`${where}: ${words}`] : [])),
    ...[one.symbol, symbolsTex(one), numbersTex(one, 'metric'), numbersTex(one, 'us')].flatMap(unsettable),
  ];
}

const isAmbiguous = ({ parts }: Trace): boolean => {
  const values = new Map<string, number>();
  return parts.some(({ name, trace }) => {
    const isOther = (values.get(name) ?? trace.value) !== trace.value;
    values.set(name, trace.value);
    return isOther;
  });
};

const settable = new Set<string>();

function unsettable(tex: string): string[] {
  if (settable.has(tex)) return [];
  try {
    katex.renderToString(tex, { throwOnError: true, strict: 'error' });
    settable.add(tex);
    return [];
  } catch (error) {
    return [`${tex}: ${String(error)}`];
  }
}
