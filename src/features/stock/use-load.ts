import { useRef, useState } from 'react';
import type { StockField } from './cells';
import { MOST_BYTES, readStockFile, rowsCsv, type StockFile, type StockRow } from './file';
import { type Loaded, mend, withCheck } from './loaded';
import { markNameOf, type StockCheck } from './stock';
import { stockApi } from './stock.api';

type Reading = ReturnType<typeof readStockFile> | { ok: false; refusal: { message: string } };

const refused = (message: string): Reading => ({ ok: false, refusal: { message } });

/** What is too large is not read at all. */
async function readContent(content: Blob): Promise<Reading> {
  if (content.size > MOST_BYTES)
    return refused('The list is larger than 5 MB. Split it, or leave columns out.');
  const bytes = await content.arrayBuffer().catch(() => null);
  return bytes ? readStockFile(new Uint8Array(bytes)) : refused('It cannot be read. Choose it again.');
}

export function useLoad(slug: string) {
  const [loaded, setLoaded] = useState<Loaded | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const isWorking = useRef(false); // known at once, before a second press

  const ask = async (file: StockFile, rows: readonly StockRow[]): Promise<StockCheck | null> => {
    const csv = { csv: rowsCsv(rows, file.as), mark: markNameOf(file.as.mark) };
    const acted = await stockApi.check(slug, csv);
    if (acted.kind === 'done') return acted.value;
    setProblem(acted.kind === 'refused' ? acted.message : 'The list changed. Load the page again.');
    return null;
  };
  const busily = async (work: () => Promise<void>) => {
    if (isWorking.current) return;
    isWorking.current = true;
    setBusy(true);
    setProblem(null);
    await work();
    isWorking.current = false;
    setBusy(false);
  };
  /** Cells may be typed, or the list put away, while these rows are checked. */
  const checkRows = async (file: StockFile, rows: readonly StockRow[]) => {
    const check = await ask(file, rows);
    if (check) setLoaded((now) => (now?.file === file ? withCheck(now, rows, check) : now));
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
    mend: ({ line }: StockRow, texts: Partial<Record<StockField, string>>) =>
      setLoaded((now) => now && mend(now, line, texts)),
    again: () =>
      busily(async () => {
        if (loaded) await checkRows(loaded.file, loaded.rows);
      }),
    leaveOut: (lines: ReadonlySet<number>) =>
      busily(async () => {
        if (!loaded) return;
        const rows = loaded.rows.filter(({ line }) => !lines.has(line));
        if (rows.length > 0) return checkRows(loaded.file, rows);
        setLoaded(null);
        setProblem('No line is left. Bring another list.');
      }),
  };
}
