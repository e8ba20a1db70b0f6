import type { Beam } from '../model/index';
import type { Region } from './types';

/** A, B, C … for supports counted from the left; beyond Z, A1, B1 … */
export const supportLetter = (index: number): string =>
  String.fromCharCode(65 + (index % 26)) + (index < 26 ? '' : String(Math.floor(index / 26)));

/** Positions of the supports from the left, with their letters. */
export function letteredSupports(beam: Beam): { at: number; letter: string; vertical: boolean }[] {
  return [...beam.supports]
    .sort((a, b) => a.at - b.at)
    .map((support, index) => ({
      at: support.at,
      letter: supportLetter(index),
      vertical: support.vertical.kind !== 'free',
    }));
}

/** The spans between vertical supports and the overhangs beyond them, from the left. An overhang of no length is none. */
export function regionsOf(beam: Beam): Region[] {
  const held = letteredSupports(beam).filter(({ vertical }) => vertical);
  const first = held[0];
  const last = held.at(-1);
  if (!first || !last) return [];
  const overhangs = (from: number, to: number, letter: string): Region[] =>
    to > from ? [{ kind: 'overhang', from, to, name: `overhang beyond ${letter}` }] : [];
  const spans = held.slice(1).map((right, index): Region => {
    const left = held[index] ?? first;
    return { kind: 'span', from: left.at, to: right.at, name: `span ${left.letter}–${right.letter}` };
  });
  return [...overhangs(0, first.at, first.letter), ...spans, ...overhangs(last.at, beam.length, last.letter)];
}

/** "at A", "at 2.860 m": a position in the words of the drawing. */
export function placeOf(beam: Beam, x: number, position: (x: number) => string): string {
  const support = letteredSupports(beam).find(({ at }) => Math.abs(at - x) <= 1e-9 * beam.length);
  return support ? `at ${support.letter}` : `at ${position(x)}`;
}
