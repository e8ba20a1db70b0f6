import { divide, type Expression, simplest, symbol, texOf } from '../chart/index';
import { imposedOf, rightSide } from './coefficients';
import { matrixStep, matrixSteps } from './matrix';
import { expressionOf } from './movement';
import { flexibilityKind, gapKind, type Movements } from './movements';
import { calculate } from './step';
import { aligned, equationsTex, type System, solutionSteps } from './system';
import type { DerivationStep } from './types';
import { acts, flexibilityTex, gapTex } from './unknown';
import type { Worked } from './values';
import { compatibilityTitle, countWord, negativeNote, sentence } from './words';

/** Up to so many redundants every coefficient has a step of its own, and their solution too; beyond, matrices. */
export const FEW = 3;

/** The equations that close the gaps and the redundants that follow; defines the redundants' letters. */
export function compatibilitySteps(worked: Worked, movements: Movements): DerivationStep[] {
  defineRedundants(worked);
  const { unknowns } = worked;
  if (unknowns.length === 1) return [single(worked), ...closedForm(worked, movements)];
  if (unknowns.length > FEW) defineCoefficients(worked);
  const system = systemOf(worked);
  if (unknowns.length > FEW) return matrixSteps(worked, system);
  return [matrixStep(worked, system), equationStep(worked, system), ...solutionSteps(system)];
}

export function defineRedundants({ beam, unknowns, values }: Worked): void {
  unknowns.forEach((unknown, i) => {
    beam.letters.define(unknown.tex, values[i]!, acts(unknown));
  });
}

/** The letters of what has no step of its own. */
function defineCoefficients({ beam, unknowns, gaps, flexibility }: Worked): void {
  unknowns.forEach((at, i) => {
    beam.letters.define(gapTex(at), gaps[i]!, gapKind(at));
    unknowns.forEach((unit, j) => {
      beam.letters.define(flexibilityTex(at, unit), flexibility[i]![j]!, flexibilityKind(at, unit));
    });
  });
}

/** δ_B0 − R_B f_BB = 0  ⇒  R_B = δ_B0 / f_BB */
function single(worked: Worked): DerivationStep {
  const { beam, unknowns, imposed, values } = worked;
  const unknown = unknowns[0]!;
  const right = rightSide(worked, 0);
  const gapTerms = texOf(right, beam.letters.symbols());
  const fraction = `\\dfrac{${gapTerms.replace(/^-/, '')}}{${flexibilityTex(unknown, unknown)}}`;
  return calculate(beam.letters, {
    id: 'compatibility',
    title: compatibilityTitle(unknown, imposed[0]!),
    left: `${equationTex(worked, 0)}\\quad\\Rightarrow\\quad ${unknown.tex}`,
    symbols: gapTerms.startsWith('-') ? `-${fraction}` : fraction,
    expression: divide(right, symbol(flexibilityTex(unknown, unknown))),
    value: values[0]!,
    kind: acts(unknown),
    scale: 'handed',
    extra: {
      key: true,
      figure: { structure: 'built' },
      ...(values[0]! < 0 && { note: negativeNote(unknown) }),
    },
  });
}

/** δ_B0 − R_B f_BB − R_C f_BC = Δ_B, or θ_B0 + M_B f_BB = 0 */
function equationTex({ beam, unknowns, flexibility }: Worked, i: number): string {
  const at = unknowns[i]!;
  const sign = at.kind === 'internal' ? '+' : '-';
  const terms = unknowns.flatMap((unit, j) =>
    flexibility[i]![j] === 0 ? [] : [`${sign}${unit.tex}${flexibilityTex(at, unit)}`],
  );
  const imposed = imposedOf(at);
  return `${gapTex(at)}${terms.join('')}=${imposed ? texOf(imposed, beam.letters.symbols()) : '0'}`;
}

/** A formula of more signs than this is not read. */
const READABLE = 150;

/** The redundant as one formula of lengths and loads, where closed forms give all of it. */
function closedForm(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns, values } = worked;
  const unknown = unknowns[0]!;
  const [gap, flexibility] = [expressionOf(movements.gap(0)), expressionOf(movements.flexibility(0, 0))];
  if (!gap || !flexibility) return [];
  const imposed = imposedOf(unknown) ?? [];
  const expression = redundantFrom(gap, imposed, flexibility, unknown.kind === 'internal');
  if (!expression || texOf(expression, beam.letters.symbols()).length > READABLE) return [];
  return [
    calculate(beam.letters, {
      id: 'closed-form',
      title: 'The same in one formula',
      left: unknown.tex,
      expression,
      value: values[0]!,
      kind: acts(unknown),
      scale: 'base',
    }),
  ];
}

function redundantFrom(
  gap: Expression,
  imposed: Expression,
  flexibility: Expression,
  isInternal: boolean,
): Expression | null {
  const right = isInternal
    ? simplest(gap.map((term) => negated(term)))
    : simplest([...gap, ...imposed.map(negated)]);
  try {
    return simplest(divide(right, simplest(flexibility)));
  } catch (cause) {
    // L³/3EI beside L/GA: a sum of fractions has no reciprocal that would read as a formula.
    if (cause instanceof RangeError) return null;
    throw cause;
  }
}

const negated = (term: Expression[number]): Expression[number] => ({
  ...term,
  coefficient: { ...term.coefficient, n: -term.coefficient.n },
});

function systemOf(worked: Worked): System {
  const { beam, unknowns, values, flexibility } = worked;
  return {
    letters: beam.letters,
    unknowns,
    values,
    coefficients: unknowns.map((at, i) =>
      unknowns.map((unit, j) => (flexibility[i]![j] === 0 ? null : flexibilityTex(at, unit))),
    ),
    rights: unknowns.map((_, i) => rightSide(worked, i)),
    kinds: unknowns.map(gapKind),
  };
}

/** All equations at once, with symbols and with numbers. */
function equationStep(worked: Worked, system: System): DerivationStep {
  const { unknowns } = worked;
  const hasImposed = unknowns.some((unknown) => imposedOf(unknown) !== null);
  return {
    id: 'compatibility',
    title: `${sentence(countWord(unknowns.length))} movements must ${hasImposed ? 'be those of the supports' : 'vanish'} at once`,
    symbols: aligned(unknowns.map((_, i) => equationTex(worked, i).replace('=', '&='))),
    numbers: equationsTex(system),
    value: null,
    unit: '',
    display: '',
    figure: { structure: 'built' },
  };
}
