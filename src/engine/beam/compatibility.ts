import { Sum, Wide } from '../linear/index';
import type { Load } from '../model/index';
import { type Actions, actionsOf } from './actions';
import type { Flexibility } from './flexibility';
import { resultantsOf, workOf } from './released';
import { floorOf } from './scale';
import { curveOf, forcesOf } from './state';
import { holdingOf, type Superposed, yielding } from './superpose';
import { addWorkOn } from './virtual-work';

/** Part of a prescribed movement that may be the rounding of the number it is given by, and room for a few of them. */
const GIVEN = 2 ** -49;

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
  const resultants = resultantsOf(mesh, actions);
  const released = reactions.map(({ motion }) => workOf(mesh, actions, resultants, motion).negated());
  const none = redundants.map(() => Wide.ZERO);
  const curve = curveOf(mesh, actions, forcesOf(mesh, actions, holdingOf(flexibility, released, none)));
  const movements = reactions.map(({ restraint }, c) => yielding(restraint, released[c]!, moved));
  const imposed = imposedOf(flexibility, moved);
  const gaps: Wide[] = [];
  const missing = units.map((unit, i) => {
    const sum = new Sum();
    addWorkOn(sum, members, unit, curve);
    for (const [c, reaction] of unit.reactions) {
      const movement = movements[c]!;
      if (movement.hi !== 0) sum.subtract(reaction.times(movement));
    }
    gaps.push(sum.total());
    sum.subtract(imposed[i]!);
    return sum.total().negated();
  });
  const values = closing(flexibility, missing, actions, apart(flexibility, imposed, moved));
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

/** What would close the gaps if none of the prescribed movements undid another: Σ |r · movement|, and the gap's own. */
function apart({ factors, reactions, units }: Flexibility, imposed: readonly Wide[], moved: boolean): Wide[] {
  const given = reactions.map(({ restraint }) => yielding(restraint, Wide.ZERO, moved).hi);
  const sizes = units.map((unit, i) => {
    let size = Math.abs(imposed[i]!.hi);
    for (const [c, { hi }] of unit.reactions) size += Math.abs(hi * given[c]!);
    return size;
  });
  return sizes.some((size) => size > 0) ? factors.solve(sizes.map(Wide.of)) : sizes.map(() => Wide.ZERO);
}

/**
 * The redundants that make the missing movements, exactly zero where they come out as nothing but rounding: beside the
 * forces, or beside what the prescribed movements would ask for one by one, as where a beam sinks or turns as a whole.
 */
function closing(
  { mesh, factors, redundants }: Flexibility,
  missing: readonly Wide[],
  actions: Actions,
  moving: readonly Wide[],
): Wide[] {
  const values = factors.solve(missing);
  const isForce = (i: number) => redundants[i]!.component === 'vertical';
  const forces = values.filter((_, i) => isForce(i));
  const couples = values.filter((_, i) => !isForce(i));
  const floor = floorOf(mesh, actions, forces, couples);
  return values.map((value, i) => {
    const nothing = Math.max(isForce(i) ? floor.force : floor.couple, GIVEN * Math.abs(moving[i]!.hi));
    return Math.abs(value.hi) > nothing ? value : Wide.ZERO;
  });
}
