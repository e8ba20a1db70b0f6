import { type Beam, letteredSupports, spansOf } from '../model/index';

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
 * The spans between vertical supports and the overhangs beyond them, from the left, by name: none where there is no such
 * support. They are the spans that loads are patterned by as well.
 */
export function regionsOf(beam: Pick<Beam, 'length' | 'supports'>): Region[] {
  const letters = new Map(letteredSupports(beam).map(({ index, letter }) => [index, letter]));
  return spansOf(beam).flatMap(({ from, to, left, right }): Region[] => {
    const [start, end] = [left, right].map((support) =>
      support === null ? undefined : letters.get(support),
    );
    if (start && end) return [{ kind: 'span', from, to, held: 'both', name: `span ${start}–${end}` }];
    const letter = start ?? end;
    if (!letter) return [];
    const held = start ? 'left' : 'right';
    return [{ kind: 'overhang', from, to, held, name: `overhang beyond ${letter}` }];
  });
}
