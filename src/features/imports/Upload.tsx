import { type DragEvent, useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { paths } from '@/paths';
import { uploadTable } from './imports.api';
import { sizeWords } from './words';

/** Sends one file at a time, and goes on to its page. */
function useSending() {
  const stop = useRef<AbortController | null>(null);
  const [sending, setSending] = useState<{ name: string; share: number } | null>(null);
  const [problem, setProblem] = useState<string | null>(null);

  async function send(file: File | undefined) {
    if (!file || sending) return;
    if (file.size > MOST) {
      setProblem(
        `${file.name} has ${sizeWords(file.size)}; 50 MB is the most. Split the table, or leave columns out.`,
      );
      return;
    }
    stop.current = new AbortController();
    setProblem(null);
    setSending({ name: file.name, share: 0 });
    const onProgress = (share: number) => setSending({ name: file.name, share });
    const acted = await uploadTable(file, { onProgress, signal: stop.current.signal });
    if (acted.kind !== 'refused') return location.assign(paths.import(acted.view.id));
    setSending(null);
    setProblem(`${file.name}: ${acted.message}`);
  }
  return { sending, problem, send, stop: () => stop.current?.abort() };
}

/** Takes a file by dragging or by choosing it. */
export function Upload() {
  const { sending, problem, send, stop } = useSending();
  const pick = useRef<HTMLInputElement>(null);
  const [isOver, setOver] = useState(false);
  // biome-ignore lint/correctness/useExhaustiveDependencies: once, for what was chosen before the page was awake
  useEffect(() => {
    void send(pick.current?.files?.[0]);
  }, []);
  function drop(event: DragEvent) {
    event.preventDefault();
    setOver(false);
    void send(event.dataTransfer.files[0]);
  }

  return (
    <section
      aria-label="A new file"
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={`grid justify-items-center gap-10 border-[1.5px] border-dashed px-20 py-28 text-center ${isOver ? 'border-ochre bg-ochre-wash' : 'border-rule-strong'}`}
    >
      <p className="text-title">{sending ? sending.name : 'Drop the supplier’s file here'}</p>
      <p className="max-w-[60ch] text-ink-2">
        A table as text: comma, semicolon, tab or bar between the cells, with one line of headings. 50 MB at
        most. The file is kept as it is, with its <span className="whitespace-nowrap">SHA-256</span>; what is
        put right is layered over it.
      </p>
      <input
        ref={pick}
        type="file"
        accept=".csv,.txt,.tsv,text/csv,text/plain,text/tab-separated-values"
        aria-label="File of a section table"
        tabIndex={-1}
        className="sr-only"
        onChange={({ target }) => {
          void send(target.files?.[0]);
          target.value = ''; // the same file may be chosen again once it is put right
        }}
      />
      {sending && (
        <progress value={sending.share} aria-label="Sent" className="import-progress w-full max-w-440" />
      )}
      {sending?.share === 1 && <p role="status">It is here, and is looked through.</p>}
      {/* One button, so that the focus stays where it was. */}
      <Button onClick={sending ? stop : () => pick.current?.click()}>
        {sending ? 'Stop' : 'Choose a file'}
      </Button>
      <p role="alert" className="font-semibold text-error empty:hidden">
        {problem}
      </p>
    </section>
  );
}

const MOST = 50 * 1024 * 1024;
