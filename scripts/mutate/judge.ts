import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { Mutant } from './mutants';
import { ROOT } from './root';
import type { Answer, Order, Question } from './worker';

/** A test file that takes this many times what it takes unchanged, and these ms, does not end. */
const PATIENCE = { times: 10, ms: 5_000 };
const MEMORY = { maxOldGenerationSizeMb: 1024 };

/** A thread of Node 20 does not take over how this one reads TypeScript. */
const START = `import('tsx/esm/api').then(({ register }) => {
  register();
  return import(${JSON.stringify(new URL('./worker.ts', import.meta.url).href)});
});`;

/** Runs the tests against one mutant after another, in a thread that can be ended when a loop does not. */
export class Judge {
  private worker: Worker | null = null;

  /** `took` is the time of each test file unchanged, ms; of one that is not in it, patience is all there is. */
  constructor(
    private readonly tests: readonly string[],
    private readonly took: ReadonlyMap<string, number>,
  ) {}

  /** What catches the mutant: a test by its name, or that it never ends; null where nothing does. */
  async judge({ file, source }: Mutant): Promise<string | null> {
    this.worker ??= await this.start();
    return this.ask({ kind: 'mutant', replaced: { path: join(ROOT, file), source } });
  }

  async end(): Promise<void> {
    await this.worker?.terminate();
    this.worker = null;
  }

  /** The time of each test file without any mutant, ms. Throws where a test fails. */
  static async time(tests: readonly string[]): Promise<Map<string, number>> {
    const judge = new Judge(tests, new Map());
    judge.worker = await judge.start();
    const begun: [string, number][] = [];
    const failed = await judge.ask({ kind: 'all' }, (file) => begun.push([file, performance.now()]));
    const end = performance.now();
    await judge.end();
    if (failed) throw new Error(`without any mutant a test fails already: ${failed}`);
    return new Map(begun.map(([file, start], i) => [file, (begun[i + 1]?.[1] ?? end) - start]));
  }

  private start(): Promise<Worker> {
    const workerData: Order = { tests: this.tests };
    const worker = new Worker(START, {
      eval: true,
      workerData,
      resourceLimits: MEMORY,
      stdout: true, // tests say what they have measured
    });
    return new Promise((resolve, reject) => {
      worker.once('error', reject);
      worker.once('message', () => {
        worker.off('error', reject);
        resolve(worker);
      });
    });
  }

  private ask(question: Question, begins: (file: string) => void = () => {}): Promise<string | null> {
    const worker = this.worker!;
    const endless = question.kind === 'mutant';
    return new Promise((resolve) => {
      let file = '';
      let timer: NodeJS.Timeout | undefined;
      const finish = (caught: string | null) => {
        clearTimeout(timer);
        worker.off('message', listen).off('error', fail);
        resolve(caught);
      };
      const giveUp = (why: string) => {
        this.worker = null;
        void worker.terminate();
        finish(`${file}: ${why}`);
      };
      const fail = (error: Error & { code?: string }) =>
        giveUp(error.code === 'ERR_WORKER_OUT_OF_MEMORY' ? 'memory runs out' : String(error));
      const listen = (answer: Answer) => {
        if (answer.kind === 'done') finish(answer.caught);
        if (answer.kind !== 'file') return;
        file = answer.file;
        begins(file);
        clearTimeout(timer);
        const patience = PATIENCE.ms + PATIENCE.times * (this.took.get(file) ?? 0);
        if (endless) timer = setTimeout(() => giveUp('does not end'), patience);
      };
      worker.on('message', listen).on('error', fail);
      worker.postMessage(question);
    });
  }
}
