import { type Beam, letteredSupports } from '../model/index';

/** A stretch of the beam between two vertical supports, or beyond the last: lengths and positions in m. */
export type Region = {
  readonly kind: 'span' | 'overhang';
  readonly from: number;
  readonly to: number;
  /** Where it is supported. */
  readonly held: 'both' | 'left' | 'right';
  /** "span A–B", "overhang beyond B". */
  readonly name: string;
};

/**
 * The spans between vertical supports and the overhangs beyond them, from the left. An overhang of no length is none.
 * They are the spans that loads are patterned by as well.
 */
export function regionsOf(beam: Pick<Beam, 'length' | 'supports'>): Region[] {
  const held = letteredSupports(beam)
    .filter(({ support }) => support.vertical.kind !== 'free')
    .map(({ support: { at }, letter }) => ({ at, letter }));
  const first = held[0];
  const last = held.at(-1);
  if (!first || !last) return [];
  const overhangs = (from: number, to: number, held: 'left' | 'right', letter: string): Region[] =>
    to > from ? [{ kind: 'overhang', from, to, held, name: `overhang beyond ${letter}` }] : [];
  const spans = held.slice(1).map((right, index): Region => {
    const left = held[index] ?? first;
    const name = `span ${left.letter}–${right.letter}`;
    return { kind: 'span', from: left.at, to: right.at, held: 'both', name };
  });
  return [
    ...overhangs(0, first.at, 'right', first.letter),
    ...spans,
    ...overhangs(last.at, beam.length, 'left', last.letter),
  ];
}
