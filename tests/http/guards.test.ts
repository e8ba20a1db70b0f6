import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { allRoutes } from '@/http/registry';
import { ask, signInAs } from '../support/app';
import { ORIGIN } from '../support/env';
import { foundPractice, PASSWORD } from '../support/practice';

let token: string;
beforeAll(async () => {
  const [reader] = await foundPractice(['reader']);
  token = await createApiToken(reader.email);
});

const JSON_TYPE = { 'content-type': 'application/json' };

describe('every endpoint', () => {
  test('but the open ones asks who is there', async () => {
    const open: string[] = [];
    for (const { pattern, endpoints } of await allRoutes())
      for (const [method, endpoint] of endpoints) {
        if (endpoint.open) open.push(`${method} ${pattern}`);
        else {
          const path = pattern.replaceAll(/\[\w+\]/g, 'any');
          const { status, json } = await ask(method, path, {
            body: method === 'GET' ? undefined : '{}',
            headers: JSON_TYPE,
          });
          expect([pattern, method, status, json.errors[0].code]).toEqual([
            pattern,
            method,
            401,
            'unauthenticated',
          ]);
        }
      }
    expect(open).toEqual(['GET /api/v1/openapi.json', 'POST /api/v1/session']);
  });

  test('is described, and nothing else', async () => {
    const { status, json } = await ask('GET', '/api/v1/openapi.json');
    expect([status, json.openapi, json.servers]).toEqual([200, '3.1.0', [{ url: ORIGIN }]]);
    const routes = await allRoutes();
    expect(Object.keys(json.paths)).toEqual(
      routes.map(({ pattern }) => pattern.replaceAll(/\[(\w+)\]/g, '{$1}')),
    );
  });

  test('refuses the methods that it has not, and names those that it has', async () => {
    const { status, headers, json } = await ask('PATCH', '/api/v1/me', { token });
    expect([status, headers.get('allow'), json.detail]).toEqual([
      405,
      'GET, HEAD',
      'PATCH is not possible here. Possible: GET, HEAD.',
    ]);
    expect((await ask('HEAD', '/api/v1/me', { token })).status).toBe(200);
  });
});

test('an address without an endpoint is 404, with or without a token', async () => {
  for (const given of [{}, { token }])
    expect(await ask('GET', '/api/v1/no/such/thing', given)).toMatchObject({
      status: 404,
      json: { errors: [{ code: 'not_found' }] },
    });
});

describe('a body', () => {
  const send = async (body: BodyInit, headers: Record<string, string> = JSON_TYPE) => {
    const { status, json } = await ask('PUT', '/api/v1/me/password', { token, body, headers });
    return [
      status,
      ...json.errors.map(({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`),
    ];
  };

  test('that is no JSON is 400', async () => {
    expect(await send('current=a&password=b')).toEqual([400, ' bad_json']);
  });

  test('of another type is 415', async () => {
    expect(await send('current=a', { 'content-type': 'text/plain' })).toEqual([
      415,
      ' unsupported_media_type',
    ]);
  });

  test('of 10 MB is 413', async () => {
    expect(await send(new Uint8Array(10_000_000).fill(0x20))).toEqual([413, ' too_large']);
  });

  test('with unknown and missing fields is 422 with a pointer to each', async () => {
    expect(await send('{"curent": "a", "password": 7}')).toEqual([
      422,
      '/current missing',
      '/password wrong_type',
      '/curent unknown_field',
    ]);
  });
});

describe('answers', () => {
  test('of the interface are stored by nobody and shown in nothing', async () => {
    const { headers } = await ask('GET', '/api/v1/me', { token });
    expect(Object.fromEntries(headers)).toMatchObject({
      'cache-control': 'no-store',
      'content-type': 'application/json; charset=utf-8',
      'content-security-policy':
        "default-src 'none'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'",
      'x-content-type-options': 'nosniff',
      'x-frame-options': 'DENY',
      'referrer-policy': 'same-origin',
    });
    expect(headers.has('strict-transport-security')).toBe(false); // the tests' origin is plain http
  });

  test('of the probes are open', async () => {
    expect((await ask('GET', '/healthz')).json).toEqual({ status: 'ok' });
    const { status, json } = await ask('GET', '/readyz');
    expect([status, json]).toEqual([
      json.ready ? 200 : 503,
      { ready: json.queue === null, database: null, migrations: null, queue: json.queue, store: null },
    ]);
  });
});

test('a page’s form from another site is turned away before anything is done', async () => {
  const [reader] = await foundPractice(['reader']);
  const cookie = await signInAs(reader.email, PASSWORD);
  await ask('POST', '/sign-out', { cookie, origin: 'https://elsewhere.example' });
  expect((await ask('GET', '/api/v1/me', { cookie })).status).toBe(200);
});
