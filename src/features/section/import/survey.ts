import { asideOf, BodyReader } from './body';
import { ownUnit, unitScale } from './cells';
import { columnFindings } from './column-findings';
import type { Edit, FileFacts, Finding, Mapping, NumberField, Refusal, SurveyReading } from './contract';
import { findDuplicates } from './duplicates';
import { filled } from './explain';
import { findingOf } from './finding';
import { headingFindings } from './heading-findings';
import { NameCount } from './names';
import { editedLine, type NumberColumn, type Plan, planOf } from './plan';
import { readRow, SIZES } from './reading';
import { RowStore } from './row-store';
import { findSeries } from './series';
import type { FileLine } from './stream';

export const MOST_ROWS = 300_000;
export const TOO_MANY_ROWS: Refusal = {
  code: 'too_many_rows',
  message: `The file has more than ${MOST_ROWS} rows. Split it.`,
};
/** Findings of one group that are listed; the others are counted. */
const LISTED = 200;

/** Cells with a unit of their own that is not their column's, and how its decimals end. */
type ColumnCount = { cells: number; decimals: number; zeros: number; owns: { line: number; unit: string }[] };

/**
 * First reading: what can only be said of the file as a whole. Columns in another unit, cells of two units in one column,
 * sections twice, sections that stand out of their series.
 */
export class Survey implements SurveyReading {
  private readonly body: BodyReader;
  private readonly plan: Plan;
  private store: RowStore;
  private readonly names = new NameCount();
  private readonly cells = new Map<number, ColumnCount>();
  private refusal: Refusal | null = null;

  constructor(
    private readonly mapping: Mapping,
    private readonly edits: readonly Edit[],
  ) {
    this.body = new BodyReader(mapping);
    this.plan = planOf(mapping, edits);
    this.store = new RowStore(this.plan.numbers.map(({ field }) => field));
    for (const { index } of this.plan.numbers)
      this.cells.set(index, { cells: 0, decimals: 0, zeros: 0, owns: [] });
  }

  push(bytes: Uint8Array): Refusal | null {
    if (this.refusal === null) this.take(this.body.push(bytes));
    return this.refusal;
  }

  finish(): ReturnType<SurveyReading['finish']> {
    if (this.refusal === null) this.take(this.body.finish());
    if (this.refusal === null && this.store.count === 0) {
      this.refusal = {
        code: 'no_rows',
        message: 'The file has no row under its headings that is a section.',
      };
    }
    if (this.refusal) return { ok: false, refusal: this.refusal };
    const facts = this.facts();
    this.store = new RowStore([]); // some 20 MB of a large file, which the second reading needs itself
    return { ok: true, facts };
  }

  private take(lines: FileLine[] | Refusal): void {
    if ('code' in lines) {
      this.refusal = lines;
      return;
    }
    for (const line of lines) this.add(line);
    if (this.store.count > MOST_ROWS) this.refusal = TOO_MANY_ROWS;
  }

  private add(line: FileLine): void {
    const { plan } = this;
    const edited = editedLine(line, plan);
    if (!edited || asideOf(edited, this.body.headings, plan.designation)) return;
    const width = Math.max(plan.width, this.body.headings.length);
    const { cells } = edited;
    if (cells.length < width || (cells.length > width && filled(cells.slice(width)).length > 0)) return;
    const row = readRow(edited, plan);
    this.store.add(row);
    this.names.add(row, plan);
    for (const column of plan.numbers) this.count(cells[column.index] ?? '', edited.number, column);
  }

  private count(raw: string, line: number, column: NumberColumn): void {
    const count = this.cells.get(column.index);
    if (!count || raw === '') return;
    count.cells++;
    const at = raw.indexOf(this.plan.mark);
    if (at >= 0) {
      count.decimals++;
      if (raw.endsWith('0')) count.zeros++;
    }
    const last = raw.charCodeAt(raw.length - 1);
    if ((last >= 48 && last <= 57) || column.scaleOfLine?.has(line)) return;
    const unit = ownUnit(raw);
    const scale = unit === '' ? Number.NaN : unitScale(unit, column.quantity);
    if (!Number.isNaN(scale) && Math.abs(scale / column.scale - 1) > 1e-9) count.owns.push({ line, unit });
  }

  private facts(): FileFacts {
    const { store, plan, mapping, body, edits } = this;
    const columnSums = Object.fromEntries(store.fields.map((field) => [field, store.sum(field)]));
    const columns = columnFindings(store, mapping, plan);
    const corrected = planOf(mapping, edits, columns);
    const duplicates = findDuplicates(store, corrected);
    const series = findSeries(store, corrected, new Set(duplicates.heldLines));
    const all = [
      ...headingFindings(body.headings, plan, mapping),
      ...this.missingColumns(),
      ...this.cellUnits(),
      ...this.lostZeros(),
      ...columns.findings,
      ...duplicates.findings,
      ...series,
    ];
    return {
      version: 1,
      rowCount: store.count,
      lineCount: body.lineCount,
      columnSums,
      ...listed(all),
      corrections: columns.corrections,
      swaps: columns.swaps,
      assumed: columns.assumed,
      names: this.names.facts(),
      heldLines: duplicates.heldLines,
    };
  }

  /** A size that a shape of the file needs and no column has. */
  private missingColumns(): Finding[] {
    const shapes = new Set(Array.from({ length: this.store.count }, (_, at) => this.store.shape(at)));
    const missing = new Set<NumberField>();
    for (const shape of shapes) {
      for (const field of shape === null ? [] : SIZES[shape]) {
        if (!this.plan.numbers.some((column) => column.field === field)) missing.add(field);
      }
    }
    return [...missing].map((field) =>
      findingOf({
        rule: 33,
        severity: 'error',
        cause: 'column_missing',
        heading: field,
        message: `No column holds ${field}, which sections of this shape need. Map one to it, or add it to the file.`,
      }),
    );
  }

  private cellUnits(): Finding[] {
    return this.plan.numbers.flatMap(({ index, heading, unit }) => {
      const owns = this.cells.get(index)?.owns ?? [];
      const [first] = owns;
      if (!first) return [];
      const others = [...new Set(owns.map((own) => own.unit))];
      const message = `${owns.length} cells carry ${others.join(', ')} under a heading of ${unit}. Each is read by its own unit: say that it is so.`;
      const fixes = others.map((other) => {
        const lines = owns.filter((own) => own.unit === other).map(({ line }) => line);
        const edit = { kind: 'set_cells_unit', column: index, lines, unit: other, factor: 1 } as const;
        return { label: `Read ${lines.length} cells in ${other}`, reach: 'column', edit } as const;
      });
      const base = { rule: 27, severity: 'error', cause: 'cell_unit', column: index, heading } as const;
      return [findingOf({ ...base, read: others.join(', '), expected: unit, message, fixes })];
    });
  }

  /** Columns of which no cell ends in 0 have lost their trailing zeros: how far they are rounded cannot be told. */
  private lostZeros(): Finding[] {
    const lost = this.plan.numbers.filter(({ index }) => {
      const { decimals = 0, zeros = 0, cells = 0 } = this.cells.get(index) ?? {};
      return decimals >= ENOUGH && zeros === 0 && decimals < cells;
    });
    if (lost.length === 0) return [];
    const headings = lost.map(({ heading }) => heading).join(', ');
    const message = `No cell ends in 0 in ${headings}: trailing zeros are lost, and with them how far values are rounded.`;
    return [findingOf({ rule: 34, severity: 'note', cause: 'zeros_lost', read: headings, message })];
  }
}
const ENOUGH = 50; // cells with decimals, of which one in ten would end in 0

/** The first findings of each group, and the counts of all. */
function listed(all: readonly Finding[]): Pick<FileFacts, 'findings' | 'counts'> {
  const counts: Record<string, number> = {};
  const findings = all.filter(({ group }) => {
    counts[group] = (counts[group] ?? 0) + 1;
    return counts[group] <= LISTED;
  });
  return { findings, counts };
}
