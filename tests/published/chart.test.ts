import { readFileSync } from 'node:fs';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import {
  chartTerms,
  evaluate as evaluateFormula,
  type NamedLoad,
  type Released,
  symbol,
  total,
} from '@/engine/chart/index';
import { type Beam, type Load, readBeam } from '@/engine/model/index';
import { isProven, proveSolution } from '@/engine/proof/index';
import { ARRANGEMENTS } from '../support/arrangements';
import { expectPrinted } from '../support/printed';
import { quantityOf } from '../support/printed-value';

type Row = Record<
  'source' | 'edition' | 'table' | 'case' | 'arrangement' | 'quantity' | 'printed' | 'units' | 'from_memory',
  string
>;

const text = readFileSync(new URL('../../data/published/beam-cases.csv', import.meta.url), 'utf8');
const rows = Papa.parse<Row>(text, { header: true, skipEmptyLines: true }).data;

function beamOf(arrangement: string): Beam {
  const document = ARRANGEMENTS[arrangement];
  if (!document) throw new Error(`no arrangement is called ${arrangement}`);
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

/** The same from the chart register, where it is a deflection or slope of a determinate beam. */
function chartedOf(quantity: string, beam: Beam): number | null {
  const [, movement, place] = /^(d|slope) at ([\d.]+)$/.exec(quantity) ?? [];
  if (!movement || !place || beam.degree > 0) return null;
  const values = new Map<string, number>();
  const letter = (value: number) => {
    const name = `n${values.size}`;
    values.set(name, value);
    return symbol(name);
  };
  const [first, second] = beam.supports.map(({ at }) => letter(at));
  const released: Released = second
    ? { kind: 'simple', left: first!, right: second }
    : { kind: 'cantilever', root: first! };
  const named = (load: Load): NamedLoad => {
    if (load.kind === 'point') return { kind: 'point', at: letter(load.at), p: letter(load.p) };
    if (load.kind === 'couple') return { kind: 'couple', at: letter(load.at), m: letter(load.m) };
    const ends = { from: letter(load.from), to: letter(load.to) };
    if (load.kind === 'curvature') return { kind: 'curvature', ...ends, kappa: letter(load.kappa) };
    const w0 = load.w0 === 0 ? [] : letter(load.w0);
    return { kind: 'line', ...ends, w0, w1: load.w1 === load.w0 ? w0 : load.w1 === 0 ? [] : letter(load.w1) };
  };
  const value = (name: string) => values.get(name) ?? Number.NaN;
  const setting = { value, ei: letter(1), length: beam.length };
  return beam.loads.reduce((sum, load) => {
    const terms = chartTerms(
      released,
      named(load),
      letter(Number(place)),
      movement === 'd' ? 'deflection' : 'slope',
      setting,
    );
    return terms ? sum + evaluateFormula(total(terms), value) : Number.NaN;
  }, 0);
}

describe('printed beam tables', () => {
  test.each(rows)('$source $table case $case, $arrangement: $quantity is $printed', (row) => {
    const beam = beamOf(row.arrangement);
    const solution = solveBeam(beam);
    expect(isProven(proveSolution(beam, solution), beam)).toBe(true);
    expectPrinted(quantityOf(row.quantity, beam, solution), row.printed, Number(row.units));
    const charted = chartedOf(row.quantity, beam);
    if (charted !== null) expectPrinted(charted, row.printed, Number(row.units));
  });

  test('every row names its source, and every arrangement is used', () => {
    expect(rows.length).toBeGreaterThan(100);
    for (const row of rows) {
      expect(
        row.source && row.edition && row.table && row.case && /^(yes|no)$/.test(row.from_memory),
      ).toBeTruthy();
    }
    const used = new Set(rows.map(({ arrangement }) => arrangement));
    expect(Object.keys(ARRANGEMENTS).filter((name) => !used.has(name))).toEqual([]);
  });
});
