import { beforeAll, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { readScreen } from '@/features/review/request-screen.server';
import { ask } from '../support/app';
import { issueTemplate } from '../support/library';
import { foundPractice, type Member } from '../support/practice';

const SPAN = 'simple-span-uniform';
let engineer: Member;
let colleague: Member;
let token: string;

beforeAll(async () => {
  const [first, second, librarian, checker] = await foundPractice(
    ['engineer'],
    ['engineer'],
    ['librarian'],
    ['checker'],
  );
  [engineer, colleague] = [first, second];
  await issueTemplate({ author: librarian, reviewer: checker }, SPAN);
  token = await createApiToken(engineer.email);
  for (const [path, json] of [
    ['/api/v1/jobs', { number: 'Q-1', name: 'Boat shed', access: 'named' }],
    ['/api/v1/jobs/Q-1/members', { mark: 'B1', template: SPAN, parameters: { L: '7.2 m' } }],
  ] as const)
    expect((await ask('POST', path, { token, json })).status).toBe(201);
});

test('a template’s screen has all of its values, those of the address before the usual', async () => {
  const address = `/templates/${SPAN}?L=9.1+m&section=IPE+300&depth=`;
  const { template, values } = await readScreen(engineer, address);
  expect(template).toEqual({ slug: SPAN, reference: 'Span 1', revision: 1 });
  expect(values).toMatchObject({ L: '9.1 m', section: 'IPE 300' });
  expect(Object.keys(values ?? {})).toContain('w');
});

test('a member’s screen has the member as it is saved, with the fingerprint of its results', async () => {
  const { json } = await ask('GET', '/api/v1/jobs/Q-1/members/B1', { token });
  const address = '/jobs/Q-1/members/B1';
  expect(await readScreen(engineer, address)).toEqual({
    address,
    template: { slug: SPAN, reference: 'Span 1', revision: 1 },
    member: {
      job: 'Q-1',
      mark: 'B1',
      version: 1,
      section: null,
      criteria: null,
      fingerprint: json.fingerprint,
      engine_version: json.engine_version,
    },
    values: json.parameters,
  });
  expect(json.fingerprint).toMatch(/^[0-9a-f]{64}$/);
});

test('a screen that its reader may not see, or that is not there, is its address alone', async () => {
  for (const address of ['/jobs/Q-1/members/B1', '/jobs/Q-1/members/B2', '/templates/none', '/jobs'])
    expect(await readScreen(colleague, address)).toEqual({ address });
});

test('a list’s screen has its filters', async () => {
  const address = '/sections?q=hea&depth_min=300';
  expect(await readScreen(colleague, address)).toEqual({ address, values: { q: 'hea', depth_min: '300' } });
});
