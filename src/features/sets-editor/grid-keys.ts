/** Keys in a table of fields: Tab as everywhere, arrows and Enter from cell to cell. */
import type { KeyboardEvent } from 'react';

/** Where a key leads from a cell, in rows and columns; null where it is the field's own. */
function stepOf(
  key: string,
  { selectionStart, selectionEnd, value }: HTMLInputElement,
): [number, number] | null {
  const isWhole = selectionStart === 0 && selectionEnd === value.length;
  const isCaret = selectionStart === selectionEnd;
  switch (key) {
    case 'ArrowUp':
      return [-1, 0];
    case 'ArrowDown':
    case 'Enter':
      return [1, 0];
    case 'ArrowLeft':
      return isWhole || (isCaret && selectionStart === 0) ? [0, -1] : null;
    case 'ArrowRight':
      return isWhole || (isCaret && selectionEnd === value.length) ? [0, 1] : null;
    default:
      return null;
  }
}

const cellIn = (table: Element, row: number, column: number) =>
  table.querySelector<HTMLElement>(`[data-row="${row}"][data-column="${column}"]`);

/** For `onKeyDown` of the table: its cells have data-row and data-column. */
export function moveInGrid(event: KeyboardEvent<HTMLElement>): void {
  const { target, currentTarget, key } = event;
  if (event.ctrlKey || event.metaKey || event.altKey || event.shiftKey) return;
  if (!(target instanceof HTMLInputElement) || target.dataset['column'] === undefined) return;
  const step = stepOf(key, target);
  if (!step) return;
  const [down, right] = step;
  const cell = cellIn(
    currentTarget,
    Number(target.dataset['row']) + down,
    Number(target.dataset['column']) + right,
  );
  // Enter at the last row does nothing: there is no form that it could send.
  event.preventDefault();
  cell?.focus();
  if (cell instanceof HTMLInputElement) cell.select();
}

/** The first field of a row takes the focus once it is drawn; a touch screen’s keyboard stays away. */
export function focusRow(row: string): void {
  if (!matchMedia('(pointer: fine)').matches) return;
  requestAnimationFrame(() =>
    document.querySelector<HTMLElement>(`[data-part="${CSS.escape(row)}"] [data-at]`)?.focus(),
  );
}
