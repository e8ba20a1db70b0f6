import type { DerivationStep } from '@/engine/derivation';

/** Worked steps with their formulas, set. */
export interface WorkedSteps {
  readonly steps: readonly DerivationStep[];
  readonly formulas: readonly string[];
}

/** Signs beyond which a line of a derivation is broken before its numbers: what fits beside the result. */
const LINE = 46;

/** Whether a line of it does not fit beside the result, which then stands below. */
export const isLong = ({ symbols, numbers }: Pick<DerivationStep, 'symbols' | 'numbers'>): boolean =>
  Math.max(signsIn(symbols), signsIn(numbers)) > LINE;

/** Whether its letters and its numbers fit in one line. */
export const isShort = ({ symbols, numbers }: Pick<DerivationStep, 'symbols' | 'numbers'>): boolean =>
  signsIn(symbols) + signsIn(numbers) <= LINE;

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
