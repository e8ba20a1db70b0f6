import { type Beam, COINCIDENT, type Fault, type Load, metres, type Reading } from '../model/index';
import { STANDARD_GRAVITY } from '../quantity/index';
import type { DistributedMass, LumpedMass, Masses } from './types';

/**
 * The mass of those loads that are weights, w/g and P/g. A couple or a curvature has none, and neither has a load that
 * pulls up anywhere: `leftOut` are the places of such in the list.
 */
export function massOfLoads(
  loads: readonly Load[],
  isWeight: (load: Load) => boolean,
): { masses: Masses; leftOut: number[] } {
  const distributed: DistributedMass[] = [];
  const lumped: LumpedMass[] = [];
  const leftOut: number[] = [];
  loads.forEach((load, i) => {
    if (!isWeight(load)) return;
    if (load.kind === 'point' && load.p >= 0) lumped.push({ at: load.at, mass: load.p / STANDARD_GRAVITY });
    else if (load.kind === 'line' && load.w0 >= 0 && load.w1 >= 0) {
      const { from, to, w0, w1 } = load;
      distributed.push({ from, to, start: w0 / STANDARD_GRAVITY, end: w1 / STANDARD_GRAVITY });
    } else leftOut.push(i);
  });
  return { masses: { distributed, lumped }, leftOut };
}

/** Both together. */
export const joinMasses = (a: Masses, b: Masses): Masses => ({
  distributed: [...a.distributed, ...b.distributed],
  lumped: [...a.lumped, ...b.lumped],
});

/** Kilograms along the beam and at points. */
export function totalMass({ distributed, lumped }: Masses): { distributed: number; lumped: number } {
  return {
    distributed: distributed.reduce(
      (sum, { from, to, start, end }) => sum + ((start + end) / 2) * (to - from),
      0,
    ),
    lumped: lumped.reduce((sum, { mass }) => sum + mass, 0),
  };
}

/** The masses, or everything that keeps them from being the beam's; paths begin with `distributed` or `lumped`. */
export function readMasses({ length }: Beam, masses: Masses): Reading<Masses> {
  const faults: Fault[] = [];
  const fail = (path: Fault['path'], code: Fault['code'], message: string) =>
    faults.push({ path, code, message });
  const position = (x: number, path: Fault['path']) => {
    if (x >= -COINCIDENT * length && x <= length * (1 + COINCIDENT)) return;
    fail(path, 'out_of_range', `The mass is off the beam. Give a position from 0 to ${metres(length)}.`);
  };
  const size = (value: number, path: Fault['path']) => {
    if (!(value >= 0)) fail(path, 'out_of_range', 'A mass cannot be less than zero.');
  };
  masses.distributed.forEach(({ from, to, start, end }, i) => {
    const path = ['distributed', i];
    position(from, [...path, 'from']);
    position(to, [...path, 'to']);
    if (from > to) fail([...path, 'from'], 'order', 'The mass ends before it starts. Exchange the two.');
    size(start, [...path, 'start']);
    size(end, [...path, 'end']);
  });
  masses.lumped.forEach(({ at, mass }, i) => {
    position(at, ['lumped', i, 'at']);
    size(mass, ['lumped', i, 'mass']);
  });
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: masses };
}
