import type { Proof } from '../beam/index';
import type { Beam, Redundant, Support } from '../model/index';
import { extremes, type Piecewise, piecewise } from '../polynomial/index';
import { provenLine } from './line';
import { coefficientsAbout, distinct } from './pieces';
import { type SolveMoved, solveWide } from './solver';
import {
  type Direction,
  frontBreaks,
  placesIn,
  standingAt,
  type TrainExtreme,
  trainEffect,
  type Wheel,
  worstTrain,
} from './train';
import type { InfluenceQuantity, Side } from './types';

/** The largest or smallest moment that a train brings about anywhere: also the section where it does, null for none. */
export type AbsoluteMoment = Omit<TrainExtreme, 'ordinates'> & { section: number | null };

/** A stretch between neighbouring supports or ends, with the influence lines of the moments just inside its two ends. */
type Panel = { from: number; to: number; left: Piecewise; right: Piecewise };

/**
 * The absolute maximum and minimum moment of a train of wheels over all sections and all its positions, N·m sagging.
 * Fails as `influenceLine` does.
 *
 * With the train at a place the moment is straight between the wheels and the supports, so that its largest value
 * stands under a wheel or at a support; at neither end but where a support holds rotation it is 0. With wheel i at t
 * from the left end of a panel of length h,
 *
 *   M_i = M_left (1 − t/h) + M_right t/h + Σ_j F_j min(t, t_j) (h − max(t, t_j))/h       (wheels j in the panel)
 *
 * in which the moments of the panel's ends are cubics of the front's place, by their influence lines. So M_i is a
 * quartic between two breaks, and its extremes are exact. In a simple span it gives the handbooks' rule, the wheel and
 * the resultant as far from midspan on either side.
 */
export function absoluteMoment(
  beam: Beam,
  wheels: readonly Wheel[],
  directions: readonly Direction[],
  redundants?: readonly Redundant[],
  solve: SolveMoved = solveWide,
): { max: AbsoluteMoment; min: AbsoluteMoment; proof: Proof } {
  const proofs: Proof[] = [];
  const joints = jointsOf(beam, (quantity) => {
    const { line, proof } = provenLine(beam, quantity, redundants, solve);
    proofs.push(proof);
    return line;
  });
  const atJoints = joints.flatMap(({ at, left, right }) =>
    [...new Set([left, right])].map((line) => ({ section: at, ...worstTrain(line, wheels, directions) })),
  );
  const max = atJoints.map(({ section, max: most }) => atSection(most, section));
  const min = atJoints.map(({ section, min: least }) => atSection(least, section));
  for (const direction of directions) {
    for (const panel of panelsBetween(joints)) max.push(...underWheels(panel, wheels, direction));
  }
  return {
    max: known(max.reduce((a, b) => (b.value > a.value ? b : a))),
    min: known(min.reduce((a, b) => (b.value < a.value ? b : a))),
    proof: worstOf(proofs),
  };
}

const atSection = ({ value, direction, at, wheels }: TrainExtreme, section: number): AbsoluteMoment => ({
  value,
  direction,
  at,
  wheels,
  section,
});

/** Where no position of the train makes a moment of that sign there is no section either. */
const known = (found: AbsoluteMoment): AbsoluteMoment =>
  found.value === 0 ? { ...found, section: null } : found;

/** Of the lines that were needed; a simple span needs none, since statics alone gives its moments. */
function worstOf(proofs: readonly Proof[]): Proof {
  const largest = (kind: 'equilibrium' | 'compatibility' | 'agreement') =>
    Math.max(0, ...proofs.map((proof) => proof[kind]));
  return {
    equilibrium: largest('equilibrium'),
    compatibility: largest('compatibility'),
    agreement: largest('agreement'),
    method: 'direct stiffness',
  };
}

/** A support or an end, with the influence lines of the moments just left and right of it. */
type Joint = { at: number; left: Piecewise; right: Piecewise };

function jointsOf(beam: Beam, lineOf: (quantity: InfluenceQuantity) => Piecewise): Joint[] {
  const supports = new Map(beam.supports.map((support) => [support.at, support]));
  const none = piecewise([0, beam.length], [[0]]);
  return distinct([0, ...supports.keys(), beam.length], 0).map((at) => {
    const line = (side: Side) => lineOf({ kind: 'moment', at, side });
    const turns = holdsRotation(supports.get(at));
    if (at === 0) return { at, left: none, right: turns ? line('right') : none };
    if (at === beam.length) return { at, left: turns ? line('left') : none, right: none };
    const left = line('left');
    return { at, left, right: turns ? line('right') : left };
  });
}

const panelsBetween = (joints: readonly Joint[]): Panel[] =>
  joints.slice(1).map((to, k) => ({
    from: joints[k]!.at,
    to: to.at,
    left: joints[k]!.right,
    right: to.left,
  }));

const holdsRotation = (support: Support | undefined): boolean =>
  support !== undefined && support.rotation.kind !== 'free';

/** The largest moment under each wheel while it runs over the panel. */
function underWheels(panel: Panel, wheels: readonly Wheel[], direction: Direction): AbsoluteMoment[] {
  const places = placesIn(wheels, direction);
  const effects = {
    left: trainEffect(panel.left, wheels, direction),
    right: trainEffect(panel.right, wheels, direction),
  };
  const breaks = [...frontBreaks(panel.left, places), ...frontBreaks(panel.right, places)];
  return places.map((place, i) => {
    const [from, to] = [panel.from - place, panel.to - place];
    const inside = breaks.filter((front) => from < front && front < to);
    const cuts = distinct([from, ...inside, to], 0);
    const pieces = cuts
      .slice(1)
      .map((end, k) => momentUnder(panel, wheels, places, i, effects, [cuts[k]!, end]));
    const { value, at } = extremes(piecewise(cuts, pieces)).max;
    const front = at[0]!;
    return {
      value,
      direction,
      at: [front],
      section: front + place,
      wheels: standingAt(panel.left, places, front),
    };
  });
}

/** Coefficients, about the start of the stretch, of the moment under wheel i. */
function momentUnder(
  { from, to }: Panel,
  wheels: readonly Wheel[],
  places: readonly number[],
  i: number,
  effects: { left: Piecewise; right: Piecewise },
  [start, end]: readonly [number, number],
): number[] {
  const h = to - from;
  const middle = (start + end) / 2;
  /** Where a wheel is, from the left end of the panel, as start + s. */
  const along = (j: number): number => start + places[j]! - from;
  const t = along(i);
  const sum = [0, 0, 0, 0, 0];
  addProduct(sum, coefficientsAbout(effects.left, middle, start), 1 - t / h, -1 / h);
  addProduct(sum, coefficientsAbout(effects.right, middle, start), t / h, 1 / h);
  wheels.forEach(({ force }, j) => {
    const x = middle + places[j]!;
    if (x < from || x > to) return;
    const [low, high] = places[j]! < places[i]! ? [along(j), t] : [t, along(j)];
    addProduct(sum, [force * low, force], 1 - high / h, -1 / h);
  });
  return sum;
}

/** Adds a · (c + d s). */
function addProduct(sum: number[], a: ArrayLike<number>, c: number, d: number): void {
  for (let j = 0; j < a.length; j++) {
    sum[j]! += c * a[j]!;
    sum[j + 1]! += d * a[j]!;
  }
}
