import { expect, test } from 'vitest';
import { authored, shippedTemplate, writtenTemplates } from '../../../tests/support/templates';
import { compareBenchmarks } from './proof-effect';

const SLUG = 'simple-span-uniform';
const issued = shippedTemplate(SLUG);

type Written = { beam: { loads: object[] }; results: { id: string; expression: string }[]; summary: string };
function changed(change: (written: Written) => void) {
  const written: unknown = structuredClone(writtenTemplates.get(SLUG));
  change(written as Written);
  return authored(written);
}

const moved = (to: typeof issued) => compareBenchmarks(issued, to).filter((one) => one.moved);

test('nothing moves where nothing that is calculated changed', () => {
  expect(compareBenchmarks(issued, issued).length).toBeGreaterThan(5);
  expect(moved(changed((written) => Object.assign(written, { summary: 'Said better.' })))).toEqual([]);
});

test('one coefficient 1 % larger moves every benchmark of that formula by 1 %, and no other', () => {
  const [first] = issued.results;
  const to = changed(({ results }) => {
    const same = results.find(({ id }) => id === first?.id);
    if (same) same.expression = `1.01*(${same.expression})`;
  });
  const compared = issued.proof_cases.flatMap(({ expect: all }) =>
    all.filter((one) => 'result' in one && one.result === first?.id),
  );
  const found = moved(to);
  expect(found.length).toBe(compared.length);
  for (const { name, from, to: now } of found) {
    expect(name).toBe(first?.name);
    expect((now?.expected ?? 0) / (from?.expected ?? 1)).toBeCloseTo(1.01, 12);
    expect(now?.got).toBe(from?.got);
  }
});

test('a load 1 % larger moves what the solver finds in every case', () => {
  const to = changed(({ beam }) => Object.assign(beam.loads[0] ?? {}, { w0: '1.01*w', w1: '1.01*w' }));
  const found = moved(to);
  expect(new Set(found.map(({ proofCase }) => proofCase)).size).toBe(issued.proof_cases.length);
});

test('a formula that is gone moves its benchmarks to nothing', () => {
  const [first] = issued.results;
  const to = { ...issued, results: issued.results.slice(1) };
  const found = moved(to);
  expect(found.length).toBeGreaterThan(0);
  expect(found.every(({ name, to: now }) => name === first?.name && now === null)).toBe(true);
});
