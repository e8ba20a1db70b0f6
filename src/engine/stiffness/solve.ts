import type { Reaction } from '../beam/index';
import { Wide } from '../linear/index';
import type { Beam, Restraint } from '../model/index';
import { SymmetricBand } from './band';
import {
  type Element,
  elementStiffness,
  elementsOf,
  fixedEndForces,
  pointsOf,
  type SectionState,
  stateAt,
} from './element';

export type State = { shear: number; moment: number; slope: number; deflection: number };

/** A piece between two points, with the state just inside its ends and at its middle. */
export type StiffnessPiece = { from: number; to: number; left: State; middle: State; right: State };

export type StiffnessSolution = { pieces: StiffnessPiece[]; reactions: Reaction[] };

/** The numbers of a point's unknowns: deflection, and rotation of the piece at its left and at its right. */
type Unknowns = { deflection: number; left: number; right: number };

/**
 * The beam by the direct stiffness method: unknown deflections and rotations at every point, K u = f, banded L D Lᵀ
 * with twice the usual digits. Independent of the force method: it shares the model and the arithmetic of wide numbers, and nothing else.
 *
 * Units and signs: the engine's (m, N, rad; up and anticlockwise positive, M sagging). Prescribed movements are known
 * values; springs stand on the diagonal; a hinge has two rotations. Fails with SingularStiffness for a mechanism.
 */
export function solveStiffness(beam: Beam): StiffnessSolution {
  const points = pointsOf(beam);
  const elements = elementsOf(beam, points);
  const unknowns = numberUnknowns(beam, points);
  const size = unknowns.at(-1)!.right + 1;
  const matrix = new SymmetricBand(size);
  const right = Array.from({ length: size }, () => Wide.ZERO);

  const parts = elements.map((element, k) => ({
    element,
    ends: endsOf(unknowns, k),
    stiffness: elementStiffness(element),
    fixed: fixedEndForces(element),
  }));
  for (const { ends, stiffness, fixed } of parts) {
    ends.forEach((i, a) => {
      right[i] = right[i]!.minus(fixed[a]!);
      ends.forEach((j, b) => {
        if (j <= i) matrix.add(i, j, stiffness[a]![b]!);
      });
    });
  }

  const at = new Map(points.map((x, k) => [x, unknowns[k]!]));
  for (const load of beam.loads) {
    if (load.kind === 'point') addTo(right, at.get(load.at)!.deflection, -load.p);
    if (load.kind === 'couple') addTo(right, at.get(load.at)!.right, load.m);
  }
  for (const support of beam.supports) {
    restrain(matrix, right, at.get(support.at)!.deflection, support.vertical);
    restrain(matrix, right, at.get(support.at)!.right, support.rotation);
  }

  const movements = matrix.solve(right);
  const pieces = parts.map((part) => pieceStates(part, movements));
  return { pieces: pieces.map(({ rounded }) => rounded), reactions: reactionsOf(beam, points, pieces) };
}

function numberUnknowns(beam: Beam, points: readonly number[]): Unknowns[] {
  let next = 0;
  return points.map((x) => {
    const deflection = next++;
    const left = next++;
    return { deflection, left, right: beam.hinges.includes(x) ? next++ : left };
  });
}

function endsOf(unknowns: readonly Unknowns[], k: number): number[] {
  const [a, b] = [unknowns[k]!, unknowns[k + 1]!];
  return [a.deflection, a.right, b.deflection, b.left];
}

function addTo(right: Wide[], i: number, value: number): void {
  right[i] = right[i]!.plus(Wide.of(value));
}

function restrain(matrix: SymmetricBand, right: Wide[], i: number, restraint: Restraint): void {
  if (restraint.kind === 'rigid') matrix.prescribe(i, Wide.of(restraint.movement), right);
  if (restraint.kind === 'spring') {
    const stiffness = Wide.of(restraint.stiffness);
    matrix.add(i, i, stiffness);
    right[i] = right[i]!.plus(stiffness.times(restraint.movement));
  }
}

type Part = { element: Element; ends: number[]; stiffness: Wide[][]; fixed: Wide[] };

type PieceStates = { left: SectionState; right: SectionState; rounded: StiffnessPiece };

function pieceStates({ element, ends, stiffness, fixed }: Part, movements: readonly Wide[]): PieceStates {
  const moved = ends.map((i) => movements[i]!);
  const forces = fixed.map((held, a) =>
    moved.reduce((total, u, b) => total.plus(stiffness[a]![b]!.times(u)), held),
  );
  const [v1, r1, v2, r2] = moved as [Wide, Wide, Wide, Wide];
  const [f1, m1, f2, m2] = forces as [Wide, Wide, Wide, Wide];
  const left = { shear: f1, moment: m1.negated(), rotation: r1, deflection: v1 };
  const right = { shear: f2.negated(), moment: m2, rotation: r2, deflection: v2 };
  const middle = stateAt(element, left, element.length.over(2));
  const rounded = {
    from: element.from,
    to: element.to,
    left: rounding(element, left),
    middle: rounding(element, middle),
    right: rounding(element, right),
  };
  return { left, right, rounded };
}

/** The slope of the axis is dv/dx = ψ − V/GA. */
function rounding(
  { shearFlexibility }: Element,
  { shear, moment, rotation, deflection }: SectionState,
): State {
  return {
    shear: shear.rounded(),
    moment: moment.rounded(),
    slope: rotation.minus(shear.times(shearFlexibility)).rounded(),
    deflection: deflection.rounded(),
  };
}

/** A support carries what the shear and the moment jump by, beyond the loads on it. */
function reactionsOf(beam: Beam, points: readonly number[], pieces: readonly PieceStates[]): Reaction[] {
  return beam.supports.map((support) => {
    const k = points.indexOf(support.at);
    const before = pieces[k - 1]?.right;
    const after = pieces[k]?.left;
    let vertical = (after?.shear ?? Wide.ZERO).minus(before?.shear ?? Wide.ZERO);
    let moment = (before?.moment ?? Wide.ZERO).minus(after?.moment ?? Wide.ZERO);
    for (const load of beam.loads) {
      if (load.kind === 'point' && load.at === support.at) vertical = vertical.plus(Wide.of(load.p));
      if (load.kind === 'couple' && load.at === support.at) moment = moment.minus(Wide.of(load.m));
    }
    return {
      at: support.at,
      vertical: support.vertical.kind === 'free' ? 0 : vertical.rounded(),
      moment: support.rotation.kind === 'free' ? 0 : moment.rounded(),
    };
  });
}
