import { Sum, settled, Wide } from '../linear/index';
import { placeOf, type Restraint } from '../model/index';
import type { Actions } from './actions';
import { diagramsOf } from './diagrams';
import type { Flexibility } from './flexibility';
import { floorOf } from './scale';
import { curveOf, forcesOf, type Holding, placedCurve } from './state';
import type { Diagrams, Reaction } from './types';

/** The beam under some actions and given values of the redundants. */
export type BeamState = { reactions: Reaction[]; diagrams: Diagrams };

/** The released beam under actions, with the reactions they cause, and the redundants that are added to it. */
export type Superposed = {
  actions: Actions;
  released: readonly Wide[];
  values: readonly Wide[];
  /** Whether the supports are moved as prescribed. */
  moved: boolean;
};

/** The loads on the released beam and each unit state times its redundant, then equilibrium and the deflected shape. */
export function superpose(flexibility: Flexibility, superposed: Superposed): BeamState {
  const { mesh, reactions } = flexibility;
  const { actions, values, moved } = superposed;
  const totals = totalReactions(flexibility, superposed);
  const holding = holdingOf(flexibility, totals, values);
  const { shear, moment } = forcesOf(mesh, actions, holding);
  const floor = floorOf(mesh, actions, [...shear, ...holding.up], [...moment, ...holding.turn]);
  const forces = { shear: settled(shear, floor.force), moment: settled(moment, floor.couple) };
  const movements = reactions.map(({ restraint }, c) => yielding(restraint, totals[c]!, moved));
  const placed = placedCurve(mesh, curveOf(mesh, actions, forces), reactions, movements);
  return {
    reactions: supportReactions(
      flexibility,
      settled(holding.up, floor.force),
      settled(holding.turn, floor.couple),
    ),
    diagrams: diagramsOf(mesh, actions, forces, placed),
  };
}

/** R = R₀ + Σ X r, of the reactions of the released beam. */
function totalReactions({ units }: Flexibility, { released, values }: Superposed): Wide[] {
  const sums = released.map((value) => {
    const sum = new Sum();
    sum.add(value);
    return sum;
  });
  units.forEach(({ reactions }, i) => {
    for (const [c, reaction] of reactions) sums[c]!.add(reaction.times(values[i]!));
  });
  return sums.map((sum) => sum.total());
}

/** How far a restraint lets its point go while it carries `force`: where it is held, less what its spring gives. */
export function yielding(restraint: Restraint, force: Wide, moved: boolean): Wide {
  if (restraint.kind === 'free') return Wide.ZERO;
  const movement = moved ? Wide.of(restraint.movement) : Wide.ZERO;
  return restraint.kind === 'spring' ? movement.minus(force.over(restraint.stiffness)) : movement;
}

/** The reactions and the redundants among them, at the points where they act. */
export function holdingOf(
  { beam, mesh, reactions, redundants }: Flexibility,
  forces: readonly Wide[],
  values: readonly Wide[],
): Holding {
  const zeros = () => new Array<Wide>(mesh.points.length).fill(Wide.ZERO);
  const holding: Holding = { up: zeros(), turn: zeros() };
  const act = (at: number, component: 'vertical' | 'rotation', value: Wide) => {
    holding[component === 'vertical' ? 'up' : 'turn'][mesh.index.get(at)!] = value;
  };
  reactions.forEach(({ at, component }, c) => {
    act(at, component, forces[c]!);
  });
  redundants.forEach((redundant, i) => {
    if (redundant.component !== 'moment') act(placeOf(beam, redundant), redundant.component, values[i]!);
  });
  return holding;
}

/** No two supports share a point, so what holds the beam at a support's point is its reaction. */
function supportReactions(
  { beam, mesh }: Flexibility,
  up: readonly Wide[],
  turn: readonly Wide[],
): Reaction[] {
  return beam.supports.map(({ at }) => {
    const i = mesh.index.get(at)!;
    return { at, vertical: up[i]!.rounded(), moment: turn[i]!.rounded() };
  });
}
