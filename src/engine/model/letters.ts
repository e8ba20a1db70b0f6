import type { Beam, Support } from './types';

/** A support with its letter, and its place in the beam's list, which need not run from the left. */
export type LetteredSupport = { readonly support: Support; readonly index: number; readonly letter: string };

/** The letter of the support at a place counted from the left: A, B … Z, AA, AB … */
export function supportLetter(place: number): string {
  const last = String.fromCharCode('A'.charCodeAt(0) + (place % 26));
  return place < 26 ? last : supportLetter(Math.floor(place / 26) - 1) + last;
}

/** Every support of the beam from the left, one that holds nothing among them, so that all speak of the same letters. */
export const letteredSupports = ({ supports }: Pick<Beam, 'supports'>): LetteredSupport[] =>
  supports
    .map((support, index) => ({ support, index }))
    .sort((a, b) => a.support.at - b.support.at)
    .map((one, place) => ({ ...one, letter: supportLetter(place) }));
