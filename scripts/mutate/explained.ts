import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Mutant } from './mutants';
import { ROOT } from './root';

/** A mutant that no test can catch, and why. Named by its text, so that lines may move. */
export type Explained = Pick<Mutant, 'file' | 'inside' | 'was' | 'becomes'> & { why: string };

const PATH = join(ROOT, 'tests/mutation/explained.json');

export const keyOf = ({ file, inside, was, becomes }: Omit<Explained, 'why'>): string =>
  [file, inside, was, becomes].join(' | ');

export const readExplained = (): Explained[] =>
  existsSync(PATH) ? (JSON.parse(readFileSync(PATH, 'utf8')) as Explained[]) : [];
