import { dirname, join } from 'node:path';
import { parentPort, workerData } from 'node:worker_threads';
import { Modules, type Replaced } from './modules';
import { ROOT } from './root';
import { Suite } from './suite';

export type Order = { tests: readonly string[] };
export type Question = { kind: 'all' } | { kind: 'mutant'; replaced: Replaced };
export type Answer =
  | { kind: 'ready' }
  /** Begins with a test file. */
  | { kind: 'file'; file: string }
  /** The name of the first test that fails; null where none does. */
  | { kind: 'done'; caught: string | null };

const SETUP = join(ROOT, 'tests/support/seed.ts');
const port = parentPort!;
const { tests } = workerData as Order;
const suite = new Suite();
const modules = new Modules({ vitest: suite.vitest });
const say = (answer: Answer) => port.postMessage(answer);

async function firstFailure(
  load: (path: string) => unknown,
  files: readonly string[],
): Promise<string | null> {
  for (const file of files) {
    say({ kind: 'file', file });
    let name = 'as it is loaded';
    try {
      for (const one of suite.gather(() => load(join(ROOT, file)))) {
        name = one.name;
        await one.run();
      }
    } catch {
      return `${file}: ${name}`;
    }
  }
  return null;
}

/** The tests that the file can fail: those beside it first, then in the order given. */
function testsOf(path: string): string[] {
  const dependents = modules.dependentsOf(path);
  const able = tests.filter((file) => dependents.has(join(ROOT, file)));
  const isBeside = (file: string) => dirname(join(ROOT, file)) === dirname(path);
  return [...able.filter(isBeside), ...able.filter((file) => !isBeside(file))];
}

port.on('message', async (question: Question) => {
  if (question.kind === 'all') {
    say({ kind: 'done', caught: await firstFailure(modules.loader(), tests) });
    return;
  }
  const { replaced } = question;
  say({ kind: 'done', caught: await firstFailure(modules.loader(replaced), testsOf(replaced.path)) });
});

for (const file of [SETUP, ...tests.map((test) => join(ROOT, test))]) await modules.read(file);
modules.loader()(SETUP);
say({ kind: 'ready' });
