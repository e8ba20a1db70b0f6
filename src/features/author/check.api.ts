/** Keeps the faults of an open draft up to date. */
import type { Written } from '@/features/review/draft';
import type { Fault } from '@/lib/app-error';
import type { CheckAnswer, CheckRequest } from './check.worker';
import { textAt } from './edit';
import type { DraftStore } from './store';

/** After the last change, ms. */
const REST = 200;

/** Answers each document with its faults; of several asked in a row the last alone need be answered. */
export interface Checker {
  check(document: Written, answer: (faults: readonly Fault[]) => void): void;
  stop(): void;
}

/** By a worker of the browser: solving a beam takes longer than a frame. */
export function templateChecker(): Checker {
  const worker = new Worker(new URL('./check.worker.ts', import.meta.url), { type: 'module' });
  let id = 0;
  return {
    check: (document, answer) => {
      worker.onmessage = ({ data }: MessageEvent<CheckAnswer>) => {
        if (data.id === id) answer(data.faults);
      };
      worker.postMessage({ id: ++id, document } satisfies CheckRequest);
    },
    stop: () => worker.terminate(),
  };
}

export function startCheck(store: DraftStore, checker: Checker): () => void {
  let checked = store.document;
  let timer: ReturnType<typeof setTimeout>;
  const check = () => {
    const { document } = store;
    checked = document;
    checker.check(document, (faults) => {
      if (store.document === document) store.put({ faults: [...faults, ...takenReference(store)] });
    });
  };
  const unsubscribe = store.subscribe(() => {
    if (store.document === checked) return;
    clearTimeout(timer);
    timer = setTimeout(check, REST);
  });
  return () => {
    unsubscribe();
    clearTimeout(timer);
    checker.stop();
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
