import { Wide } from '../linear/index';
import { type Beam, COINCIDENT } from '../model/index';
import type { Masses } from './types';

/** A piece of the beam of constant stiffness whose mass varies linearly: kg/m at its ends. */
export type Piece = {
  from: number;
  to: number;
  ei: number;
  ga: number | null;
  start: number;
  end: number;
};

/** The beam cut wherever its stiffness or mass changes or something holds or burdens it; kg at the points with a mass. */
export type Vibrating = { beam: Beam; pieces: readonly Piece[]; lumped: ReadonlyMap<number, number> };

/** The beam with its masses; positions that coincide with a point of it are brought there. */
export function vibratingBeam(beam: Beam, masses: Masses): Vibrating {
  const known = [0, beam.length, ...beam.supports.map(({ at }) => at), ...beam.hinges];
  const points = [...known, ...beam.segments.map(({ to }) => to)];
  const place = (x: number) => points.find((at) => Math.abs(at - x) <= COINCIDENT * beam.length) ?? x;
  const distributed = masses.distributed.map((mass) => ({
    ...mass,
    from: place(mass.from),
    to: place(mass.to),
  }));
  const lumped = new Map<number, number>();
  for (const { at, mass } of masses.lumped) lumped.set(place(at), (lumped.get(place(at)) ?? 0) + mass);
  const ends = distributed.flatMap(({ from, to }) => [from, to]);
  const cuts = [...new Set([...points, ...ends, ...lumped.keys()])].sort((a, b) => a - b);
  const pieces = cuts.slice(1).map((to, k): Piece => {
    const from = cuts[k]!;
    const { ei, ga } = beam.segments.find((segment) => to <= segment.to)!;
    const over = distributed.filter((mass) => mass.from <= from && to <= mass.to);
    const massAt = (x: number) =>
      over.reduce(
        (sum, mass) => sum + mass.start + ((mass.end - mass.start) * (x - mass.from)) / (mass.to - mass.from),
        0,
      );
    return { from, to, ei, ga, start: massAt(from), end: massAt(to) };
  });
  return { beam, pieces, lumped };
}

/** Terms after which every series has long come to its end: (3)ⁿ/n! is below 10⁻³⁴ from the 48th on. */
const TERMS = 96;
const SMALL = 2 ** -112;

/** The state at one end of a piece: v, ψh, Mh²/EI, Vh³/EI. */
type State = readonly [Wide, Wide, Wide, Wide];

const UNITS: readonly State[] = [0, 1, 2, 3].map((i) => {
  const unit = (k: number) => (k === i ? Wide.ONE : Wide.ZERO);
  return [unit(0), unit(1), unit(2), unit(3)];
});

/**
 * Dynamic stiffness of a piece at ω²: harmonic end forces and moments (up, anticlockwise) of end movements v₁, ψ₁, v₂, ψ₂,
 * rad²/s². Exact solutions, by their power series in s = x/h, of
 *
 *   v' = ψ − V/GA    ψ' = M/EI    M' = V    V' = m ω² v          (shear flexibility; no rotary inertia)
 *
 * which for a uniform mass without shear are the usual sums of cos, sin, cosh and sinh. Carried in 32 digits, since the
 * stiffness of a short piece would drown the rest.
 */
export function dynamicStiffness({ from, to, ei, ga, start, end }: Piece, omega2: number): Wide[][] {
  const h = Wide.difference(to, from);
  const bending = Wide.of(ei);
  const unit = h.times(h).times(h).times(h).times(omega2).over(bending);
  const slip = ga === null ? Wide.ZERO : bending.over(Wide.of(ga).times(h).times(h));
  const inertia = [unit.times(start), unit.times(end - start)] as const;
  const [v, p, m, q] = UNITS.map((state) => carried(state, slip, inertia)) as [State, State, State, State];
  // [v₂ p₂] = A [v₁ p₁] + B [m₁ q₁]
  const determinant = m[0].times(q[1]).minus(q[0].times(m[1]));
  const forces = (movement: readonly [Wide, Wide, Wide, Wide]): Wide[] => {
    const [v1, p1, v2, p2] = movement;
    const gapV = v2.minus(v[0].times(v1)).minus(p[0].times(p1));
    const gapP = p2.minus(v[1].times(v1)).minus(p[1].times(p1));
    const m1 = gapV.times(q[1]).minus(gapP.times(q[0])).over(determinant);
    const q1 = gapP.times(m[0]).minus(gapV.times(m[1])).over(determinant);
    const at = (k: 2 | 3) => v[k].times(v1).plus(p[k].times(p1)).plus(m[k].times(m1)).plus(q[k].times(q1));
    return [q1, m1.negated(), at(3).negated(), at(2)];
  };
  const scale = [bending.over(h.times(h).times(h)), bending.over(h.times(h)), bending.over(h)] as const;
  const columns = UNITS.map((state) => forces(state));
  return [0, 1, 2, 3].map((a) => [0, 1, 2, 3].map((b) => columns[b]![a]!.times(scale[(a % 2) + (b % 2)]!)));
}

/** Of the four, three are zero at most steps: the work is left out where it comes to nothing. */
const product = (a: Wide, b: Wide): Wide => (a.hi === 0 || b.hi === 0 ? Wide.ZERO : a.times(b));
const part = (a: Wide, n: number): Wide => (a.hi === 0 ? Wide.ZERO : a.over(n));

/** The state at s = 1 from that at s = 0. */
function carried(state: State, slip: Wide, [inertia, growth]: readonly [Wide, Wide]): State {
  let term: State = state;
  let before = Wide.ZERO;
  const sum = [...state] as [Wide, Wide, Wide, Wide];
  for (let n = 1; n < TERMS; n++) {
    const [v, p, m, q] = term;
    term = [
      part(p.minus(product(slip, q)), n),
      part(m, n),
      part(q, n),
      part(product(inertia, v).plus(product(growth, before)), n),
    ];
    before = v;
    term.forEach((one, i) => {
      if (one.hi !== 0) sum[i] = sum[i]!.plus(one);
    });
    if (n > 8 && term.every((one, i) => Math.abs(one.hi) <= SMALL * Math.abs(sum[i]!.hi))) break;
  }
  return sum;
}
