import { type DerivationStep, derive } from '@/engine/derivation/index';
import { type Beam, type BeamDocument, readBeam } from '@/engine/model/index';
import { checkDerivation } from './derivation-check';

/** A beam from its document, which needs no horizontal support; throws with its faults. */
export function beamOf(document: BeamDocument): Beam {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

/** The steps of a derivation by their ids; every one of them parses and recalculates. */
export function stepsOf(input: Parameters<typeof derive>[0]): Record<string, DerivationStep> {
  const steps = derive(input);
  checkDerivation(steps, 'derivation');
  return Object.fromEntries(steps.map((step) => [step.id, step]));
}

export const line = (from: number, to: number, w0: number, w1 = w0) => ({
  kind: 'line' as const,
  from,
  to,
  w0,
  w1,
});

export const rollers = (...places: number[]) => places.map((at) => ({ at, kind: 'roller' as const }));
