import { solveBeam } from '../beam/index';
import {
  add,
  type ChartTerm,
  chartTerms,
  constant,
  type Expression,
  expand,
  movementTerms,
  multiply,
  subtract,
  total,
} from '../chart/index';
import type { Beam, Restraint } from '../model/index';
import { evaluate } from '../polynomial/index';
import type { NamedBeam } from './named-beam';
import { type Piece, piecesOf } from './pieces';
import { calculate, chartsOf, sumUp } from './step';
import type { DerivationStep } from './types';
import { fixingSense, fixingTex, reactionTex } from './unknown';
import type { Worked } from './values';
import { type ReleasedState, workParts, workTex } from './virtual-work';

/** Where a determinate beam's deflection is worth working out: the middle of a span, and free ends. */
type Spot = { x: number; at: Expression; name: string };

/** Deflections of a determinate beam: by the charts at midspan and at free ends, else the largest by virtual work. */
export function deflectionSteps(worked: Worked): DerivationStep[] {
  const pieces = piecesOf(worked.beam, []) ?? [];
  const steps = pieces.flatMap((piece) =>
    spotsOf(worked.beam, piece).map((spot) => charted(worked, piece, spot)),
  );
  return steps.length > 0 && steps.every((step) => step !== null) ? steps : [byVirtualWork(worked)];
}

function spotsOf(beam: NamedBeam, { from, to, released }: Piece): Spot[] {
  const ends = [
    { x: from, at: beam.places.load(from), name: 'the left end' },
    { x: to, at: beam.places.load(to), name: 'the right end' },
  ];
  const isHeld = (x: number) => beam.supports.some((s) => s.x === x && s.support.vertical.kind !== 'free');
  const free = ends.filter(({ x }) => !isHeld(x));
  if (released.kind !== 'simple') return free;
  const half = multiply(constant({ n: 1, d: 2 }), expand(subtract(released.right, released.left)));
  const middle = expand(add(released.left, half));
  const x = beam.letters.of(middle);
  const name = beam.hinges.length > 0 ? `midspan, ${place(x)}` : 'midspan';
  return [{ x, at: middle, name }, ...free];
}

const place = (x: number): string => `${Number(x.toFixed(3))} m from the left end`;

function charted(worked: Worked, piece: Piece, { x, at, name }: Spot): DerivationStep | null {
  const { beam, solution } = worked;
  const setting = beam.setting(piece.ei);
  const found = piece.loads.map((load) => chartTerms(piece.released, load, at, 'deflection', setting));
  if (found.some((terms) => terms === null)) return null;
  const terms: ChartTerm[] = [
    ...found.flatMap((of) => of ?? []),
    ...movementTerms(piece.released, piece.movements, at, 'deflection', setting),
  ];
  return calculate(beam.letters, {
    id: `deflection-${x.toFixed(3)}`,
    title: `Deflection at ${name}`,
    left: '\\delta',
    expression: total(terms),
    value: -evaluate(solution.diagrams.deflection, x)[0],
    kind: 'deflection',
    scale: 'metre',
    extra: { charts: chartsOf(terms), figure: { structure: 'built' } },
  });
}

/** The largest deflection, as the work of the loads' moments on those of a unit load there. */
function byVirtualWork(worked: Worked): DerivationStep {
  const { beam, solution } = worked;
  const { max, min } = solution.extremes.deflection;
  const { value, at } = -min.value >= max.value ? min : max;
  const x = at[0]!;
  const unit = stateOf(beam, { ...still(beam.beam), loads: [{ kind: 'point', at: x, p: 1 }] });
  const parts = workParts(worked, unit, stateOf(beam, beam.beam), true, [x]);
  return sumUp({
    id: 'deflection',
    title: `Largest deflection, ${place(x)}, by a unit load there`,
    left: '\\delta',
    symbols: workTex(beam, { own: '1', other: '', underLoads: true, isAgainst: false }),
    parts,
    value: -value,
    kind: 'deflection',
    scale: 'metre',
    extra: { figure: { structure: 'built' } },
  });
}

/** The beam on supports that stay where they are. */
function still(beam: Beam): Beam {
  const rest = (restraint: Restraint): Restraint =>
    restraint.kind === 'free' ? restraint : { ...restraint, movement: 0 };
  const supports = beam.supports.map((s) => ({
    ...s,
    vertical: rest(s.vertical),
    rotation: rest(s.rotation),
  }));
  return { ...beam, supports };
}

function stateOf(beam: NamedBeam, loaded: Beam): ReleasedState {
  const { reactions, diagrams } = solveBeam(loaded);
  const letters = beam.supports.flatMap((named): [string, number][] => [
    [reactionTex(named), reactions[named.index]!.vertical],
    [fixingTex(named), reactions[named.index]!.moment * fixingSense(beam, named)],
  ]);
  return { reactions: new Map(letters), shear: diagrams.shear, moment: diagrams.moment };
}
