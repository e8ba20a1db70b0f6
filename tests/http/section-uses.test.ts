import { beforeAll, expect, test } from 'vitest';
import type { User } from '@/features/account/account';
import { createApiToken } from '@/features/account/token.server';
import { readSectionPage } from '@/features/section/page.server';
import { ask } from '../support/app';
import { foundStockedPractice } from '../support/stocked';

let practice: Awaited<ReturnType<typeof foundStockedPractice>>;

const CANOPY = {
  mark: 'LF4',
  template: 'propped-cantilever-overhang-uniform',
  parameters: { L: '6 m', a: '1.8 m', w: { G: '5.52 kN/m', S: '3.6 kN/m' } },
  section: { designation: 'ipe 300', table: 'european-i', material: 's355' },
  criteria: 'steel-elastic-en',
};

beforeAll(async () => {
  practice = await foundStockedPractice();
  const token = await createApiToken(practice.engineer.email);
  await ask('POST', '/api/v1/jobs', { token, json: { number: 'J1', name: 'School hall' } });
  const { status } = await ask('POST', '/api/v1/jobs/J1/members', { token, json: CANOPY });
  expect(status).toBe(201);
}, 120_000);

const usesOf = async (designation: string, from: number) =>
  (
    await readSectionPage(
      practice.engineer as User,
      { table: 'european-i', designation, edition: undefined },
      from,
    )
  ).uses;

test('the members made of a section are counted on whichever page', async () => {
  expect(await usesOf('IPE 300', 0)).toMatchObject({
    items: [{ job: 'J1', mark: 'LF4' }],
    total: 1,
    next: null,
  });
  expect(await usesOf('IPE 300', 20)).toEqual({ items: [], total: 1, next: null });
  expect(await usesOf('IPE 270', 0)).toEqual({ items: [], total: 0, next: null });
});
