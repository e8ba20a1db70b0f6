import { execFileSync } from 'node:child_process';
import { closeSync, mkdtempSync, openSync, readSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { addFindings, RowCheck, recognise, reportOf, Survey } from '../../src/features/section/import';
import { RECOGNISED_BYTES } from '../../src/features/section/import/contract';

/**
 * `npm run bench:import -- [ROWS]`: a file of plausible sections of all kinds (100,000 where none is said) read
 * and checked in both passes, in pieces of 64 KB. States processor time and the most memory the process has held.
 */

const ROWS = Number(process.argv[2] ?? 100_000);
const SEED = 1;
const MOST_SECONDS = 15;
const MOST_MEGABYTES = 250;

const folder = mkdtempSync(join(tmpdir(), 'import-'));
const path = join(folder, 'sections.csv');

/** In a process of its own, whose memory is not ours. */
function write(): void {
  const script = fileURLToPath(new URL('../generate-sections.ts', import.meta.url));
  execFileSync(process.execPath, ['--import', 'tsx', script, path, String(ROWS), String(SEED)]);
}

function* pieces() {
  const file = openSync(path, 'r');
  for (;;) {
    const piece = new Uint8Array(RECOGNISED_BYTES);
    const read = readSync(file, piece);
    if (read === 0) break;
    yield piece.subarray(0, read);
  }
  closeSync(file);
}

const seconds = (since: NodeJS.CpuUsage) => {
  const { user, system } = process.cpuUsage(since);
  return (user + system) / 1e6;
};

write();
const size = statSync(path).size;
const before = process.memoryUsage().rss / 1e6;
const head = pieces().next().value ?? new Uint8Array(0);
const recognition = recognise(head, { name: 'sections.csv', size });
if (!recognition.ok) throw new Error(recognition.refusal.message);

const start = process.cpuUsage();
const survey = new Survey(recognition.mapping, []);
for (const piece of pieces()) survey.push(piece);
const read = seconds(start);
const surveyed = survey.finish();
if (!surveyed.ok) throw new Error(surveyed.refusal.message);
const first = seconds(start);
const check = new RowCheck(recognition.mapping, [], surveyed.facts);
let report = reportOf(surveyed.facts);
let rows = 0;
for (const piece of pieces()) {
  const batch = check.push(piece);
  rows += batch.rows.length;
  report = addFindings(report, batch.findings);
}
rows += check.finish().rows.length;
const all = seconds(start);
const peak = process.resourceUsage().maxRSS / 1e3;
rmSync(folder, { recursive: true });

const stated = (words: string, value: string) => console.info(`${words.padEnd(44)} ${value}`);
stated('rows, MB', `${rows}, ${(size / 1e6).toFixed(1)}`);
stated('first pass: read, compared, s', `${read.toFixed(1)} + ${(first - read).toFixed(1)}`);
stated('second pass, s', (all - first).toFixed(1));
stated(`both, s (at most ${MOST_SECONDS})`, `${all.toFixed(1)} ${all <= MOST_SECONDS ? 'met' : 'MISSED'}`);
stated('memory before, MB', before.toFixed(0));
stated(
  `most memory, MB (at most ${MOST_MEGABYTES})`,
  `${peak.toFixed(0)} ${peak <= MOST_MEGABYTES ? 'met' : 'MISSED'}`,
);
stated('errors, warnings, notes', `${report.errors}, ${report.warnings}, ${report.notes}`);
