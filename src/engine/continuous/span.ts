import type { Piece, Span, Support } from './records';

const SIXTH = 1 / 6; // a product is several times faster than a quotient
const THIRD = 1 / 3;

/**
 * The flexibility of the simple span between two supports:
 *
 *   ∫ m_i m_j/EI dx + ∫ v_i v_j/GA dx        (unit-load theorem)     rad/(N·m)
 *
 * of the moments m that are 1 at one end and 0 at the other, and their shears v = ±1/length.
 */
export function measureSpan(span: Span, piece: readonly Piece[], from: Support, to: Support): void {
  if (to.point > from.point + 1) {
    measurePieces(span, piece, from, to);
    return;
  }
  const { length, bending, shearing } = piece[from.point]!;
  const inverse = 1 / length;
  const sixth = length * bending * SIXTH;
  const slides = shearing * inverse;
  span.inverse = inverse;
  span.near = 2 * sixth + slides;
  span.cross = sixth - slides;
  span.far = 2 * sixth + slides;
}

function measurePieces(
  span: Span,
  piece: readonly Piece[],
  { point: first, at }: Support,
  to: Support,
): void {
  const last = to.point;
  const inverse = 1 / (to.at - at);
  let near = 0;
  let cross = 0;
  let far = 0;
  let slides = 0;
  let q = 0; // ordinates q, r at the piece's ends of the moment that is 1 at the right end of the span; p, o of its twin
  for (let k = first; k < last; k++) {
    const { from, length, bending, shearing } = piece[k]!;
    const r = k + 1 < last ? (from - at + length) * inverse : 1;
    const p = 1 - q;
    const o = 1 - r;
    const sixth = length * bending * SIXTH;
    near += sixth * (p * p + p * o + o * o);
    cross += sixth * (2 * (p * q + o * r) + p * r + o * q);
    far += sixth * (q * q + q * r + r * r);
    slides += length * shearing;
    q = r;
  }
  slides *= inverse * inverse;
  span.inverse = inverse;
  span.near = 2 * near + slides;
  span.cross = cross - slides;
  span.far = 2 * far + slides;
}

/**
 * The simple span under its loads: ∫ m (M₀/EI + κ) dx + ∫ v V₀/GA dx with m = 1 at one end is how far that end turns
 * inwards from the chord.
 */
export function releaseSpan(span: Span, piece: readonly Piece[], from: Support, to: Support): void {
  if (to.point > from.point + 1) {
    releasePieces(span, piece, from, to.point);
    return;
  }
  const { length, bending, start, rate, curvature } = piece[from.point]!;
  const load = start * length;
  const rise = rate * length * length;
  const bend = bending * length * length;
  const turn = (curvature * length) / 2;
  span.leftShear = load / 2 + rise * SIXTH;
  span.rightShear = -load / 2 - rise * THIRD;
  span.leftTurn = bend * (load + rise * (7 / 15)) * (1 / 24) + turn;
  span.rightTurn = bend * (load + rise * (8 / 15)) * (1 / 24) + turn;
}

/**
 * Several pieces: first as a cantilever from the left end, where nothing holds it; then the left reaction V₀ that brings
 * the moment at the right end to 0 adds V₀ x, which is the moment V₀ · length at the right end.
 */
function releasePieces(
  span: Span,
  piece: readonly Piece[],
  { point: first, at }: Support,
  last: number,
): void {
  const { inverse, cross, far: ownFar } = span;
  let V = 0;
  let M = 0;
  let near = 0;
  let far = 0;
  let slid = 0;
  for (let k = first; k < last; k++) {
    const { from, length: s, bending: b, start, rate, curvature, force, couple, shearing } = piece[k]!;
    if (k > first) {
      V -= force;
      M -= couple;
    }
    const change = rate * s;
    const half = s / 2;
    const third = s * THIRD;
    const bent = s * (curvature + b * (M + half * (V - third * (start + change / 4))));
    const lever = half * s * (curvature + b * (M + third * (2 * V - s * 0.75 * (start + change * (4 / 15)))));
    const part = ((from - at) * bent + lever) * inverse;
    far += part;
    near += bent - part;
    const gain = s * (V - half * (start + change * THIRD));
    slid += gain * shearing;
    M += gain;
    V -= s * (start + change / 2);
  }
  span.leftShear = -M * inverse;
  span.rightShear = V - M * inverse;
  span.leftTurn = near - slid * inverse - cross * M;
  span.rightTurn = far + slid * inverse - ownFar * M;
}
