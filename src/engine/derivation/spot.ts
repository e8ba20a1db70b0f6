import { constant, type Expression, expand, multiply, subtract, texOf } from '../chart/index';
import type { NamedBeam, NamedSupport } from './named-beam';

/** The supports on either side of a place that hold the beam up. */
function around({ supports }: NamedBeam, x: number): [NamedSupport | undefined, NamedSupport | undefined] {
  const held = supports.filter(({ support }) => support.vertical.kind !== 'free');
  return [held.findLast((s) => s.x < x), held.find((s) => s.x > x)];
}

/** An extreme is found to no better than this share of the beam's length. */
const HALFWAY = 1e-7;

export function isHalfway(beam: NamedBeam, x: number): boolean {
  const [left, right] = around(beam, x);
  return (
    left !== undefined &&
    right !== undefined &&
    Math.abs(left.x + right.x - 2 * x) <= HALFWAY * beam.beam.length
  );
}

/** The formula of a place that the beam's behaviour picks: half of a span, one that is known, or a letter of its own. */
export function placeOf(beam: NamedBeam, x: number, letter: string): Expression {
  const [left, right] = around(beam, x);
  if (left && right && isHalfway(beam, x)) {
    const half = multiply(constant({ n: 1, d: 2 }), expand(subtract(right.at, left.at)));
    return expand([...left.at, ...half]);
  }
  const known = beam.places.find(x);
  if (known) return known;
  let tex = letter;
  for (let k = 2; beam.letters.has(tex); k++) tex = letter.replace('}', ` ${k}}`);
  return beam.places.give(x, beam.letters.define(tex, x, 'length'));
}

/** A place as it stands within brackets or below the line. */
export const placeTex = (beam: NamedBeam, place: Expression): string =>
  texOf(place, beam.letters.symbols()).replaceAll('\\dfrac', '\\tfrac');
