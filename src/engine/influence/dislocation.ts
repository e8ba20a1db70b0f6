import type { Beam, Restraint, Support } from '../model/index';
import { type Piecewise, piecewise } from '../polynomial/index';
import type { InfluenceQuantity, Side } from './types';

/**
 * A beam whose deflection, with a rigid movement of one part added to it, is an influence line:
 *
 *   η(x) = sense · (v(x) + rigid(x))
 */
export type Dislocated = { beam: Beam; rigid: Piecewise | null; sense: 1 | -1 };

/**
 * The Müller-Breslau principle for every quantity: the influence line of a force is the deflection of the beam when
 * that force alone gives way by 1, and that of a deflection is the deflection under a force of 1 there (Maxwell).
 *
 *   reaction    its support rises, or turns, by 1                              η = v
 *   moment      a sagging kink of 1 at the section, v'(c+) − v'(c−) = 1        η = −v
 *   shear       a step down of 1 at the section, v(c+) − v(c−) = −1            η = −v
 *   deflection  a downward force of 1 at the section                           η = v
 *
 * by Betti's theorem with the unit load at x. What is broken at the section is put together by moving all that holds
 * one of its parts as a rigid body with that part, backwards: so the force method sees prescribed movements only, and
 * beams of every degree, determinate ones too, are alike.
 *
 * Source: H. Müller-Breslau, Die neueren Methoden der Festigkeitslehre, 1886 (from memory).
 */
export function dislocated(beam: Beam, quantity: InfluenceQuantity): Dislocated {
  switch (quantity.kind) {
    case 'reaction':
      return { beam: { ...beam, supports: reactionGiven(beam, quantity), loads: [] }, rigid: null, sense: 1 };
    case 'deflection':
      return {
        beam: {
          ...beam,
          supports: beam.supports.map(unmoved),
          loads: [{ kind: 'point', at: quantity.at, p: 1 }],
        },
        rigid: null,
        sense: 1,
      };
    default:
      return broken(beam, quantity);
  }
}

function reactionGiven(
  { supports }: Beam,
  { support: index, component }: Extract<InfluenceQuantity, { kind: 'reaction' }>,
): Support[] {
  return supports.map((support, i) => {
    const still = unmoved(support);
    return i === index ? { ...still, [component]: movedBy(still[component], 1) } : still;
  });
}

/** The part of the beam that is moved: the shorter one, whose movements are the smaller. */
type Moving = { part: Side; rise: (x: number) => number; turn: number };

function broken(beam: Beam, { kind, at, side }: Extract<InfluenceQuantity, { side: Side }>): Dislocated {
  const part = at <= beam.length / 2 ? 'left' : 'right';
  const sign = part === 'right' ? 1 : -1;
  const moving: Moving =
    kind === 'moment'
      ? { part, rise: (x) => sign * (x - at), turn: sign }
      : { part, rise: () => -sign, turn: 0 };
  const belongs = (x: number) =>
    part === 'right' ? x > at || (x === at && side === 'left') : x < at || (x === at && side === 'right');
  const supports = beam.supports.map((support) => {
    const still = unmoved(support);
    return belongs(support.at)
      ? {
          ...still,
          vertical: movedBy(still.vertical, -moving.rise(support.at)),
          rotation: movedBy(still.rotation, -moving.turn),
        }
      : still;
  });
  return { beam: { ...beam, supports, loads: [] }, rigid: shapeOf(beam.length, at, moving), sense: -1 };
}

function shapeOf(length: number, at: number, { part, rise, turn }: Moving): Piecewise {
  const pieces = [
    { from: 0, to: at, moves: part === 'left' },
    { from: at, to: length, moves: part === 'right' },
  ].filter(({ from, to }) => from < to);
  return piecewise(
    [0, ...pieces.map(({ to }) => to)],
    pieces.map(({ from, moves }) => (moves ? [rise(from), turn] : [0])),
  );
}

const unmoved = (support: Support): Support => ({
  ...support,
  vertical: movedBy(support.vertical, 0),
  rotation: movedBy(support.rotation, 0),
});

const movedBy = (restraint: Restraint, movement: number): Restraint =>
  restraint.kind === 'free' ? restraint : { ...restraint, movement: movement + 0 };
