import type { DerivationStep } from '@/engine/derivation';

/** Worked steps with their formulas, set. */
export interface WorkedSteps {
  readonly steps: readonly DerivationStep[];
  readonly formulas: readonly string[];
}

/** Signs beyond which a line of a derivation is broken before its numbers: what fits beside the result. */
const LINE = 46;

/** A step's formula: what it says in letters, then in numbers, on a line of their own where they are long. */
export function stepTex(step: DerivationStep): string {
  const { symbols, numbers } = step;
  if (numbers === '') return symbols;
  return isBroken(step)
    ? `\\begin{aligned}&${symbols}\\\\[2pt]&\\quad=${numbers}\\end{aligned}`
    : `${symbols} = ${numbers}`;
}

const isBroken = ({ symbols, numbers }: DerivationStep): boolean =>
  numbers !== '' && signsIn(symbols) + signsIn(numbers) > LINE;

const longestLine = (step: DerivationStep): number => {
  const [symbols, numbers] = [signsIn(step.symbols), signsIn(step.numbers)];
  return isBroken(step) ? Math.max(symbols, numbers) : symbols + numbers;
};

/** Whether a formula may be wider than a phone, and must be moved sideways there to be read. */
export const isWide = (step: DerivationStep): boolean => longestLine(step) > LINE / 2;

/** Whether a line of it does not fit beside the result, which then stands below. */
export const isLong = (step: DerivationStep): boolean => longestLine(step) > LINE;

/** About as many signs as the formula is wide: a fraction is as wide as the longer of its halves. */
const signsIn = (tex: string): number =>
  plain(
    tex.replaceAll(FRACTION, (_, top: string, bottom: string) =>
      plain(top).length > plain(bottom).length ? top : bottom,
    ),
  ).length;

const FRACTION = /\\d?frac\{((?:[^{}]|\{[^{}]*\})*)\}\{((?:[^{}]|\{[^{}]*\})*)\}/g;

const plain = (tex: string): string =>
  tex
    .replaceAll(/\\(?:text|mathrm)\{([^}]*)\}/g, '$1')
    .replaceAll(/\\[a-zA-Z]+/g, '*')
    .replaceAll(/[{}_^\s]|\\[,;!]/g, '');
