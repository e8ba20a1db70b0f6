import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { ask } from '../support/app';
import { foundPractice } from '../support/practice';

let token: string;
beforeAll(async () => {
  const [reader] = await foundPractice(['reader']);
  token = await createApiToken(reader.email);
});

const beam = {
  length: '6 m',
  ei: 1,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 3, kind: 'roller' },
    { at: 6, kind: 'roller' },
  ],
  loads: [{ kind: 'line', from: 0, to: '6 m', w0: '8 kN/m', w1: 8000, group: 'Q' }],
  combinations: [{ name: '1', factors: { Q: 1.5 } }],
  patterns: ['Q'],
};
const envelope = (json: unknown, as = token) =>
  ask('POST', '/api/v1/beams/envelope', { json, ...(as !== '' && { token: as }) });

describe('POST /api/v1/beams/envelope', () => {
  // Two equal spans: −wL²/8 with both loaded, −wL/16 at the far end with one (AISC Manual Table 3-23 case 29, from memory).
  test('answers a reader with the envelope', async () => {
    const { status, json } = await envelope(beam);
    expect(status).toBe(200);
    expect(json.extremes.moment.min.value).toBeCloseTo((-1.5 * 8000 * 9) / 8, 6);
    expect(json.extremes.moment.min).toMatchObject({ at: [3], combination: '1', pattern: [0, 1] });
    expect(json.reactions[2].min.vertical.value).toBeCloseTo((-1.5 * 8000 * 3) / 16, 6);
    expect(json.reactions[2].groups.Q.vertical.min).toBeCloseTo((-8000 * 3) / 16, 6);
  });

  test('points to what it refuses', async () => {
    const { status, json } = await envelope({
      ...beam,
      loads: [{ kind: 'point', at: 7, p: '3', group: 'Q' }],
    });
    expect([status, json.errors[0].pointer, json.errors[0].code]).toEqual([
      422,
      '/loads/0/p',
      'unit_missing',
    ]);
  });

  test('asks who is there', async () => {
    expect((await envelope(beam, '')).status).toBe(401);
  });
});
