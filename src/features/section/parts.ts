import { formatNumber, toUnit, type UnitSystemName } from '@/engine/quantity';
import { type Contribution, contributionsOf } from '@/engine/section';
import { dimensionsOf, type SectionItem } from './section';

/** A part as the page shows it, in the person's units. */
interface PartLine {
  readonly name: string;
  readonly area: string;
  readonly offset: string;
  readonly own: string;
  readonly shifted: string;
}

interface PartsTable {
  readonly lines: readonly PartLine[];
  /** Sums: those of I are I about the major axis. */
  readonly sum: PartLine;
  readonly units: { readonly area: string; readonly offset: string; readonly second: string };
}

const UNITS = {
  metric: {
    length: 'mm',
    area: 'cm2',
    second: 'cm4',
    words: { area: 'cm^{2}', offset: 'mm', second: 'cm^{4}' },
  },
  us: { length: 'in', area: 'in2', second: 'in4', words: { area: 'in^{2}', offset: 'in', second: 'in^{4}' } },
} as const;

/** What each part of a made section adds to I by the parallel-axis theorem; null where it has no parts or but one. */
export function partsTable(item: SectionItem, system: UnitSystemName): PartsTable | null {
  const dimensions = dimensionsOf(item);
  const parts = dimensions.shape === 'outline' ? contributionsOf(dimensions) : [];
  if (parts.length < 2) return null;
  const units = UNITS[system];
  const figure = (si: number, unit: string) => formatNumber(toUnit(si, unit), { significant: 4, places: 0 });
  const line = (part: Pick<Contribution, 'name' | 'area' | 'own' | 'shifted'>, offset: string): PartLine => ({
    name: part.name,
    area: figure(part.area, units.area),
    offset,
    own: figure(part.own, units.second),
    shifted: figure(part.shifted, units.second),
  });
  const total = (of: 'area' | 'own' | 'shifted') => parts.reduce((sum, part) => sum + part[of], 0);
  const place = (metres: number) =>
    formatNumber(toUnit(metres, units.length), { places: system === 'us' ? 3 : 1 });
  return {
    lines: parts.map((part) => line(part, place(part.offset))),
    sum: line({ name: 'Together', area: total('area'), own: total('own'), shifted: total('shifted') }, ''),
    units: units.words,
  };
}

/** Rings of corners as they were typed, across, up and radius in the person's units; none where parts say it. */
export function cornerLines(item: SectionItem, system: UnitSystemName): readonly (readonly string[])[] {
  const dimensions = dimensionsOf(item);
  if (dimensions.shape !== 'outline' || dimensions.parts) return [];
  const { length } = UNITS[system];
  const figure = (metres: number) => String(Number(toUnit(metres, length).toFixed(4)));
  return dimensions.rings.map((ring) =>
    ring.map(({ z, y, r }) => `${figure(z)}, ${figure(y)}${r > 0 ? `, r ${figure(r)}` : ''}`),
  );
}

/** What was said of a made section when it was kept: the note of its edition that begins with its name. */
export const sourceOf = (
  { printed }: Pick<SectionItem, 'printed'>,
  notes: readonly string[],
): string | null => notes.find((note) => note.startsWith(`${printed}: `))?.slice(printed.length + 2) ?? null;
