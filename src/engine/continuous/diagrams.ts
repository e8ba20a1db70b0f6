import type { Diagrams } from '../beam/index';
import type { Piecewise } from '../polynomial/index';
import type { Geometry } from './geometry';

/** The diagrams as the beam solver's: exact piecewise polynomials, all of one beam on the same breaks. Never −0. */
export function diagramsOf({ points, piece, states }: Geometry): Diagrams {
  const pieces = points - 1;
  const breaks = new Float64Array(points);
  for (let k = 0; k < points; k++) breaks[k] = piece[k]!.from;
  const memory = new Float64Array(18 * pieces); // to allocate takes longer than to fill
  const shear: Piecewise = { breaks, degree: 2, coefficients: memory.subarray(0, 3 * pieces) };
  const moment: Piecewise = { breaks, degree: 3, coefficients: memory.subarray(3 * pieces, 7 * pieces) };
  const slope: Piecewise = { breaks, degree: 4, coefficients: memory.subarray(7 * pieces, 12 * pieces) };
  const deflection: Piecewise = { breaks, degree: 5, coefficients: memory.subarray(12 * pieces) };
  for (let k = 0; k + 1 < points; k++) {
    const { bending: b, shearing: g, start, rate, curvature } = piece[k]!;
    const V = states[8 * k]! + 0;
    const M = states[8 * k + 1]! + 0;
    const first = b * M + curvature + g * start;
    const second = (b * V + g * rate) / 2;
    write(shear, k, [V, 0 - start, 0 - rate / 2]);
    write(moment, k, [M, V, 0 - start / 2, 0 - rate / 6]);
    write(slope, k, [states[8 * k + 2]! + 0, first, second, 0 - (b * start) / 6, 0 - (b * rate) / 24]);
    integrate(slope, deflection, k, states[8 * k + 3]! + 0);
  }
  return { shear, moment, slope, deflection };
}

function write({ coefficients }: Piecewise, k: number, values: readonly number[]): void {
  const first = k * values.length;
  for (let j = 0; j < values.length; j++) coefficients[first + j] = values[j]!;
}

function integrate(slope: Piecewise, deflection: Piecewise, k: number, start: number): void {
  deflection.coefficients[6 * k] = start;
  for (let j = 0; j < 5; j++) {
    deflection.coefficients[6 * k + j + 1] = slope.coefficients[5 * k + j]! / (j + 1);
  }
}
