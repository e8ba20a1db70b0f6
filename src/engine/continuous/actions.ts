import type { Load } from '../model/index';
import type { Geometry } from './geometry';

/**
 * What acts on a beam. On piece k, at s from its left end, the downward load is start[k] + rate[k]·s and the free
 * curvature is curvature[k]; at point i act the downward force[i] and the anticlockwise couple[i].
 */
export class Actions {
  start = new Float64Array(0);
  rate = new Float64Array(0);
  curvature = new Float64Array(0);
  force = new Float64Array(0);
  couple = new Float64Array(0);

  /** The sum of the loads, which act at points of the geometry; those of no length cover no piece. */
  take(geometry: Geometry, loads: readonly Load[]): void {
    this.clear(geometry.points);
    const { force, couple } = this;
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'line') this.spread(geometry, load.from, load.to, load.w0, load.w1);
      else if (load.kind === 'point') force[geometry.pointAt(load.at)]! += load.p;
      else if (load.kind === 'couple') couple[geometry.pointAt(load.at)]! += load.m;
      else this.bend(geometry, load.from, load.to, load.kappa);
    }
  }

  private spread(geometry: Geometry, from: number, to: number, w0: number, w1: number): void {
    const { start, rate } = this;
    const { x } = geometry;
    const slope = w1 === w0 || to === from ? 0 : (w1 - w0) / (to - from);
    const last = geometry.pointAt(to);
    for (let k = geometry.pointAt(from); k < last; k++) {
      start[k]! += w0 + slope * (x[k]! - from);
      rate[k]! += slope;
    }
  }

  private bend(geometry: Geometry, from: number, to: number, kappa: number): void {
    const last = geometry.pointAt(to);
    for (let k = geometry.pointAt(from); k < last; k++) this.curvature[k]! += kappa;
  }

  private clear(points: number): void {
    if (points > this.force.length) {
      const room = 2 * points;
      this.start = new Float64Array(room);
      this.rate = new Float64Array(room);
      this.curvature = new Float64Array(room);
      this.force = new Float64Array(room);
      this.couple = new Float64Array(room);
      return;
    }
    for (let i = 0; i < points; i++) {
      this.start[i] = 0;
      this.rate[i] = 0;
      this.curvature[i] = 0;
      this.force[i] = 0;
      this.couple[i] = 0;
    }
  }
}
