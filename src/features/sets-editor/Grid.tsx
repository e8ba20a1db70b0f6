import {
  type ClipboardEvent,
  type CSSProperties,
  type FocusEvent,
  type ReactNode,
  useId,
  useState,
} from 'react';
import { Button } from '@/components/ui/Button';
import type { Pointer } from '@/features/author/edit';
import { useReadOnly } from '@/features/author/fields';
import type { Snapshot } from '@/features/author/store';
import { useDraft, useIsSelected, useSnapshot } from '@/features/author/use-editor';
import type { Fault } from '@/lib/app-error';
import { Cell } from './Cell';
import { type Column, type Growth, grown, isFigure, isTable, pastedRows, pasteEdits } from './cells';
import { moveInGrid } from './grid-keys';

export interface GridRow {
  readonly at: Pointer;
  /** What it is called to a screen reader's user: "combination 2". */
  readonly name: string;
}

interface GridProps {
  readonly caption: ReactNode;
  readonly columns: readonly Column[];
  /** Heads that say more than the column's label. */
  readonly heads?: Readonly<Record<string, ReactNode>>;
  /** Widths of the columns by key, as CSS; the others share what is left. */
  readonly widths: Readonly<Record<string, string>>;
  readonly rows: readonly GridRow[];
  /** Under a row that is opened: the rest of its fields, and what may be done with it. */
  readonly more?: (row: GridRow) => ReactNode;
  /** Under a row's first field. */
  readonly below?: (row: GridRow) => ReactNode;
  /** A first column that is not typed into. */
  readonly lead?: { readonly head: string; readonly width: string; readonly of: (row: GridRow) => ReactNode };
  /** Where rows that were pasted beyond the last go. */
  readonly growth?: Growth;
  /** What of a row another table shows. */
  readonly apart?: string;
  /** As CSS; where there is less room the table scrolls, but on a phone, where it stacks. */
  readonly leastWidth?: string;
}

/** Entries of a set as a table of fields. */
export function Grid({ caption, columns, heads = {}, widths, rows, more, below, lead, ...rest }: GridProps) {
  const { left, paste } = usePaste({ columns, rows, growth: rest.growth });
  return (
    <div className="md:overflow-x-auto">
      <table
        className="schedule stacking table-fixed md:min-w-(--least-width) md:[&_td]:px-4"
        style={{ '--least-width': rest.leastWidth ?? 'auto' } as CSSProperties}
        onKeyDown={moveInGrid}
      >
        <caption className="max-md:block">{caption}</caption>
        <colgroup className="max-md:hidden">
          {lead && <col style={{ width: lead.width }} />}
          {columns.map(({ key }) => (
            <col key={key} style={{ width: widths[key] }} />
          ))}
          {more && <col style={{ width: '4.5rem' }} />}
        </colgroup>
        <thead>
          <tr>
            {lead && <th scope="col">{lead.head}</th>}
            {columns.map((column) => (
              <th key={column.key} scope="col" className={isFigure(column) ? 'figure' : undefined}>
                {heads[column.key] ?? column.label}
              </th>
            ))}
            {more && (
              <th scope="col">
                <span className="sr-only">More of the row</span>
              </th>
            )}
          </tr>
        </thead>
        {rows.map((row, index) => (
          <Row
            key={row.at}
            {...{ row, index, columns, more, below, lead }}
            apart={rest.apart}
            paste={paste}
          />
        ))}
      </table>
      {left > 0 && (
        <p role="status" className="mt-6 text-schedule text-ochre-ink">
          {left === 1 ? 'One pasted line' : `${left} pasted lines`} had no row, and{' '}
          {left === 1 ? 'was' : 'were'} left out.
        </p>
      )}
    </div>
  );
}

/** Fills the table with a pasted block, as one step of undo; `left` counts the lines that had no row. */
function usePaste({
  columns,
  rows,
  growth,
}: Pick<GridProps, 'columns' | 'rows'> & { growth: Growth | undefined }) {
  const store = useDraft();
  const [left, setLeft] = useState(0);
  const paste = (row: number, column: number) => (event: ClipboardEvent<HTMLInputElement>) => {
    const text = event.clipboardData.getData('text/plain');
    if (!isTable(text) || store.snapshot.readOnly) return;
    event.preventDefault();
    const pasted = pastedRows(text);
    const there = rows.slice(row).map(({ at }) => at);
    const added = growth && grown(store.document, growth, pasted.length - there.length);
    const filled = pasteEdits(pasted, [...there, ...(added?.rows ?? [])], columns.slice(column));
    store.edit(...(added?.edits ?? []), ...filled.edits);
    setLeft(filled.left);
  };
  return { left, paste };
}

interface RowProps extends Pick<GridProps, 'columns'> {
  readonly more: GridProps['more'] | undefined;
  readonly below: GridProps['below'] | undefined;
  readonly lead: GridProps['lead'] | undefined;
  readonly apart: string | undefined;
  readonly row: GridRow;
  readonly index: number;
  readonly paste: (row: number, column: number) => (event: ClipboardEvent<HTMLInputElement>) => void;
}

function Row({ row, index, columns, more, below, lead, apart, paste }: RowProps) {
  const store = useDraft();
  const isOpen = useIsSelected(row.at) && more !== undefined;
  const { faults, isHidden, isLeft, onBlur } = useRowFaults(row.at, columns, apart);
  const noteId = useId();
  const span = columns.length + (more ? 1 : 0) + (lead ? 1 : 0);
  return (
    <tbody data-part={row.at} onBlur={onBlur}>
      <tr data-chosen={isOpen || undefined}>
        {lead && <th scope="row">{lead.of(row)}</th>}
        {columns.map((column, place) => (
          <td key={column.key} data-label={column.label} className="align-top! max-md:items-center">
            <div className="min-w-0 max-md:w-200 max-md:flex-none">
              <Cell
                row={row.at}
                column={column}
                name={row.name}
                place={[index, place]}
                noteId={noteId}
                isLeft={isLeft}
                onPaste={paste(index, place)}
              />
              {place === 0 && below?.(row)}
            </div>
          </td>
        ))}
        {more && (
          <td className="align-top! max-md:pt-6!">
            <Button
              size="small"
              aria-expanded={isOpen}
              aria-label={`${isOpen ? 'Less' : 'More'} of ${row.name}${isHidden ? ', which has a fault' : ''}`}
              onClick={() => store.select(isOpen ? null : row.at)}
            >
              {isHidden && <span aria-hidden="true">×</span>}
              {isOpen ? 'Less' : 'More'}
            </Button>
          </td>
        )}
      </tr>
      {faults !== '' && (
        <tr>
          <td colSpan={span} className="py-2! max-md:text-left!">
            <span id={noteId} role="alert" className="text-note font-semibold text-error">
              {faults}
            </span>
          </td>
        </tr>
      )}
      {isOpen && (
        <tr data-chosen>
          <td colSpan={span} className="max-md:block! max-md:text-left!">
            <div className="grid gap-12 py-8">{more?.(row)}</div>
          </td>
        </tr>
      )}
    </tbody>
  );
}

const isOfNothing = ({ code, message }: Fault): boolean =>
  code === 'missing' || code === 'empty' || message.startsWith('Empty.');

/**
 * What is wrong with a row's cells, in one text, and whether something is wrong with the rest of its fields. What is
 * still empty is not blamed before the row is left.
 */
function useRowFaults(at: Pointer, columns: readonly Column[], apart: string | undefined) {
  const [isLeft, setLeft] = useState(false);
  const columnOf = (key: string) => columns.find((one) => key === one.key || key.startsWith(`${one.key}/`));
  /** Of several cells at once: a combination without any factor. */
  const isAround = (key: string) => key === '' || columns.some((one) => one.key.startsWith(`${key}/`));
  const shown = ({ faults: all }: Snapshot) =>
    all
      .filter(({ pointer }) => pointer === at || pointer.startsWith(`${at}/`))
      .filter((fault) => isLeft || !isOfNothing(fault))
      .map(({ pointer, message }) => ({ key: pointer.slice(at.length + 1), message }));
  const faults = useSnapshot((snapshot) =>
    shown(snapshot)
      .flatMap(({ key, message }) => {
        const column = columnOf(key);
        return column ? [`${column.label}: ${message}`] : isAround(key) ? [message] : [];
      })
      .join(' '),
  );
  const isHidden = useSnapshot((snapshot) =>
    shown(snapshot).some(({ key }) => !columnOf(key) && !isAround(key) && !(apart && key.startsWith(apart))),
  );
  const onBlur = ({ currentTarget, relatedTarget }: FocusEvent<Element>) => {
    if (!(relatedTarget instanceof Node && currentTarget.contains(relatedTarget))) setLeft(true);
  };
  return { faults, isHidden, isLeft, onBlur };
}

/** Duplicate, move, remove: of an entry of a list. */
export function RowActions({
  row,
  index,
  count,
  onDuplicate,
  onMove,
  onRemove,
  children,
}: {
  readonly row: GridRow;
  readonly index: number;
  readonly count: number;
  readonly onDuplicate: () => void;
  readonly onMove: (to: number) => void;
  readonly onRemove: () => void;
  readonly children?: ReactNode;
}) {
  if (useReadOnly()) return null;
  return (
    <div className="flex flex-wrap gap-10">
      {children}
      <Button size="small" aria-label={`Duplicate ${row.name}`} onClick={onDuplicate}>
        Duplicate
      </Button>
      {index > 0 && (
        <Button size="small" aria-label={`Move ${row.name} up`} onClick={() => onMove(index - 1)}>
          Up
        </Button>
      )}
      {index < count - 1 && (
        <Button size="small" aria-label={`Move ${row.name} down`} onClick={() => onMove(index + 1)}>
          Down
        </Button>
      )}
      <Button size="small" aria-label={`Remove ${row.name}`} onClick={onRemove}>
        Remove
      </Button>
    </div>
  );
}
