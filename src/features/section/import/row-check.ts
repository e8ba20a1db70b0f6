import type { SectionRow } from '../section';
import { asideOf, BodyReader } from './body';
import type { CheckBatch, CheckedRow, Edit, FileFacts, Finding, Mapping, RowReading } from './contract';
import { explained, filled, shiftFinding } from './explain';
import { dropRow, findingOf, isError } from './finding';
import { judgeLine, measureLine } from './judge-row';
import { editedLine, type Plan, planOf } from './plan';
import { isSound, toSectionRow } from './section-row';
import type { FileLine } from './stream';

/** Rows of which as many are explained by trying; trying costs as much as hundreds of sound rows. */
const BLOCK = 1000;
const EXPLAINED_IN_BLOCK = 30;

const isWorthTrying = (findings: readonly Finding[]) =>
  findings.some(isError) || findings.filter(({ severity }) => severity !== 'note').length > 1;

interface Reading {
  /** Rows that are read over without a look: where a reading that was cut short goes on. */
  readonly fromRow?: number;
  /** The rows were judged before and nothing is open: they are read, not judged again. */
  readonly isSettled?: boolean;
}

/** Second reading: every row by itself, with what the first reading found of the file. */
export class RowCheck implements RowReading {
  private readonly body: BodyReader;
  private readonly plan: Plan;
  private readonly held: ReadonlySet<number>;
  private readonly fromRow: number;
  private readonly judges: boolean;
  private rowsDone = 0;
  private tried = 0;

  constructor(
    mapping: Mapping,
    edits: readonly Edit[],
    private readonly facts: FileFacts,
    { fromRow = 0, isSettled = false }: Reading = {},
  ) {
    this.body = new BodyReader(mapping);
    this.plan = planOf(mapping, edits, facts);
    this.held = new Set(facts.heldLines);
    this.fromRow = fromRow;
    // Rows that are left out for what is found in them must be judged to be known.
    this.judges = !isSettled || this.plan.dropped.size > 0;
  }

  push(bytes: Uint8Array): CheckBatch {
    return this.batch(this.body.push(bytes));
  }

  finish(): CheckBatch {
    return this.batch(this.body.finish());
  }

  /** A refusal has ended the first reading already; it leaves nothing to be read here. */
  private batch(lines: ReturnType<BodyReader['push']>): CheckBatch {
    const rows: CheckedRow[] = [];
    const findings: Finding[] = [];
    for (const line of 'code' in lines ? [] : lines) {
      this.rowsDone++;
      if (this.rowsDone % BLOCK === 1) this.tried = 0;
      if (this.rowsDone <= this.fromRow) continue;
      const edited = editedLine(line, this.plan);
      if (edited) this.check(edited, rows, findings);
    }
    return { rowsDone: this.rowsDone, rows, findings };
  }

  private check(line: FileLine, rows: CheckedRow[], findings: Finding[]): void {
    const found = this.findingsOf(line);
    const { dropped } = this.plan;
    if (dropped.size > 0 && found.findings.some(({ group }) => dropped.has(group))) return;
    for (const finding of found.findings) findings.push(finding);
    const { row } = found;
    if (!row || !isSound(row) || this.held.has(line.number) || found.findings.some(isError)) return;
    const { plan } = this;
    let made: SectionRow | undefined;
    rows.push({
      line: line.number,
      get row() {
        made ??= toSectionRow(row, plan);
        return made;
      },
    });
  }

  private findingsOf(line: FileLine) {
    const { plan, facts } = this;
    const aside = asideOf(line, this.body.headings, plan.designation);
    if (aside) return { row: null, findings: [aside] };
    const { cells, number } = line;
    const width = Math.max(plan.width, this.body.headings.length);
    if (cells.length < width || (cells.length > width && filled(cells.slice(width)).length > 0)) {
      return { row: null, findings: [this.ragged(line, width)] };
    }
    if (!this.judges) {
      const row = measureLine(line, plan);
      return { row, findings: row.findings };
    }
    const row = judgeLine(line, plan, facts.names);
    if (!isWorthTrying(row.findings) || this.tried >= EXPLAINED_IN_BLOCK || this.held.has(number))
      return { row, findings: row.findings };
    this.tried++;
    return { row, findings: explained(row, plan, facts.names) };
  }

  private ragged(line: FileLine, width: number): Finding {
    const isTried = this.tried++ < EXPLAINED_IN_BLOCK;
    const shift = isTried ? shiftFinding(line, width, this.plan, this.facts.names) : null;
    if (shift) return shift;
    const { cells, number } = line;
    const message = `The row has ${cells.length} cells where the headings have ${width}. A mark is missing or too many.`;
    const base = { rule: 31, severity: 'error', cause: 'ragged_row', line: number } as const;
    return findingOf({ ...base, message, read: cells.join(' | '), fixes: [dropRow(number)] });
  }
}
