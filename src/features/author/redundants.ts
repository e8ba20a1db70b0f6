/** Redundants of a draft: which may be released, and those that a beam would choose itself. */
import { type Beam, defaultRedundants, eligibleRedundants, type Redundant, readBeam } from '@/engine/model';
import { evaluateTruth } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import { type Sketch, sketchOf } from './drawing/sketch';

/** As the document writes one. */
export type WrittenRedundant =
  | { readonly support: string; readonly component: 'vertical' | 'rotation' }
  | { readonly at: string; readonly component: 'moment' };

interface Releasable {
  readonly degree: number;
  readonly eligible: readonly WrittenRedundant[];
  readonly usual: readonly WrittenRedundant[];
}

/** What may be released at the defaults; null where the beam cannot be read or is a mechanism. */
export function releasable(document: Written): Releasable | null {
  const sketch = sketchOf(document);
  if (!sketch) return null;
  const { redundants: _, ...rest } = sketch.instance.beam;
  const reading = readBeam(rest);
  if (!reading.ok) return null;
  const beam = reading.value;
  const write = (one: Redundant) => writtenRedundant(sketch, beam, one) ?? [];
  return {
    degree: beam.degree,
    eligible: eligibleRedundants(beam).flatMap(write),
    usual: defaultRedundants(beam).flatMap(write),
  };
}

/** By the letter or the expression of its support; null for a place that has no support. */
export function writtenRedundant(sketch: Sketch, beam: Beam, one: Redundant): WrittenRedundant | null {
  const { instance, template } = sketch;
  if (one.component !== 'moment') {
    const support = instance.letters[one.support];
    return support === undefined ? null : { support, component: one.component };
  }
  const standing = template.beam.supports.filter(
    ({ when }) => !when || evaluateTruth(when.tree, instance.scope),
  );
  const place = standing[beam.supports.findIndex(({ at }) => at === one.at)];
  return place ? { at: place.at.text, component: 'moment' } : null;
}
