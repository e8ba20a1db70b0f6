import { expect, test } from 'vitest';
import { type EnvelopeDocument, readEnvelope, solveEnvelope } from './index';

const simple: EnvelopeDocument = {
  length: 6,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 6, kind: 'roller' },
  ],
  loads: [
    { kind: 'point', at: 2, p: 3000, group: 'G' },
    { kind: 'line', from: 0, to: 6, w0: 1000, w1: 1000, group: 'Q' },
  ],
  combinations: [{ name: 'both', factors: { G: 1.35, Q: 1.5 } }],
  patterns: ['Q'],
};

const faultsOf = (changes: Partial<EnvelopeDocument>): string[] => {
  const reading = readEnvelope({ ...simple, ...changes });
  return reading.ok ? [] : reading.faults.map(({ path, code }) => `${path.join('.')} ${code}`);
};

test('a task without a combination, or with one twice, is refused at its place', () => {
  expect(faultsOf({})).toEqual([]);
  expect(faultsOf({ combinations: [] })).toEqual(['combinations required']);
  const [both] = simple.combinations;
  expect(faultsOf({ combinations: [both!, both!] })).toEqual(['combinations.1.name duplicate']);
  expect(faultsOf({ combinations: [{ name: 'all', factors: { G: Number.NaN } }] })).toEqual([
    'combinations.0.factors.G not_finite',
  ]);
});

test('a beam without loads has an envelope of nothing', () => {
  const reading = readEnvelope({ ...simple, loads: [] });
  if (!reading.ok) throw new Error('refused');
  const solved = solveEnvelope(reading.value, [0, 3]);
  if (!solved.ok) throw new Error('refused');
  const { extremes, reactions } = solved.value.envelope;
  expect(extremes.moment.max).toMatchObject({ value: 0, combination: 'both', pattern: [] });
  expect(reactions.map(({ max, groups }) => [max.vertical.value, groups])).toEqual([
    [0, {}],
    [0, {}],
  ]);
});

test('a station a hair beside a load is at the load: both sides of its jump', () => {
  const reading = readEnvelope(simple);
  if (!reading.ok) throw new Error('refused');
  const solved = solveEnvelope(reading.value, [2 - 1e-12, 2 + 1e-12]);
  if (!solved.ok) throw new Error('refused');
  // R = 1.35 · 3000 · 4/6 + 1.5 · 3000 = 7200; V = 7200 − 1.5 · 1000 · 2 left of the load; right of it, without Q, −1350.
  for (const { shear } of solved.value.envelope.stations) {
    expect(shear.max.value).toBeCloseTo(4200, 6);
    expect(shear.min.value).toBeCloseTo(-1350, 6);
  }
});
