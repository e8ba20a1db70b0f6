import { cantileverTerms } from './cantilever';
import { type Expression, expand, negate, subtract } from './expression';
import { type Axis, along, localLoad, type NamedLoad } from './load';
import type { Movement } from './register';
import { compare, type Setting } from './setting';
import { simpleTerms } from './simple';
import { type ChartTerm, chartTerm } from './term';

/** A determinate beam that the charts know: fixed somewhere, or on two supports; with any overhangs. */
export type Released =
  | { kind: 'cantilever'; root: Expression }
  | { kind: 'simple'; left: Expression; right: Expression };

/** What its supports do: rises up, and the turn of a fixed end anticlockwise. */
export type SupportMovements = { rises: readonly [Expression, Expression]; rotation: Expression };

/**
 * The chart terms whose sum is a load's deflection (down) or slope (clockwise) at a place of the released beam; the
 * formulas are exact for a straight beam of one EI that only bends. Null where no case covers the load.
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
    released.kind === 'simple'
      ? simpleTerms(local, along(axis, released.right), x, movement, setting)
      : cantileverTerms(local, x, movement, setting);
  const turned = movement === 'slope' && axis.direction < 0;
  return (
    terms
      ?.filter(({ value }) => value.length > 0)
      .map((term) => (turned ? { ...term, value: negate(term.value) } : term)) ?? null
  );
}

/** From the left support, or from the fixed end to the place. */
function axisTowards(released: Released, place: Expression, setting: Setting): Axis {
  if (released.kind === 'simple') return { origin: released.left, direction: 1 };
  return { origin: released.root, direction: compare(place, released.root, setting) < 0 ? -1 : 1 };
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
  const origin = released.kind === 'simple' ? released.left : released.root;
  const x = expand(subtract(place, origin));
  const values =
    released.kind === 'simple'
      ? { s: negate(first), t: negate(second), L: expand(subtract(released.right, released.left)) }
      : { s: negate(first), phi: negate(rotation) };
  const term = chartTerm(`${released.kind}-movement`, movement, values, x, setting);
  return term.value.length === 0 ? [] : [term];
}
