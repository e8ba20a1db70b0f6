import katex from 'katex';
import { expect } from 'vitest';
import type { DerivationStep } from '@/engine/derivation/index';
import {
  evaluateTex,
  linesOf,
  readEquation,
  readMatrix,
  readNumber,
  readShown,
  recalculate,
  solveSystem,
} from './tex-arithmetic';

/** Half a unit of the last printed digit, and what doubles leave of it. */
const HALF = 0.5001;

/** How the numbers of steps were checked. */
export type Checked = Record<'recalculated' | 'line' | 'system' | 'matrix' | 'listed', number>;
export const nothingChecked = (): Checked => ({ recalculated: 0, line: 0, system: 0, matrix: 0, listed: 0 });

/** Strict: a warning is an error. */
function parse(tex: string): void {
  katex.renderToString(tex, { throwOnError: true, strict: 'error', displayMode: true });
}

/** Writing that no person would leave: doubled signs, a factor of 1.0, a lost number, a power of a bare minus. */
const NONSENSE =
  /[+-]\s*[+-]|\b1\.0+\\times(?!10\^)|NaN|Infinity|undefined|null|--|\{\}(?!\\)|=\s*$|\\times\s*-|=\s*=/;

/** Every step's TeX parses and reads, and its numbers come to what is printed as their result. */
export function checkDerivation(
  steps: readonly DerivationStep[],
  where: string,
  checked = nothingChecked(),
): Checked {
  expect(new Set(steps.map(({ id }) => id)).size, `${where}: step ids are unique`).toBe(steps.length);
  for (const step of steps) {
    const here = `${where}, ${step.id}: ${step.symbols} = ${step.numbers}`;
    parse(step.symbols);
    if (step.numbers !== '') parse(step.numbers);
    expect(NONSENSE.test(step.symbols), here).toBe(false);
    expect(NONSENSE.test(step.numbers), here).toBe(false);
    checked[checkStep(step, steps, here)]++;
  }
  return checked;
}

function checkStep(step: DerivationStep, steps: readonly DerivationStep[], here: string): keyof Checked {
  const { numbers, id } = step;
  if (numbers === '') return 'listed';
  if (numbers.includes('bmatrix')) return checkMatrix(step, steps, here);
  if (id.startsWith('elimination')) return checkLines(step, here);
  if (id === 'compatibility' && step.value === null) return checkSystem(step, steps, here);
  checkArithmetic(step, here);
  return 'recalculated';
}

function checkArithmetic({ numbers, unit, display }: DerivationStep, here: string): void {
  const shown = readShown(display);
  const { arithmetic, result } = recalculate(numbers, unit);
  expect(Math.abs(arithmetic - shown.value), `${here} is shown as ${display} ${unit}`).toBeLessThanOrEqual(
    HALF * shown.lastDigit,
  );
  if (result !== null)
    expect(Math.abs(result - shown.value), `${here} is shown as ${display}`).toBeLessThanOrEqual(
      1.01 * shown.lastDigit,
    );
}

function checkLines({ numbers }: DerivationStep, here: string): 'line' {
  for (const { right } of linesOf(numbers)) {
    const [arithmetic = '', result = arithmetic] = right.split('=');
    const shown = readNumber(result);
    const value = evaluateTex(arithmetic.replace(/\\,\\mathrm\{.*\}$/, ''));
    expect(Math.abs(value - shown.value), `${here}: ${right}`).toBeLessThanOrEqual(HALF * shown.lastDigit);
  }
  return 'line';
}

/** The printed equations give the redundants as they are shown. */
function checkSystem({ numbers }: DerivationStep, steps: readonly DerivationStep[], here: string): 'system' {
  const equations = linesOf(numbers).map(readEquation);
  const letters = [...new Set(equations.flatMap(({ coefficients }) => [...coefficients.keys()]))];
  const found = solveSystem(
    equations.map(({ coefficients }) => letters.map((letter) => coefficients.get(letter) ?? 0)),
    equations.map(({ right }) => right),
  );
  letters.forEach((letter, i) => {
    const step = steps.find(({ key, symbols }) => key && symbols.startsWith(`${letter}=`));
    expect(step, `${here}: ${letter} is found`).toBeDefined();
    const shown = readShown(step!.display);
    expect(Math.abs(found[i]! - shown.value), `${here}: ${letter}`).toBeLessThanOrEqual(
      HALF * shown.lastDigit,
    );
  });
  return 'system';
}

/** F is symmetric as far as its units are alike, and F⁻¹ d is X. */
function checkMatrix(step: DerivationStep, steps: readonly DerivationStep[], here: string): 'matrix' {
  const entries = readMatrix(step.numbers);
  if (step.id === 'matrix') {
    entries.forEach((row, i) => {
      expect(row[i]!.value, here).toBeGreaterThan(0);
    });
  }
  const flexibility = steps.find(({ id }) => id === 'matrix')?.numbers;
  if (step.id === 'redundants' && flexibility !== '') {
    const numbersOf = (id: string) => readMatrix(steps.find((one) => one.id === id)!.numbers);
    const right = numbersOf('compatibility').map(([d]) => d!.value);
    const found = solveSystem(
      numbersOf('matrix').map((row) => row.map(({ value }) => value)),
      right,
    );
    entries.forEach(([shown], i) => {
      expect(Math.abs(found[i]! - shown!.value), here).toBeLessThanOrEqual(HALF * shown!.lastDigit);
    });
  }
  return 'matrix';
}
