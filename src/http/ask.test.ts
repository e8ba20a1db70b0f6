import { afterEach, expect, test, vi } from 'vitest';
import { ask } from './ask';

afterEach(() => vi.unstubAllGlobals());

const answering = (give: () => Promise<Response>) => {
  const fetch = vi.fn((_: string, _init: RequestInit) => give());
  vi.stubGlobal('fetch', fetch);
  return fetch;
};
const FAULTS = [{ pointer: '/name', code: 'duplicate', message: 'Taken.' }];
const LOST = { kind: 'refused', message: /does not answer/, faults: [] };
const problem = { detail: 'Refused.', errors: FAULTS };
const json = (status: number, body: object) => async () => Response.json(body, { status });

test.each([
  ['an answer', json(201, { id: 1 }), { kind: 'done', json: { id: 1 } }],
  ['an answer without a body', async () => new Response(null, { status: 204 }), { kind: 'done', json: null }],
  ['a refusal', json(422, problem), { kind: 'refused', message: 'Refused.', faults: FAULTS }],
  ['an older version', json(412, { ...problem, current: { id: 2 } }), { kind: 'stale', current: { id: 2 } }],
  ['no session', json(401, problem), { kind: 'refused', message: /session has ended/, faults: [] }],
  ['a proxy’s page', async () => new Response('Bad gateway', { status: 502 }), LOST],
  ['nobody', () => Promise.reject(new TypeError('fetch failed')), LOST],
])('%s is told', async (_, give, expected) => {
  answering(give);
  const { message, ...rest } = expected as { message?: string | RegExp };
  const told = await ask('GET', '/');
  expect(told).toMatchObject(rest);
  if (message !== undefined) expect(told).toMatchObject({ message: expect.stringMatching(message) });
});

test('what is asked goes as JSON, over the version that was read', async () => {
  const fetch = answering(json(200, {}));
  await ask('PUT', '/a', { json: { b: 1 }, version: 3 });
  await ask('DELETE', '/a');
  expect(fetch.mock.calls).toEqual([
    [
      '/a',
      { method: 'PUT', body: '{"b":1}', headers: { 'Content-Type': 'application/json', 'If-Match': '"3"' } },
    ],
    ['/a', { method: 'DELETE', headers: {} }],
  ]);
});
