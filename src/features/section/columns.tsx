import { type ColumnDef, createColumnHelper } from '@tanstack/react-table';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { UnitSystemName } from '@/engine/quantity';
import { axesOf, figureOf, richUnitOf, symbolOf } from './display';
import { measureOf, SECTION_MEASURES, type SectionField, type SectionMeasure } from './query';
import type { SectionItem } from './section';

/** The order of the columns, and from which width on each is shown. */
const SHOWN: readonly (readonly [SectionMeasure, 'always' | 'wide'])[] = [
  ['mass', 'always'],
  ['depth', 'always'],
  ['width', 'always'],
  ['tw', 'wide'],
  ['tf', 'wide'],
  ['r', 'wide'],
  ['area', 'always'],
  ['i_major', 'always'],
  ['i_minor', 'wide'],
  ['w_el', 'wide'],
  ['w_pl', 'always'],
  ['r_major', 'always'],
  ['r_minor', 'always'],
  ['j', 'wide'],
  ['iw', 'wide'],
];

export const COLUMN_FIELDS = SHOWN.map(([measure]) => SECTION_MEASURES[measure]);

/** What the columns show, by their ids. `wide`: on wide screens alone. */
export const COLUMNS_BY_ID: ReadonlyMap<string, { readonly field: SectionField; readonly wide: boolean }> =
  new Map(
    SHOWN.map(([measure, when]) => [measure, { field: SECTION_MEASURES[measure], wide: when === 'wide' }]),
  );

const column = createColumnHelper<SectionItem>();

/** The columns of figures in a unit system. */
export const columnsIn = (system: UnitSystemName): ColumnDef<SectionItem, number | null>[] =>
  SHOWN.map(([measure]) => {
    const field = SECTION_MEASURES[measure];
    return column.accessor((item) => measureOf(item, field), {
      id: measure,
      header: measure,
      cell: ({ row }) => figureOf(row.original, field, system),
    });
  });

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
