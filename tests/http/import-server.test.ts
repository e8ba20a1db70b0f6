import { mkdtempSync } from 'node:fs';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createWebServer } from '../../scripts/support/server.mjs';

const MEGABYTE = 1024 * 1024;
/** In Astro's place: reads as much of the body as the address says, then answers with how much it was. */
async function taster(request: IncomingMessage & { body: AsyncIterable<Buffer> }, response: ServerResponse) {
  const most = Number(
    new URL(request.url ?? '', 'http://x').searchParams.get('most') ?? Number.POSITIVE_INFINITY,
  );
  let length = 0;
  let pieces = 0;
  for await (const chunk of request.body) {
    length += chunk.length;
    pieces += 1;
    if (length > most) break;
  }
  response.writeHead(length > most ? 413 : 200, { 'content-type': 'application/json' });
  response.end(JSON.stringify({ length, pieces }));
}

let url: string;
const server = createWebServer({
  handler: taster,
  folder: mkdtempSync(join(tmpdir(), 'putlog-files-')),
  origin: 'http://localhost:1',
});
beforeAll(async () => {
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));
  url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
});
afterAll(() => new Promise<void>((resolve) => server.drain(() => resolve())));

const send = (method: string, path: string, bytes: number) =>
  fetch(`${url}${path}`, { method, body: Buffer.alloc(bytes, 'a;b\n') });

test('a file goes through as it comes, in pieces; any other body of its size is refused', async () => {
  for (const [method, path] of [
    ['POST', '/api/v1/section-imports'],
    ['PUT', '/api/v1/section-imports/8db086e3-2478-4a6a-911c-d95a2acb329a/source'],
  ] as const) {
    const answer = await send(method, path, 20 * MEGABYTE);
    const { length, pieces } = await answer.json();
    expect([answer.status, length]).toEqual([200, 20 * MEGABYTE]);
    expect(pieces).toBeGreaterThan(20);
  }
  for (const [method, path] of [
    ['POST', '/api/v1/section-imports/8db086e3-2478-4a6a-911c-d95a2acb329a/fixes'],
    ['PUT', '/api/v1/section-imports'],
    ['POST', '/api/v1/jobs'],
  ] as const)
    expect((await send(method, path, 2 * MEGABYTE)).status).toBe(413);
});

test('a file that announces more than 50 MB is refused before it is read', async () => {
  const answer = await send('POST', '/api/v1/section-imports', 52 * MEGABYTE);
  expect(answer.status).toBe(413);
  expect((await answer.json()).detail).toContain('50 MB');
});

test('whoever stops reading a file is still heard, and the connection goes on', async () => {
  for (let turn = 0; turn < 3; turn++) {
    const answer = await send('POST', `/api/v1/section-imports?most=${MEGABYTE}`, 8 * MEGABYTE);
    expect(answer.status).toBe(413);
    expect((await answer.json()).length).toBeLessThan(2 * MEGABYTE);
  }
});
