import { Sum, Wide } from '../linear/index';
import { type Beam, eligibleRedundants, type Load, type Redundant, type Restraint } from '../model/index';
import { extremes, signChanges } from '../polynomial/index';
import { type Actions, actionsOf } from './actions';
import { diagramsOf } from './diagrams';
import { type Flexibility, flexibilityMatrix, flexibilityOf, placeOf } from './flexibility';
import { workOf } from './released';
import { type Curve, curveOf, type Forces, forcesOf, type Holding, placedCurve } from './state';
import type { Diagrams, Extremes, Reaction, Solution } from './types';
import { addWorkOn } from './virtual-work';

/** The released beam under some actions and given values of the redundants. */
export type BeamState = { reactions: Reaction[]; diagrams: Diagrams };

type Solving = {
  actions: Actions;
  released: Wide[];
  gaps: Wide[];
  imposed: Wide[];
  values: Wide[];
  moved: boolean;
};

/** A beam with everything that does not depend on its loads already done. */
export type PreparedBeam = {
  beam: Beam;
  /**
   * The beam under the loads, all of its own unless given. They may be any of the beam's loads, factored or not.
   * `movements: false` leaves the supports where they are, for superposition.
   */
  solve(loads?: readonly Load[], options?: { movements?: boolean }): Solution;
};

/** Solves many load cases of one beam with one flexibility matrix. Fails as `solveBeam` does. */
export function prepareBeam(beam: Beam, redundants?: readonly Redundant[]): PreparedBeam {
  const flexibility = flexibilityOf(beam, redundants);
  const matrix = flexibilityMatrix(flexibility.rows);
  const eligible = eligibleRedundants(beam);
  return {
    beam,
    solve(loads = beam.loads, { movements = true } = {}) {
      const solving = solveCompatibility(flexibility, loads, movements);
      const { reactions, diagrams } = superpose(flexibility, solving);
      return {
        degree: beam.degree,
        reactions,
        diagrams,
        extremes: extremesOf(diagrams),
        contraflexure: signChanges(diagrams.moment),
        forceMethod: {
          redundants: [...flexibility.redundants],
          eligible: [...eligible],
          flexibility: matrix.map((row) => [...row]),
          gaps: solving.gaps.map(rounded),
          imposed: solving.imposed.map(rounded),
          values: solving.values.map(rounded),
        },
      };
    },
  };
}

/**
 * The beam by the force method: released beam, unit states, F·X + Δ₀ = Δ_imposed, superposition, exact diagrams.
 *
 * Any admissible redundants give the same answer, since all of it is carried with twice the usual digits and rounded
 * once. Units and signs: the engine's. Fails with SingularMatrix where the redundants repeat one another to within
 * those digits; `checkRedundants` refuses before that what leaves a mechanism.
 */
export function solveBeam(beam: Beam, redundants?: readonly Redundant[]): Solution {
  return prepareBeam(beam, redundants).solve();
}

/** Gaps of the released beam under the loads, and the redundants that close them. */
export function solveCompatibility(
  flexibility: Flexibility,
  loads: readonly Load[],
  moved: boolean,
): Solving {
  const { beam, mesh, members, reactions, redundants, units, factors } = flexibility;
  const actions = actionsOf(mesh, loads);
  const released = reactions.map(({ motion }) => workOf(mesh, actions, motion).negated());
  const none = redundants.map(() => Wide.ZERO);
  const curve = curveOf(mesh, actions, forcesOf(mesh, actions, holdingOf(flexibility, released, none)));
  const movement = (restraint: Restraint) =>
    moved && restraint.kind !== 'free' ? Wide.of(restraint.movement) : Wide.ZERO;
  const imposed = redundants.map((redundant) =>
    redundant.component === 'moment'
      ? Wide.ZERO
      : movement(beam.supports[redundant.support]![redundant.component]),
  );
  const given = reactions.map(({ restraint }, c) => yielding(restraint, released[c]!, moved));
  const work = units.map((unit) => {
    const sum = new Sum();
    addWorkOn(sum, members, unit, curve);
    given.forEach((value, c) => {
      sum.subtract(unit.reactions[c]!.times(value));
    });
    return sum;
  });
  const gaps = work.map((sum) => sum.total());
  const missing = work.map((sum, i) => {
    sum.subtract(imposed[i]!);
    return sum.total().negated();
  });
  return { actions, released, gaps, imposed, values: factors.solve(missing), moved };
}

/** How far a restraint lets its point go while it carries `force`: where it is held, less what its spring gives. */
function yielding(restraint: Restraint, force: Wide, moved: boolean): Wide {
  if (restraint.kind === 'free') return Wide.ZERO;
  const movement = moved ? Wide.of(restraint.movement) : Wide.ZERO;
  return restraint.kind === 'spring' ? movement.minus(force.over(restraint.stiffness)) : movement;
}

/** The loads on the released beam and each unit state times its redundant, then equilibrium and the deflected shape. */
export function superpose(
  flexibility: Flexibility,
  { actions, released, values, moved }: Pick<Solving, 'actions' | 'released' | 'values' | 'moved'>,
): BeamState {
  const { mesh, reactions, units } = flexibility;
  const totals = released.map((value, c) => {
    const sum = new Sum();
    sum.add(value);
    units.forEach((unit, i) => {
      if (unit.reactions[c]!.hi !== 0) sum.add(unit.reactions[c]!.times(values[i]!));
    });
    return sum.total();
  });
  const forces: Forces = forcesOf(mesh, actions, holdingOf(flexibility, totals, values));
  const curve: Curve = curveOf(mesh, actions, forces);
  const movements = reactions.map(({ restraint }, c) => yielding(restraint, totals[c]!, moved));
  const diagrams = diagramsOf(mesh, actions, forces, placedCurve(mesh, curve, reactions, movements));
  return { reactions: supportReactions(flexibility, totals, values), diagrams };
}

function holdingOf(
  { beam, mesh, reactions, redundants }: Flexibility,
  forces: readonly Wide[],
  values: readonly Wide[],
): Holding {
  const holding: Holding = {
    up: new Array<Wide>(mesh.points.length).fill(Wide.ZERO),
    turn: new Array<Wide>(mesh.points.length).fill(Wide.ZERO),
  };
  const act = (at: number, component: 'vertical' | 'rotation', value: Wide) => {
    const list = component === 'vertical' ? holding.up : holding.turn;
    const i = mesh.index.get(at)!;
    list[i] = list[i]!.plus(value);
  };
  reactions.forEach(({ at, component }, c) => {
    act(at, component, forces[c]!);
  });
  redundants.forEach((redundant, i) => {
    if (redundant.component !== 'moment') act(placeOf(beam, redundant), redundant.component, values[i]!);
  });
  return holding;
}

function supportReactions(
  { beam, reactions, redundants }: Flexibility,
  forces: readonly Wide[],
  values: readonly Wide[],
): Reaction[] {
  const found = beam.supports.map(({ at }) => ({ at, vertical: 0, rotation: 0 }));
  reactions.forEach(({ support, component }, c) => {
    found[support]![component] = rounded(forces[c]!);
  });
  redundants.forEach((redundant, i) => {
    if (redundant.component !== 'moment')
      found[redundant.support]![redundant.component] = rounded(values[i]!);
  });
  return found.map(({ at, vertical, rotation }) => ({ at, vertical, moment: rotation }));
}

function extremesOf({ shear, moment, slope, deflection }: Diagrams): Extremes {
  return {
    shear: extremes(shear),
    moment: extremes(moment),
    slope: extremes(slope),
    deflection: extremes(deflection),
  };
}

const rounded = (value: Wide): number => value.rounded() + 0; // never −0
