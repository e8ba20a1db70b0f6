const STEPS = [1, 2, 2.5, 5, 10];

/** The smallest round step, at least `least`, out of 1, 2, 2.5 and 5 times powers of ten. */
export function roundStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  return (STEPS.find((step) => step * power >= least * (1 - 1e-9)) ?? 10) * power;
}
