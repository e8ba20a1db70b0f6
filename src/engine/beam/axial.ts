/** N/N_cr up to which first-order bending is taken as it is: α_cr ≥ 10 of EN 1993-1-1:2005, 5.2.1(3) (from memory). */
export const AXIAL_LIMIT = 0.1;

/** A stated axial force beside the buckling force of the member in the plane of bending. */
export type AxialScope = { critical: number; ratio: number; inScope: boolean };

/**
 * Euler's N_cr = π² EI/L_cr² and N/N_cr. The beam has no axial force in it: beyond a tenth of N_cr the force makes the
 * bending moments and deflections larger by more than about a ninth, 1/(1 − N/N_cr), and they are out of scope.
 *
 * N newtons, compression positive (tension is always in scope); EI N·m²; L_cr metres. Throws a RangeError where EI or
 * L_cr is not more than zero.
 */
export function axialScope(compression: number, ei: number, bucklingLength: number): AxialScope {
  if (!(ei > 0 && bucklingLength > 0)) {
    throw new RangeError(`EI ${ei} and the buckling length ${bucklingLength} must be more than zero`);
  }
  const critical = (Math.PI ** 2 * ei) / bucklingLength ** 2;
  const ratio = Math.max(0, compression) / critical;
  return { critical, ratio, inScope: ratio <= AXIAL_LIMIT };
}
