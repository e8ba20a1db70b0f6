import { asideOf, BodyReader } from './body';
import {
  type Encoding,
  type Mapping,
  MOST_BYTES,
  RECOGNISED_BYTES,
  type Recognition,
  type Refusal,
} from './contract';
import { BINARY_SHARE, binaryBytes } from './encoding';
import { filled } from './explain';
import { recognise } from './recognise';
import type { FileLine } from './stream';
import { MOST_ROWS, TOO_MANY_ROWS } from './survey';

/**
 * A file while it arrives: recognised by its beginning, and refused as soon as the rest of it cannot be the rows of a
 * table. What is wrong with single rows is left to the check, which says it with a fix.
 */
export class Screening {
  private head: Uint8Array[] = [];
  private bytes = 0;
  private recognition: Recognition | null = null;
  private rows: RowScreen | null = null;

  constructor(private readonly name: string) {}

  push(piece: Uint8Array): Refusal | null {
    this.bytes += piece.byteLength;
    if (this.rows) return this.rows.push(piece);
    this.head.push(piece);
    if (this.bytes <= RECOGNISED_BYTES) return null;
    const begun = this.begin(MOST_BYTES);
    return begun.ok ? null : begun.refusal;
  }

  /** What the file is, now that it is all here. */
  finish(): Recognition {
    const begun = this.recognition ?? this.begin(this.bytes);
    const refusal = begun.ok ? this.rows?.finish() : null;
    return refusal ? { ok: false, refusal } : begun;
  }

  /** `size` says whether there is more than the head. */
  private begin(size: number): Recognition {
    const pieces = this.head;
    this.head = [];
    this.recognition = recognise(joined(pieces, RECOGNISED_BYTES), { name: this.name, size });
    if (!this.recognition.ok) return this.recognition;
    this.rows = new RowScreen(this.recognition.mapping, likelyEncoding(this.recognition));
    for (const piece of pieces) {
      const refusal = this.rows.push(piece);
      if (refusal) return { ok: false, refusal };
    }
    return this.recognition;
  }
}

function joined(pieces: readonly Uint8Array[], most: number): Uint8Array {
  const whole = new Uint8Array(pieces.reduce((sum, { byteLength }) => sum + byteLength, 0));
  let at = 0;
  for (const piece of pieces) {
    whole.set(piece, at);
    at += piece.byteLength;
  }
  return whole.subarray(0, most);
}

/** As the file says, or the likeliest: how lines and cells part is the same in all that it may be. */
function likelyEncoding({ mapping, questions }: Extract<Recognition, { ok: true }>): Encoding {
  const asked = questions.find((one) => one.kind === 'encoding');
  return mapping.encoding ?? asked?.choices[0]?.value ?? 'utf-8';
}

/** The lines of a file by their form alone: that it stays text, that rows end, that some row fits its headings. */
class RowScreen {
  private readonly body: BodyReader;
  private readonly isWide: boolean;
  private readonly designation: number;
  private seen = 0;
  private binary = 0;
  private fitting = 0;
  private hasRow = false;
  private firstMisfit: FileLine | null = null;

  constructor(mapping: Mapping, encoding: Encoding) {
    this.body = new BodyReader({ ...mapping, encoding });
    this.isWide = encoding.startsWith('utf-16');
    this.designation = mapping.columns.find(({ field }) => field === 'designation')?.index ?? 0;
  }

  push(piece: Uint8Array): Refusal | null {
    return this.binaryFault(piece) ?? this.take(this.body.push(piece));
  }

  finish(): Refusal | null {
    return this.take(this.body.finish()) ?? (this.hasRow ? null : this.noRows());
  }

  /** A stretch of a file that is no text, beyond a stray character or two, which the check finds by their cells. */
  private binaryFault(piece: Uint8Array): Refusal | null {
    for (let at = 0; !this.isWide && at < piece.byteLength; at += RECOGNISED_BYTES) {
      const stretch = piece.subarray(at, at + RECOGNISED_BYTES);
      this.seen += stretch.byteLength;
      this.binary += binaryBytes(stretch);
      if (this.binary > BINARY_SHARE * Math.max(this.seen, RECOGNISED_BYTES)) {
        const message = `After line ${this.body.lineCount} the file is no text. Save the table as CSV again.`;
        return { code: 'binary', message };
      }
      if (this.seen >= RECOGNISED_BYTES) this.seen = this.binary = 0;
    }
    return null;
  }

  private take(lines: FileLine[] | Refusal): Refusal | null {
    if ('code' in lines) return lines;
    const width = this.body.headings.length;
    for (const line of lines) {
      const { cells } = line;
      if (cells.length < width || (cells.length > width && filled(cells.slice(width)).length > 0))
        this.firstMisfit ??= line;
      else {
        this.fitting++;
        this.hasRow ||= asideOf(line, this.body.headings, this.designation) === null;
      }
    }
    return this.fitting > MOST_ROWS ? TOO_MANY_ROWS : null;
  }

  private noRows(): Refusal {
    const misfit = this.firstMisfit;
    const message = misfit
      ? `No row has the ${this.body.headings.length} cells of the headings; line ${misfit.number} has ${misfit.cells.length}. Look whether something is missing at the ends of the rows.`
      : 'The file has no row under its headings that is a section.';
    return { code: 'no_rows', message };
  }
}
