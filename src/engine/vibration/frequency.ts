import { prepareBeam } from '../beam/index';
import type { Beam } from '../model/index';
import { STANDARD_GRAVITY } from '../quantity/index';
import { type Bracket, closeBracket } from './close';
import { countBelow } from './count';
import { type Vibrating, vibratingBeam } from './piece';
import { frequencyFromSag, type Prepare, sagOf } from './sag';
import type { FirstFrequency, Masses } from './types';

/** Widening of a bracket, in ω². */
const STEP = 4;

/**
 * The first natural frequency of the beam with its masses, by the dynamic stiffness method: exact for any supports,
 * springs, hinges and steps, with shear flexibility and without rotary inertia. Found by counting the natural
 * frequencies below ω, first to bracket the first one and then to close the bracket, so that none can be missed.
 * Loads and prescribed movements have no part in it. Null where no mass can move. Fails as `prepare` does, which
 * finds the sag.
 */
export function firstFrequency(
  beam: Beam,
  masses: Masses,
  prepare: Prepare = prepareBeam,
): FirstFrequency | null {
  const vibrating = vibratingBeam(beam, masses);
  if (!canMove(vibrating)) return null;
  const sag = sagOf(vibrating, prepare);
  const { lower, upper } = bracketFrom(vibrating, STANDARD_GRAVITY / sag.deflection);
  const hertz = (omega2: number) => Math.sqrt(omega2) / (2 * Math.PI);
  return {
    frequency: hertz((lower.omega2 + upper.omega2) / 2),
    lower: hertz(lower.omega2),
    upper: hertz(upper.omega2),
    count: upper.below,
    sag,
    estimate: frequencyFromSag(sag),
  };
}

/** Closed around the first frequency, from a guess of ω². */
function bracketFrom(vibrating: Vibrating, guess: number): Bracket {
  let largest = guess * STEP;
  let lower = countBelow(vibrating, guess, largest);
  let upper = countBelow(vibrating, largest, largest);
  while (lower.below > 0) {
    upper = lower;
    lower = countBelow(vibrating, lower.omega2 / STEP, largest);
  }
  while (upper.below === 0) {
    const from = largest;
    largest *= STEP;
    lower = countBelow(vibrating, from, largest);
    upper = countBelow(vibrating, largest, largest);
  }
  return closeBracket({ lower, upper }, (omega2) => countBelow(vibrating, omega2, largest));
}

/** Whether any mass is where the beam can move: not on a rigid support alone. */
function canMove({ beam, pieces, lumped }: Vibrating): boolean {
  const isHeld = (x: number) =>
    beam.supports.some(({ at, vertical }) => at === x && vertical.kind === 'rigid');
  return (
    pieces.some(({ start, end }) => start + end > 0) ||
    [...lumped].some(([at, mass]) => mass > 0 && !isHeld(at))
  );
}
