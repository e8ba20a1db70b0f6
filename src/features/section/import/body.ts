import { cellText } from './cells';
import type { Encoding, Finding, Mapping, Refusal } from './contract';
import { dropRow, findingOf } from './finding';
import { isUnit, readUnitText } from './headings';
import { type FileLine, LineReader } from './stream';

const isBlank = (cells: readonly string[]) => {
  for (const cell of cells) if (cell !== '' && cellText(cell) !== '') return false;
  return true;
};

const FALLBACK_ENCODING: Encoding = 'utf-8';

/** The lines under the headings that are not blank, of a file given in pieces; the headings as they stand. */
export class BodyReader {
  private readonly reader: LineReader;
  private readonly skipTo: number;
  headings: readonly string[] = [];
  lineCount = 0;

  constructor(private readonly mapping: Mapping) {
    const { encoding, delimiter, headingLine, unitLine } = mapping;
    this.reader = new LineReader({ encoding: encoding ?? FALLBACK_ENCODING, delimiter });
    this.skipTo = Math.max(headingLine, unitLine ?? 0);
  }

  push(bytes: Uint8Array): FileLine[] | Refusal {
    return this.bodyOf(this.reader.push(bytes));
  }

  finish(): FileLine[] | Refusal {
    return this.bodyOf(this.reader.finish());
  }

  private bodyOf(lines: FileLine[] | Refusal): FileLine[] | Refusal {
    if ('code' in lines) return lines;
    this.lineCount = lines.at(-1)?.number ?? this.lineCount;
    if ((lines[0]?.number ?? 0) <= this.skipTo) {
      this.headings = lines.find(({ number }) => number === this.mapping.headingLine)?.cells ?? this.headings;
    }
    return lines.filter(({ number, cells }) => number > this.skipTo && !isBlank(cells));
  }
}

const SUMS =
  /^(average|avg|mean|total|totals|sum|subtotal|summe|gesamt|mittel|mittelwert|durchschnitt|moyenne|somme|media|totale|gemiddelde|totaal|medel|min|max|minimum|maximum|std)\b/i;

/** Lines that are no section: repeated headings, units, remarks, sums. Null where the line is a row. */
export function asideOf(
  { number, cells }: FileLine,
  headings: readonly string[],
  name: number,
): Finding | null {
  const first = cellText(cells[0] ?? '');
  const named = cellText(cells[name] ?? '');
  const base = { line: number, rule: 32, read: first || named } as const;
  const sum = [first, named].find((text) => SUMS.test(text) && !/\d/.test(text));
  if (sum !== undefined) {
    const message = 'This line sums up other rows; it is no section. Leave it out.';
    const fixes = [
      dropRow(number),
      {
        label: 'Leave out all such lines',
        reach: 'file',
        edit: { kind: 'drop_every', group: '32|summary_row|' },
      } as const,
    ];
    return findingOf({ ...base, severity: 'error', cause: 'summary_row', message, read: sum, fixes });
  }
  if (first !== '' && first === cellText(headings[0] ?? '') && isRepeated(cells, headings)) {
    const message = 'The headings stand here once more. The line is skipped.';
    return findingOf({ ...base, severity: 'note', cause: 'repeated_header', message });
  }
  let texts = 0;
  for (const cell of cells) if (cell !== '' && cellText(cell) !== '') texts++;
  if (texts === 1 && headings.length > 2) {
    const message = 'The line has one cell only. It is taken as a remark and skipped.';
    const read = cells.map(cellText).find((text) => text !== '') ?? '';
    return findingOf({ ...base, severity: 'note', cause: 'remark', message, read });
  }
  if (texts > 1 && named === '' && areUnits(cells)) {
    const message = 'The units stand here once more. The line is skipped.';
    return findingOf({ ...base, severity: 'note', cause: 'repeated_header', message });
  }
  return null;
}

const areUnits = (cells: readonly string[]) =>
  cells.every((cell) => {
    const text = cellText(cell);
    return text === '' || isUnit(readUnitText(text).unit ?? '');
  });

const isRepeated = (cells: readonly string[], headings: readonly string[]) =>
  headings.every((heading, at) => cellText(heading) === cellText(cells[at] ?? ''));
