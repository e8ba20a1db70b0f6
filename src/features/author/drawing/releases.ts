/** The redundants that a draft names, kept fit for its beam. */
import {
  type Beam,
  checkRedundants,
  defaultRedundants,
  type Fault,
  type Redundant,
  readBeam,
  supportLetter,
} from '@/engine/model';
import { evaluateNumber } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import { applyEdits, type Edit } from '../edit';
import { type Sketch, sketchOf } from './sketch';

/** A redundant as a document writes it. */
export type WrittenRedundant =
  | { readonly support: string; readonly component: 'vertical' | 'rotation' }
  | { readonly at: string; readonly component: 'moment' };

export type BeamReading = { readonly beam: Beam } | { readonly faults: readonly Fault[] };

/** The beam of a sketch, or why it has no result. */
export function beamOf({ instance }: Sketch): BeamReading {
  const reading = readBeam(instance.beam);
  return reading.ok ? { beam: reading.value } : { faults: reading.faults };
}

/** The redundant in the document's words: a support by its letter, a moment by the expression of its support. */
export function writtenRedundant({ template, instance }: Sketch, redundant: Redundant): WrittenRedundant {
  if (redundant.component !== 'moment')
    return { support: supportLetter(redundant.support), component: redundant.component };
  const support = template.beam.supports.find(
    ({ at }) =>
      Math.abs(evaluateNumber(at.tree, instance.scope) - redundant.at) < 1e-9 * instance.beam.length,
  );
  return { at: support?.at.text ?? String(redundant.at), component: 'moment' };
}

export const setRedundants = (sketch: Sketch, set: readonly Redundant[]): Edit => ({
  do: 'set',
  at: '/beam/redundants',
  value: set.map((one) => writtenRedundant(sketch, one)),
});

/**
 * The edits, and after them the beam's own choice of redundants where those of the document do not fit any more. A
 * beam that cannot stand yet keeps what it has.
 */
export function withReleases(document: Written, edits: readonly Edit[]): Edit[] {
  const sketch = sketchOf(applyEdits(document, edits).document);
  const reading = sketch && beamOf(sketch);
  if (!sketch || !reading || !('beam' in reading)) return [...edits];
  const { beam } = reading;
  const isFit = checkRedundants(beam, sketch.instance.beam.redundants ?? []).length === 0;
  return isFit ? [...edits] : [...edits, setRedundants(sketch, defaultRedundants(beam))];
}
