import { type ClipboardEvent, useState } from 'react';
import { useReadOnly } from '@/features/author/fields';
import { sameValue } from '@/features/author/merge';
import { useDraft, useFaultIn, useSnapshot } from '@/features/author/use-editor';
import { type Column, cellAt, cellEdit, cellText, cellValue, isFigure } from './cells';

interface CellProps {
  /** The row's pointer. */
  readonly row: string;
  readonly column: Column;
  /** Of the row: "610-q". */
  readonly name: string;
  /** The cell's place in its table, for the arrow keys. */
  readonly place: readonly [row: number, column: number];
  /** Id of the line that says the row's faults. */
  readonly noteId: string;
  /** The row was left once: what is still empty in it is a fault then. */
  readonly isLeft: boolean;
  readonly onPaste: (event: ClipboardEvent<HTMLInputElement>) => void;
}

/** One field of a table: it shows what was typed while that still is what the document says. */
export function Cell({ row, column, name, place, noteId, isLeft, onPaste }: CellProps) {
  const store = useDraft();
  const value = useSnapshot(({ history }) => cellAt(history.document, row, column));
  const fault = useFaultIn(`${row}/${column.key}`);
  const [typed, setTyped] = useState('');
  const shown = sameValue(cellValue(typed, column), value) ? typed : cellText(value, column);
  const isFaulty = fault !== undefined && (isLeft || shown !== '');
  const isReadOnly = useReadOnly();
  const shared = {
    'data-at': `${row}/${column.key}`,
    'data-row': place[0],
    'data-column': place[1],
    'aria-label': `${column.label}, ${name}`,
    'aria-invalid': isFaulty || undefined,
    'aria-describedby': isFaulty ? noteId : undefined,
  };
  if (column.kind === 'choice')
    return (
      <select
        {...shared}
        className="input md:pointer-fine:min-h-28 md:text-schedule"
        disabled={isReadOnly}
        value={shown}
        onChange={({ target }) => store.edit(cellEdit(row, target.value, column))}
      >
        {!column.choices.some((one) => one.value === shown) && (
          <option value={shown}>{shown || 'Choose'}</option>
        )}
        {column.choices.map((one) => (
          <option key={one.value} value={one.value}>
            {one.label}
          </option>
        ))}
      </select>
    );
  return (
    <input
      {...shared}
      className={`input md:pointer-fine:min-h-28 md:text-schedule ${isFigure(column) ? 'text-right' : ''}`}
      autoComplete="off"
      spellCheck={false}
      inputMode={column.kind === 'number' ? 'decimal' : undefined}
      placeholder={column.placeholder}
      readOnly={isReadOnly}
      value={shown}
      onPaste={onPaste}
      onBlur={() => setTyped(cellText(value, column))}
      onChange={({ target }) => {
        setTyped(target.value);
        store.edit(cellEdit(row, target.value, column));
      }}
    />
  );
}
