import { Wide } from '../linear/index';
import type { Load } from '../model/index';
import type { Mesh } from './mesh';

/**
 * What acts on the mesh. On piece k, at s from its left end, the downward load is start[k] + rate[k]·s and the free
 * curvature is curvature[k]; at point i act the downward force[i] and the anticlockwise couple[i].
 */
export type Actions = {
  start: Wide[];
  rate: Wide[];
  curvature: Wide[];
  force: Wide[];
  couple: Wide[];
};

export function noActions({ points }: Mesh): Actions {
  const zeros = (n: number) => new Array<Wide>(n).fill(Wide.ZERO);
  const pieces = points.length - 1;
  return {
    start: zeros(pieces),
    rate: zeros(pieces),
    curvature: zeros(pieces),
    force: zeros(points.length),
    couple: zeros(points.length),
  };
}

/** The sum of the loads. A line load or a curvature of no length covers no piece. */
export function actionsOf(mesh: Mesh, loads: readonly Load[]): Actions {
  const actions = noActions(mesh);
  const add = (list: Wide[], i: number, value: Wide) => {
    list[i] = list[i]!.plus(value);
  };
  for (const load of loads) {
    if (load.kind === 'point') add(actions.force, mesh.index.get(load.at)!, Wide.of(load.p));
    else if (load.kind === 'couple') add(actions.couple, mesh.index.get(load.at)!, Wide.of(load.m));
    else {
      const rate =
        load.kind === 'line' && load.to > load.from
          ? Wide.difference(load.w1, load.w0).over(Wide.difference(load.to, load.from))
          : Wide.ZERO;
      for (let k = mesh.index.get(load.from)!; k < mesh.index.get(load.to)!; k++) {
        if (load.kind === 'curvature') {
          add(actions.curvature, k, Wide.of(load.kappa));
          continue;
        }
        const run = Wide.difference(mesh.points[k]!, load.from);
        add(actions.start, k, Wide.of(load.w0).plus(rate.times(run)));
        add(actions.rate, k, rate);
      }
    }
  }
  return actions;
}
