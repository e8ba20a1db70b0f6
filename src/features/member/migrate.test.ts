import { expect, test } from 'vitest';
import { buildSheet } from '@/engine/sheet';
import stored from '../../../tests/support/member-result-1.0.0.json';
import { readResult } from './migrate';
import { drawnSolution, governingOf } from './result';

// A simple span of 5.4 m, G 4.0 and Q 18 kN/m, as engine 1.0.0 stored it before patterns were run.
const result = readResult(stored);

test('a result of engine 1.0.0 is read with every combination as its only arrangement', () => {
  if (result.kind !== 'result') throw new Error('it is a result');
  const full = result.strength.find(({ combination }) => combination.name === '1.35 G + 1.5 Q');
  const w = 1.35 * (4000 + 42.2 * 9.80665) + 1.5 * 18000;
  expect(full?.extremes.moment.max).toMatchObject({
    combination: '1.35 G + 1.5 Q',
    pattern: [],
    at: [expect.closeTo(2.7, 12)],
  });
  expect(full?.extremes.moment.max.value).toBeCloseTo((w * 5.4 ** 2) / 8, 6);
  expect(full?.reactions.map(({ max, min }) => [max.vertical.value, min.vertical.value])).toEqual([
    [expect.closeTo((w * 5.4) / 2, 6), expect.closeTo((w * 5.4) / 2, 6)],
    [expect.closeTo((w * 5.4) / 2, 6), expect.closeTo((w * 5.4) / 2, 6)],
  ]);
  expect(result.patterning.groups).toEqual([]);
  expect(governingOf(result)?.pattern).toBeUndefined();
});

test('its sheet prints, and says that every group stands everywhere', () => {
  if (result.kind !== 'result') throw new Error('it is a result');
  const blocks = buildSheet({
    system: 'metric',
    purpose: '',
    basis: '',
    template: { reference: 'Span 1', name: 'Simple span', revision: 1, parameters: [] },
    parameters: {},
    ownWeight: { acts: true, reason: '' },
    patterns: { act: true, reason: '' },
    section: null,
    criteria: { name: 'Steel', revision: 1, basis: '', combinations: [], letters: {}, patterns: [] },
    result: { ...result, total: drawnSolution(result.total) },
    cautions: [],
  });
  expect(JSON.stringify(blocks)).toContain('Every group stands on its whole length in every combination.');
});

test('what is read once is read the same again, and a fault stays one', () => {
  expect(readResult(JSON.parse(JSON.stringify(result)))).toEqual(JSON.parse(JSON.stringify(result)));
  const fault = { kind: 'fault', message: 'Not proven.', proof: {} };
  expect(readResult(fault)).toEqual(fault);
  expect(() => readResult({})).toThrow();
});
