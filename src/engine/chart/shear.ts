import type { ReleasedKind } from './case';
import {
  add,
  divide,
  type Expression,
  expand,
  multiply,
  negate,
  simplest,
  subtract,
  ZERO,
} from './expression';
import { forceOf, type LocalLoad, mirrored, momentOf, shifted } from './load';
import { compare, type Setting } from './setting';
import { cut } from './stretch';

/**
 * Areas of the shear diagram of a released beam along its axis, from its origin to x and to the end of the span: a
 * couple changes the moment without any shear of its own there, so that they are not moments.
 */
export function shearAreas(
  kind: ReleasedKind,
  loads: readonly LocalLoad[],
  x: Expression,
  length: Expression | null,
  setting: Setting,
): [Expression, Expression] {
  if (!length) return [outwards(loads, x, setting), ZERO];
  const right = parts(loads, length, setting).beyond.map((load) => shifted(load, length));
  const end =
    kind === 'simple' ? simpleArea(loads, length, length, setting) : guidedArea(loads, length, setting);
  if (compare(x, length, setting) > 0)
    return [add(end, outwards(right, expand(subtract(x, length)), setting)), end];
  if (kind === 'guided') return [guidedArea(loads, x, setting), end];
  if (compare(x, ZERO, setting) >= 0) return [simpleArea(loads, length, x, setting), end];
  const left = parts(loads, ZERO, setting).before.map((load) => mirrored(load, ZERO));
  return [outwards(left, negate(x), setting), end];
}

/** Of a cantilever from its fixed end: at every section, what stands beyond it. */
function outwards(loads: readonly LocalLoad[], x: Expression, setting: Setting): Expression {
  const beyondRoot = parts(loads, ZERO, setting).beyond;
  const { before, beyond } = parts(beyondRoot, x, setting);
  const near = before.filter(({ kind }) => kind !== 'couple').map((load) => momentOf(load, ZERO));
  return add(...near, ...beyond.map((load) => multiply(forceOf(load), x)));
}

/** Of a span from its left support: what is left there of the reaction, less what stands between. */
function simpleArea(
  loads: readonly LocalLoad[],
  length: Expression,
  x: Expression,
  setting: Setting,
): Expression {
  const overhanging = parts(loads, ZERO, setting);
  const shear = add(
    ...loads.map((load) => divide(negate(momentOf(load, length)), length)),
    ...overhanging.before.map((load) => negate(forceOf(load))),
  );
  return simplest(add(multiply(shear, x), takenOff(overhanging.beyond, x, setting)));
}

/** Of a span from its guide, which carries no force. */
const guidedArea = (loads: readonly LocalLoad[], x: Expression, setting: Setting): Expression =>
  simplest(takenOff(loads, x, setting));

/** What loads before x take off the area up to there: their moment about it. */
function takenOff(loads: readonly LocalLoad[], x: Expression, setting: Setting): Expression {
  const before = parts(loads, x, setting).before.filter(({ kind }) => kind !== 'couple');
  return add(...before.map((load) => momentOf(load, x)));
}

/** The loads before a place, and those at or beyond it, each cut there. */
function parts(
  loads: readonly LocalLoad[],
  at: Expression,
  setting: Setting,
): { before: LocalLoad[]; beyond: LocalLoad[] } {
  const found: { before: LocalLoad[]; beyond: LocalLoad[] } = { before: [], beyond: [] };
  for (const load of loads) {
    if (load.kind === 'point' || load.kind === 'couple') {
      (compare(load.a, at, setting) < 0 ? found.before : found.beyond).push(load);
    } else if (load.kind === 'line') {
      const [before, beyond] = cut(load, at, setting);
      if (before) found.before.push({ kind: 'line', ...before });
      if (beyond) found.beyond.push({ kind: 'line', ...beyond });
    }
  }
  return found;
}
