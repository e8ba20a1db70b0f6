import { add, type Expression, negate, texOf, ZERO } from '../chart/index';
import { evaluate } from '../polynomial/index';
import type { NamedBeam, NamedSupport } from './named-beam';
import { type Equilibrium, equilibrium, momentAt } from './statics';
import { calculate } from './step';
import type { DerivationStep } from './types';
import { fixingTex } from './unknown';
import type { Worked } from './values';

/** The reactions that equilibrium gives, each from one equation; defines their letters. */
export function reactionSteps(worked: Worked): DerivationStep[] {
  const { beam, unknowns } = worked;
  const internal = unknowns.some(({ kind }) => kind === 'internal');
  const whole = beam.hinges.length === 0 && !internal;
  return equilibrium(beam, worked.parts, unknowns).map((equation) => {
    const kind = equation.support && equation.tex === fixingTex(equation.support) ? 'moment' : 'force';
    const step = calculate(beam.letters, {
      id: `equilibrium-${equation.tex.replaceAll(/[^A-Za-z0-9]/g, '')}`,
      title: titleOf(beam, equation, whole),
      left: equation.tex,
      expression: equation.value,
      kind,
      scale: 'metre',
      ...(isNegative(beam, equation.value) &&
        equation.support && { extra: { note: noteOf(equation, kind) } }),
    });
    beam.letters.define(equation.tex, beam.letters.of(equation.value), kind);
    return step;
  });
}

/** Below zero, and not what rounding leaves of a difference. */
function isNegative({ letters }: NamedBeam, value: Expression): boolean {
  const largest = Math.max(0, ...value.map((term) => Math.abs(letters.of([term]))));
  return letters.of(value) < -1e-9 * largest;
}

function noteOf({ support }: Equilibrium, kind: 'force' | 'moment'): string {
  return kind === 'force'
    ? `Negative: the support at ${support?.letter} must hold the beam down.`
    : `Negative: the moment at ${support?.letter} acts the other way than assumed.`;
}

function titleOf(beam: NamedBeam, { about, part, support, tex }: Equilibrium, whole: boolean): string {
  const point = about && (beam.supports.find(({ x }) => x === about.x)?.letter ?? 'the hinge');
  const equation = about ? `Moments about ${point}` : 'Vertical equilibrium';
  const of = whole ? '' : ` of ${nameLength(beam, part)}`;
  if (support) return `${equation}${of}`;
  const [, section = ''] = /\{(.*)\}/.exec(tex) ?? [];
  return `${equation}${of}: the shear right of ${section.startsWith('h') ? 'the hinge' : section}`;
}

/** "the part from A to C" */
function nameLength(beam: NamedBeam, { from, to }: { from: number; to: number }): string {
  const name = (x: number) => {
    const support = beam.supports.find((s) => s.x === x);
    if (support) return support.letter;
    if (x === 0) return 'the left end';
    return x === beam.beam.length ? 'the right end' : 'the hinge';
  };
  return `the part from ${name(from)} to ${name(to)}`;
}

/** The moments over the supports that are no unknowns of the derivation already; defines nothing. */
export function supportMomentSteps(worked: Worked): DerivationStep[] {
  const { beam, unknowns, parts, solution } = worked;
  const largest = Math.max(
    Math.abs(solution.extremes.moment.max.value),
    Math.abs(solution.extremes.moment.min.value),
  );
  return beam.supports.flatMap((support) => {
    const { x, letter } = support;
    const isEnd = x === 0 || x === beam.beam.length;
    const isFound = unknowns.some((unknown) => unknown.kind === 'internal' && unknown.x === x);
    const [left, right] = evaluate(solution.diagrams.moment, x);
    const isNothing = Math.max(Math.abs(left), Math.abs(right)) <= 1e-9 * largest;
    if (isEnd || isFound || isNothing || beam.beam.hinges.includes(x)) return [];
    if (jumpsAt(beam, support)) {
      return (['left', 'right'] as const).map((side) =>
        moment(
          beam,
          `${letter}-${side}`,
          `Moment just ${side} of ${letter}`,
          `M_{${letter},\\mathrm{${side}}}`,
          momentAt(beam, parts, support, side),
        ),
      );
    }
    return [moment(beam, letter, `Moment over ${letter}`, `M_{${letter}}`, momentAt(beam, parts, support))];
  });
}

/** The moments on both sides of each couple that stands clear of the supports, and at an end that one is put on. */
export function coupleMomentSteps({ beam, parts }: Worked): DerivationStep[] {
  const places = new Map<number, { at: Expression; m: Expression }>();
  for (const { load, numeric } of beam.loads) {
    if (load.kind !== 'couple' || numeric.kind !== 'couple') continue;
    const { at, m } = places.get(numeric.at) ?? { at: load.at, m: ZERO };
    places.set(numeric.at, { at, m: add(m, load.m) });
  }
  return [...places].flatMap(([x, { at, m }]) => {
    const support = beam.supports.find((each) => each.x === x);
    const where = support?.letter ?? nameOf(beam, at);
    const id = `couple-${x.toFixed(3)}`;
    if (x === 0 || x === beam.beam.length) {
      if (support && support.support.rotation.kind !== 'free') return [];
      const name = support?.letter ?? `the ${x === 0 ? 'left' : 'right'} end`;
      const sagging = x === 0 ? negate(m) : m;
      return [moment(beam, id, `Moment at ${name}: the couple put on there`, `M_{${where}}`, sagging)];
    }
    if (support) return [];
    return (['left', 'right'] as const).map((side) =>
      moment(
        beam,
        `${id}-${side}`,
        `Moment just ${side} of the couple at ${Number(x.toFixed(3))} m`,
        `M_{${where},\\mathrm{${side}}}`,
        momentAt(beam, parts, { x, at }, side),
      ),
    );
  });
}

const jumpsAt = (beam: NamedBeam, { x, support }: NamedSupport): boolean =>
  support.rotation.kind !== 'free' ||
  beam.loads.some(({ numeric }) => numeric.kind === 'couple' && numeric.at === x);

function moment(
  beam: NamedBeam,
  id: string,
  title: string,
  left: string,
  expression: Expression,
): DerivationStep {
  return calculate(beam.letters, {
    id: `moment-${id}`,
    title,
    left,
    expression,
    kind: 'moment',
    scale: 'metre',
  });
}

/** A place as it stands within brackets or below the line. */
const nameOf = (beam: NamedBeam, place: Expression): string =>
  texOf(place, beam.letters.symbols()).replaceAll('\\dfrac', '\\tfrac');

/** The largest sagging moment, where it is within a span: where the shear is zero. */
export function peakStep(worked: Worked): DerivationStep[] {
  const { beam, solution } = worked;
  const { value, at } = solution.extremes.moment.max;
  const x = at[0]!;
  const isPlain = !beam.beam.hinges.includes(x) && !beam.supports.some((s) => s.x === x);
  if (value <= 0 || x === 0 || x === beam.beam.length || !isPlain) return [];
  if (beam.loads.some(({ numeric }) => numeric.kind === 'couple' && numeric.at === x)) return [];
  const place = beam.places.find(x) ?? beam.places.give(x, beam.letters.define('x_m', x, 'length'));
  const where = nameOf(beam, place);
  return [
    calculate(beam.letters, {
      id: 'largest-moment',
      title: `Largest sagging moment, ${Number(x.toFixed(3))} m from the left end`,
      left: `M(${where})`,
      expression: momentAt(beam, worked.parts, { x, at: place }),
      value,
      kind: 'moment',
      scale: 'metre',
    }),
  ];
}
