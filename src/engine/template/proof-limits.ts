/** Every parameter at its ends, every choice at each of its values, and lengths that vanish. */
import { type Beam, type BeamDocument, readBeam } from '../model/index';
import { evaluate, type Piecewise } from '../polynomial/index';
import { relative, type Scales, scalesOf } from '../proof/index';
import { solveStiffness } from '../stiffness/index';
import type { Template } from './document';
import { limitsOf } from './measured';
import type { Parameter, RowsParameter } from './parts';
import { type BoxPoint, defaultPoint, type Stated } from './proof-box';
import { sampleDifference, sampleOf } from './proof-laws';
import { compareForms, type SolvedPoint, solvePoint } from './proof-solve';

/** One parameter held at one value: "a" at "0 m", "w" at the value "both", "loads" with their fewest rows. */
type LimitTask = {
  readonly symbol: string;
  /** Of a list of rows: the column that is held, in all of its rows. */
  readonly column?: string;
  readonly held: string;
  readonly hold: (stated: Stated | undefined) => Stated | undefined;
};

export type Limit = {
  readonly symbol: string;
  readonly column?: string;
  /** The value as the template's author wrote it. */
  readonly held: string;
  /** Refused: block rules let in no point at this value. */
  readonly state: 'proven' | 'refused' | 'failed';
  readonly message?: string;
  /** Where it was held; not of one that is refused everywhere. */
  readonly at?: BoxPoint;
  /**
   * Of a length at zero, as shares of the largest values: how far the result is from that of the beam without what has
   * no length; and from that at a millionth of the beam's length, of what the loads could do.
   */
  readonly without?: number;
  readonly near?: number;
};

/** Every limit test of a template, in the order of its parameters. */
export const limitTasks = (template: Template): readonly LimitTask[] =>
  template.parameters.flatMap((parameter) => tasksOf(parameter));

const ENDS = ['min', 'max'] as const;

function tasksOf(parameter: Parameter): LimitTask[] {
  const { symbol } = parameter;
  if (parameter.kind === 'quantity')
    return ENDS.map((end) => ({ symbol, held: parameter[end], hold: () => parameter[end] }));
  if (parameter.kind === 'choice')
    return parameter.options.map(({ value }) => ({ symbol, held: value, hold: () => value }));
  return [...countTasks(parameter), ...columnTasks(parameter)];
}

const ROWS_AT_MOST = 12;

function countTasks(parameter: RowsParameter): LimitTask[] {
  const { symbol, least, most } = parameter;
  const first = Object.fromEntries(parameter.columns.map((column) => [column.symbol, column.default]));
  return [least, Math.min(most, ROWS_AT_MOST)].map((count) => ({
    symbol,
    held: `${count} ${count === 1 ? 'row' : 'rows'}`,
    hold: (stated) => {
      const rows = typeof stated === 'object' ? stated : [];
      return Array.from({ length: count }, (_, k) => rows[k % Math.max(1, rows.length)] ?? first);
    },
  }));
}

const columnTasks = ({ symbol, columns }: RowsParameter): LimitTask[] =>
  columns.flatMap((column) =>
    column.kind === 'quantity'
      ? ENDS.map((end) => ({
          symbol,
          column: column.symbol,
          held: column[end],
          hold: (stated: Stated | undefined) =>
            typeof stated === 'object' && stated.length > 0
              ? stated.map((row) => ({ ...row, [column.symbol]: column[end] }))
              : undefined,
        }))
      : [],
  );

/** Points of the box that are tried until block rules let one in with the parameter at its limit. */
const TRIES = 240;

/** What the other parameters are held at: their defaults; all lengths at their ends; then points of the box. */
function* bases(template: Template, box: (index: number) => BoxPoint): Generator<BoxPoint> {
  const defaults = defaultPoint(template);
  yield defaults;
  for (const end of ENDS) {
    const lengths = template.parameters.flatMap((one): [string, string][] =>
      one.kind === 'quantity' && one.dimension === 'length' ? [[one.symbol, one[end]]] : [],
    );
    yield { ...defaults, parameters: { ...defaults.parameters, ...Object.fromEntries(lengths) } };
  }
  for (let index = 0; index < TRIES; index++) yield box(index);
}

/** Holds the parameter at its limit, with the first values of the others that block rules let in beside it. */
export function proveLimit(template: Template, task: LimitTask, box: (index: number) => BoxPoint): Limit {
  const { hold, ...named } = task;
  let refusal = '';
  for (const base of bases(template, box)) {
    const value = hold(base.parameters[task.symbol]);
    if (value === undefined) continue;
    const at = { ...base, parameters: { ...base.parameters, [task.symbol]: value } };
    const reading = solvePoint(template, at);
    if (reading.state === 'failed') return { ...named, at, state: 'failed', message: reading.message };
    if (reading.state === 'solved') return { ...named, at, ...judge(template, task, at, reading.solved) };
    refusal ||= reading.rule;
  }
  const rule = template.rules.find(({ id }) => id === refusal);
  return { ...named, state: 'refused', message: rule?.title ?? 'There is no row to hold.' };
}

type Judged = Pick<Limit, 'state' | 'message' | 'without' | 'near'>;

function judge(template: Template, task: LimitTask, point: BoxPoint, solved: SolvedPoint): Judged {
  const wrong = compareForms(template, solved).find(({ share }) => !(share <= solved.limit));
  if (wrong) return { state: 'failed', message: `The closed form ${wrong.id} does not hold there.` };
  if (!vanishes(template, task)) return { state: 'proven' };
  const without = withoutDifference(solved);
  const near = nearDifference(template, task, point, solved);
  const shares = { without, ...(near !== null && { near }) };
  if (!(without <= solved.limit))
    return {
      state: 'failed',
      message: 'The beam without what has no length gives another result.',
      ...shares,
    };
  if (near !== null && !(near <= SMALL))
    return { state: 'failed', message: 'The result jumps as the length comes to zero.', ...shares };
  return { state: 'proven', ...shares };
}

function vanishes(template: Template, { symbol, column, held }: LimitTask): boolean {
  const parameter = template.parameters.find((one) => one.symbol === symbol);
  return (
    column === undefined &&
    parameter?.kind === 'quantity' &&
    parameter.dimension === 'length' &&
    held === parameter.min &&
    limitsOf(parameter).min === 0
  );
}

/** A share of the beam's length that is as good as nothing, and what of the results may be left of it. */
const TINY = 1e-6;
const SMALL = 1e-5;

/** The direct stiffness of the beam without what has no length, beside the result. */
function withoutDifference({ beam, solution, instance }: SolvedPoint): number {
  const reading = readBeam(withoutNothing(instance.beam));
  if (!reading.ok) return Number.POSITIVE_INFINITY;
  const check = solveStiffness(reading.value);
  const scales = scalesOf(beam, solution.reactions, check);
  const at = (diagram: Piecewise, x: number) => evaluate(diagram, x)[1];
  const { diagrams, reactions } = solution;
  return Math.max(
    ...check.pieces.flatMap(({ from, to, middle }) => {
      const x = from + (to - from) / 2;
      return [
        relative(at(diagrams.shear, x) - middle.shear, scales.force),
        relative(at(diagrams.moment, x) - middle.moment, scales.moment),
        relative(at(diagrams.slope, x) - middle.slope, scales.rotation),
        relative(at(diagrams.deflection, x) - middle.deflection, scales.deflection),
      ];
    }),
    ...check.reactions.flatMap(({ vertical, moment }, k) => [
      relative((reactions[k]?.vertical ?? Number.NaN) - vertical, scales.force),
      relative((reactions[k]?.moment ?? Number.NaN) - moment, scales.moment),
    ]),
  );
}

type Extent = { from: number; to: number };
const hasLength = ({ from, to }: Extent): boolean => to > from;

const withoutNothing = (beam: SolvedPoint['instance']['beam']): BeamDocument => ({
  ...beam,
  segments: beam.segments?.filter(hasLength),
  loads: beam.loads.filter((load) => !('from' in load) || hasLength(load)),
});

/** How far the result at a millionth of the beam's length is from the one at zero; null where a rule keeps it out. */
function nearDifference(
  template: Template,
  { symbol }: LimitTask,
  point: BoxPoint,
  { beam, solution }: SolvedPoint,
): number | null {
  const tiny = `${TINY * beam.length} m`;
  const reading = solvePoint(template, { ...point, parameters: { ...point.parameters, [symbol]: tiny } });
  if (reading.state === 'refused') return null;
  if (reading.state === 'failed') return Number.POSITIVE_INFINITY;
  const near = reading.solved;
  return sampleDifference(
    naturalScales(near.beam),
    sampleOf(solution, beam.length),
    sampleOf(near.solution, near.beam.length),
  );
}

/** What the loads and movements could do if they were spread out over the whole beam: a vanishing one does next to nothing. */
function naturalScales({ length, segments, loads, supports }: Beam): Scales {
  const softest = Math.min(...segments.map(({ ei }) => ei));
  const sum = (values: readonly number[]) => values.reduce((total, value) => total + Math.abs(value), 0);
  const force = sum(
    loads.map((load) => {
      if (load.kind === 'point') return load.p;
      if (load.kind === 'line') return Math.max(Math.abs(load.w0), Math.abs(load.w1)) * length;
      return load.kind === 'couple' ? load.m / length : 0;
    }),
  );
  const curvature = sum(loads.map((load) => (load.kind === 'curvature' ? load.kappa : 0)));
  const moved = (restraint: Beam['supports'][number]['vertical']) =>
    restraint.kind === 'free' ? 0 : restraint.movement;
  const rises = sum(supports.map(({ vertical }) => moved(vertical)));
  const turns = sum(supports.map(({ rotation }) => moved(rotation)));
  const strain = (force * length) / softest + curvature + turns / length + rises / length ** 2;
  const moment = strain * softest;
  return { force: moment / length, moment, rotation: strain * length, deflection: strain * length ** 2 };
}
