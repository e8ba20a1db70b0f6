import { createContext } from 'astro/middleware';
import { describe, expect, test, vi } from 'vitest';
import { z } from 'zod';
import type { User } from '@/features/account/account';
import { AppError, notFound } from '@/lib/app-error';
import { readForm } from './body';
import { answer, type Endpoint, endpoint, openEndpoint } from './endpoint';
import { etag, ifMatch } from './etag';
import { listQuery } from './list';

const user: User = {
  personId: 'p',
  practiceId: 'c',
  practiceName: 'Quillmere Structural Partnership',
  email: 'kofi.danesmoor@quillmere.example',
  name: 'Kofi Danesmoor',
  initials: 'KD',
  roles: ['engineer'],
  unitSystem: 'metric',
  via: { kind: 'session', id: 's' },
};

interface Ask {
  readonly as?: User | null;
  readonly body?: string | ReadableStream;
  readonly headers?: Record<string, string>;
  readonly query?: string;
}

async function ask(route: Endpoint, { as = user, body, headers, query = '' }: Ask = {}) {
  const json = body === undefined ? {} : { 'content-type': 'application/json' };
  const request = new Request(`http://localhost/api/v1/things${query}`, {
    method: body === undefined ? 'GET' : 'POST',
    headers: { ...json, ...headers },
    ...(body === undefined ? {} : { body, duplex: 'half' }),
  });
  const context = createContext({
    request,
    params: {},
    defaultLocale: 'en',
    locals: { user: as, theme: null, refusal: null, origin: 'http://localhost' },
  });
  const response = await route(context);
  const text = await response.text();
  return { status: response.status, headers: response.headers, json: text === '' ? null : JSON.parse(text) };
}

const Beam = z.strictObject({ length: z.number().positive() });
const echo = endpoint({ summary: 'Echo', body: Beam }, (_, { body }) => body);

describe('who', () => {
  test('nobody is answered 401 with how to sign', async () => {
    const { status, headers, json } = await ask(echo, { as: null, body: 'not even read' });
    expect([status, headers.get('www-authenticate')]).toEqual([401, 'Bearer realm="putlog"']);
    expect(json).toEqual({
      type: 'urn:putlog:problem:unauthenticated',
      title: 'Not signed in',
      status: 401,
      detail: 'You are not signed in, or the session has ended. Sign in, or send a bearer token.',
      errors: [{ pointer: '', code: 'unauthenticated', message: json.detail }],
    });
  });

  test('a token that is not good is told so', async () => {
    const { headers } = await ask(echo, {
      as: null,
      body: '{}',
      headers: { authorization: 'Bearer putlog_x' },
    });
    expect(headers.get('www-authenticate')).toBe('Bearer realm="putlog", error="invalid_token"');
  });

  test('an open endpoint answers anybody', async () => {
    const open = openEndpoint({ summary: 'Open' }, () => ({ ok: true }));
    expect((await ask(open, { as: null })).json).toEqual({ ok: true });
  });
});

describe('the body', () => {
  const codes = async (given: Ask) => {
    const { status, json } = await ask(echo, given);
    return [
      status,
      ...json.errors.map((fault: { pointer: string; code: string }) => `${fault.pointer} ${fault.code}`),
    ];
  };
  const bytes = (size: number) => JSON.stringify({ length: 1, pad: 'x'.repeat(size) });

  test('is read by its schema', async () => {
    expect((await ask(echo, { body: '{"length": 7.2}' })).json).toEqual({ length: 7.2 });
  });

  test('of another type is 415', async () => {
    expect(await codes({ body: 'length=7', headers: { 'content-type': 'text/plain' } })).toEqual([
      415,
      ' unsupported_media_type',
    ]);
  });

  test.each([
    ['{"length": 7,}', ' bad_json'],
    ['', ' bad_json'],
    ['length=7', ' bad_json'],
  ])('%j is 400', async (body, fault) => {
    expect(await codes({ body })).toEqual([400, fault]);
  });

  test('that is not UTF-8 is 400', async () => {
    const body = new Blob([new Uint8Array([0x22, 0xff, 0x22])]).stream();
    expect(await codes({ body })).toEqual([400, ' bad_json']);
  });

  test('of 10 MB is 413, whether its length is declared or not', async () => {
    expect(await codes({ body: bytes(10_000_000), headers: { 'content-length': '10000020' } })).toEqual([
      413,
      ' too_large',
    ]);
    let sent = 0;
    const body = new ReadableStream({
      pull(stream) {
        sent += 65_536;
        stream.enqueue(new Uint8Array(65_536).fill(0x20));
        if (sent > 10_000_000) stream.close();
      },
    });
    expect(await codes({ body })).toEqual([413, ' too_large']);
    expect(sent).toBeLessThan(1_300_000);
  });

  test('names every unknown or wrong field', async () => {
    expect(await codes({ body: '{"length": 0, "lenght": 7}' })).toEqual([
      422,
      '/length out_of_range',
      '/lenght unknown_field',
    ]);
  });

  test('that is deep without end is refused, not followed', async () => {
    const deep = '['.repeat(400_000) + ']'.repeat(400_000);
    expect(await codes({ body: `{"length": ${deep}}` })).toEqual([422, ' too_deep']);
    const text = JSON.stringify({ length: 1, note: '[{"\\\\"'.repeat(100) });
    expect(await codes({ body: text })).toEqual([422, '/note unknown_field']); // brackets in a text are no levels
  });

  test('does not reach a prototype', async () => {
    const lax = endpoint({ summary: 'Any', body: z.looseObject({}) }, (_, { body }) => body);
    const { status, json } = await ask(lax, { body: '{"a": {"\\u005f_proto__": {"admin": true}}}' });
    expect([status, json.errors[0].pointer]).toEqual([422, '/a/__proto__']);
  });
});

describe('the query', () => {
  const list = endpoint({ summary: 'List', query: z.strictObject(listQuery) }, (_, { query }) => query);

  test('has fifty entries to a page unless it says otherwise', async () => {
    expect((await ask(list)).json).toEqual({ limit: 50 });
    expect((await ask(list, { query: '?limit=200&cursor=abc' })).json).toEqual({ limit: 200, cursor: 'abc' });
  });

  test.each(['?limit=0', '?limit=201', '?limit=2.5', '?limit=ten', '?limit=', '?limit=1&limit=2', '?limt=5'])(
    '%s is 422',
    async (query) => {
      expect((await ask(list, { query })).status).toBe(422);
    },
  );
});

describe('the answer', () => {
  const of = (result: unknown, status?: 201) =>
    ask(endpoint({ summary: 'Result', ...(status && { status }) }, () => result));

  test('is JSON that nobody stores', async () => {
    const { status, headers } = await of({ a: 1 });
    expect([status, headers.get('content-type'), headers.get('cache-control')]).toEqual([
      200,
      'application/json; charset=utf-8',
      'no-store',
    ]);
  });

  test('of nothing is 204', async () => {
    expect((await of(undefined)).status).toBe(204);
  });

  test('has the status that its description says, or its own', async () => {
    expect((await of({}, 201)).status).toBe(201);
    const { status, headers } = await of(answer({}, { status: 202, headers: { ETag: etag(3) } }));
    expect([status, headers.get('etag')]).toEqual([202, '"3"']);
  });

  test('of what was refused carries its status and headers', async () => {
    const missing = endpoint({ summary: 'Missing' }, () => {
      throw notFound('Job Q-9999');
    });
    expect(await ask(missing)).toMatchObject({ status: 404, json: { errors: [{ code: 'not_found' }] } });
    const busy = endpoint({ summary: 'Busy' }, () => {
      throw new AppError('too_many_requests', 'Wait.', { headers: { 'Retry-After': '60' } });
    });
    expect((await ask(busy)).headers.get('retry-after')).toBe('60');
  });

  test('of our own fault is 500, tells nothing and is logged once', async () => {
    const written = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    const broken = endpoint({ summary: 'Broken' }, () => {
      throw new Error('password of the database is hunter2');
    });
    const { status, json } = await ask(broken);
    const lines = written.mock.calls.map(([line]) => String(line));
    written.mockRestore();
    expect(status).toBe(500);
    expect(JSON.stringify(json)).not.toContain('hunter2');
    expect(lines).toHaveLength(1);
    const reference = /Quote (\S+) when/.exec(json.detail)?.[1] ?? 'none';
    expect(lines[0]).toContain(reference);
    expect(lines[0]).toContain('hunter2');
  });

  test('while the database is away is 503', async () => {
    const written = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    const away = endpoint({ summary: 'Away' }, () => {
      const refused = Object.assign(new Error('connect'), { code: 'ECONNREFUSED' });
      throw new Error('query failed', { cause: refused });
    });
    const { status, headers } = await ask(away);
    written.mockRestore();
    expect([status, headers.get('retry-after')]).toEqual([503, '60']);
  });
});

describe('If-Match', () => {
  const version = (header?: string) => {
    const headers = header === undefined ? {} : { 'if-match': header };
    return ifMatch({ request: new Request('http://localhost/', { headers }) });
  };

  test('gives the version that was read, through a proxy that weakens tags too', () => {
    expect([version('"3"'), version('W/"12"')]).toEqual([3, 12]);
  });

  test('is asked for (428) and must be one of ours (412)', () => {
    expect(() => version()).toThrow(expect.objectContaining({ status: 428 }));
    for (const header of ['3', '"abc"', '*', '"-1"', '"1", "2"'])
      expect(() => version(header)).toThrow(expect.objectContaining({ status: 412 }));
  });
});

describe('a form', () => {
  const post = (body: BodyInit, headers: Record<string, string> = {}) =>
    readForm({ request: new Request('http://localhost/', { method: 'POST', body, headers }) });

  test('is read in either encoding of a page', async () => {
    expect((await post(new URLSearchParams({ email: 'a@b.example' }))).get('email')).toBe('a@b.example');
    const form = new FormData();
    form.set('email', 'a@b.example');
    expect((await post(form)).get('email')).toBe('a@b.example');
  });

  test.each([
    [415, '{}', { 'content-type': 'application/json' }],
    [422, 'no parts', { 'content-type': 'multipart/form-data; boundary=x' }],
    [413, 'x'.repeat(1_000_001), { 'content-type': 'application/x-www-form-urlencoded' }],
  ])('is refused with %d', async (status, body, headers) => {
    await expect(post(body, headers)).rejects.toMatchObject({ status });
  });
});
