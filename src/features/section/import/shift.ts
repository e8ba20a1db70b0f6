import { isError, onLine } from './fault';
import { type FileLine, filled } from './lines';
import { cellText } from './old-cells';
import { type RowReading, readRow } from './row';
import type { RowContext } from './values';

const SUSPICIOUS = 3; // errors in one row, from which a shift is likelier than as many slips

/** The row with its cells moved by one from some column on, where that makes it sound; the fault that says so. */
function movedRow({ number, cells }: FileLine, width: number, context: RowContext): RowReading | null {
  for (let at = 0; at < width; at++) {
    const moves = [
      { cells: [...cells.slice(0, at), ...cells.slice(at + 1), ''], way: 'right' },
      { cells: [...cells.slice(0, at), '', ...cells.slice(at)], way: 'left' },
    ];
    const sound = moves.find(
      (move) =>
        filled(move.cells.slice(width)).length === 0 && readRow(move.cells, number, context).row !== null,
    );
    if (!sound) continue;
    const column = context.columns.find(({ index }) => index >= at)?.heading ?? '';
    const message = `The cells from "${column}" on stand one column too far to the ${sound.way}. Move them back.`;
    const fault = onLine(number, 'row_shift', 'error', message, cellText(cells[at] ?? ''));
    return { row: null, faults: [{ ...fault, column }] };
  }
  return null;
}

/** Reads a row; one of the wrong length, or with many errors, is first tried with its cells moved by one. */
export function readFittedRow(line: FileLine, width: number, context: RowContext): RowReading {
  const { number, cells } = line;
  const isRagged = cells.length < width || filled(cells.slice(width)).length > 0;
  if (isRagged) {
    const message = `The row has ${cells.length} cells where the headings have ${width}.`;
    return (
      movedRow(line, width, context) ?? {
        row: null,
        faults: [onLine(number, 'ragged_row', 'error', message)],
      }
    );
  }
  const reading = readRow(cells, number, context);
  if (reading.faults.filter(isError).length < SUSPICIOUS) return reading;
  return movedRow(line, width, context) ?? reading;
}
