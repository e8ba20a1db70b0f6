import { type Beam, letteredSupports, type Segment } from '../model/index';
import { add, evaluate, integralOfProduct, multiply, type Piecewise, piecewise } from '../polynomial/index';
import type { Solution } from './types';

/**
 * The movement of the free end of an overhang or a cantilever, m, positive up, and what it is made of. The parts add up
 * to the total; each comes from another integral than the total does.
 */
export type TipParts = {
  /** Where the tip is, and the support that it hangs on, by its place in the beam's list. */
  at: number;
  support: number;
  total: number;
  /** The support's own movement: prescribed, a spring's, or that of one which may slide. */
  settlement: number;
  /** The section's rotation over the support times the length of the overhang. */
  rotation: number;
  /** Bending of the overhang as a cantilever, with its free curvature: ∫ (M/EI + κ) · distance from the tip. */
  bending: number;
  /** Shear of the overhang: ∫ V/GA. 0 where it does not shear. */
  shear: number;
};

/** A free end, and the support nearest to it, beyond which nothing can hold or fold. */
type Overhang = { end: 'left' | 'right'; from: number; to: number; support: number };

/** The free ends of the beam from the left: those that no support stands at. */
export function tipParts(beam: Beam, solution: Pick<Solution, 'diagrams'>): TipParts[] {
  const held = letteredSupports(beam).filter(
    ({ support: { vertical, rotation } }) => vertical.kind !== 'free' || rotation.kind !== 'free',
  );
  const [first, last] = [held[0]!, held.at(-1)!];
  const overhangs: Overhang[] = [
    { end: 'left', from: 0, to: first.support.at, support: first.index },
    { end: 'right', from: last.support.at, to: beam.length, support: last.index },
  ];
  return overhangs.filter(({ from, to }) => from < to).map((overhang) => partsOf(beam, solution, overhang));
}

/**
 * With ψ' = M/EI + κ and v' = ψ − V/GA from the support s to the tip, a away:
 *
 *   right   v = v_s + ψ_s a + ∫ (tip − x)(M/EI + κ) dx − ∫ V/GA dx
 *   left    v = v_s − ψ_s a + ∫ (x − tip)(M/EI + κ) dx + ∫ V/GA dx
 */
function partsOf(
  beam: Beam,
  { diagrams }: Pick<Solution, 'diagrams'>,
  { end, from, to, support }: Overhang,
): TipParts {
  const isRight = end === 'right';
  const [at, root] = isRight ? [to, from] : [from, to];
  const outward = isRight ? 1 : -1;
  const over = (inside: readonly number[]) => onlyBetween(beam.length, from, to, inside);
  const arm = over(isRight ? [to - from, -1] : [0, 1]);
  const side = isRight ? 1 : 0;
  const shearing = perSegment(beam, ({ ga }) => (ga === null ? 0 : 1 / ga));
  const slip = multiply(diagrams.shear, shearing);
  const turn = evaluate(diagrams.slope, root)[side] + evaluate(slip, root)[side];
  return {
    at,
    support,
    total: evaluate(diagrams.deflection, at)[0],
    settlement: evaluate(diagrams.deflection, root)[side],
    rotation: outward * turn * (to - from) + 0,
    bending: integralOfProduct(curvatureOf(beam, diagrams.moment), arm),
    shear: -outward * integralOfProduct(slip, over([1])) + 0,
  };
}

/** M/EI and the free curvatures, 1/m, sagging. */
function curvatureOf(beam: Beam, moment: Piecewise): Piecewise {
  const bending = multiply(
    moment,
    perSegment(beam, ({ ei }) => 1 / ei),
  );
  return beam.loads.reduce(
    (sum, load) =>
      load.kind === 'curvature' && load.to > load.from
        ? add(sum, onlyBetween(beam.length, load.from, load.to, [load.kappa]))
        : sum,
    bending,
  );
}

const perSegment = ({ segments }: Beam, value: (segment: Segment) => number): Piecewise =>
  piecewise(
    [0, ...segments.map(({ to }) => to)],
    segments.map((segment) => [value(segment)]),
  );

/** A polynomial, about `from`, between two places, and 0 elsewhere. */
function onlyBetween(length: number, from: number, to: number, inside: readonly number[]): Piecewise {
  const pieces = [
    { from: 0, to: from, coefficients: [0] },
    { from, to, coefficients: inside },
    { from: to, to: length, coefficients: [0] },
  ].filter((piece) => piece.from < piece.to);
  return piecewise(
    [0, ...pieces.map((piece) => piece.to)],
    pieces.map(({ coefficients }) => coefficients),
  );
}
