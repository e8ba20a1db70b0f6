import type { ArrangementNamer } from '../combination/index';
import type { CombinationEnvelope } from '../envelope/index';
import { type Beam, letteredSupports } from '../model/index';
import type { Finding } from './types';

/** Below this share of the largest reaction a pull is rounding. */
const NOTHING = 1e-9;

/**
 * Every support that is pulled up under a combination and pattern, with the most it is pulled, N. A roller does not hold
 * a beam down by itself, and a reaction that is uplift under one of them only is the one that is overlooked.
 */
export function upliftFindings(
  beam: Beam,
  strength: readonly CombinationEnvelope[],
  nameOf: ArrangementNamer,
  force: (newtons: number) => string,
): Finding[] {
  const letters = new Map(letteredSupports(beam).map(({ index, letter }) => [index, letter]));
  const largest = Math.max(
    0,
    ...strength.flatMap(({ reactions }) =>
      reactions.flatMap(({ max, min }) => [max.vertical.value, -min.vertical.value]),
    ),
  );
  return beam.supports.flatMap((support, index) => {
    const least = strength
      .flatMap(({ reactions }) => reactions[index]?.min.vertical ?? [])
      .reduce((a, b) => (b.value < a.value ? b : a), { value: 0, combination: '', pattern: [] });
    if (least.value >= -NOTHING * largest) return [];
    const letter = letters.get(index) ?? '';
    return [
      {
        id: `uplift-${letter}`,
        title: `Uplift at ${letter}`,
        detail: `${force(least.value)} under ${nameOf(least)}: the support must hold the beam down.`,
        at: support.at,
        combination: least.combination,
        pattern: least.pattern,
      },
    ];
  });
}
