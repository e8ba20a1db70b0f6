import { add, type Expression, negate, ZERO } from '../chart/index';
import { evaluate } from '../polynomial/index';
import { placeWords } from './display';
import type { NamedBeam, NamedSupport } from './named-beam';
import { placeTex } from './spot';
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
      scale: 'base',
      ...(isNegative(beam, equation.value) &&
        equation.support && { extra: { note: noteOf(equation, kind) } }),
    });
    beam.letters.define(equation.tex, beam.letters.of(equation.value), kind);
    return step;
  });
}

/** Below zero, and not what rounding leaves of a difference. */
function isNegative({ letters }: NamedBeam, value: Expression): boolean {
  return letters.of(value) < -1e-9 * letters.largest(value);
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

/** The moments over the supports that are not found already; defines their letters. */
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
    if (beam.letters.has(supportMomentTex(support))) return [];
    if (jumpsAt(beam, support)) {
      return (['left', 'right'] as const).map((side) =>
        moment(
          beam,
          `${letter}-${side}`,
          `Moment just ${side} of ${letter}`,
          supportMomentTex(support, side),
          momentAt(beam, parts, support, side),
        ),
      );
    }
    return [supportMoment(beam, support, momentAt(beam, parts, support))];
  });
}

/** The moments on both sides of each couple that stands clear of the supports, and at an end that one is put on. */
export function coupleMomentSteps({ beam, parts }: Worked): DerivationStep[] {
  const places = new Map<number, { at: Expression; m: Expression }>();
  for (const { numeric, fine } of beam.groups) {
    const [load] = fine;
    if (load?.kind !== 'couple' || numeric.kind !== 'couple') continue;
    const { at, m } = places.get(numeric.at) ?? { at: load.at, m: ZERO };
    places.set(numeric.at, { at, m: add(m, load.m) });
  }
  return [...places].flatMap(([x, { at, m }]) => {
    const support = beam.supports.find((each) => each.x === x);
    const where = support?.letter ?? placeTex(beam, at);
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
        `Moment just ${side} of the couple, ${placeWords(x, beam.letters.units.of('length', 'base'))}`,
        `M_{${where},\\mathrm{${side}}}`,
        momentAt(beam, parts, { x, at }, side),
      ),
    );
  });
}

const jumpsAt = (beam: NamedBeam, { x, support }: NamedSupport): boolean =>
  support.rotation.kind !== 'free' ||
  beam.groups.some(({ numeric }) => numeric.kind === 'couple' && numeric.at === x);

/** M_B, or M_B just left or right of a support where it jumps. */
export const supportMomentTex = ({ letter }: NamedSupport, side?: 'left' | 'right'): string =>
  side ? `M_{${letter},\\mathrm{${side}}}` : `M_{${letter}}`;

export const supportMoment = (
  beam: NamedBeam,
  support: NamedSupport,
  expression: Expression,
): DerivationStep =>
  moment(beam, support.letter, `Moment over ${support.letter}`, supportMomentTex(support), expression);

function moment(
  beam: NamedBeam,
  id: string,
  title: string,
  left: string,
  expression: Expression,
): DerivationStep {
  const step = calculate(beam.letters, {
    id: `moment-${id}`,
    title,
    left,
    expression,
    kind: 'moment',
    scale: 'base',
  });
  beam.letters.define(left, beam.letters.of(expression), 'moment');
  return step;
}
