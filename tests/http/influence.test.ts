import { beforeAll, describe, expect, test } from 'vitest';
import { ROLES } from '@/features/account/roles';
import { createApiToken } from '@/features/account/token.server';
import { answerFrequency } from '@/features/beam/frequency';
import { answerInfluence } from '@/features/beam/influence';
import { answerMovingLoad } from '@/features/beam/moving-load';
import { ask } from '../support/app';
import { foundPractice } from '../support/practice';

const beam = {
  length: '9 m',
  ei: 2e7,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 7, kind: 'roller' },
  ],
};

/** What each endpoint is sent, what its use case answers with, and what is wrong with a body of its own. */
const ENDPOINTS = [
  {
    path: '/api/v1/beams/influence',
    body: { ...beam, quantity: { kind: 'moment', at: '7 m', side: 'left' } },
    answer: answerInfluence,
    wrong: { quantity: { kind: 'shear', at: 10 } },
    pointer: '/quantity/at',
  },
  {
    path: '/api/v1/beams/moving-load',
    body: {
      ...beam,
      wheels: [{ offset: 0, force: '50 kN' }],
      quantity: { kind: 'shear', at: 3 },
      absolute_moment: true,
    },
    answer: answerMovingLoad,
    wrong: { wheels: [{ offset: 0, force: '-50 kN' }] },
    pointer: '/wheels/0/force',
  },
  {
    path: '/api/v1/beams/frequency',
    body: { ...beam, mass: '80 kg/m' },
    answer: answerFrequency,
    wrong: { lumped: [{ at: 9.5, mass: 40 }] },
    pointer: '/lumped/0/at',
  },
] as const;

const tokens: string[] = [];
beforeAll(async () => {
  const staff = await foundPractice(...ROLES.map((role) => [role]));
  for (const { email } of staff) tokens.push(await createApiToken(email));
});

describe.each(ENDPOINTS)('POST $path', ({ path, body, answer, wrong, pointer }) => {
  test('answers every role with what its use case does', async () => {
    const expected = answer(body);
    expect(expected.ok).toBe(true);
    for (const token of tokens) {
      const { status, json } = await ask('POST', path, { token, json: body });
      expect([status, json]).toEqual([200, expected.ok ? JSON.parse(JSON.stringify(expected.answer)) : null]);
    }
  });

  test('names what is wrong at its place', async () => {
    const { status, headers, json } = await ask('POST', path, {
      token: tokens[0]!,
      json: { ...body, ...wrong },
    });
    expect(status).toBe(422);
    expect(headers.get('content-type')).toContain('application/problem+json');
    expect(json.errors).toMatchObject([{ pointer }]);
    const unknown = await ask('POST', path, { token: tokens[0]!, json: { ...body, lenght: 1 } });
    expect(unknown.json.errors).toMatchObject([{ pointer: '/lenght', code: 'unknown_field' }]);
  });

  test('asks who is there', async () => {
    const { status } = await ask('POST', path, { json: body });
    expect(status).toBe(401);
  });
});
