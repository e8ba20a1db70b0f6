import type { Diagrams } from '../beam/index';
import type { Piecewise } from '../polynomial/index';
import type { Geometry } from './geometry';

/** The diagrams as the beam solver's: exact piecewise polynomials, all of one beam on the same breaks. Never −0. */
export function diagramsOf({ points, piece, states }: Geometry): Diagrams {
  const breaks = new Float64Array(points);
  for (let k = 0; k < points; k++) breaks[k] = piece[k]!.from;
  const diagram = (degree: number): Piecewise => ({
    breaks,
    degree,
    coefficients: new Float64Array((points - 1) * (degree + 1)),
  });
  const shear = diagram(2);
  const moment = diagram(3);
  const slope = diagram(4);
  const deflection = diagram(5);
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
