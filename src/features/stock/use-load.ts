import { useState } from 'react';
import type { StockField } from './cells';
import { MOST_BYTES, readStockFile, rowsCsv, type StockFile, type StockRow } from './file';
import type { StockCheck } from './stock';
import { stockApi } from './stock.api';

export type LineFault = StockCheck['faults'][number];

/** A list on its way in: its rows with what was put right, and what is still wrong with them. */
export interface Loaded {
  readonly name: string;
  readonly file: StockFile;
  readonly rows: readonly StockRow[];
  readonly leftOut: number;
  /** What was found wrong, and the rows as they were then. */
  readonly check: StockCheck;
  readonly checked: readonly StockRow[];
}

type Reading = ReturnType<typeof readStockFile> | { ok: false; refusal: { message: string } };

const refused = (message: string): Reading => ({ ok: false, refusal: { message } });

/** What is too large is not read at all. */
async function readContent(content: Blob): Promise<Reading> {
  if (content.size > MOST_BYTES)
    return refused('The list is larger than 5 MB. Split it, or leave columns out.');
  const bytes = await content.arrayBuffer().catch(() => null);
  return bytes ? readStockFile(new Uint8Array(bytes)) : refused('It cannot be read. Choose it again.');
}

/** The row that a fault was found in: rows are sent one to a line, under one line of headings. */
export const checkedRow = ({ checked }: Loaded, { line }: LineFault): StockRow | undefined =>
  checked[line - 2];

export function useLoad(slug: string) {
  const [loaded, setLoaded] = useState<Loaded | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  const ask = async (file: StockFile, rows: readonly StockRow[]): Promise<StockCheck | null> => {
    const acted = await stockApi.check(slug, rowsCsv(rows, file.as));
    if (acted.kind === 'done') return acted.value;
    setProblem(acted.kind === 'refused' ? acted.message : 'The list changed. Load the page again.');
    return null;
  };
  const busily = async (work: () => Promise<void>) => {
    setBusy(true);
    setProblem(null);
    await work();
    setBusy(false);
  };

  return {
    loaded,
    problem,
    isBusy,
    say: setProblem,
    clear: () => setLoaded(null),
    read: (name: string, content: Blob) =>
      busily(async () => {
        const reading = await readContent(content);
        if (!reading.ok) return setProblem(`${name}: ${reading.refusal.message}`);
        const { file } = reading;
        const check = await ask(file, file.rows);
        if (check) setLoaded({ name, file, rows: file.rows, leftOut: 0, check, checked: file.rows });
      }),
    /** Puts cells of one line right. */
    mend: (row: StockRow, texts: Partial<Record<StockField, string>>) => {
      if (!loaded) return;
      const mended = { ...row, texts: { ...row.texts, ...texts } };
      const rows = loaded.rows.map((one) => (one.line === row.line ? mended : one));
      setLoaded({ ...loaded, rows });
    },
    again: () =>
      busily(async () => {
        if (!loaded) return;
        const { file, rows } = loaded;
        const check = await ask(file, rows);
        if (check) setLoaded({ ...loaded, check, checked: rows });
      }),
    leaveOut: (lines: ReadonlySet<number>) =>
      busily(async () => {
        if (!loaded) return;
        const { file } = loaded;
        const rows = loaded.rows.filter(({ line }) => !lines.has(line));
        const leftOut = loaded.leftOut + loaded.rows.length - rows.length;
        if (rows.length === 0) {
          setLoaded(null);
          return setProblem('No line is left. Bring another list.');
        }
        const check = await ask(file, rows);
        if (check) setLoaded({ ...loaded, rows, leftOut, check, checked: rows });
      }),
  };
}
