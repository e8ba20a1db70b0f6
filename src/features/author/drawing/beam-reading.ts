/** The redundants that a draft names, kept fit for its beam. */
import {
  type Beam,
  checkRedundants,
  defaultRedundants,
  type Fault,
  type Redundant,
  readBeam,
} from '@/engine/model';
import type { Written } from '@/features/review/draft';
import { adding } from '../add';
import type { DraftSteps } from '../draft-steps';
import { applyEdits, type Edit } from '../edit';
import { writtenRedundant } from '../redundants';
import { type Sketch, sketchOf } from './sketch';

export type BeamReading = { readonly beam: Beam } | { readonly faults: readonly Fault[] };

/** The beam of a sketch, or why it has no result. */
export function beamOf({ instance }: Sketch): BeamReading {
  const reading = readBeam(instance.beam);
  return reading.ok ? { beam: reading.value } : { faults: reading.faults };
}

export const setRedundants = (sketch: Sketch, beam: Beam, set: readonly Redundant[]): Edit => ({
  do: 'set',
  at: '/beam/redundants',
  value: set.flatMap((one) => writtenRedundant(sketch, beam, one) ?? []),
});

/**
 * A change of the beam with what follows from it: what the draft says of itself, and its redundants where those that
 * are written do not fit any more. A beam that cannot stand yet keeps what it has.
 */
export function changing(document: Written, change: (steps: DraftSteps) => void): Edit[] {
  const { edits } = adding(document, (steps) => {
    change(steps);
    return '';
  });
  const sketch = sketchOf(applyEdits(document, edits).document);
  const reading = sketch && beamOf(sketch);
  if (!sketch || !reading || !('beam' in reading)) return [...edits];
  const { beam } = reading;
  const isFit = checkRedundants(beam, sketch.instance.beam.redundants ?? []).length === 0;
  return isFit ? [...edits] : [...edits, setRedundants(sketch, beam, defaultRedundants(beam))];
}
