import { Wide } from '../linear/index';
import type { Beam } from '../model/index';

/** The beam cut at every point where anything starts, stops or acts. Piece k lies between points k and k + 1. */
export type Mesh = {
  points: Float64Array;
  /** Points that are none of the beam's own: releases within a span. */
  cuts: readonly number[];
  index: ReadonlyMap<number, number>;
  /** Of each piece: its length, 1/EI, and 1/GA (0 where it does not shear). */
  lengths: readonly Wide[];
  bending: readonly Wide[];
  shearing: readonly Wide[];
};

export function meshOf(beam: Beam, releases: readonly number[] = []): Mesh {
  const positions = new Set([0, beam.length, ...beam.hinges]);
  for (const { at } of beam.supports) positions.add(at);
  for (const { from, to } of beam.segments) positions.add(from).add(to);
  for (const load of beam.loads) {
    if ('at' in load) positions.add(load.at);
    else positions.add(load.from).add(load.to);
  }
  const cuts = releases.filter((x) => !positions.has(x));
  const points = Float64Array.from([...positions, ...cuts]).sort();
  const flexible = beam.segments.map(({ to, ei, ga }) => ({
    to,
    bending: Wide.ONE.over(ei),
    shearing: ga === null ? Wide.ZERO : Wide.ONE.over(ga),
  }));
  let segment = 0;
  const pieces = Array.from(points.subarray(1), (to, k) => {
    while (flexible[segment]!.to < to) segment++;
    return { length: Wide.difference(to, points[k]!), ...flexible[segment]! };
  });
  return {
    points,
    cuts,
    index: new Map(Array.from(points, (x, i) => [x, i])),
    lengths: pieces.map(({ length }) => length),
    bending: pieces.map(({ bending }) => bending),
    shearing: pieces.map(({ shearing }) => shearing),
  };
}
