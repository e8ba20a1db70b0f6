import { entryFor } from '@/components/ui/range';
import { type Beam, letteredSupports } from '@/engine/model';
import { formatFeetInches, UNIT_SYSTEMS, type UnitSystemName } from '@/engine/quantity';
import type { Entry } from '../raw';

/**
 * A field's text for a length that was computed: to the millimetre or the sixteenth of an inch, which is what then
 * counts. A support's place stays exact, since a hair beside it is another place.
 */
export function placeEntry(beam: Beam, x: number, system: UnitSystemName): Entry {
  const { unit } = UNIT_SYSTEMS[system].length;
  const isSupport = letteredSupports(beam).some(
    ({ support }) => Math.abs(support.at - x) <= beam.length * 1e-9,
  );
  if (isSupport) return entryFor(x, unit);
  return unit === 'ft-in' ? { text: formatFeetInches(x), unit } : entryFor(Math.round(x * 1000) / 1000, unit);
}
