import type { CurvatureLoad, LineLoad, Load } from '../model/index';
import type { Geometry } from './geometry';

/** Puts the sum of the loads on the pieces; they act at points of the geometry. Those of no length cover no piece. */
export function applyLoads(geometry: Geometry, loads: readonly Load[]): void {
  clear(geometry);
  const { piece } = geometry;
  geometry.turned = geometry.holds;
  for (let i = 0; i < loads.length; i++) {
    const load = loads[i]!;
    if (load.kind === 'line') spread(geometry, load);
    else if (load.kind === 'point') piece[geometry.pointAt(load.at)]!.force += load.p;
    else if (load.kind === 'couple') {
      piece[geometry.pointAt(load.at)]!.couple += load.m;
      geometry.turned = true;
    } else bend(geometry, load);
  }
}

function clear({ piece, points }: Geometry): void {
  for (let k = 0; k < points; k++) {
    const record = piece[k]!;
    record.start = 0;
    record.rate = 0;
    record.curvature = 0;
    record.force = 0;
    record.couple = 0;
  }
}

function spread(geometry: Geometry, { from, to, w0, w1 }: LineLoad): void {
  const { piece } = geometry;
  const last = geometry.pointAt(to);
  let k = geometry.pointAt(from);
  if (w0 === w1) {
    for (; k < last; k++) piece[k]!.start += w0;
    return;
  }
  const rate = (w1 - w0) / (to - from);
  for (; k < last; k++) {
    const record = piece[k]!;
    record.start += w0 + rate * (record.from - from);
    record.rate += rate;
  }
}

function bend(geometry: Geometry, { from, to, kappa }: CurvatureLoad): void {
  const { piece } = geometry;
  const last = geometry.pointAt(to);
  for (let k = geometry.pointAt(from); k < last; k++) piece[k]!.curvature += kappa;
}
