import { cantileverTerms } from './cantilever';
import type { Movement } from './case';
import { divide, type Expression, expand, negate, simplest, subtract, ZERO } from './expression';
import { type Axis, along, forceOf, localLoad, momentAbout, type NamedLoad } from './load';
import { compare, type Setting } from './setting';
import { shearAreas } from './shear';
import { type Span, spanTerms } from './span';
import { type ChartTerm, chartTerm } from './term';

/**
 * A determinate beam that the charts know: fixed somewhere; on two supports; or guided, so that it cannot turn, at one
 * place and propped at another. With any overhangs.
 */
export type Released =
  | { kind: 'cantilever'; root: Expression }
  | { kind: 'simple'; left: Expression; right: Expression }
  | { kind: 'guided'; guide: Expression; prop: Expression };

/**
 * What its supports do: rises up, of the root, of the two supports, or of the prop as the first; and the turn of a fixed
 * or guided end, anticlockwise.
 */
export type SupportMovements = { rises: readonly [Expression, Expression]; rotation: Expression };

/** What its supports carry, in the same order: forces up, and the couple of a fixed or guided end, anticlockwise. */
export type SupportForces = { forces: readonly [Expression, Expression]; couple: Expression };

/**
 * The chart terms whose sum is a load's deflection (down) or turn (clockwise) at a place of the released beam by
 * bending; the formulas are exact for a straight beam of one EI. Null where no case covers the load.
 */
export function chartTerms(
  released: Released,
  load: NamedLoad,
  place: Expression,
  movement: Movement,
  setting: Setting,
): ChartTerm[] | null {
  const axis = axisTowards(released, place, setting);
  const [local, x] = [localLoad(axis, load), along(axis, place)];
  const terms =
    released.kind === 'cantilever'
      ? cantileverTerms(local, x, movement, setting)
      : spanTerms(local, spanOf(released, axis, x, movement, setting));
  return terms && onBeam(terms, axis, movement);
}

/** The chart term of what the supports of the released beam do, if they move at all. */
export function movementTerms(
  released: Released,
  { rises: [first, second], rotation }: SupportMovements,
  place: Expression,
  movement: Movement,
  setting: Setting,
): ChartTerm[] {
  if ([first, second, rotation].every((value) => value.length === 0)) return [];
  const axis = axisTowards(released, place, setting);
  const phi = axis.direction > 0 ? negate(rotation) : rotation;
  const values =
    released.kind === 'simple'
      ? { s: negate(first), t: negate(second), L: lengthOf(released, axis) }
      : released.kind === 'guided'
        ? { t: negate(first), phi, L: lengthOf(released, axis) }
        : { s: negate(first), phi };
  const id = `${released.kind}-movement`;
  return onBeam([chartTerm(id, movement, values, along(axis, place), setting)], axis, movement);
}

/** The chart term of what the loads' shear adds, with the beam's GA; bending has none of it. */
export function shearTerms(
  released: Released,
  loads: readonly NamedLoad[],
  place: Expression,
  movement: Movement,
  setting: Setting,
  ga: Expression,
): ChartTerm[] {
  const axis = axisTowards(released, place, setting);
  const x = along(axis, place);
  const length = released.kind === 'cantilever' ? null : lengthOf(released, axis);
  const local = loads.map((load) => localLoad(axis, load));
  const [S, T] = shearAreas(released.kind, local, x, length, setting);
  const values = { S, T, GA: ga, ...(length && { L: length }) };
  const term = chartTerm(`${released.kind}-shear`, movement, values, x, setting);
  return onBeam([{ ...term, value: simplest(term.value) }], axis, movement);
}

/** What the supports of the released beam carry of a load. */
export function supportForces(released: Released, load: NamedLoad): SupportForces {
  const about = (place: Expression) => momentAbout(load, place);
  const force = forceOf(load);
  switch (released.kind) {
    case 'cantilever':
      return { forces: [force, ZERO], couple: about(released.root) };
    case 'guided':
      return { forces: [force, ZERO], couple: about(released.prop) };
    case 'simple': {
      const { left, right } = released;
      const second = divide(about(left), expand(subtract(right, left)));
      return { forces: [divide(negate(about(right)), expand(subtract(right, left))), second], couple: ZERO };
    }
  }
}

/** From the left support, from the guide to the prop, or from the fixed end to the place. */
function axisTowards(released: Released, place: Expression, setting: Setting): Axis {
  if (released.kind === 'simple') return { origin: released.left, direction: 1 };
  const [origin, towards] =
    released.kind === 'guided' ? [released.guide, released.prop] : [released.root, place];
  return { origin, direction: compare(towards, origin, setting) < 0 ? -1 : 1 };
}

const lengthOf = (released: Exclude<Released, { kind: 'cantilever' }>, axis: Axis): Expression =>
  along(axis, released.kind === 'simple' ? released.right : released.prop);

const spanOf = (
  released: Exclude<Released, { kind: 'cantilever' }>,
  axis: Axis,
  x: Expression,
  movement: Movement,
  setting: Setting,
): Span => ({ kind: released.kind, length: lengthOf(released, axis), x, movement, setting });

/** As seen on the beam: slopes of an axis that runs to the left are the other way round. Nothing for nothing. */
function onBeam(terms: readonly ChartTerm[], { direction }: Axis, movement: Movement): ChartTerm[] {
  const found = terms.filter(({ value }) => value.length > 0);
  return movement === 'slope' && direction < 0
    ? found.map((term) => ({ ...term, value: negate(term.value) }))
    : found;
}
