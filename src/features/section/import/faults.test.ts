import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { seededFaults } from '../../../../tests/support/section-faults';
import { alarms, type Imported, importBytes, importText } from '../../../../tests/support/section-import';
import { csvOf, plausibleTable } from '../../../../tests/support/section-table';
import { identityFindings, RULES } from './index';

const FIXTURES = new URL('../../../../tests/fixtures/', import.meta.url);
const fixture = (name: string) => new Uint8Array(readFileSync(new URL(name, FIXTURES)));

describe("the supplier's file: semicolons, decimal commas, a byte order mark", () => {
  test('clean, it asks for the axes and is then silent', () => {
    const asked = importBytes(fixture('ottervane-issue-7.csv'));
    expect(asked.questions.map(({ kind }) => kind)).toEqual(['axes']);
    const imported = importBytes(fixture('ottervane-issue-7.csv'), { axes: 'en' });
    expect(imported.findings).toEqual([]);
    expect(imported.rows).toHaveLength(11);
    expect(imported.rows[1]).toMatchObject({
      printed: 'OV 180×90×18',
      key: 'ov180x90x18',
      depth_mm: 178,
      mass_kg_m: 17.6,
      i_major_cm4: 1208,
      iw_cm6: 6700,
      dimensions: { shape: 'i', h: 0.178, b: 0.09, tw: 0.005, tf: 0.0076, r: 0.008 },
    });
  });

  test('thirteen seeded faults are thirteen findings, each with its cause', () => {
    const { findings } = importBytes(fixture('ottervane-issue-7-faults.csv'), { axes: 'en' });
    const found = findings.map(({ line, rule, cause, heading }) => [line, rule, cause, heading]);
    found.sort((a, b) => Number(a[0]) - Number(b[0]));
    expect(found).toEqual([
      [null, 20, 'column_slip', 'Iw (cm⁶)'],
      [1, 30, 'byte_order_mark', 'A (cm²)'],
      [3, 28, 'decimal_mark', 'kg/m'],
      [4, 18, 'power_of_ten', 'Iy (cm⁴)'],
      [5, 33, 'missing', 'tf (mm)'],
      [6, 9, 'moduli_swapped', 'Wpl,y (cm³)'],
      [7, 37, 'look_alike', 'Name'],
      [8, 19, 'mass_units', 'kg/m'],
      [9, 6, 'axes_swapped', 'Iy (cm⁴)'],
      [10, 38, 'formula', 'Name'],
      [11, 21, 'row_shift', 'h (mm)'],
      [13, 23, 'duplicate_differs', ''],
      [14, 32, 'summary_row', ''],
    ]);
  });

  test('a finding says what was read, what is expected, by which formula and why', () => {
    const { findings } = importBytes(fixture('ottervane-issue-7-faults.csv'), { axes: 'en' });
    expect(findings.find(({ line }) => line === 4)).toMatchObject({
      severity: 'error',
      designation: 'OV 210×110×24',
      read: '23420000',
      expected: '2\u202f342 cm⁴',
      formula:
        '[b·h³ − (b − t_w)·(h − 2·t_f)³]/12 + 4 fillets with h 208, b 110, t_w 5.6, t_f 9, r 9 mm = 2\u202f342 cm⁴',
      message: 'The value looks like mm⁴ under a heading of cm⁴.',
    });
    expect(findings.find(({ rule }) => rule === 20)?.message).toBe(
      'The whole column: the value looks like dm⁶ under a heading of cm⁶.',
    );
  });
});

describe('clean rows give no alarm', () => {
  const folder = new URL('../../../../data/sections/', import.meta.url);
  const slugs = readdirSync(folder).filter((name) => name.endsWith('.csv'));
  test('there are tables to try', () => expect(slugs.length).toBeGreaterThan(10));
  test.each(slugs)('%s', (name) => {
    const bytes = new Uint8Array(readFileSync(new URL(name, folder)));
    const imported = importBytes(bytes);
    expect(imported.questions).toEqual([]);
    expect(alarms(imported)).toEqual([]);
    expect(imported.rows).toHaveLength(imported.facts?.rowCount ?? 0);
  });

  test('two thousand generated rows of all kinds', () => {
    const table = plausibleTable(2000, 3, ['i', 'channel', 'rhs', 'shs', 'chs', 'rectangle', 'round']);
    const imported = importText(csvOf(table));
    expect(alarms(imported)).toEqual([]);
    expect(imported.rows).toHaveLength(2000);
  });
});

/** Found with its cause, in its place, and nothing said of the clean rows beside it. */
function isFound(seeded: ReturnType<typeof seededFaults>[number], imported: Imported): boolean {
  const { before, causes, line } = seeded;
  if (before !== null) return imported.questions.some(({ kind }) => kind === before);
  return imported.findings.some(
    (finding) => causes.includes(finding.cause) && (line === null || finding.line === line),
  );
}
function strays({ before, causes, line }: ReturnType<typeof seededFaults>[number], imported: Imported) {
  if (before !== null) return [];
  return alarms(imported).filter((finding) =>
    line === null ? !causes.includes(finding.cause) : finding.line !== line,
  );
}

test('of a hundred faults seeded at random, over all rules, 95 are found and no clean row is blamed', () => {
  const faults = seededFaults(100, 20_250_301);
  const counts = new Map<number, { seeded: number; found: number }>();
  const missed: string[] = [];
  const blamed: string[] = [];
  for (const seeded of faults) {
    const imported = importText(seeded.csv, { change: seeded.change });
    const count = counts.get(seeded.rule) ?? { seeded: 0, found: 0 };
    const found = isFound(seeded, imported);
    counts.set(seeded.rule, { seeded: count.seeded + 1, found: count.found + (found ? 1 : 0) });
    if (!found) missed.push(`rule ${seeded.rule}: ${seeded.words}`);
    for (const { line, message } of strays(seeded, imported))
      blamed.push(`${seeded.words}: line ${line}, ${message}`);
  }
  const table = [...counts]
    .sort(([a], [b]) => a - b)
    .map(([rule, { seeded, found }]) => `${String(rule).padStart(2)} ${RULES[rule]}: ${found} of ${seeded}`);
  console.info([...table, ...missed.map((words) => `missed: ${words}`)].join('\n'));
  expect(blamed).toEqual([]);
  expect(faults.length - missed.length).toBeGreaterThanOrEqual(95);
  const rules = Object.keys(RULES).map(Number);
  expect(rules.filter((rule) => rule !== 40 && !counts.has(rule))).toEqual([]);
});

describe('rule 40, the identity of a file', () => {
  const identity = (sha256: string) => ({
    sha256,
    rowCount: 6,
    columnSums: {},
    source: 'issue 7',
    date: '2026-01-05',
  });
  test('the same bytes bring nothing new', () => {
    const [finding, ...more] = identityFindings(identity('a1'), identity('a1'), null);
    expect(finding).toMatchObject({ rule: 40, severity: 'note', cause: 'same_file' });
    expect(finding?.message).toContain('nothing new');
    expect(more).toEqual([]);
  });
  test.each([
    [5, 0, 0],
    [4, 2, 1],
    [0, 6, 1],
  ])('%d changed and %d removed of a hundred: %d alerts', (changed, removed, alerts) => {
    const found = identityFindings(identity('b2'), identity('a1'), { changed, removed, of: 100 });
    expect(found).toHaveLength(alerts);
  });
  test('a first edition has none before it', () => {
    expect(identityFindings(identity('a1'), null, null)).toEqual([]);
  });
});
