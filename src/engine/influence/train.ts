import { evaluate, extremes, type Piecewise, pieceCount } from '../polynomial/index';
import { breakAt, distinct, readAbout } from './pieces';

/** A wheel: how far behind the front of the train, m, and its downward force, N. */
export type Wheel = { offset: number; force: number };
/** Where the train runs to. Its front is ahead: a wheel stands at front − offset, or at front + offset. */
export type Direction = 'right' | 'left';

/**
 * The largest or the smallest value that a train brings about: every place of its front where it does, ascending, and
 * where each wheel stands with the front at the first of them, null off the beam. No place: with the train off the
 * beam the value is 0, and no position on it goes beyond that.
 */
export type TrainExtreme = {
  value: number;
  direction: Direction;
  at: number[];
  wheels: (number | null)[];
  /** Of the line under each wheel, on the side that counts; null off the beam. The value is Σ force · ordinate. */
  ordinates: (number | null)[];
};

/** Places of the front nearer than this part of the train's way are one. */
const COINCIDENT = 1e-12;
/** What is larger by less than this part of the larger is as large. */
const TIE = 1e-9;

/** How far each wheel is to the right of the front. */
export const placesIn = (wheels: readonly Wheel[], direction: Direction): number[] =>
  wheels.map(({ offset }) => (direction === 'right' ? -offset : offset));

/** Where each wheel stands with the front at a place, brought to a break of the line that it meets; null off the beam. */
export function standingAt(line: Piecewise, places: readonly number[], front: number): (number | null)[] {
  const { breaks } = line;
  const [start, end] = [breaks[0]!, breaks.at(-1)!];
  return places.map((place) => {
    const at = breakAt(line, front + place, COINCIDENT * (end - start));
    return start <= at && at <= end ? at : null;
  });
}

/** Where the front changes what the train does: a wheel comes to a break of the line, or to an end of the beam. */
export function frontBreaks({ breaks }: Piecewise, places: readonly number[]): number[] {
  const way = breaks.at(-1)! - breaks[0]! + Math.max(...places) - Math.min(...places);
  const fronts: number[] = [];
  for (const place of places) for (const x of breaks) fronts.push(x - place);
  return distinct(fronts, COINCIDENT * way);
}

/**
 * The effect of the train, Σ force · η(wheel), by the place of its front: an exact piecewise cubic, from where the first
 * wheel comes on to where the last goes off. Wheels off the beam have no effect.
 */
export function trainEffect(line: Piecewise, wheels: readonly Wheel[], direction: Direction): Piecewise {
  const places = placesIn(wheels, direction);
  const breaks = Float64Array.from(frontBreaks(line, places));
  const { degree } = line;
  const effect = { breaks, degree, coefficients: new Float64Array((breaks.length - 1) * (degree + 1)) };
  wheels.forEach(({ force }, i) => {
    addWheel(effect, line, force, places[i]!);
  });
  return effect;
}

/** Adds force · η(front + place) where the wheel is on the line. The breaks of the effect are those of the line as well. */
function addWheel(effect: Piecewise, line: Piecewise, force: number, place: number): void {
  const { breaks, degree, coefficients } = effect;
  const moved = new Float64Array(degree + 1);
  const end = line.breaks.at(-1)!;
  let piece = 0;
  for (let k = 0; k + 1 < breaks.length; k++) {
    const middle = (breaks[k]! + breaks[k + 1]!) / 2 + place;
    if (middle < line.breaks[0]! || middle > end) continue;
    while (piece + 1 < pieceCount(line) && line.breaks[piece + 1]! <= middle) piece++;
    readAbout(line, piece, breaks[k]! + place, moved);
    for (let j = 0; j <= degree; j++) coefficients[k * (degree + 1) + j]! += force * moved[j]!;
  }
}

/**
 * The largest and the smallest effect of the train over all its positions, in the directions it may run. Exact: between
 * two places where a wheel meets a break the effect is a cubic, whose turning points are roots of its derivative.
 */
export function worstTrain(
  line: Piecewise,
  wheels: readonly Wheel[],
  directions: readonly Direction[],
): { max: TrainExtreme; min: TrainExtreme } {
  const found = directions.map((direction) => {
    const { max, min } = extremes(trainEffect(line, wheels, direction));
    const meetings = jumpMeetings(line, wheels, direction);
    return {
      max: placed(line, wheels, direction, [max, ...meetings], 1),
      min: placed(line, wheels, direction, [min, ...meetings], -1),
    };
  });
  return {
    max: worst(
      found.map(({ max }) => max),
      1,
    ),
    min: worst(
      found.map(({ min }) => min),
      -1,
    ),
  };
}

type Found = { value: number; at: number[] };

function placed(
  line: Piecewise,
  wheels: readonly Wheel[],
  direction: Direction,
  found: readonly Found[],
  sense: 1 | -1,
): TrainExtreme {
  const { value, at } = worst(found, sense);
  const [front] = at;
  if (front === undefined || sense * value <= 0) {
    const off = wheels.map(() => null);
    return { value: 0, direction, at: [], wheels: off, ordinates: off };
  }
  const stands = standings(line, wheels, direction, front);
  const held = stands.find((one) => !isWorse(one.value, value, 1) && !isWorse(one.value, value, -1));
  const { wheels: places, ordinates } = held ?? stands[0]!;
  return { value, direction, at, wheels: places, ordinates };
}

const isWorse = (a: number, b: number, sense: 1 | -1): boolean =>
  sense * (a - b) > TIE * Math.max(Math.abs(a), Math.abs(b));

/** The first of those that are as bad as each other. */
const worst = <T extends { value: number }>(found: readonly T[], sense: 1 | -1): T =>
  found.reduce((a, b) => (isWorse(b.value, a.value, sense) ? b : a));

/** A wheel that stands where the line jumps may count on either side of it, while another stands at an end of the beam. */
function jumpMeetings(line: Piecewise, wheels: readonly Wheel[], direction: Direction): Found[] {
  const sides = Array.from(line.breaks, (x) => evaluate(line, x));
  // A smaller one makes no difference that counts; between pieces without a jump there is that of rounding.
  const nothing = TIE * Math.max(...sides.map(([left, right]) => Math.max(Math.abs(left), Math.abs(right))));
  const jumps = Array.from(line.breaks).filter((_, k, { length }) => {
    const [left, right] = sides[k]!;
    return Math.abs(k === 0 || k === length - 1 ? left : left - right) > nothing;
  });
  return placesIn(wheels, direction).flatMap((place) =>
    jumps.flatMap((x) =>
      standings(line, wheels, direction, x - place).map(({ value }) => ({ value, at: [x - place] })),
    ),
  );
}

type Standing = Pick<TrainExtreme, 'value' | 'wheels' | 'ordinates'>;

/** The train with its front at a place: standing there, a wheel at a jump counted at its left or right; a hair before it, and a hair beyond. */
function standings(
  line: Piecewise,
  wheels: readonly Wheel[],
  direction: Direction,
  front: number,
): Standing[] {
  const [start, end] = [line.breaks[0]!, line.breaks.at(-1)!];
  const places = standingAt(line, placesIn(wheels, direction), front);
  const stand = (side: 0 | 1, holds: (x: number) => boolean): Standing => {
    const on = places.map((x) => (x !== null && holds(x) ? x : null));
    const ordinates = on.map((x) => (x === null ? null : evaluate(line, x)[side]));
    const value = ordinates.reduce<number>((sum, y, i) => sum + (y ?? 0) * wheels[i]!.force, 0);
    return { value, wheels: on, ordinates };
  };
  const always = () => true;
  return [stand(0, always), stand(1, always), stand(0, (x) => x > start), stand(1, (x) => x < end)];
}
