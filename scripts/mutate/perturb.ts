import { mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type Explained, keyOf, readExplained } from './explained';
import { Judge } from './judge';
import { type Mutant, mutantsOf } from './mutants';
import { ROOT } from './root';

/**
 * Changes every number, sign and operator of the solvers and the charts in turn, and asks the tests whether they notice.
 * `npm run perturb`, or `npm run perturb -- beam/ chart/cases` for the files whose paths hold one of the words.
 * Fails where a mutant is neither caught nor explained, or where an explanation explains no survivor.
 */
const FOLDERS = ['src/engine/beam', 'src/engine/stiffness', 'src/engine/chart'];
const TESTS = [
  ...[...FOLDERS, 'src/engine/proof'].flatMap((folder) => listed(folder, /\.test\.ts$/)),
  ...listed('tests/published', /^(exact-beams|solve-examples|beam-tables|chart)\.test\.ts$/),
];
const REPORT = '.cache/perturb.tsv';

type Verdict = { mutant: Mutant; caught: string | null };

const words = process.argv.slice(2);
const files = FOLDERS.flatMap((folder) => listed(folder, /(?<!\.test)\.ts$/)).filter(
  (file) => words.length === 0 || words.some((word) => file.includes(word)),
);
const verdicts = await judgeAll(mutantsOf(files.map((file) => join(ROOT, file))));
const survivors = verdicts.filter(({ caught }) => caught === null).map(({ mutant }) => mutant);
const explained = readExplained().filter(({ file }) => files.includes(file));
const known = new Set(explained.map(keyOf));
const unexplained = survivors.filter((mutant) => !known.has(keyOf(mutant)));
const surviving = new Set(survivors.map(keyOf));
const idle = explained.filter((one) => !surviving.has(keyOf(one)));

for (const mutant of unexplained) print('survives', mutant);
for (const one of idle) print('explained, but no survivor', one);
printTable();
console.log(`Every mutant and what caught it: ${REPORT}`);
process.exitCode = unexplained.length + idle.length > 0 ? 1 : 0;

function listed(folder: string, name: RegExp): string[] {
  return readdirSync(join(ROOT, folder))
    .filter((file) => name.test(file))
    .map((file) => `${folder}/${file}`);
}

async function judgeAll(mutants: readonly Mutant[]): Promise<Verdict[]> {
  const took = await Judge.time(TESTS);
  const ordered = [...TESTS].sort((a, b) => took.get(a)! - took.get(b)!);
  const judge = new Judge(ordered, took);
  const found: Verdict[] = [];
  for (const mutant of mutants) {
    found.push({ mutant, caught: await judge.judge(mutant) });
    if (process.stderr.isTTY || found.length % 100 === 0) progress(found, mutants.length);
    if (found.length % 20 === 0) writeReport(found);
  }
  writeReport(found);
  await judge.end();
  return found;
}

function progress(found: readonly Verdict[], all: number): void {
  const left = found.filter(({ caught }) => caught === null).length;
  process.stderr.write(`${found.length} of ${all}, ${left} not caught${process.stderr.isTTY ? '\r' : '\n'}`);
}

function print(what: string, { file, inside, was, becomes, ...rest }: Mutant | Explained): void {
  const line = 'line' in rest ? `:${rest.line}` : '';
  console.log(`${what}: ${file}${line} ${inside}\n  - ${was}\n  + ${becomes}`);
}

function printTable(): void {
  for (const folder of FOLDERS) {
    const own = verdicts.filter(({ mutant }) => mutant.file.startsWith(`${folder}/`));
    if (own.length === 0) continue;
    const caught = own.filter((verdict) => verdict.caught !== null).length;
    const without = unexplained.filter(({ file }) => file.startsWith(`${folder}/`)).length;
    const counts = [own.length, caught, own.length - caught - without, without];
    const [all, by, why, none] = counts.map((count) => String(count).padStart(5));
    console.log(`${folder.padEnd(22)}${all} mutants,${by} caught,${why} explained,${none} neither`);
  }
}

function writeReport(verdicts: readonly Verdict[]): void {
  const rows = verdicts.map(({ mutant: { file, line, inside, was, becomes }, caught }) => {
    const verdict = caught ?? 'survives';
    return [file, line, inside, was, becomes, verdict].join('\t');
  });
  mkdirSync(join(ROOT, '.cache'), { recursive: true });
  writeFileSync(join(ROOT, REPORT), `${rows.join('\n')}\n`);
}
