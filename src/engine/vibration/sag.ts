import type { Extremes } from '../beam/index';
import type { Beam, Load } from '../model/index';
import { STANDARD_GRAVITY } from '../quantity/index';
import type { Vibrating } from './piece';

/** The largest deflection, m, up or down, under the weight of the masses, and where it is. */
export type Sag = { deflection: number; at: number };

/** A solver of beams, such as `prepareBeam`, as far as it is needed here. */
export type Prepare = (beam: Beam) => {
  solve(loads: readonly Load[], options: { movements: boolean }): { extremes: Pick<Extremes, 'deflection'> };
};

/** Fails as `prepare` does. */
export function sagOf({ beam, pieces, lumped }: Vibrating, prepare: Prepare): Sag {
  const loads: Load[] = [
    ...pieces.map(({ from, to, start, end }) => {
      const [w0, w1] = [start * STANDARD_GRAVITY, end * STANDARD_GRAVITY];
      return { kind: 'line', from, to, w0, w1 } as const;
    }),
    ...[...lumped].map(([at, mass]) => ({ kind: 'point', at, p: mass * STANDARD_GRAVITY }) as const),
  ];
  const { extremes } = prepare({ ...beam, loads }).solve(loads, { movements: false });
  const { max, min } = extremes.deflection;
  const largest = -min.value >= max.value ? min : max;
  return { deflection: Math.abs(largest.value), at: largest.at[0]! };
}

/** Hz · mm^½: a simple span under a uniform load has 17.75, π/2 · √(5g/384) with the deflection in mm. */
const USUAL = 18;

/**
 * The usual estimate of the first natural frequency, 18/√δ, Hz, with the largest deflection δ in millimetres under the
 * weight of the masses. Good for one span; in continuous beams the first mode is not the shape that weight makes.
 *
 * Source: Steel Construction Institute, P354, "Design of floors for vibration: a new approach" (from memory).
 */
export const frequencyFromSag = ({ deflection }: Sag): number => USUAL / Math.sqrt(deflection * 1000);
