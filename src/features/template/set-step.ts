import { type DerivationStep, joinedNumbers } from '@/engine/derivation';
import { setTex } from './tex';
import { isShort } from './worked';

/** A step's formula, line by line: what it says in letters, then in numbers, on a line of their own where they are long. */
export function stepLines(step: Pick<DerivationStep, 'symbols' | 'numbers'>): string[] {
  const numbers = joinedNumbers(step);
  if (numbers === '') return [step.symbols];
  if (!numbers.startsWith('=')) return [step.symbols, numbers];
  // A relation at the start of a line needs something at its left to stand off from.
  return isShort(step) ? [step.symbols + numbers] : [step.symbols, `{}${numbers}`];
}

/** Set in running text, where a display would not break; its integrals and sums are as tall as in one. */
const TALL = /\\(?:int(?:_\{[^}]*\}\^\{[^}]*\})?|sum)(?![a-z])/g;

/** The lines as HTML; each goes on in the next at an operator. */
export const setStep = (step: DerivationStep): string =>
  stepLines(step)
    .map((tex) => `<span class="block">${setTex(tex.replaceAll(TALL, '{\\displaystyle$&}'), false)}</span>`)
    .join('');
