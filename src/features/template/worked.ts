import type { DerivationStep } from '@/engine/derivation';

/** Worked steps with their formulas, set. */
export interface WorkedSteps {
  readonly steps: readonly DerivationStep[];
  readonly formulas: readonly string[];
}

/** Signs beyond which a line of a derivation is broken before its numbers: what fits beside the result. */
const LINE = 46;

/** A step's formula: what it says in letters, then in numbers, on a line of their own where they are long. */
export function stepTex({ symbols, numbers }: DerivationStep): string {
  if (numbers === '') return symbols;
  return signsIn(symbols) + signsIn(numbers) > LINE
    ? `\\begin{aligned}&${symbols}\\\\[2pt]&\\quad=${numbers}\\end{aligned}`
    : `${symbols} = ${numbers}`;
}

/** Whether a line of it does not fit beside the result, which then stands below. */
export const isLong = ({ symbols, numbers }: DerivationStep): boolean =>
  Math.max(signsIn(symbols), signsIn(numbers)) > LINE;

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
