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
      const [first, end] = [mesh.index.get(load.from)!, mesh.index.get(load.to)!];
      const size = Wide.of(load.kind === 'line' ? load.w0 : load.kappa);
      const varies = load.kind === 'line' && load.w0 !== load.w1 && end > first;
      const rate = varies
        ? Wide.difference(load.w1, load.w0).over(Wide.difference(load.to, load.from))
        : Wide.ZERO;
      const list = load.kind === 'line' ? actions.start : actions.curvature;
      for (let k = first; k < end; k++) {
        if (!varies) {
          add(list, k, size);
          continue;
        }
        const run = Wide.difference(mesh.points[k]!, load.from);
        add(list, k, size.plus(rate.times(run)));
        add(actions.rate, k, rate);
      }
    }
  }
  return actions;
}
