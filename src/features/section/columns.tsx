import { type ColumnDef, createColumnHelper } from '@tanstack/react-table';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { UnitSystemName } from '@/engine/quantity';
import { axesOf, FIELD_WORDS, figureOf, richUnitOf, symbolOf, unitOf } from './display';
import { measureOf, SECTION_MEASURES, type SectionField, type SectionMeasure } from './query';
import type { SectionItem } from './section';

/** What the schedule shows of a section where nobody has chosen, in order. */
export const USUAL_COLUMNS: readonly SectionMeasure[] = [
  'mass',
  'depth',
  'width',
  'tw',
  'tf',
  'r',
  'area',
  'i_major',
  'i_minor',
  'w_el',
  'w_pl',
  'r_major',
  'r_minor',
  'j',
  'iw',
];
/** Of the usual ones, shown on wide screens alone; what was chosen is shown on every screen. */
const WIDE: readonly SectionMeasure[] = ['tw', 'tf', 'r', 'i_minor', 'w_el', 'j', 'iw'];

export interface Column {
  readonly measure: SectionMeasure;
  readonly field: SectionField;
  readonly className: string;
  /** On a phone, which has room for two and no heads: its unit, and below the designation its name too. */
  readonly phoneUnit: string | undefined;
  readonly phoneName: string | undefined;
}

/** The columns of figures; null: the usual ones. Made once for all rows. */
export function columnsOf(
  chosen: readonly SectionMeasure[] | null,
  system: UnitSystemName,
): readonly Column[] {
  const below = chosen === null ? 'w_pl' : chosen.find((measure) => measure !== 'mass');
  return (chosen ?? USUAL_COLUMNS).map((measure) => {
    const field = SECTION_MEASURES[measure];
    return {
      measure,
      field,
      className: chosen === null && WIDE.includes(measure) ? 'figure max-lg:hidden' : 'figure',
      phoneUnit: measure === 'mass' || measure === below ? unitOf(field, system) : undefined,
      phoneName: measure === below ? FIELD_WORDS[field].name : undefined,
    };
  });
}

/** The usual columns in their order are nobody's choice. */
export const asChoice = (columns: readonly SectionMeasure[]): readonly SectionMeasure[] | null =>
  columns.join() === USUAL_COLUMNS.join() ? null : columns;

const column = createColumnHelper<SectionItem>();

/** The same for the table's model, with figures in a unit system. */
export const columnDefs = (
  columns: readonly Column[],
  system: UnitSystemName,
): ColumnDef<SectionItem, number | null>[] =>
  columns.map(({ measure, field }) =>
    column.accessor((item) => measureOf(item, field), {
      id: measure,
      header: measure,
      cell: ({ row }) => figureOf(row.original, field, system),
    }),
  );

/** Letter and unit; the mass by its name. */
export function ColumnHead({ field, system }: { field: SectionField; system: UnitSystemName }) {
  return (
    <>
      {field === 'mass_kg_m' ? (
        'Mass'
      ) : (
        <i>
          <RichHtml text={symbolOf(field, axesOf(system))} />
        </i>
      )}
      <small>
        <RichHtml text={richUnitOf(field, system)} />
      </small>
    </>
  );
}
