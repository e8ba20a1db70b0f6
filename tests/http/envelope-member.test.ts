import { and, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { member } from '@/db/schema/member';
import { withPractice } from '@/db/tenancy';
import { createApiToken } from '@/features/account/token.server';
import { readSheet } from '@/features/sheet/sheet.server';
import { ask } from '../support/app';
import stored from '../support/member-result-1.0.0.json';
import { foundStockedPractice } from '../support/stocked';

let practice: Awaited<ReturnType<typeof foundStockedPractice>>;
let token: string;

beforeAll(async () => {
  practice = await foundStockedPractice();
  token = await createApiToken(practice.engineer.email);
  await ask('POST', '/api/v1/jobs', { token, json: { number: 'J1', name: 'School hall' } });
}, 120_000);

const CANOPY = {
  mark: 'LF4',
  template: 'propped-cantilever-overhang-uniform',
  parameters: { L: '6 m', a: '1.8 m', w: { G: '5.52 kN/m', S: '3.6 kN/m' } },
  section: { designation: 'ipe 300', table: 'european-i', material: 's355' },
  criteria: 'steel-elastic-en',
};
const create = (json: object) => ask('POST', '/api/v1/jobs/J1/members', { token, json });
const sheetOf = async (mark: string) =>
  JSON.stringify((await readSheet({ ...practice.engineer, practiceName: 'P' }, 'J1', mark, [])).blocks);

describe('a member with snow that acts only where adverse', () => {
  // −wL²/8 + wa²/4 everywhere and −wL²/8 on the span alone, by the three-moment equation; IPE 300 weighs 42.2 kg/m.
  test('is judged by the span alone, and says so', async () => {
    const { status, json } = await create(CANOPY);
    expect([status, json.patterns, json.result.schema_version]).toEqual([201, true, 2]);
    expect(json.result.patterning.groups).toEqual(['S']);
    const g = 5520 + 42.2 * 9.80665;
    const snow = json.result.strength.find(
      ({ combination }: { combination: { name: string } }) => combination.name === '1.35 G + 1.5 S',
    );
    expect(snow.extremes.moment.min).toMatchObject({
      at: [0],
      pattern: [0],
      value: expect.closeTo(-1.35 * g * (36 / 8 - 3.24 / 4) - (1.5 * 3600 * 36) / 8, 4),
    });
    const bending = json.result.checks.rows.find(({ kind }: { kind: string }) => kind === 'bending');
    expect(bending.place).toBe('at A, 1.35 G + 1.5 S, span A–B loaded');
    expect(await sheetOf('LF4')).toContain('On each span and overhang where adverse');
  });

  test('needs a reason for snow everywhere, which its sheet prints', async () => {
    const without = { ...CANOPY, mark: 'LF7', patterns: false };
    expect((await create(without)).json.errors).toMatchObject([
      { pointer: '/patterns_reason', code: 'required' },
    ]);
    const { status, json } = await create({ ...without, patterns_reason: 'Snow guards hold it.' });
    expect([status, json.result.patterning.groups, json.patterns_reason]).toEqual([
      201,
      [],
      'Snow guards hold it.',
    ]);
    const bending = json.result.checks.rows.find(({ kind }: { kind: string }) => kind === 'bending');
    expect(bending.place).toBe('at A, 1.35 G + 1.5 S');
    expect(await sheetOf('LF7')).toContain('Patterns are switched off: Snow guards hold it.');
  });

  test('is tried with patterns switched off, and nothing is saved', async () => {
    const tried = await ask('POST', '/api/v1/jobs/J1/members/LF4/evaluate', {
      token,
      json: { patterns: false },
    });
    expect(tried.json.result.patterning.groups).toEqual([]);
    const { json } = await ask('GET', '/api/v1/jobs/J1/members/LF4', { token });
    expect(json.result.patterning.groups).toEqual(['S']);
  });
});

test('what engine 1.0.0 stored is read, listed and printed as it was', async () => {
  const { engineer } = practice;
  await create({ ...CANOPY, mark: 'OLD', template: 'simple-span-uniform', parameters: { L: '5.4 m' } });
  await withPractice(engineer, (tx) =>
    tx
      .update(member)
      .set({
        result: stored,
        settings: { self_weight: true, self_weight_reason: '', redundants: null, reason: '' },
      })
      .where(and(eq(member.practiceId, engineer.practiceId), eq(member.mark, 'OLD'))),
  );
  const { status, json } = await ask('GET', '/api/v1/jobs/J1/members/OLD', { token });
  expect([status, json.patterns, json.patterns_reason]).toEqual([200, true, '']);
  expect(json.result.checks).toEqual(stored.checks);
  expect(json.result.strength.map((one: { combination: object }) => one.combination)).toEqual(
    stored.strength.map(({ combination }) => combination),
  );
  expect(await sheetOf('OLD')).toContain('Every group stands on its whole length');
  expect((await ask('GET', '/api/v1/jobs/J1/members', { token })).status).toBe(200);
});
