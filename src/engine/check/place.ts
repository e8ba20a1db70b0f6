import { type Beam, letteredSupports } from '../model/index';

/** "at A", "at 2.860 m": a position in the words of the drawing. */
export function placeOf(beam: Beam, x: number, position: (x: number) => string): string {
  const found = letteredSupports(beam).find(({ support }) => Math.abs(support.at - x) <= 1e-9 * beam.length);
  return found ? `at ${found.letter}` : `at ${position(x)}`;
}
