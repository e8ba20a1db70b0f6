import { Sum, Wide } from '../linear/index';
import type { Load } from '../model/index';
import { type Actions, actionsOf } from './actions';
import type { Flexibility } from './flexibility';
import { workOf } from './released';
import { floorOf } from './scale';
import { curveOf, forcesOf } from './state';
import { holdingOf, type Superposed, yielding } from './superpose';
import { addWorkOn } from './virtual-work';

/** F·X + Δ₀ = Δ_imposed, solved. */
export type Compatibility = Superposed & { gaps: Wide[]; imposed: Wide[] };

/** Gaps of the released beam under the loads, and the redundants that close them. */
export function solveCompatibility(
  flexibility: Flexibility,
  loads: readonly Load[],
  moved: boolean,
): Compatibility {
  const { mesh, members, reactions, redundants, units } = flexibility;
  const actions = actionsOf(mesh, loads);
  const released = reactions.map(({ motion }) => workOf(mesh, actions, motion).negated());
  const none = redundants.map(() => Wide.ZERO);
  const curve = curveOf(mesh, actions, forcesOf(mesh, actions, holdingOf(flexibility, released, none)));
  const movements = reactions.map(({ restraint }, c) => yielding(restraint, released[c]!, moved));
  const imposed = imposedOf(flexibility, moved);
  const gaps: Wide[] = [];
  const missing = units.map((unit, i) => {
    const sum = new Sum();
    addWorkOn(sum, members, unit, curve);
    movements.forEach((movement, c) => {
      if (movement.hi !== 0) sum.subtract(unit.reactions[c]!.times(movement));
    });
    gaps.push(sum.total());
    sum.subtract(imposed[i]!);
    return sum.total().negated();
  });
  const values = closing(flexibility, missing, actions);
  return { actions, released, values, moved, gaps, imposed };
}

/** Prescribed movement of each redundant; there is none across an internal release. */
function imposedOf({ beam, redundants }: Flexibility, moved: boolean): Wide[] {
  return redundants.map((redundant) => {
    const restraint =
      redundant.component !== 'moment' && beam.supports[redundant.support]![redundant.component];
    return moved && restraint && restraint.kind !== 'free' ? Wide.of(restraint.movement) : Wide.ZERO;
  });
}

/** The redundants that make the missing movements, exactly zero where they come out as nothing but rounding. */
function closing(
  { mesh, factors, redundants }: Flexibility,
  missing: readonly Wide[],
  actions: Actions,
): Wide[] {
  const values = factors.solve(missing);
  const isForce = (i: number) => redundants[i]!.component === 'vertical';
  const forces = values.filter((_, i) => isForce(i));
  const couples = values.filter((_, i) => !isForce(i));
  const floor = floorOf(mesh, actions, forces, couples);
  return values.map((value, i) =>
    Math.abs(value.hi) > (isForce(i) ? floor.force : floor.couple) ? value : Wide.ZERO,
  );
}
