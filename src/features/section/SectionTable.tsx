import { flexRender, getCoreRowModel, type Row, useReactTable } from '@tanstack/react-table';
import type { VirtualItem } from '@tanstack/react-virtual';
import { type KeyboardEvent, memo, useEffect, useId, useMemo } from 'react';
import { GraduatedRule } from '@/components/drawing/GraduatedRule';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import { keyOf } from './address';
import { type Column, ColumnHead, columnDefs, columnsOf } from './columns';
import { shownName, toShown, unitOf } from './display';
import { measureOf, type SectionMeasure, type SectionQuery } from './query';
import type { SectionItem } from './section';
import { useRows } from './use-rows';

export interface SectionTableProps {
  /** As far as they are read. */
  readonly rows: readonly SectionItem[];
  readonly total: number;
  readonly query: SectionQuery;
  readonly system: UnitSystemName;
  /** Measures that were chosen to be shown; null: the usual ones. */
  readonly shown: readonly SectionMeasure[] | null;
  readonly pins: readonly string[];
  /** Index of the chosen row. */
  readonly at: number;
  readonly uses: ReadonlyMap<string, number>;
  /** True where the next answer is read from the chosen row on. */
  readonly opensAtChosen: { current: boolean };
  readonly onChoose: (item: SectionItem) => void;
  readonly onPin: (item: SectionItem) => void;
  readonly onSort: (name: string) => void;
  /** Rows in view, for the line above. */
  readonly onView: (first: number, last: number) => void;
  /** The rows in view are near the end of those read. */
  readonly onNearEnd: () => void;
}

/** So many rows before the end of those read, more are read. */
const NEAR = 100;

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

/** Another answer is read from its top, or where it was asked for about the chosen row; the line above says which rows are in view. */
function useReport(
  { rows, total, query, at, opensAtChosen, onView, onNearEnd }: SectionTableProps,
  { first, size, startAt, showAround }: ReturnType<typeof useRows>,
) {
  // biome-ignore lint/correctness/useExhaustiveDependencies: not when the way to scroll is made anew
  useEffect(() => {
    if (opensAtChosen.current) showAround(at);
    else startAt(0);
    opensAtChosen.current = false;
  }, [query]);
  const last = Math.min(rows.length, first + size);
  useEffect(() => onView(first + 1, last), [onView, first, last]);
  const isNearEnd = rows.length < total && last > rows.length - NEAR;
  useEffect(() => {
    if (isNearEnd) onNearEnd();
  }, [isNearEnd, onNearEnd]);
}

/** The rows that are drawn, as the table's model: the model of a long answer would be made anew with every page. */
function useDrawnRows(
  rows: readonly SectionItem[],
  columns: readonly Column[],
  system: UnitSystemName,
  drawn: readonly VirtualItem[],
) {
  const [from, to] = [drawn[0]?.index ?? 0, (drawn.at(-1)?.index ?? -1) + 1];
  const data = useMemo(() => rows.slice(from, to), [rows, from, to]);
  const defs = useMemo(() => columnDefs(columns, system), [columns, system]);
  const table = useReactTable({
    data,
    columns: defs,
    getCoreRowModel: getCoreRowModel(),
    manualSorting: true,
    getRowId: keyOf,
  });
  return table.getRowModel().rows.map((row, i) => ({ row, index: from + i }));
}

/** The sections that meet the query: only the rows in view are drawn, and the rule beside them is the scroll bar. */
export function SectionTable(props: SectionTableProps) {
  const { rows, total, query, system, shown, at, pins, uses, onChoose, onPin } = props;
  const id = useId();
  const columns = useMemo(() => columnsOf(shown, system), [shown, system]);
  const view = useRows(rows.length);
  useReport(props, view);
  const drawn = useDrawnRows(rows, columns, system, view.drawn);
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
  return (
    <div className="grid lg:grid-cols-[minmax(0,1fr)_62px]">
      <div ref={view.scroller} className="section-scroll" data-sideways={view.isSideways || undefined}>
        <table
          id={id}
          // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: rows are chosen by keys, as in a grid
          role="grid"
          className="schedule section-table"
          aria-label="Sections"
          aria-rowcount={total + 1}
          aria-activedescendant={at < rows.length ? `${id}-${at}` : undefined}
          tabIndex={0}
          onKeyDown={onKeyDown}
        >
          <Heads {...props} columns={columns} />
          <tbody>
            <Filler height={view.before} />
            {drawn.map(({ row, index }) => (
              <SectionRow
                key={row.id}
                {...{ row, index, columns, onChoose, onPin }}
                id={`${id}-${index}`}
                pin={pins.indexOf(row.id) + 1}
                isChosen={index === at}
                used={uses.get(row.id)}
              />
            ))}
            <Filler height={view.after} />
            {rows.length < total && <Unread rows={total - rows.length} columns={columns.length + 3} />}
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

const Unread = ({ rows, columns }: { rows: number; columns: number }) => (
  <tr data-filler>
    <td colSpan={columns} className="h-28 px-(--pad)! text-left text-ink-2">
      … {rows} more are read on the way down
    </td>
  </tr>
);

/** Rows that the rule is graduated by at most; it is a few hundred px high. */
const GRADUATED = 1000;

type Part = Pick<SectionTableProps, 'rows' | 'query' | 'system'>;

function Rule({
  rows,
  query,
  system,
  view,
  controls,
}: Part & { view: ReturnType<typeof useRows>; controls: string }) {
  const field = query.sort?.field ?? 'mass_kg_m';
  const column = useMemo(() => {
    const count = Math.min(rows.length, GRADUATED);
    return Array.from({ length: count }, (_, i) => {
      const at = count < 2 ? 0 : Math.round((i * (rows.length - 1)) / (count - 1));
      const item = rows[at];
      return field === 'designation' || !item ? at + 1 : toShown(field, measureOf(item, field) ?? 0, system);
    });
  }, [rows, field, system]);
  if (rows.length === 0) return null;
  return (
    <GraduatedRule
      rows={rows.length}
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

function Heads({
  query,
  system,
  columns,
  onSort,
}: SectionTableProps & { readonly columns: readonly Column[] }) {
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
        {columns.map(({ measure, field, className }) => (
          <th key={measure} scope="col" className={className} aria-sort={sortOf(query, field)}>
            <button type="button" className="sort" onClick={() => onSort(measure)}>
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

interface SectionRowProps extends Pick<SectionTableProps, 'onChoose' | 'onPin'> {
  readonly id: string;
  readonly row: Row<SectionItem>;
  readonly columns: readonly Column[];
  readonly index: number;
  /** Its number among the pinned; 0 where it is not pinned. */
  readonly pin: number;
  readonly isChosen: boolean;
  /** Members that use it. */
  readonly used: number | undefined;
}

/** The model's rows are made anew with every window, the sections in them are not. */
const isSameRow = (before: SectionRowProps, now: SectionRowProps): boolean =>
  before.row.original === now.row.original &&
  before.columns === now.columns &&
  before.index === now.index &&
  before.pin === now.pin &&
  before.isChosen === now.isChosen &&
  before.used === now.used &&
  before.onChoose === now.onChoose &&
  before.onPin === now.onPin;

const SectionRow = memo(function SectionRow(props: SectionRowProps) {
  const { id, row, columns, index, pin, isChosen, used, onChoose, onPin } = props;
  const item = row.original;
  const name = shownName(item.designation);
  return (
    <tr id={id} aria-rowindex={index + 2} aria-selected={isChosen} onClick={() => onChoose(item)}>
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
      {row.getVisibleCells().map(({ id: cell, column, getContext }, i) => (
        <td
          key={cell}
          className={columns[i]?.className}
          data-phone={columns[i]?.phoneUnit}
          data-before={columns[i]?.phoneName}
        >
          {flexRender(column.columnDef.cell, getContext())}
        </td>
      ))}
      <td className="figure text-ink-2">{used ?? '–'}</td>
    </tr>
  );
}, isSameRow);
