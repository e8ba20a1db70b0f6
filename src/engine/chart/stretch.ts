import { add, constant, type Expression, expand, multiply, power, subtract } from './expression';
import { compare, type Setting } from './setting';

/** A stretch of an axis under a load (or curvature) that goes straight from w0 at `from` to w1 at `to`. */
export type Stretch = { from: Expression; to: Expression; w0: Expression; w1: Expression };

export const isUniform = ({ w0, w1 }: Stretch): boolean => subtract(w0, w1).length === 0;

/** The parts before and beyond a cut; null where there is nothing. */
export function cut(stretch: Stretch, at: Expression, setting: Setting): [Stretch | null, Stretch | null] {
  if (compare(stretch.to, stretch.from, setting) <= 0) return [null, null];
  if (compare(stretch.to, at, setting) <= 0) return [stretch, null];
  if (compare(stretch.from, at, setting) >= 0) return [null, stretch];
  const { from, to, w0, w1 } = stretch;
  const part = () => multiply(expand(subtract(at, from)), power(expand(subtract(to, from)), -1));
  const middle = isUniform(stretch) ? w0 : add(w0, multiply(subtract(w1, w0), part()));
  return [
    { from, to: at, w0, w1: middle },
    { from: at, to, w0: middle, w1 },
  ];
}

/** Resultant of the stretch, and its clockwise moment about x, for x at or before its start. */
export function resultant(
  { from, to, w0, w1 }: Stretch,
  x: Expression,
): { force: Expression; moment: Expression } {
  const c = expand(subtract(to, from));
  const lever = expand(subtract(from, x));
  if (isUniform({ from, to, w0, w1 })) {
    const force = multiply(w0, c);
    const middle = expand(add(lever, multiply(c, constant({ n: 1, d: 2 }))));
    return { force, moment: multiply(force, middle) };
  }
  const force = multiply(multiply(add(w0, w1), c), constant({ n: 1, d: 2 }));
  const weighted = add(w0, multiply(w1, constant(2)));
  const aboutStart = multiply(multiply(weighted, multiply(c, c)), constant({ n: 1, d: 6 }));
  return { force, moment: add(multiply(force, lever), aboutStart) };
}
