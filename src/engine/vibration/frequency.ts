import type { Beam } from '../model/index';
import { STANDARD_GRAVITY } from '../quantity/index';
import { frequenciesBelow } from './count';
import { type Vibrating, vibratingBeam } from './piece';
import { frequencyFromSag, sagOf } from './sag';
import type { FirstFrequency, Masses } from './types';

/** The bounds of ω² are closed to this part of it: f is known to half of that. */
const CLOSED = 1e-12;
/** Widening of a bracket, in ω². */
const STEP = 4;

/**
 * The first natural frequency of the beam with its masses, by the dynamic stiffness method: exact for any supports,
 * springs, hinges and steps, with shear flexibility and without rotary inertia. Found by counting the natural
 * frequencies below ω, first to bracket the first one and then to halve the bracket, so that none can be missed.
 * Loads and prescribed movements have no part in it. Null where no mass can move. Fails as `solveBeam` does.
 */
export function firstFrequency(beam: Beam, masses: Masses): FirstFrequency | null {
  const vibrating = vibratingBeam(beam, masses);
  if (!canMove(vibrating)) return null;
  const below = (omega2: number) => frequenciesBelow(vibrating, omega2);
  const sag = sagOf(vibrating);
  let lower = STANDARD_GRAVITY / sag.deflection;
  while (below(lower) > 0) lower /= STEP;
  let upper = lower * STEP;
  while (below(upper) === 0) {
    lower = upper;
    upper *= STEP;
  }
  while (upper - lower > CLOSED * lower) {
    const middle = (lower + upper) / 2;
    if (below(middle) > 0) upper = middle;
    else lower = middle;
  }
  const hertz = (omega2: number) => Math.sqrt(omega2) / (2 * Math.PI);
  return {
    frequency: hertz((lower + upper) / 2),
    lower: hertz(lower),
    upper: hertz(upper),
    count: below(upper),
    sag,
    estimate: frequencyFromSag(sag),
  };
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
