import type { Geometry } from './geometry';

const THIRD = 1 / 3; // a product is several times faster than a quotient

/**
 * The moments that equilibrium alone tells, at the inner ends of the overhangs, and through outer supports that let the
 * beam turn; the shear just right of the last support. The shear just left of the first is the geometry's.
 */
export function hangOverhangs(geometry: Geometry): void {
  hangRight(geometry);
  const { supports, support, piece } = geometry;
  const first = support[0]!;
  let V = 0;
  let M = 0;
  for (let k = 0; k < first.point; k++) {
    const { length: s, start, rate, force, couple } = piece[k]!;
    V -= force;
    M -= couple;
    M += s * (V - (s / 2) * (start + s * rate * THIRD));
    V -= s * (start + (s * rate) / 2);
  }
  first.left = M;
  if (!first.held && supports > 1) first.right = M - piece[first.point]!.couple;
  geometry.hanging = V;
}

function hangRight({ supports, points, support, span, piece }: Geometry): void {
  const last = support[supports - 1]!;
  let V = 0;
  let M = 0;
  for (let k = points - 2; k >= last.point; k--) {
    const { length: s, start, rate } = piece[k]!;
    const { force, couple } = piece[k + 1]!;
    V += force + s * (start + (s * rate) / 2);
    M += couple - s * (V - (s / 2) * (start + s * rate * THIRD));
  }
  span[supports - 1]!.shear = V;
  last.right = M;
  if (!last.held) last.left = M + piece[last.point]!.couple;
}
