import { Wide } from '../linear/index';
import type { Beam } from '../model/index';

/** A piece of the beam between two neighbouring points: constant EI and GA, a load varying linearly, one curvature. */
export type Element = {
  from: number;
  to: number;
  /** Length, EI, and 1/GA (0 where the piece does not shear). */
  length: Wide;
  ei: Wide;
  shearFlexibility: Wide;
  /** Φ = 12 EI / (GA h²) */
  phi: Wide;
  /** Downward load at the left and right end, N/m. */
  load: readonly [Wide, Wide];
  /** Free curvature, 1/m, sagging. */
  curvature: Wide;
};

/** What acts at one cross-section: V, M, the section's rotation ψ and the deflection v. */
export type SectionState = { shear: Wide; moment: Wide; rotation: Wide; deflection: Wide };

/** Every position where something starts, stops or acts, ascending. */
export function pointsOf(beam: Beam): number[] {
  const points = new Set([0, beam.length, ...beam.hinges]);
  for (const support of beam.supports) points.add(support.at);
  for (const segment of beam.segments) points.add(segment.from).add(segment.to);
  for (const load of beam.loads) {
    if (load.kind === 'point' || load.kind === 'couple') points.add(load.at);
    else points.add(load.from).add(load.to);
  }
  return [...points].sort((a, b) => a - b);
}

export function elementsOf(beam: Beam, points: readonly number[]): Element[] {
  const { loads, curvatures } = actingOn(beam, points);
  let s = 0;
  return loads.map((load, k) => {
    const [from, to] = [points[k]!, points[k + 1]!];
    while (beam.segments[s]!.to < to) s++;
    const segment = beam.segments[s]!;
    const length = Wide.difference(to, from);
    const ei = Wide.of(segment.ei);
    const shearFlexibility = segment.ga === null ? Wide.ZERO : Wide.ONE.over(segment.ga);
    const phi = ei.times(12).times(shearFlexibility).over(length.times(length));
    return { from, to, length, ei, shearFlexibility, phi, load, curvature: curvatures[k]! };
  });
}

/** The line load and its rate, and the free curvature, right of a point; or what they change by there. */
type Acting = { intensity: Wide; rate: Wide; curvature: Wide };

/**
 * The line loads and the curvatures on each piece, in one walk along the points, so that many loads on many points cost
 * their sum and not their product. What rounding leaves of a load beyond its end is 2⁻¹⁰² of it.
 */
function actingOn(beam: Beam, points: readonly number[]) {
  const onsets = onsetsOf(beam, points);
  const loads: (readonly [Wide, Wide])[] = [];
  const curvatures: Wide[] = [];
  let acting: Acting = NOTHING;
  for (let k = 0; k < points.length - 1; k++) {
    acting = joined(acting, onsets[k]!, 1);
    const run = Wide.difference(points[k + 1]!, points[k]!);
    const end = acting.intensity.plus(acting.rate.times(run));
    loads.push([acting.intensity, end]);
    curvatures.push(acting.curvature);
    acting = { ...acting, intensity: end };
  }
  return { loads, curvatures };
}

const NOTHING: Acting = { intensity: Wide.ZERO, rate: Wide.ZERO, curvature: Wide.ZERO };

function onsetsOf(beam: Beam, points: readonly number[]): Acting[] {
  const onsets = points.map(() => NOTHING);
  const index = new Map(points.map((x, k) => [x, k]));
  const add = (x: number, change: Acting, sense: 1 | -1) => {
    const k = index.get(x)!;
    onsets[k] = joined(onsets[k]!, change, sense);
  };
  for (const load of beam.loads) {
    if (load.kind === 'point' || load.kind === 'couple' || load.from === load.to) continue;
    if (load.kind === 'curvature') {
      const change = { ...NOTHING, curvature: Wide.of(load.kappa) };
      add(load.from, change, 1);
      add(load.to, change, -1);
    } else {
      const rate = Wide.difference(load.w1, load.w0).over(Wide.difference(load.to, load.from));
      add(load.from, { ...NOTHING, intensity: Wide.of(load.w0), rate }, 1);
      add(load.to, { ...NOTHING, intensity: Wide.of(load.w1), rate }, -1);
    }
  }
  return onsets;
}

const joined = (a: Acting, b: Acting, sense: 1 | -1): Acting => ({
  intensity: a.intensity.plus(b.intensity.times(sense)),
  rate: a.rate.plus(b.rate.times(sense)),
  curvature: a.curvature.plus(b.curvature.times(sense)),
});

/**
 * Stiffness of a piece that bends and shears, forces on its ends from (v₁, ψ₁, v₂, ψ₂):
 *
 *   k = EI / ((1 + Φ) h³) · [ 12, 6h, −12, 6h;  ·, (4 + Φ)h², −6h, (2 − Φ)h²;  ·, ·, 12, −6h;  ·, ·, ·, (4 + Φ)h² ]
 *
 * Upward and anticlockwise positive. Exact for a prismatic piece (J. S. Przemieniecki, Theory of Matrix Structural
 * Analysis, 1968, section 5.6, from memory).
 */
export function elementStiffness({ length: h, ei, phi }: Element): Wide[][] {
  const square = h.times(h);
  const unit = ei.over(Wide.ONE.plus(phi).times(square).times(h));
  const twelve = unit.times(12);
  const six = unit.times(6).times(h);
  const near = unit.times(square).times(Wide.of(4).plus(phi));
  const far = unit.times(square).times(Wide.of(2).minus(phi));
  const [minusTwelve, minusSix] = [twelve.negated(), six.negated()];
  return [
    [twelve, six, minusTwelve, six],
    [six, near, minusSix, far],
    [minusTwelve, minusSix, twelve, minusSix],
    [six, far, minusSix, near],
  ];
}

/**
 * Forces on the ends of the piece held fixed under its load and curvature, in the order of elementStiffness.
 * The load is its mean q and half its change d; the mean is symmetric, so shear does not alter its end moments:
 *
 *   mean:       force qh/2, moment ±qh²/12
 *   change:     force ∓dh (6 + 5Φ) / (30 (1 + Φ)), moment −dh² / (60 (1 + Φ))      (own derivation; Φ = 0: ∓dh/5, −dh²/60)
 *   curvature:  moment ±EIκ
 */
export function fixedEndForces({ length: h, ei, phi, load, curvature }: Element): Wide[] {
  const mean = load[0].plus(load[1]).times(0.5);
  const change = load[1].minus(load[0]).times(0.5);
  const stiffened = Wide.ONE.plus(phi);
  const force = mean.times(h).times(0.5);
  const moment = mean.times(h).times(h).over(12).plus(ei.times(curvature));
  const forceOfChange = change
    .times(h)
    .times(Wide.of(6).plus(phi.times(5)))
    .over(stiffened.times(30));
  const momentOfChange = change.times(h).times(h).over(stiffened.times(60));
  return [
    force.minus(forceOfChange),
    moment.minus(momentOfChange),
    force.plus(forceOfChange),
    moment.negated().minus(momentOfChange),
  ];
}

/** The state at s from the left end, from the state there: equilibrium, then ψ' = M/EI + κ and v' = ψ − V/GA. */
export function stateAt(element: Element, start: SectionState, s: Wide): SectionState {
  const { ei, load, length, curvature, shearFlexibility } = element;
  const rate = load[1].minus(load[0]).over(length);
  // V, M − M₀ and the bending parts of ψ and v: the load integrated once, twice, three and four times
  const shear = polynomial(s, [start.shear, load[0].negated(), rate.times(-0.5)]);
  const gain = polynomial(s, [Wide.ZERO, start.shear, load[0].times(-0.5), rate.over(-6)]);
  const bend = polynomial(s, [
    Wide.ZERO,
    start.moment,
    start.shear.times(0.5),
    load[0].over(-6),
    rate.over(-24),
  ]);
  const sag = polynomial(s, [
    Wide.ZERO,
    Wide.ZERO,
    start.moment.times(0.5),
    start.shear.over(6),
    load[0].over(-24),
    rate.over(-120),
  ]);
  return {
    shear,
    moment: start.moment.plus(gain),
    rotation: start.rotation.plus(bend.over(ei)).plus(curvature.times(s)),
    deflection: start.deflection
      .plus(start.rotation.times(s))
      .plus(sag.over(ei))
      .plus(curvature.times(s).times(s).times(0.5))
      .minus(gain.times(shearFlexibility)),
  };
}

function polynomial(s: Wide, coefficients: readonly Wide[]): Wide {
  return coefficients.reduceRight((total, c) => total.times(s).plus(c), Wide.ZERO);
}
