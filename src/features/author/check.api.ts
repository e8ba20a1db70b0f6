/** Keeps the faults of an open draft up to date, by a worker of the browser. */
import type { Fault } from '@/lib/app-error';
import type { CheckAnswer, CheckRequest } from './check.worker';
import { textAt } from './edit';
import type { DraftStore } from './store';

/** After the last change, ms. */
const REST = 200;

export function startCheck(store: DraftStore): () => void {
  const worker = new Worker(new URL('./check.worker.ts', import.meta.url), { type: 'module' });
  let checked = store.document;
  let id = 0;
  let timer: ReturnType<typeof setTimeout>;
  const check = () => {
    const { document } = store;
    checked = document;
    worker.postMessage({ id: ++id, document } satisfies CheckRequest);
  };
  const unsubscribe = store.subscribe(() => {
    if (store.document === checked) return;
    clearTimeout(timer);
    timer = setTimeout(check, REST);
  });
  worker.onmessage = ({ data }: MessageEvent<CheckAnswer>) => {
    if (data.id === id && store.document === checked)
      store.put({ faults: [...data.faults, ...takenReference(store)] });
  };
  return () => {
    unsubscribe();
    clearTimeout(timer);
    worker.terminate();
  };
}

/** Whether another document has the reference only the server knows; it holds until the reference is changed. */
function takenReference({ document, snapshot }: DraftStore): Fault[] {
  const reference = textAt(document, '/reference');
  return snapshot.faults.filter(
    ({ pointer, code, message }) =>
      pointer === '/reference' && code === 'duplicate' && message.includes(` ${reference} `),
  );
}
