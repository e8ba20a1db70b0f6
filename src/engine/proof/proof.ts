import type { Diagrams, Proof, Reaction } from '../beam/index';
import type { Beam, Restraint } from '../model/index';
import { evaluate, type Piecewise } from '../polynomial/index';
import { pointsOf, type State, type StiffnessPiece, solveStiffness } from '../stiffness/index';
import { magnitude, relative, type Scales, scalesOf } from './scale';

/** What there is to prove. */
type Solved = { diagrams: Diagrams; reactions: readonly Reaction[] };

/** Below this part of the length between two points, doubles leave the force method six digits instead of nine. */
const SHORT = 1e-4;

/** How far a result may be from its proof: 1e-9, or 1e-6 where two points are closer than 1e-4 of the length. */
export function proofLimit(beam: Beam): number {
  const points = pointsOf(beam);
  const shortest = Math.min(...points.slice(1).map((x, k) => x - points[k]!));
  return shortest < SHORT * beam.length ? 1e-6 : 1e-9;
}

/** Whether a result may be shown as a result. A proof that is not a number proves nothing. */
export function isProven(proof: Proof, beam: Beam): boolean {
  const limit = proofLimit(beam);
  return proof.equilibrium <= limit && proof.compatibility <= limit && proof.agreement <= limit;
}

/**
 * Residuals of a solution, each relative to the largest value of its kind (forces, moments, rotations, deflections):
 *
 *   equilibrium    ΣF, ΣM about both ends, and the moment in every hinge
 *   compatibility  v and ψ less the prescribed movement at every rigid support; plus R/k at every spring
 *   agreement      V, M, θ, v just left and right of every point and midway between, and the reactions, against the
 *                  direct stiffness method
 *
 * ψ = θ + V/GA is the section's rotation. Fails with SingularStiffness where the beam is a mechanism.
 */
export function proveSolution(beam: Beam, solution: Solved): Proof {
  const check = solveStiffness(beam);
  const scales = scalesOf(beam, solution.reactions, check);
  return {
    equilibrium: equilibriumOf(beam, solution, scales),
    compatibility: compatibilityOf(beam, solution, scales),
    agreement: Math.max(
      magnitude(check.pieces.map((piece) => pieceDifference(piece, solution, scales))),
      magnitude(check.reactions.map((r, k) => reactionDifference(r, solution.reactions[k]!, scales))),
    ),
    method: 'direct stiffness',
  };
}

type Side = 'left' | 'right';
const SIDES: readonly Side[] = ['left', 'right'];

function valueAt(diagram: Piecewise, x: number, side: Side): number {
  return evaluate(diagram, x)[side === 'left' ? 0 : 1];
}

/** A force (up) with its moment about the left end, and a couple (anticlockwise). */
type Action = { force: number; moment: number };

function actionsOf(beam: Beam, reactions: readonly Reaction[]): Action[] {
  const actions = reactions.flatMap(({ at, vertical, moment }) => [
    { force: vertical, moment: vertical * at },
    { force: 0, moment },
  ]);
  for (const load of beam.loads) {
    if (load.kind === 'point') actions.push({ force: -load.p, moment: -load.p * load.at });
    if (load.kind === 'couple') actions.push({ force: 0, moment: load.m });
    if (load.kind === 'line') {
      const c = load.to - load.from;
      const force = -((load.w0 + load.w1) * c) / 2;
      actions.push({ force, moment: force * load.from - ((load.w0 + 2 * load.w1) * c * c) / 6 });
    }
  }
  return actions;
}

function equilibriumOf(beam: Beam, solution: Solved, scales: Scales): number {
  const actions = actionsOf(beam, solution.reactions);
  const force = actions.reduce((total, action) => total + action.force, 0);
  const aboutEnds = [0, beam.length].map((x) => {
    const moments = actions.map((action) => action.moment - action.force * x);
    const total = moments.reduce((sum, moment) => sum + moment, 0);
    return relative(total, Math.max(magnitude(moments), scales.moment));
  });
  const inHinges = beam.hinges.flatMap((x) =>
    SIDES.map((side) => relative(valueAt(solution.diagrams.moment, x, side), scales.moment)),
  );
  return magnitude([relative(force, scales.force), ...aboutEnds, ...inHinges]);
}

function compatibilityOf(beam: Beam, { diagrams, reactions }: Solved, scales: Scales): number {
  const residuals = beam.supports.flatMap((support, k) => {
    const reaction = reactions[k]!;
    return SIDES.flatMap((side) => {
      const segment = segmentAt(beam, support.at, side);
      const shearing = segment.ga === null ? 0 : valueAt(diagrams.shear, support.at, side) / segment.ga;
      const v = valueAt(diagrams.deflection, support.at, side);
      const rotation = valueAt(diagrams.slope, support.at, side) + shearing;
      return [
        relative(gapOf(support.vertical, v, reaction.vertical), scales.deflection),
        relative(gapOf(support.rotation, rotation, reaction.moment), scales.rotation),
      ];
    });
  });
  return magnitude(residuals);
}

/** What is left between the beam and its support: 0 where nothing holds it. */
function gapOf(restraint: Restraint, moved: number, reaction: number): number {
  if (restraint.kind === 'free') return 0;
  const yielding = restraint.kind === 'spring' ? reaction / restraint.stiffness : 0;
  return moved + yielding - restraint.movement;
}

function segmentAt(beam: Beam, x: number, side: Side) {
  const beside = beam.segments.filter(({ from, to }) => from <= x && x <= to);
  return side === 'left' ? beside[0]! : beside.at(-1)!;
}

function pieceDifference(piece: StiffnessPiece, { diagrams }: Solved, scales: Scales): number {
  const middle = piece.from + (piece.to - piece.from) / 2;
  const places: [State, number, Side][] = [
    [piece.left, piece.from, 'right'],
    [piece.middle, middle, 'right'],
    [piece.right, piece.to, 'left'],
  ];
  return magnitude(
    places.flatMap(([state, x, side]) => [
      relative(valueAt(diagrams.shear, x, side) - state.shear, scales.force),
      relative(valueAt(diagrams.moment, x, side) - state.moment, scales.moment),
      relative(valueAt(diagrams.slope, x, side) - state.slope, scales.rotation),
      relative(valueAt(diagrams.deflection, x, side) - state.deflection, scales.deflection),
    ]),
  );
}

function reactionDifference(a: Reaction, b: Reaction, scales: Scales): number {
  return Math.max(
    relative(a.vertical - b.vertical, scales.force),
    relative(a.moment - b.moment, scales.moment),
  );
}
