/** Laws that hold for every beam: seen from behind it is mirrored, in other units it is scaled. */
import { type Reaction, type Solution, solveBeam } from '../beam/index';
import { type Beam, type BeamDocument, type Load, type Redundant, readBeam } from '../model/index';
import { evaluate, type Piecewise } from '../polynomial/index';
import { relative, type Scales, scalesOf } from '../proof/index';
import { solveStiffness } from '../stiffness/index';
import type { SolvedPoint } from './proof-solve';

type BeamOf<L> = Omit<BeamDocument, 'loads'> & { loads: L };
type Drawn = BeamOf<Load[]>;

/** Places where results are compared, as shares of the length: irrational ones, where no template puts a load. */
const PLACES = Array.from({ length: 16 }, (_, k) => ((k + 1) * (Math.sqrt(5) - 1)) / 2).map((x) => x % 1);

export type Sample = {
  readonly shear: readonly number[];
  readonly moment: readonly number[];
  readonly slope: readonly number[];
  readonly deflection: readonly number[];
  readonly forces: readonly number[];
  readonly couples: readonly number[];
};

/** The solution's values at the same shares of its length; from the right end, where `mirrored`. */
export function sampleOf({ diagrams, reactions }: Solution, length: number, mirrored = false): Sample {
  const read = (diagram: Piecewise) =>
    PLACES.map((share) => evaluate(diagram, (mirrored ? 1 - share : share) * length)[0]);
  return {
    shear: read(diagrams.shear),
    moment: read(diagrams.moment),
    slope: read(diagrams.slope),
    deflection: read(diagrams.deflection),
    forces: reactions.map(({ vertical }: Reaction) => vertical),
    couples: reactions.map(({ moment }: Reaction) => moment),
  };
}

const KINDS = {
  shear: 'force',
  moment: 'moment',
  slope: 'rotation',
  deflection: 'deflection',
  forces: 'force',
  couples: 'moment',
} as const;
const QUANTITIES = ['shear', 'moment', 'slope', 'deflection', 'forces', 'couples'] as const;

/** The largest values of each kind in a solution. */
export const ownScales = (beam: Beam, solution: Solution): Scales =>
  scalesOf(beam, solution.reactions, solveStiffness(beam));

/** The largest difference of two samples, each as a share of the largest value of its kind. */
export function sampleDifference(scales: Scales, sample: Sample, other: Sample): number {
  return Math.max(
    ...QUANTITIES.map((quantity) => {
      const [a, b] = [sample[quantity], other[quantity]];
      if (a.length !== b.length) return Number.POSITIVE_INFINITY;
      return Math.max(
        0,
        ...a.map((value, k) => relative(value - (b[k] ?? Number.NaN), scales[KINDS[quantity]])),
      );
    }),
  );
}

/** The beam seen from behind: x runs from the other end, couples and rotations turn the other way. */
export function mirroredBeam(beam: Drawn): Drawn {
  const { length, supports, segments, hinges, loads, redundants } = beam;
  const last = supports.length - 1;
  return {
    ...beam,
    supports: supports
      .map((support) => ({
        ...support,
        at: length - support.at,
        ...(support.rotation !== undefined && { rotation: -support.rotation }),
      }))
      .reverse(),
    segments: segments
      ?.map((segment) => ({ ...segment, from: length - segment.to, to: length - segment.from }))
      .reverse(),
    hinges: hinges?.map((at) => length - at).reverse(),
    loads: loads.map((load) => mirroredLoad(load, length)),
    redundants: redundants?.map(
      (redundant): Redundant =>
        'support' in redundant
          ? { ...redundant, support: last - redundant.support }
          : { ...redundant, at: length - redundant.at },
    ),
  };
}

function mirroredLoad(load: Load, length: number): Load {
  switch (load.kind) {
    case 'point':
      return { ...load, at: length - load.at };
    case 'couple':
      return { ...load, at: length - load.at, m: -load.m };
    case 'line':
      return { ...load, from: length - load.to, to: length - load.from, w0: load.w1, w1: load.w0 };
    case 'curvature':
      return { ...load, from: length - load.to, to: length - load.from };
  }
}

const negative = (values: readonly number[]) => values.map((value) => -value);

/** How far the mirrored beam is from giving the mirrored results: V and θ turn, M and v stay. */
export function mirrorDifference(point: SolvedPoint): number {
  const other = solved(mirroredBeam(point.instance.beam));
  const sample = sampleOf(other, point.beam.length, true);
  return sampleDifference(ownScales(point.beam, point.solution), ownSample(point), {
    ...sample,
    shear: negative(sample.shear),
    slope: negative(sample.slope),
    forces: [...sample.forces].reverse(),
    couples: negative(sample.couples).reverse(),
  });
}

/** How many times longer, more loaded and stiffer a beam is made. */
export type Factors = { readonly length: number; readonly force: number; readonly stiffness: number };

/**
 * The beam with its lengths, forces and EI multiplied, and all the rest by what its dimension then asks for: a moment
 * by force × length, a movement as δ ∝ P L³/EI, a spring so that it yields in proportion.
 */
export function scaledBeam(beam: Drawn, factors: Factors): Drawn {
  const { length: l, stiffness: e } = factors;
  const shear = (ga: number | null | undefined) => (ga == null ? {} : { ga: (ga * e) / l ** 2 });
  const movement = movementFactors(factors);
  return {
    ...beam,
    length: beam.length * l,
    ...(beam.ei !== undefined && { ei: beam.ei * e }),
    ...shear(beam.ga),
    supports: beam.supports.map(({ at, kind, kv, kr, rise, rotation }) => ({
      at: at * l,
      kind,
      ...(kv !== undefined && { kv: (kv * e) / l ** 3 }),
      ...(kr !== undefined && { kr: (kr * e) / l }),
      ...(rise !== undefined && { rise: rise * movement.deflection }),
      ...(rotation !== undefined && { rotation: rotation * movement.slope }),
    })),
    segments: beam.segments?.map((segment) => ({
      from: segment.from * l,
      to: segment.to * l,
      ei: segment.ei * e,
      ...shear(segment.ga),
    })),
    hinges: beam.hinges?.map((at) => at * l),
    loads: beam.loads.map((load) => scaledLoad(load, factors)),
    redundants: beam.redundants?.map((one) => ('support' in one ? one : { ...one, at: one.at * l })),
  };
}

function scaledLoad(load: Load, { length: l, force: f, stiffness: e }: Factors): Load {
  switch (load.kind) {
    case 'point':
      return { ...load, at: load.at * l, p: load.p * f };
    case 'couple':
      return { ...load, at: load.at * l, m: load.m * f * l };
    case 'line':
      return { ...load, from: load.from * l, to: load.to * l, w0: (load.w0 * f) / l, w1: (load.w1 * f) / l };
    case 'curvature':
      return { ...load, from: load.from * l, to: load.to * l, kappa: (load.kappa * f * l) / e };
  }
}

/** θ ∝ P L²/EI and δ ∝ P L³/EI. */
const movementFactors = ({ length: l, force: f, stiffness: e }: Factors) => ({
  slope: (f * l ** 2) / e,
  deflection: (f * l ** 3) / e,
});

/** How far the scaled beam is from giving results in proportion: V by force, M by force × length, θ and δ as above. */
export function scalingDifference(point: SolvedPoint, factors: Factors): number {
  const other = solved(scaledBeam(point.instance.beam, factors));
  const sample = sampleOf(other, point.beam.length * factors.length);
  const { slope, deflection } = movementFactors(factors);
  const by = (values: readonly number[], factor: number) => values.map((value) => value / factor);
  const moment = factors.force * factors.length;
  return sampleDifference(ownScales(point.beam, point.solution), ownSample(point), {
    shear: by(sample.shear, factors.force),
    moment: by(sample.moment, moment),
    slope: by(sample.slope, slope),
    deflection: by(sample.deflection, deflection),
    forces: by(sample.forces, factors.force),
    couples: by(sample.couples, moment),
  });
}

const ownSample = ({ solution, beam }: SolvedPoint): Sample => sampleOf(solution, beam.length);

/** A beam that was read is read again mirrored or scaled; anything else is our mistake. */
function solved(document: Drawn): Solution {
  const reading = readBeam(document);
  if (!reading.ok) throw new RangeError(`A beam made from a sound one is not: ${reading.faults[0]?.message}`);
  return solveBeam(reading.value, document.redundants);
}
