import { type Beam, letteredSupports } from '../model/index';
import type { Region } from './types';

/** The spans between vertical supports and the overhangs beyond them, from the left. An overhang of no length is none. */
export function regionsOf(beam: Beam): Region[] {
  const held = letteredSupports(beam)
    .filter(({ support }) => support.vertical.kind !== 'free')
    .map(({ support: { at }, letter }) => ({ at, letter }));
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
  const found = letteredSupports(beam).find(({ support }) => Math.abs(support.at - x) <= 1e-9 * beam.length);
  return found ? `at ${found.letter}` : `at ${position(x)}`;
}
