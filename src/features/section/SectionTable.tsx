import { flexRender, getCoreRowModel, type Row, useReactTable } from '@tanstack/react-table';
import { type KeyboardEvent, useEffect, useId, useMemo } from 'react';
import { GraduatedRule } from '@/components/drawing/GraduatedRule';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import { keyOf } from './address';
import { COLUMNS_BY_ID, ColumnHead, columnsIn } from './columns';
import { shownName, toShown, unitOf } from './display';
import { measureOf, type SectionQuery } from './query';
import type { SectionItem } from './section';
import { useRows } from './use-rows';

export interface SectionTableProps {
  readonly rows: readonly SectionItem[];
  readonly query: SectionQuery;
  readonly system: UnitSystemName;
  readonly pins: readonly string[];
  readonly chosen: string | null;
  readonly uses: ReadonlyMap<string, number>;
  readonly onChoose: (item: SectionItem) => void;
  readonly onPin: (item: SectionItem) => void;
  readonly onSort: (name: string) => void;
  /** Rows in view, for the line above. */
  readonly onView: (first: number, last: number) => void;
}

/** What a phone shows of a section beside its name. */
const PHONE = ['mass', 'w_pl'];
const phoneUnit = (id: string, system: UnitSystemName): string | undefined => {
  const shown = PHONE.includes(id) ? COLUMNS_BY_ID.get(id) : undefined;
  return shown && unitOf(shown.field, system);
};
const COLUMNS = { metric: columnsIn('metric'), us: columnsIn('us') };

/** Where a key takes the chosen row. */
function moved(key: string, at: number, page: number, rows: number): number | null {
  const steps: Record<string, number> = {
    ArrowDown: at + 1,
    ArrowUp: at - 1,
    PageDown: at + page,
    PageUp: at - page,
    Home: 0,
    End: rows - 1,
  };
  const to = steps[key];
  return to === undefined || rows === 0 ? null : Math.max(0, Math.min(rows - 1, to));
}

/** Another answer is read from its top; the line above says which rows are in view. */
function useReport(
  rows: readonly SectionItem[],
  { first, size, startAt }: ReturnType<typeof useRows>,
  onView: SectionTableProps['onView'],
) {
  // biome-ignore lint/correctness/useExhaustiveDependencies: not when the way to scroll is made anew
  useEffect(() => startAt(0), [rows]);
  const last = Math.min(rows.length, first + size);
  useEffect(() => onView(first + 1, last), [onView, first, last]);
}

/** The sections that meet the query: only the rows in view are drawn, and the rule beside them is the scroll bar. */
export function SectionTable(props: SectionTableProps) {
  const { rows, query, system, chosen, onChoose, onView } = props;
  const id = useId();
  const data = useMemo(() => [...rows], [rows]);
  const table = useReactTable({
    data,
    columns: COLUMNS[system],
    getCoreRowModel: getCoreRowModel(),
    manualSorting: true,
    getRowId: keyOf,
  });
  const view = useRows(rows.length);
  useReport(rows, view, onView);

  const at = rows.findIndex((item) => keyOf(item) === chosen);
  const onKeyDown = (event: KeyboardEvent) => {
    const item = rows[at];
    if (event.key === 'Enter' && item && event.target === event.currentTarget) {
      location.assign(paths.section(item.table, item.designation));
      return;
    }
    const to = moved(event.key, at, view.size - 1, rows.length);
    const next = to === null ? undefined : rows[to];
    if (to === null || !next) return;
    event.preventDefault();
    onChoose(next);
    view.show(to);
  };
  const all = table.getRowModel().rows;
  return (
    <div className="grid lg:grid-cols-[minmax(0,1fr)_62px]">
      <div ref={view.scroller} className="section-scroll">
        <table
          id={id}
          // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: rows are chosen by keys, as in a grid
          role="grid"
          className="schedule section-table"
          aria-label="Sections"
          aria-rowcount={rows.length + 1}
          aria-activedescendant={at >= 0 ? `${id}-${at}` : undefined}
          tabIndex={0}
          onKeyDown={onKeyDown}
        >
          <Heads {...props} />
          <tbody>
            <Filler height={view.before} />
            {view.drawn.map(({ index }) => {
              const row = all[index];
              return (
                row && <SectionRow key={row.id} {...props} id={`${id}-${index}`} row={row} index={index} />
              );
            })}
            <Filler height={view.after} />
          </tbody>
        </table>
      </div>
      <div className="border-l border-ink max-lg:hidden">
        <Rule {...{ rows, query, system }} view={view} controls={id} />
      </div>
    </div>
  );
}

const Filler = ({ height }: { height: number }) =>
  height > 0 && (
    <tr data-filler style={{ height }}>
      <td style={{ height }} />
    </tr>
  );

type Part = Pick<SectionTableProps, 'rows' | 'query' | 'system'>;

function Rule({
  rows,
  query,
  system,
  view,
  controls,
}: Part & { view: ReturnType<typeof useRows>; controls: string }) {
  const field = query.sort?.field ?? 'mass_kg_m';
  const column = useMemo(
    () =>
      rows.map((item, i) =>
        field === 'designation' ? i + 1 : toShown(field, measureOf(item, field) ?? 0, system),
      ),
    [rows, field, system],
  );
  if (rows.length === 0) return null;
  return (
    <GraduatedRule
      column={column}
      unit={field === 'designation' ? 'row' : unitOf(field, system)}
      first={view.first}
      size={Math.min(view.size, rows.length)}
      height={view.height}
      controls={controls}
      onFirst={view.startAt}
    />
  );
}

/** The sort that a column is under, for its head. */
function sortOf({ q, sort }: SectionQuery, field: string): 'ascending' | 'descending' | undefined {
  // Answers to a search stand in the order of how well they fit.
  const unsorted = { field: q === '' ? 'mass_kg_m' : null, descending: false };
  const { field: by, descending } = sort ?? unsorted;
  if (by !== field) return undefined;
  return descending ? 'descending' : 'ascending';
}

function Heads({ query, system, onSort }: SectionTableProps) {
  return (
    <thead>
      <tr aria-rowindex={1}>
        <th scope="col">
          <span className="sr-only">Pin</span>
        </th>
        <th scope="col" aria-sort={sortOf(query, 'designation')}>
          <button type="button" className="sort" onClick={() => onSort('designation')}>
            Section
          </button>
        </th>
        {[...COLUMNS_BY_ID].map(([id, { field, wide }]) => (
          <th
            key={id}
            scope="col"
            className={`figure ${wide ? 'max-lg:hidden' : ''}`}
            aria-sort={sortOf(query, field)}
          >
            <button type="button" className="sort" onClick={() => onSort(id)}>
              <ColumnHead field={field} system={system} />
            </button>
          </th>
        ))}
        <th scope="col" className="figure">
          In use
        </th>
      </tr>
    </thead>
  );
}

interface SectionRowProps extends SectionTableProps {
  readonly id: string;
  readonly row: Row<SectionItem>;
  readonly index: number;
}

function SectionRow({ id, row, index, pins, chosen, uses, system, onChoose, onPin }: SectionRowProps) {
  const item = row.original;
  const pin = pins.indexOf(row.id) + 1;
  const name = shownName(item.designation);
  return (
    <tr id={id} aria-rowindex={index + 2} aria-selected={row.id === chosen} onClick={() => onChoose(item)}>
      <td>
        <button
          type="button"
          tabIndex={-1}
          className="pin"
          aria-pressed={pin > 0}
          aria-label={pin > 0 ? `Unpin ${pin}, ${name}` : `Pin ${name}`}
          onClick={(event) => {
            event.stopPropagation();
            onPin(item);
          }}
        >
          {pin > 0 && pin}
        </button>
      </td>
      <th scope="row">
        <a
          tabIndex={-1}
          className="no-underline hover:underline"
          href={paths.section(item.table, item.designation)}
        >
          {name}
        </a>
      </th>
      {row.getVisibleCells().map(({ id: cell, column: { columnDef, id: measure }, getContext }) => (
        <td
          key={cell}
          className={`figure ${COLUMNS_BY_ID.get(measure)?.wide ? 'max-lg:hidden' : ''}`}
          data-phone={phoneUnit(measure, system)}
          data-before={measure === 'w_pl' ? 'plastic modulus' : undefined}
        >
          {flexRender(columnDef.cell, getContext())}
        </td>
      ))}
      <td className="figure text-ink-2">{uses.get(row.id) ?? '–'}</td>
    </tr>
  );
}
