import { divide, type Expression, multiply, power, subtract, symbol, texOf } from '../chart/index';
import { display } from './display';
import { arithmetic, calculate, fewest } from './step';
import { type Letters, numberTex } from './symbols';
import type { DerivationStep } from './types';
import { inUnit, type Kind, toSi, unitTex } from './units';
import { acts, flexibilityTex, type Unknown } from './unknown';
import { nameForce, negativeNote } from './words';

/** Equations Σ c_ij X_j = d_i for the redundants, in letters. */
export type System = {
  letters: Letters;
  unknowns: readonly Unknown[];
  values: readonly number[];
  /** c_ij; null for nothing. */
  coefficients: readonly (readonly (string | null)[])[];
  rights: readonly Expression[];
  /** What is added up in each equation. */
  kinds: readonly Kind[];
};

/** How an unknown comes out of a step. */
const found = ({ values, unknowns }: System, unknown: Unknown, i: number) => ({
  id: `redundant-${unknown.key}`,
  left: unknown.tex,
  kind: acts(unknown),
  scale: 'handed' as const,
  value: values[i]!,
  beside: Math.max(...values.filter((_, j) => acts(unknowns[j]!) === acts(unknown)).map(Math.abs)),
  extra: {
    key: true as const,
    figure: { structure: 'built' as const },
    ...(values[i]! < 0 && { note: negativeNote(unknown) }),
  },
});

/** Two equations by determinants, three by elimination. The letters of the unknowns are defined already. */
export function solutionSteps(system: System): DerivationStep[] {
  const { unknowns } = system;
  if (unknowns.length === 2) return unknowns.map((unknown, i) => byDeterminants(system, unknown, i));
  return byElimination(system);
}

const letter = (system: System, i: number, j: number): Expression => {
  const tex = system.coefficients[i]![j];
  return tex ? symbol(tex) : [];
};

function byDeterminants(system: System, unknown: Unknown, i: number): DerivationStep {
  const o = 1 - i;
  const c = (row: number, column: number) => letter(system, row, column);
  const [own, other] = [system.rights[i]!, system.rights[o]!];
  const isApart = system.coefficients[i]![o] === null;
  const top = subtract(multiply(own, c(o, o)), multiply(other, c(i, o)));
  const bottom = subtract(multiply(c(i, i), c(o, o)), multiply(c(i, o), c(o, i)));
  return calculate(system.letters, {
    ...found(system, unknown, i),
    title: `${nameForce(unknown)}, from the ${isApart ? 'equation' : 'two equations'}`,
    expression: multiply(isApart ? own : top, power(isApart ? c(i, i) : bottom, -1)),
    isRule: true,
  });
}

/** One unknown after another taken out of the equations below it, then back up. */
function byElimination(system: System): DerivationStep[] {
  const steps: DerivationStep[] = [];
  let left = system;
  for (let k = 0; k < system.unknowns.length - 1; k++) {
    const { step, reduced } = eliminate(left, k);
    left = reduced;
    if (step) steps.push(step);
  }
  for (let i = system.unknowns.length - 1; i >= 0; i--) {
    const known = system.unknowns.map((unknown, j) =>
      j > i ? multiply(letter(left, i, j), symbol(unknown.tex)) : [],
    );
    const right = known.reduce<Expression>((sum, term) => subtract(sum, term), left.rights[i]!);
    steps.push(
      calculate(system.letters, {
        ...found(system, system.unknowns[i]!, i),
        title: `${nameForce(system.unknowns[i]!)}, from equation ${i + 1}`,
        expression: multiply(right, power(letter(left, i, i), -1)),
        isRule: true,
      }),
    );
  }
  return steps;
}

/** c'_ij = c_ij − c_ik c_kj / c_kk for the equations below k, which lose X_k. */
function eliminate(system: System, k: number): { step: DerivationStep | null; reduced: System } {
  const { letters, unknowns, kinds } = system;
  const coefficients = system.coefficients.map((row) => [...row]);
  const rights = [...system.rights];
  const lines: Line[] = [];
  const pivot = letter(system, k, k);
  const reduce = (value: Expression, of: Expression, i: number) =>
    subtract(value, divide(multiply(letter(system, i, k), of), pivot));
  for (let i = k + 1; i < unknowns.length; i++) {
    if (coefficients[i]![k] === null) continue;
    for (let j = k + 1; j < unknowns.length; j++) {
      if (coefficients[k]![j] === null) continue;
      const value = reduce(letter(system, i, j), letter(system, k, j), i);
      const kind = coefficientKind(letters, system, i, j);
      coefficients[i]![j] = newLetter(
        letters,
        system.coefficients[i]![j] ?? flexibilityTex(unknowns[i]!, unknowns[j]!),
        value,
        kind,
        lines,
      );
    }
    const kind = kinds[i]!;
    rights[i] = symbol(
      newLetter(letters, `d_{${unknowns[i]!.index}}`, reduce(rights[i]!, rights[k]!, i), kind, lines),
    );
    coefficients[i]![k] = null;
  }
  const reduced = { ...system, coefficients, rights };
  return { step: lines.length > 0 ? lineStep(letters, unknowns[k]!, k, lines) : null, reduced };
}

const ORDINALS = ['first', 'second'];

type Line = { tex: string; expression: Expression; kind: Kind };

/** A primed letter for the value; again primed where it is already. */
function newLetter(letters: Letters, tex: string, value: Expression, kind: Kind, lines: Line[]): string {
  const [, head = tex, primes = '', index = ''] = /^([a-zA-Z]+)('*)(.*)$/.exec(tex) ?? [];
  let primed = `${head}${primes}'${index}`;
  while (letters.has(primed)) primed = primed.replace(head, `${head}'`);
  letters.define(primed, letters.of(value), kind);
  lines.push({ tex: primed, expression: value, kind });
  return primed;
}

function coefficientKind(
  letters: Letters,
  { coefficients, kinds, unknowns }: System,
  i: number,
  j: number,
): Kind {
  const known = coefficients[i]![j];
  if (known) return letters.letter(known).kind;
  return kinds[i] === 'load term' ? 'length' : (`${kinds[i]} per ${acts(unknowns[j]!)}` as Kind);
}

function lineStep(letters: Letters, unknown: Unknown, k: number, lines: readonly Line[]): DerivationStep {
  const symbols = lines.map(({ tex, expression }) => `${tex}&=${texOf(expression, letters.symbols())}`);
  const numbers = lines.map(({ tex, expression, kind }) => {
    const { numbers: own, result } = arithmetic(letters, { kind, scale: 'handed' }, expression);
    return `${tex}&=${own === result ? own : `${own}=${result}`}`;
  });
  return {
    id: `elimination-${k + 1}`,
    title: `The ${nameForce(unknown, 'within')} taken out of the equations below the ${ORDINALS[k]}`,
    symbols: aligned(symbols),
    numbers: aligned(numbers),
    value: null,
    unit: '',
    display: '',
  };
}

/** Lines under one another, with room for their fractions. */
export const aligned = (lines: readonly string[]): string =>
  `\\begin{aligned}${lines.join('\\\\[3pt]')}\\end{aligned}`;

/** The equations with numbers, to as many figures as it takes until they give the redundants as they are shown. */
export function equationsTex(system: System): string {
  const { unknowns, rights, letters, kinds } = system;
  const { coefficients, right } = numbersOf(system);
  return aligned(
    unknowns.map((_, i) => {
      const terms = coefficients[i]!.flatMap((c, j) =>
        c === 0
          ? []
          : [`${c < 0 ? '-' : '+'}${Math.abs(c) === 1 ? '' : numberTex(Math.abs(c))}${unknowns[j]!.tex}`],
      );
      const unit = unitTex(letters.units.of(kinds[i]!, 'handed'));
      return `${terms.join('').replace(/^\+/, '')}&=${rights[i]!.length === 0 ? '0' : `${numberTex(right[i]!)}\\,${unit}`}`;
    }),
  );
}

/** The numbers of the equations, rounded as little as they may be; in the units of the handed scale. */
export function numbersOf(system: System): { coefficients: number[][]; right: number[] } {
  const at = (figures: number) => rounded(system, figures);
  return at(fewest((figures) => givesThem(system, at(figures))) ?? 10);
}

function rounded({ letters, coefficients, rights, kinds }: System, figures: number) {
  return {
    coefficients: coefficients.map((row) =>
      row.map((tex) => (tex ? letters.shown(tex, 'handed', figures) : 0)),
    ),
    right: rights.map((right, i) =>
      Number(inUnit(letters.of(right), letters.units.of(kinds[i]!, 'handed')).toPrecision(figures)),
    ),
  };
}

/** Whether the rounded equations give every unknown as it is displayed. */
function givesThem(
  { letters, unknowns, values }: System,
  { coefficients, right }: { coefficients: number[][]; right: number[] },
): boolean {
  return solve(coefficients, right).every((value, i) => {
    const kind = acts(unknowns[i]!);
    const unit = letters.units.of(kind, 'handed');
    const alike = values.filter((_, j) => acts(unknowns[j]!) === kind);
    const largest = Math.max(...alike.map(Math.abs));
    return display(toSi(value, unit), unit, largest) === display(values[i]!, unit, largest);
  });
}

/** A small system by elimination with the largest pivot; only to choose how many figures are written. */
function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  const n = rows.length;
  for (let k = 0; k < n; k++) {
    const best = rows
      .slice(k)
      .reduce((b, row, r) => (Math.abs(row[k]!) > Math.abs(rows[b]![k]!) ? k + r : b), k);
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
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
  return x;
}
