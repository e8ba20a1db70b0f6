import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { ask } from '../support/app';
import { foundPractice } from '../support/practice';

let principal: string;
let engineer: string;
let engineerEmail: string;
let stranger: string;

beforeAll(async () => {
  const [first, second] = await foundPractice(['principal'], ['engineer']);
  const [elsewhere] = await foundPractice(['principal']);
  principal = await createApiToken(first.email);
  engineer = await createApiToken(second.email);
  engineerEmail = second.email;
  stranger = await createApiToken(elsewhere.email);
  for (const number of ['J-1', 'J-2', 'J-3'])
    await ask('POST', '/api/v1/jobs', { token: engineer, json: { number, name: `=Shed ${number}` } });
});

const read = (query = '', token = principal) => ask('GET', `/api/v1/audit${query}`, { token });

describe('the record of events', () => {
  test('is read by a principal, newest first, with who did what', async () => {
    const { status, json } = await read('?subject=job');
    expect(status).toBe(200);
    expect(json.total).toBe(3);
    expect(json.items.map((item: { after: { number: string } }) => item.after.number)).toEqual([
      'J-3',
      'J-2',
      'J-1',
    ]);
    expect(json.items[0]).toMatchObject({ action: 'job.create', by: { email: engineerEmail }, before: null });
  });

  test('is closed to an engineer, and to another practice', async () => {
    expect((await read('', engineer)).status).toBe(403);
    expect((await read('?subject=job', stranger)).json.total).toBe(0);
  });

  test('goes on where a page ended', async () => {
    const first = await read('?subject=job&limit=2');
    const second = await read(`?subject=job&limit=2&cursor=${first.json.next}`);
    expect([first.json.items.length, second.json.items.length, second.json.next]).toEqual([2, 1, null]);
    expect(first.json.items[1].sequence).toBeGreaterThan(second.json.items[0].sequence);
  });

  test.each([
    ['the person', () => `?person=${encodeURIComponent(engineerEmail)}&subject=job`, 3],
    ['text in what changed', () => '?q=J-2', 1],
    ['text that is no pattern', () => '?q=%25', 0],
    ['days to come', () => '?from=2999-01-01', 0],
    ['days gone by', () => '?to=2000-01-01', 0],
  ])('is narrowed by %s', async (_, query, total) => {
    expect((await read(query())).json.total).toBe(total);
  });

  test('refuses days the wrong way round, at the field', async () => {
    const { status, json } = await read('?from=2026-05-02&to=2026-05-01');
    expect([status, json.errors[0].pointer, json.errors[0].code]).toEqual([422, '/to', 'out_of_range']);
  });
});

describe('its export', () => {
  const take = (query: string, token = principal) => ask('GET', `/api/v1/audit/export?${query}`, { token });

  test('as a table keeps a formula from being one, and is an event itself', async () => {
    const { status, headers, json } = await take('format=csv&subject=job');
    expect([status, headers.get('content-type')]).toEqual([200, 'text/csv; charset=utf-8']);
    const lines = String(json).trim().split('\r\n');
    expect(lines[0]).toBe('event,at,by,action,subject,id,before,after,hash');
    expect(lines).toHaveLength(4);
    expect((await read('?subject=record')).json.items[0]).toMatchObject({
      action: 'record.export',
      subject_id: 'csv',
    });
  });

  test('with every row whole can be followed with nothing but SHA-256 and canonical JSON', async () => {
    const { json } = await take('format=jsonl');
    const rows = String(json)
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line));
    expect(rows.length).toBeGreaterThan(3);
    let previous = '0'.repeat(64);
    for (const { by: _, hash, ...row } of rows) {
      expect(row.previousHash).toBe(previous);
      expect(
        createHash('sha256')
          .update(String(canonicalize(row)))
          .digest('hex'),
      ).toBe(hash);
      previous = hash;
    }
  });

  test('is closed to an engineer', async () => {
    expect((await take('format=csv', engineer)).status).toBe(403);
  });
});
