import type { Diagrams } from '../beam/index';
import type { Piecewise } from '../polynomial/index';
import type { Geometry } from './geometry';

/** The diagrams as the beam solver's: exact piecewise polynomials, all of one beam on the same breaks. */
export function diagramsOf({ points, piece, states }: Geometry): Diagrams {
  const breaks = new Float64Array(points);
  const pieces = points - 1;
  const diagram = (degree: number): Piecewise => ({
    breaks,
    degree,
    coefficients: new Float64Array(pieces * (degree + 1)),
  });
  const [shear, moment, slope, deflection] = [diagram(2), diagram(3), diagram(4), diagram(5)];
  for (let k = 0; k < pieces; k++) {
    const { from, bending: b, shearing: g, start, rate, curvature } = piece[k]!;
    breaks[k] = from;
    const V = [states[8 * k]! + 0, 0 - start, 0 - rate / 2] as const;
    const M = [states[8 * k + 1]! + 0, V[0], V[1] / 2, V[2] / 3] as const;
    const theta = [
      states[8 * k + 2]! + 0,
      b * M[0] + curvature - g * V[1],
      (b * M[1]) / 2 - g * V[2],
      (b * M[2]) / 3,
      (b * M[3]) / 4,
    ];
    shear.coefficients.set(V, 3 * k);
    moment.coefficients.set(M, 4 * k);
    slope.coefficients.set(theta, 5 * k);
    deflection.coefficients.set([states[8 * k + 3]! + 0, ...theta.map((c, j) => c / (j + 1))], 6 * k);
  }
  breaks[pieces] = piece[pieces]!.from;
  return { shear, moment, slope, deflection };
}
