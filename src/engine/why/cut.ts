import {
  add,
  constant,
  type Expression,
  expand,
  forceOf,
  momentAbout,
  multiply,
  negate,
  subtract,
  symbol,
} from '../chart/index';
import { type NamedBeam, type Part, partOn } from '../derivation/index';
import type { Side } from './types';

/** A section of the beam, just left or right of a place, and from which side the forces on it are added up. */
type Cut = {
  readonly x: number;
  readonly at: Expression;
  readonly side: Side;
  readonly from: Side;
  readonly isSame: (place: number) => boolean;
};

/** Whether what acts at a place is on the side that is added up; just beside the section it may be on either. */
const isCounted = ({ x, side, from, isSame }: Cut, place: number): boolean => {
  if (isSame(place)) return side !== from;
  return from === 'left' ? place < x : place > x;
};

/** The shear: what pushes up on its left, or down on its right. */
export function shearFrom(beam: NamedBeam, part: Part, cut: Cut): Expression {
  const forces = part.actions
    .filter(({ kind, x }) => kind === 'force' && isCounted(cut, x))
    .map(({ tex, amount }) => multiply(constant(amount), symbol(tex)));
  const up = add(...forces, ...loadsOf(beam, part, cut).map((load) => negate(forceOf(load))));
  return cut.from === 'left' ? up : negate(up);
}

/** The moment, sagging: from the left, what turns clockwise about the section; from the right, what turns the other way. */
export function momentFrom(beam: NamedBeam, part: Part, cut: Cut): Expression {
  const actions = part.actions
    .filter(({ x }) => isCounted(cut, x))
    .map(({ tex, at, kind, amount }) =>
      kind === 'couple'
        ? multiply(constant(-amount), symbol(tex))
        : multiply(multiply(constant(amount), symbol(tex)), expand(subtract(cut.at, at))),
    );
  const clockwise = add(...actions, ...loadsOf(beam, part, cut).map((load) => momentAbout(load, cut.at)));
  const [left, right] = part.moments;
  return cut.from === 'left' ? add(left, clockwise) : add(right, negate(clockwise));
}

function loadsOf(beam: NamedBeam, part: Part, cut: Cut): Part['loads'] {
  const [start, end] = cut.from === 'left' ? [part.from, cut.x] : [cut.x, part.to];
  return part.loads.flatMap((load) => {
    if (load.kind === 'point' || load.kind === 'couple')
      return isCounted(cut, beam.letters.of(load.at)) ? [load] : [];
    return cut.isSame(cut.from === 'left' ? start : end) ? [] : (partOn(beam, load, start, end) ?? []);
  });
}
