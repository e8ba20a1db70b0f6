import Papa from 'papaparse';
import type { Delimiter, Encoding, Refusal } from './contract';

/** A line of the file: its number from 1, and its cells. One with a quoted line break is several lines long; an empty one is none. */
export type FileLine = { number: number; cells: string[] };

const LONGEST_ROW = 1_000_000; // characters: an open quote would else swallow the file
const QUOTES_SHOWN = 60;

/**
 * The lines of a file given in pieces. Bytes are decoded as they come (replacement characters stand for what cannot be),
 * line ends are made one, and Papa Parse cuts the rows; the last, which may go on, waits for the next piece.
 */
export class LineReader {
  private readonly decoder: TextDecoder;
  private readonly parser: Papa.Parser;
  private rest = '';
  private number = 1;
  private endsInReturn = false;

  constructor({ encoding, delimiter }: { encoding: Encoding; delimiter: Delimiter }) {
    this.decoder = new TextDecoder(encoding);
    this.parser = new Papa.Parser({ delimiter, newline: '\n' });
  }

  push(bytes: Uint8Array): FileLine[] | Refusal {
    return this.read(this.oneLineEnd(this.decoder.decode(bytes, { stream: true })), false);
  }

  finish(): FileLine[] | Refusal {
    const last = this.oneLineEnd(this.decoder.decode());
    return this.read(last, true);
  }

  /** Why what is left over cannot be the start of a row that fits. */
  unfinished(): Refusal | null {
    if (this.rest === '') return null;
    if (this.rest.includes('"')) return this.unclosed(this.rest, this.number);
    const message = `Line ${this.number} goes on for more than ${this.rest.length} characters. This is no table of sections.`;
    return { code: 'cell_too_long', message };
  }

  /** CR LF and CR as LF; a CR at the end of a piece may be half of one. */
  private oneLineEnd(text: string): string {
    if (text === '') return text;
    const whole = this.endsInReturn && text.startsWith('\n') ? text.slice(1) : text;
    this.endsInReturn = text.endsWith('\r');
    return whole.includes('\r') ? whole.replaceAll(/\r\n?/g, '\n') : whole;
  }

  private read(text: string, isLast: boolean): FileLine[] | Refusal {
    const input = this.rest + text;
    if (input === '') return [];
    const { data, errors, meta } = this.parser.parse(input, 0, !isLast) as Papa.ParseResult<string[]>;
    this.rest = isLast ? '' : input.slice(meta.cursor);
    const lines: FileLine[] = [];
    for (const cells of data) {
      if (cells.length > 1 || cells[0] !== '') lines.push(this.line(cells));
      else this.number++;
    }
    if (isLast && errors.some(({ code }) => code === 'MissingQuotes')) {
      return this.unclosed(lines.at(-1)?.cells.at(-1) ?? '', lines.at(-1)?.number ?? this.number);
    }
    return (this.rest.length > LONGEST_ROW ? this.unfinished() : null) ?? lines;
  }

  private line(cells: string[]): FileLine {
    const line = { number: this.number, cells };
    this.number++;
    for (const cell of cells) {
      if (cell.includes('\n')) this.number += cell.split('\n').length - 1;
    }
    return line;
  }

  private unclosed(text: string, line: number): Refusal {
    const start = text.slice(0, QUOTES_SHOWN).replaceAll(/\s+/g, ' ').trim();
    const message = `A quote that opens in line ${line} never closes: ${start}… Close it, or take the quote out.`;
    return { code: 'unclosed_quote', message };
  }
}
