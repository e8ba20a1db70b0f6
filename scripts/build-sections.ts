import { readFileSync, writeFileSync } from 'node:fs';
import Papa from 'papaparse';
import { readSectionTable } from '../src/features/section/import';
import { sectionTableMetaSchema } from '../src/features/section/section';
import {
  fromInches,
  headings,
  INCHES,
  METRIC,
  type Radius,
  radiusByRule,
  radiusFromMass,
  radiusGiven,
  radiusOfChannel,
  radiusOfSeries,
  type Source,
  tableRow,
  teeOf,
  type Units,
} from './section-tables';

/**
 * Builds data/sections/*.csv from the dimensions in data/sections/source: `npx tsx scripts/build-sections.ts`. The
 * sidecar of each table is written by hand and only read here. Every table is read back by the importer, so that a
 * table which it would refuse is never written.
 */

const FOLDER = new URL('../data/sections/', import.meta.url);
const at = (name: string) => new URL(name, FOLDER);

type Plan = {
  slug: string;
  families: readonly string[];
  units?: Units;
  radius?: (row: Source, rows: readonly Source[]) => Radius;
  /** Sizes and names where the source has rounded or marked them. */
  adapt?: (row: Source) => Source;
};

const QUARTER_INCH = 6.35; // mm

/** US lumber is dressed to quarters of an inch; the source has rounded them to whole mm. */
function dressed(row: Source): Source {
  const exact = (text: string) => String(Math.round(Number(text) / QUARTER_INCH) * QUARTER_INCH);
  return { ...row, name: row.name.replace(/in$/, ''), h: exact(row.h), b: exact(row.b) };
}

const PLANS: readonly Plan[] = [
  { slug: 'european-i', families: ['IPE'], radius: radiusOfSeries, adapt: namedMass },
  { slug: 'european-h', families: ['HEA', 'HEB'], radius: radiusOfSeries },
  { slug: 'british-beams', families: ['UB'], radius: radiusFromMass },
  { slug: 'british-columns', families: ['UC'], radius: radiusFromMass },
  { slug: 'american-wide-flange', families: ['W'], units: INCHES, radius: radiusFromMass },
  { slug: 'parallel-channels', families: ['UPE'], radius: radiusOfChannel },
  { slug: 'european-tapered-i', families: ['IPN'], radius: radiusGiven },
  { slug: 'european-tapered-channels', families: ['UPN'], radius: radiusGiven },
  { slug: 'american-tapered-i', families: ['S'], units: INCHES, radius: radiusByRule },
  { slug: 'american-tapered-channels', families: ['C'], units: INCHES, radius: radiusByRule },
  { slug: 'american-tees', families: ['WT'], units: INCHES, radius: radiusByRule },
  { slug: 'equal-angles', families: ['L equal'], radius: radiusGiven },
  { slug: 'unequal-angles', families: ['L unequal'], radius: radiusGiven },
  { slug: 'american-angles', families: ['L inch'], units: INCHES, radius: radiusByRule },
  { slug: 'hollow-round', families: ['CHS'] },
  { slug: 'hollow-square', families: ['SHS'] },
  { slug: 'hollow-rectangular', families: ['RHS'] },
  { slug: 'sawn-timber', families: ['Sawn timber'] },
  { slug: 'regularised-timber', families: ['Regularised timber'] },
  { slug: 'glulam', families: ['Glulam'] },
  { slug: 'dimension-lumber', families: ['Dimension lumber'], units: INCHES, adapt: dressed },
  { slug: 'glulam-inch', families: ['Glulam inch'], units: INCHES },
];

/** IPE 750×137 carries its mass in its name. */
function namedMass(row: Source): Source {
  const named = /^IPE750x(\d+)$/.exec(row.name);
  return named ? { ...row, name: `IPE 750x${named[1]}`, mass_nominal: named[1] ?? '' } : row;
}

const readSource = (name: string): Source[] =>
  Papa.parse<Source>(readFileSync(at(`source/${name}`), 'utf8'), { header: true, skipEmptyLines: true }).data;

const byName = new Intl.Collator('en', { numeric: true });

function build(plan: Plan, sources: readonly Source[]): number {
  const meta = sectionTableMetaSchema.parse(JSON.parse(readFileSync(at(`${plan.slug}.json`), 'utf8')));
  const units = plan.units ?? METRIC;
  const rows = sources
    .filter(({ family }) => plan.families.includes(family))
    .map(plan.adapt ?? ((row) => row));
  rows.sort((a, b) => byName.compare(a.name, b.name));
  const shape = rows[0]?.shape ?? '';
  const lines = rows.map((row) =>
    tableRow(row, { units, density: meta.density_kg_m3, radius: plan.radius?.(row, rows) ?? null }),
  );
  const csv = Papa.unparse([headings(shape, units), ...lines], { newline: '\n' });
  const reading = readSectionTable(`${csv}\n`, meta);
  for (const { line, heading, severity, message } of reading.faults) {
    console.log(`${plan.slug}.csv:${line} ${severity} ${heading}: ${message}`);
  }
  if (!reading.ok) throw new Error(`${plan.slug}.csv is refused by its own importer`);
  writeFileSync(at(`${plan.slug}.csv`), `${csv}\n`);
  return reading.rows.length;
}

const inMm = [...readSource('section-dimensions.csv'), ...readSource('additions.csv')];
const wide = inMm.filter(({ family }) => family === 'W');
const sources = [
  ...inMm,
  ...readSource('additions-inch.csv').map(fromInches),
  ...wide.map((row) => teeOf(row, radiusFromMass(row, wide))),
];
const counts = PLANS.map((plan) => ({ slug: plan.slug, rows: build(plan, sources) }));
for (const { slug, rows } of counts) console.log(`${slug}: ${rows} sections`);
console.log(`${counts.reduce((sum, { rows }) => sum + rows, 0)} sections in ${counts.length} tables`);
