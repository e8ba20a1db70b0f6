import { describe, expect, test } from 'vitest';
import { shippedTemplate } from '../../../tests/support/templates';
import { defaultPoint } from './proof-box';
import { compareResults } from './proof-same';
import { solvePoint } from './proof-solve';
import { beginSameness, beginSweep, tallyPoint, tallySameness } from './proof-tally';
import { asProofCase } from './proof-worst';

const template = shippedTemplate('propped-cantilever-overhang-uniform');
const point = defaultPoint(template);
const unread = { ...point, parameters: { ...point.parameters, L: 'long' } };

describe('a point without a result', () => {
  test('says what cannot be read of it', () => {
    expect(solvePoint(template, unread)).toMatchObject({
      state: 'failed',
      message: expect.stringContaining('long'),
    });
    expect(solvePoint(template, { ...point, ei: 'stiff' })).toMatchObject({
      state: 'failed',
      message: expect.stringContaining('stiff'),
    });
  });

  test('is no proof case', () => {
    expect(asProofCase(template, unread, 'worst')).toBeNull();
  });

  test('is counted in a sweep, and the first five of such are kept with their reasons', () => {
    const tally = beginSweep(template);
    for (let k = 1; k <= 7; k++) tallyPoint(template, tally, point, { state: 'failed', message: `no ${k}` });
    expect(tally).toMatchObject({ points: 7, failed: 7, worst: null });
    expect(tally.failures.map(({ message }) => message)).toEqual(['no 1', 'no 2', 'no 3', 'no 4', 'no 5']);
  });

  test('is not compared with the issued revision; where only the new one has none the point is lost', () => {
    expect(compareResults(template, template, unread)).toBeNull();
    const tally = beginSameness();
    for (let k = 1; k <= 6; k++) tallySameness(tally, point, { state: 'lost', message: `lost ${k}` });
    expect(tally).toMatchObject({ points: 0, lost: 6, largest: null });
    expect(tally.losses).toHaveLength(5);
  });
});

describe('a comparison of two revisions', () => {
  test('counts what differs by more than it may, and keeps the largest; a number that is none differs', () => {
    const tally = beginSameness();
    for (const share of [1e-12, 3e-9, Number.NaN, 2e-9]) {
      tallySameness(tally, point, { state: 'compared', share, limit: 1e-9 });
    }
    expect(tally).toMatchObject({ points: 4, differing: 3, lost: 0, largest: { share: 3e-9 } });
  });

  test('of a revision with itself finds no difference', () => {
    expect(compareResults(template, template, point)).toMatchObject({ state: 'compared', share: 0 });
  });
});
