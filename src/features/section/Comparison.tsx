import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { formatNumber, type UnitSystemName } from '@/engine/quantity';
import { axesOf, FIELD_WORDS, figureOf, richUnitOf, shownName, symbolOf } from './display';
import { measureOf, SECTION_MEASURES, type SectionField, type SectionMeasure } from './query';
import type { SectionItem } from './section';

interface ComparisonProps {
  readonly pinned: readonly SectionItem[];
  /** Shown where nothing is pinned. */
  readonly chosen: SectionItem | null;
  /** What was chosen to be shown of sections; null: what tells them apart at a glance. */
  readonly columns: readonly SectionMeasure[] | null;
  readonly system: UnitSystemName;
}

const COMPARED: readonly SectionField[] = [
  'mass_kg_m',
  'depth_mm',
  'area_cm2',
  'w_pl_cm3',
  'i_major_cm4',
  'r_minor_cm',
];

/** "+18 %": how much more than the first; nothing of what the first has not. */
function difference(item: SectionItem, first: SectionItem, field: SectionField): string {
  const [value, from] = [measureOf(item, field), measureOf(first, field)];
  if (value === null || from === null || from === 0) return '';
  if (value === from) return '0 %';
  const percent = formatNumber((value / from - 1) * 100, { places: 0 });
  return `${value >= from ? `+${percent}` : percent} %`;
}

/** What the pinned sections are, and by how much they differ from the first; the chosen one while none is pinned. */
export function Comparison({ pinned, chosen, columns, system }: ComparisonProps) {
  const isPinned = pinned.length > 0;
  const shown = isPinned || chosen === null ? pinned : [chosen];
  const [first] = shown;
  const compared = columns?.map((measure) => SECTION_MEASURES[measure]) ?? COMPARED;
  return (
    <section className="zone">
      <ZoneHeading letter="B">{pinned.length > 1 ? 'Compared with 1' : 'At a glance'}</ZoneHeading>
      {first && (
        <table className="schedule">
          <thead>
            <tr>
              <th scope="col">
                <span className="sr-only">Property</span>
              </th>
              {shown.map((item, i) => (
                <th key={`${item.table} ${item.designation}`} scope="col" className="figure">
                  {isPinned && i + 1}
                  <small className="whitespace-normal">{shownName(item.designation)}</small>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {compared.map((field) => (
              <tr key={field}>
                <th scope="row">
                  <FieldName field={field} system={system} />
                </th>
                {shown.map((item, i) => (
                  <td key={`${item.table} ${item.designation}`} className="figure">
                    {figureOf(item, field, system)}
                    {i > 0 && <small>{difference(item, first, field)}</small>}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {pinned.length < 2 && <p className="mt-10 text-ink-2">Pin two sections or more to compare them.</p>}
    </section>
  );
}

function FieldName({ field, system }: { field: SectionField; system: UnitSystemName }) {
  const words = field === 'mass_kg_m' ? 'Mass' : field === 'depth_mm' ? 'Depth' : null;
  return (
    <>
      {words ?? (
        <i title={FIELD_WORDS[field].name}>
          <RichHtml text={symbolOf(field, axesOf(system))} />
        </i>
      )}
      , <RichHtml text={richUnitOf(field, system)} />
    </>
  );
}
