import { expect } from 'vitest';

type Body = (...args: readonly unknown[]) => unknown;
type Case = { name: string; run: () => unknown };

// Some of the runner's assertions ask it which file is running.
Object.assign(globalThis, { __vitest_worker__: { filepath: '' } });

/**
 * `describe` and `test` for one process: files are gathered and their tests run one after another, up to the first that
 * fails. `expect` is the test runner's own.
 */
export class Suite {
  private cases: Case[] = [];
  private titles: string[] = [];

  /** What a test file finds under the name of the test runner. */
  readonly vitest = {
    __esModule: true,
    expect,
    describe: this.blocks(),
    test: this.tests(),
    it: this.tests(),
  };

  /** The tests that loading a file defines. */
  gather(load: () => unknown): Case[] {
    this.cases = [];
    this.titles = [];
    load();
    return this.cases;
  }

  private blocks() {
    const describe = (title: string, ...rest: readonly unknown[]) => {
      this.titles.push(title);
      bodyOf(rest)();
      this.titles.pop();
    };
    return Object.assign(describe, { each: eachOf(describe) });
  }

  private tests() {
    const test = (title: string, ...rest: readonly unknown[]) => {
      this.cases.push({ name: [...this.titles, title].join(' › '), run: bodyOf(rest) });
    };
    return Object.assign(test, { each: eachOf(test) });
  }
}

type Define = (title: string, body: () => unknown) => void;

/** The function among a title's companions; the other is options, such as a timeout. */
const bodyOf = (rest: readonly unknown[]): Body => rest.find((one) => typeof one === 'function') as Body;

const eachOf =
  (define: Define) =>
  (rows: readonly unknown[]) =>
  (title: string, ...rest: readonly unknown[]) => {
    rows.forEach((row, i) => {
      define(titled(title, row, i), () => bodyOf(rest)(...argumentsOf(row)));
    });
  };

const argumentsOf = (row: unknown): readonly unknown[] => (Array.isArray(row) ? row : [row]);

/** "$a.b" from the row, or "%s" from its values in turn. */
function titled(title: string, row: unknown, index: number): string {
  const values = [...argumentsOf(row)];
  return title
    .replace(/\$([A-Za-z][\w.]*)/g, (_, path: string) =>
      String(path.split('.').reduce<unknown>((value, key) => (value as Record<string, unknown>)?.[key], row)),
    )
    .replace(/%[sdifj#]/g, (mark) => (mark === '%#' ? String(index) : String(values.shift())));
}
