import type { ChannelDimensions } from './dimensions';

/** Area and first moment about z = 0 of what lies left of z. */
type Left = { area: number; moment: number };

const slab = (from: number, to: number, height: number): Left =>
  to <= from
    ? { area: 0, moment: 0 }
    : { area: height * (to - from), moment: (height * (to ** 2 - from ** 2)) / 2 };

/** Two root fillets, from the web's face at z = start to z: height r − √(r² − (r − s)²) at s from the face. */
function filletsLeft(r: number, start: number, z: number): Left {
  const u = Math.min(Math.max(z - start, 0), r);
  if (u === 0) return { area: 0, moment: 0 };
  const v = r - u;
  const circle = (x: number) => (x * Math.sqrt(r ** 2 - x ** 2) + r ** 2 * Math.asin(x / r)) / 2;
  const sector = circle(r) - circle(v);
  const area = r * u - sector;
  const about = (r * u ** 2) / 2 - (r * sector - (r ** 2 - v ** 2) ** 1.5 / 3);
  return { area: 2 * area, moment: 2 * (about + start * area) };
}

function left(d: ChannelDimensions, z: number): Left {
  const pieces = [slab(0, Math.min(z, d.tw), d.h), slab(d.tw, z, 2 * d.tf), filletsLeft(d.r, d.tw, z)];
  return pieces.reduce((sum, piece) => ({ area: sum.area + piece.area, moment: sum.moment + piece.moment }));
}

const HALVINGS = 60; // each halves the bracket: below the last bit of the width

/**
 * Plastic modulus of a channel about its minor axis, m³: first moment of both halves about the axis that parts the
 * area in two. The axis is found by halving; it may lie in the web, in the fillets or in the flanges.
 */
export function channelMinorPlastic(d: ChannelDimensions): number {
  const whole = left(d, d.b);
  let low = 0;
  let high = d.b;
  for (let step = 0; step < HALVINGS; step++) {
    const middle = (low + high) / 2;
    if (left(d, middle).area < whole.area / 2) low = middle;
    else high = middle;
  }
  return whole.moment - 2 * left(d, low).moment;
}
