import { Wide } from '../linear/index';
import type { Beam, Redundant, SupportKind } from '../model/index';
import { noActions } from './actions';
import { solveCompatibility } from './compatibility';
import { flexibilityMatrix, flexibilityOf } from './flexibility';
import { isReleased } from './released';
import { type BeamState, superpose } from './superpose';

/**
 * The force method taken apart, for the worked derivation and its drawings:
 * flexibility · values + gaps = imposed, and the state of the beam = loads + Σ values · units.
 */
export type ForceMethodParts = {
  redundants: Redundant[];
  /** The statically determinate beam that is left when the redundants are released, under the beam's own loads. */
  released: Beam;
  /** The released beam under the loads, curvature and the movements of the supports that it keeps. */
  loads: BeamState;
  /** The released beam under a unit value of each redundant alone. */
  units: BeamState[];
  flexibility: number[][];
  gaps: number[];
  imposed: number[];
  values: number[];
};

/** Fails as `solveBeam` does. */
export function forceMethod(beam: Beam, chosen?: readonly Redundant[]): ForceMethodParts {
  const flexibility = flexibilityOf(beam, chosen);
  const { mesh, redundants, rows, reactions, units } = flexibility;
  const solved = solveCompatibility(flexibility, beam.loads, true);
  const none = redundants.map(() => Wide.ZERO);
  const unloaded = { actions: noActions(mesh), released: reactions.map(() => Wide.ZERO), moved: false };
  return {
    redundants: [...redundants],
    released: releasedBeam(beam, redundants),
    loads: superpose(flexibility, { ...solved, values: none }),
    units: units.map((_, i) => superpose(flexibility, { ...unloaded, values: none.with(i, Wide.ONE) })),
    flexibility: flexibilityMatrix(rows),
    gaps: solved.gaps.map((gap) => gap.rounded()),
    imposed: solved.imposed.map((movement) => movement.rounded()),
    values: solved.values.map((value) => value.rounded()),
  };
}

/** The beam without the redundants, as a beam of its own. */
export function releasedBeam(beam: Beam, redundants: readonly Redundant[]): Beam {
  const supports = beam.supports.map((support, i) => {
    const vertical = isReleased(redundants, i, 'vertical') ? ({ kind: 'free' } as const) : support.vertical;
    const rotation = isReleased(redundants, i, 'rotation') ? ({ kind: 'free' } as const) : support.rotation;
    const { horizontal } = support;
    const kind = kindOf(vertical.kind === 'rigid', rotation.kind === 'rigid', horizontal);
    return { ...support, kind, vertical, rotation };
  });
  const cuts = redundants.flatMap((r) => (r.component === 'moment' ? [r.at] : []));
  const hinges = [...beam.hinges, ...cuts].sort((a, b) => a - b);
  return { ...beam, supports, hinges, degree: beam.degree - redundants.length };
}

/** The trade's name for what a support still holds rigidly. */
function kindOf(vertical: boolean, rotation: boolean, horizontal: boolean): SupportKind {
  if (vertical) return rotation ? 'fixed' : horizontal ? 'pin' : 'roller';
  return rotation ? 'guided' : 'free';
}
