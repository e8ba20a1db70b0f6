import {
  add,
  divide,
  type Expression,
  multiply,
  negate,
  power,
  subtract,
  symbol,
  texOf,
  ZERO,
} from '../chart/index';
import { withUnit } from './display';
import { FEW, imposedLetter, type Movements, rightSide } from './redundants';
import { calculate } from './step';
import { numberTex, unitOf } from './symbols';
import type { DerivationStep } from './types';
import { flexibilityTex, gapTex, moves, type Unknown } from './unknown';
import type { Worked } from './values';
import { compatibilityTitle, countWord, nameForce, negativeNote, sentence } from './words';

/** The equations that close the gaps and the redundants that follow; defines the redundants' letters. */
export function compatibilitySteps(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns, values } = worked;
  unknowns.forEach((unknown, i) => {
    beam.letters.define(unknown.tex, values[i]!, unknown.kind === 'reaction' ? 'force' : 'moment');
  });
  if (unknowns.length === 1) return [single(worked), ...closedForm(worked, movements)];
  return [system(worked), ...unknowns.map((_, i) => solved(worked, i))];
}

const kindOf = ({ kind }: Unknown) => (kind === 'reaction' ? 'force' : 'moment') as 'force' | 'moment';

/** δ_B0 − R_B f_BB = 0  ⇒  R_B = δ_B0 / f_BB */
function single(worked: Worked): DerivationStep {
  const { beam, unknowns, imposed, values } = worked;
  const [unknown] = unknowns as [Unknown];
  const expression = divide(rightSide(worked, 0), symbol(flexibilityTex(unknown, unknown)));
  const equation = equationTex(worked, 0);
  const gapTerms = texOf(rightSide(worked, 0), beam.letters.symbols());
  const fraction = `\\dfrac{${gapTerms.replace(/^-/, '')}}{${flexibilityTex(unknown, unknown)}}`;
  return calculate(beam.letters, {
    id: 'compatibility',
    title: compatibilityTitle(unknown, imposed[0]!),
    left: `${equation}\\quad\\Rightarrow\\quad ${unknown.tex}`,
    symbols: gapTerms.startsWith('-') ? `-${fraction}` : fraction,
    expression,
    kind: kindOf(unknown),
    scale: 'milli',
    extra: {
      key: true,
      figure: { structure: 'built' },
      ...(values[0]! < 0 && { note: negativeNote(unknown) }),
    },
  });
}

/** δ_B0 − R_B f_BB − R_C f_BC = Δ_B, or θ_B0 + M_B f_BB = 0 */
function equationTex({ beam, unknowns, flexibility, imposed }: Worked, i: number): string {
  const at = unknowns[i]!;
  const sign = at.kind === 'internal' ? '+' : '-';
  const terms = unknowns.flatMap((unit, j) =>
    flexibility[i]![j] === 0 ? [] : [`${sign}${unit.tex}${flexibilityTex(at, unit)}`],
  );
  const right = imposed[i] === 0 ? '0' : texOf(imposedLetter(at), beam.letters.symbols());
  return `${gapTex(at)}${terms.join('')}=${right}`;
}

/** The redundant as one formula of lengths and loads, where charts give all of it. */
function closedForm(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns } = worked;
  const [unknown] = unknowns as [Unknown];
  const [gap, flexibility] = [movements.gaps[0], movements.flexibility(0, 0)];
  if (!gap || !flexibility) return [];
  const isInternal = unknown.kind === 'internal';
  const imposed = worked.imposed[0] === 0 ? ZERO : imposedLetter(unknown);
  const right = isInternal ? negate(gap.value) : subtract(gap.value, imposed);
  let value: Expression;
  try {
    value = divide(right, flexibility.value);
  } catch (cause) {
    // 1/k beside L³/3EI: a sum of fractions has no reciprocal that would read as a formula.
    if (cause instanceof RangeError) return [];
    throw cause;
  }
  return [
    calculate(beam.letters, {
      id: 'closed-form',
      title: 'The same in one formula',
      left: unknown.tex,
      expression: value,
      kind: kindOf(unknown),
      scale: 'metre',
    }),
  ];
}

/** Terms that a set of equations with numbers may have before nobody reads it. */
const READABLE = 60;

/** All equations at once, with symbols and with numbers in mm, mrad, kN and kNm. */
function system(worked: Worked): DerivationStep {
  const { beam, unknowns, flexibility } = worked;
  const rows = unknowns.map((_, i) => equationTex(worked, i).replace('=', '&='));
  const numbers = unknowns.map((at, i) => {
    const terms = unknowns.flatMap((unit, j) => {
      const f = flexibility[i]![j]!;
      if (f === 0) return [];
      const shown = beam.letters.shown(flexibilityTex(at, unit), 'milli', 5);
      return [`${shown < 0 ? '-' : '+'}${numberTex(Math.abs(shown))}${unit.tex}`];
    });
    const right = beam.letters.of(rightSide(worked, i));
    const unit = unitOf(moves(at), 'milli');
    return `${terms.join('').replace(/^\+/, '')}&=${withUnit(right, unit)}`;
  });
  const terms = flexibility.flat().filter((f) => f !== 0).length;
  const aligned = (lines: readonly string[]) => `\\begin{aligned}${lines.join('\\\\')}\\end{aligned}`;
  return {
    id: 'compatibility',
    title: `${sentence(countWord(unknowns.length))} movements must close at once`,
    symbols: unknowns.length <= FEW ? aligned(rows) : matrixTex(worked),
    numbers: terms <= READABLE ? aligned(numbers) : '',
    value: null,
    unit: '',
    display: '',
    figure: { structure: 'built' },
  };
}

/** A matrix beyond this size would not fit a page; the equations below it show every number. */
const PRINTABLE = 6;

/** F X = d */
function matrixTex(worked: Worked): string {
  const { beam, unknowns, flexibility } = worked;
  if (unknowns.length > PRINTABLE) return '\\mathbf{F}\\,\\mathbf{X}=\\mathbf{d}';
  const column = (entries: readonly string[]) => `\\begin{bmatrix}${entries.join('\\\\')}\\end{bmatrix}`;
  const rows = unknowns.map((a, i) =>
    unknowns.map((b, j) => (flexibility[i]![j] === 0 ? '0' : flexibilityTex(a, b))).join('&'),
  );
  const right = unknowns.map((_, i) => texOf(rightSide(worked, i), beam.letters.symbols()));
  return `${column(rows)}${column(unknowns.map(({ tex }) => tex))}=${column(right)}`;
}

/** One redundant of several: by determinants for two, else by its row of the inverse of F. */
function solved(worked: Worked, i: number): DerivationStep {
  const { beam, unknowns, values } = worked;
  const unknown = unknowns[i]!;
  const note = values[i]! < 0 ? { note: negativeNote(unknown) } : {};
  const common = {
    id: `redundant-${unknown.index.replace('\\', '')}`,
    title: `${nameForce(unknown)}, from the equations`,
    left: unknown.tex,
    kind: kindOf(unknown),
    scale: 'milli' as const,
    extra: { key: true as const, ...note },
  };
  if (unknowns.length > FEW) {
    // The row of the inverse, multiplied out, would be longer than it is worth.
    const letter = symbol(unknown.tex);
    return calculate(beam.letters, {
      ...common,
      symbols: `\\left(\\mathbf{F}^{-1}\\mathbf{d}\\right)_{${i + 1}}`,
      expression: letter,
    });
  }
  const expression = unknowns.length === 2 ? byDeterminants(worked, i) : byInverse(worked, i);
  return calculate(beam.letters, { ...common, expression, value: values[i]! });
}

function byDeterminants(worked: Worked, i: number): Expression {
  const { unknowns, flexibility } = worked;
  const [at, other] = [unknowns[i]!, unknowns[1 - i]!];
  const f = (a: Unknown, b: Unknown) => symbol(flexibilityTex(a, b));
  const [first, second] = unknowns as [Unknown, Unknown];
  const shared = flexibility[0]![1] === 0 ? ZERO : f(first, second);
  const top = subtract(
    multiply(rightSide(worked, i), f(other, other)),
    multiply(rightSide(worked, 1 - i), shared),
  );
  const bottom = subtract(multiply(f(at, at), f(other, other)), power(shared, 2));
  return multiply(top, power(bottom, -1));
}

/** k_ij of F⁻¹ as letters of their own, so that the row can be multiplied out by hand. */
function byInverse(worked: Worked, i: number): Expression {
  const { beam, unknowns, flexibility } = worked;
  const row = solveRow(flexibility, i);
  return unknowns.reduce<Expression>((sum, at, j) => {
    if (row[j] === 0) return sum;
    const tex = `k_{${unknowns[i]!.index}${at.index}}`;
    const kind = `${kindOf(unknowns[i]!)} per ${moves(at)}` as const;
    return add(sum, multiply(beam.letters.define(tex, row[j]!, kind), rightSide(worked, j)));
  }, ZERO);
}

/** Row i of the inverse of a small symmetric positive definite matrix, by Gauss elimination; only for display. */
function solveRow(matrix: readonly (readonly number[])[], i: number): number[] {
  const n = matrix.length;
  const scale = matrix.map((row, k) => 1 / Math.sqrt(row[k]!));
  const rows = matrix.map((row, k) => [
    ...row.map((value, j) => value * scale[k]! * scale[j]!),
    k === i ? scale[i]! : 0,
  ]);
  for (let k = 0; k < n; k++) {
    for (let r = k + 1; r < n; r++) {
      const factor = rows[r]![k]! / rows[k]![k]!;
      for (let c = k; c <= n; c++) rows[r]![c]! -= factor * rows[k]![c]!;
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let k = n - 1; k >= 0; k--) {
    const known = x.reduce((sum, value, c) => (c > k ? sum + rows[k]![c]! * value : sum), 0);
    x[k] = (rows[k]![n]! - known) / rows[k]![k]!;
  }
  return x.map((value, k) => value * scale[k]!);
}
