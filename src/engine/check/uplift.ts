import { type Beam, letteredSupports } from '../model/index';
import type { Arrangement, Finding } from './types';

/** Below this share of the largest reaction a pull is rounding. */
const NOTHING = 1e-9;

/**
 * Every support that is pulled up under a combination, with the most it is pulled, N. A roller does not hold a beam
 * down by itself, and a reaction that is uplift under one combination only is the one that is overlooked.
 */
export function upliftFindings(
  beam: Beam,
  arrangements: readonly Arrangement[],
  force: (newtons: number) => string,
): Finding[] {
  const letters = new Map(letteredSupports(beam).map(({ index, letter }) => [index, letter]));
  return beam.supports.flatMap((support, index) => {
    let least = 0;
    let combination = '';
    for (const arrangement of arrangements) {
      const { reactions } = arrangement.solution;
      const largest = Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)));
      const value = reactions[index]?.vertical ?? 0;
      if (value < least && value < -NOTHING * largest) {
        least = value;
        combination = arrangement.combination.name;
      }
    }
    if (least === 0) return [];
    const letter = letters.get(index) ?? '';
    return [
      {
        id: `uplift-${letter}`,
        title: `Uplift at ${letter}`,
        detail: `${force(least)} under ${combination}: the support must hold the beam down.`,
        at: support.at,
      },
    ];
  });
}
