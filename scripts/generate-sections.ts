import { once } from 'node:events';
import { createWriteStream } from 'node:fs';
import Papa from 'papaparse';
import { PRINTED_HEADINGS, plausibleSections } from '../tests/support/plausible-sections';

/**
 * Writes a CSV of plausible sections of all kinds, for measuring: `npx tsx scripts/generate-sections.ts PATH [ROWS] [SEED]`,
 * 100,000 rows where none are given. The same seed writes the same file.
 */

const [path, rows = '100000', seed = '1'] = process.argv.slice(2);
if (path === undefined) {
  console.error('Give the path of the file to write: generate-sections.ts sections.csv [rows] [seed]');
  process.exit(2);
}

const file = createWriteStream(path);
file.write(`${Papa.unparse([[...PRINTED_HEADINGS]])}\n`);
let count = 0;
for (const row of plausibleSections(Number(rows), Number(seed))) {
  const line = Papa.unparse([PRINTED_HEADINGS.map((heading) => row[heading])]);
  if (!file.write(`${line}\n`)) await once(file, 'drain');
  count++;
}
file.end();
await once(file, 'finish');
console.info(`${count} sections in ${path}`);
