import { mkdtempSync, writeFileSync } from 'node:fs';
import { request as ask, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createWebServer } from '../../scripts/support/server.mjs';

const MEGABYTE = 1024 * 1024;
const folder = mkdtempSync(join(tmpdir(), 'putlog-files-'));
writeFileSync(join(folder, 'mark.svg'), '<svg/>');

/** In Astro's place: tells what reached it, with the length of the body. */
async function echo(request: IncomingMessage & { body: AsyncIterable<Buffer> }, response: ServerResponse) {
  let length = 0;
  for await (const chunk of request.body) length += chunk.length;
  if (request.url === '/stream') {
    response.writeHead(200, {
      'content-type': 'text/event-stream',
      'cache-control': 'no-store, no-transform',
    });
    response.write('event: unread\ndata: {"unread":1}\n\n');
    return;
  }
  const text = JSON.stringify({ headers: request.headers, length });
  if (request.url === '/slow') await new Promise((resolve) => setTimeout(resolve, 300));
  response.writeHead(200, { 'content-type': request.url === '/page' ? 'text/html' : 'application/json' });
  response.end(request.url === '/page' ? '<p>ü</p>'.repeat(500) : text);
}

const start = (options: { origin: string; proxies?: string }) => {
  const server = createWebServer({ handler: echo, folder, ...options });
  return new Promise<{ url: string; close: () => Promise<void>; drain: () => Promise<void> }>((resolve) => {
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      const close = () => new Promise<void>((done) => server.close(() => done()));
      const drain = () => new Promise<void>((done) => server.drain(() => done()));
      resolve({ url: `http://127.0.0.1:${port}`, close, drain });
    });
  });
};

let plain: Awaited<ReturnType<typeof start>>;
let proxied: Awaited<ReturnType<typeof start>>;

beforeAll(async () => {
  plain = await start({ origin: 'https://putlog.fernhollow.example' });
  proxied = await start({ origin: 'https://putlog.fernhollow.example', proxies: '10.0.0.0/8, 127.0.0.1' });
});
afterAll(() => Promise.all([plain.close(), proxied.close()]));

const LIES = {
  'x-forwarded-for': '203.0.113.7, 198.51.100.9',
  'x-forwarded-host': 'elsewhere.example',
  'x-forwarded-proto': 'ftp',
  'x-real-ip': '203.0.113.7',
  forwarded: 'for=203.0.113.7',
};

describe('what reaches the application', () => {
  test('is our host and scheme, and the peer’s address, whatever the client says', async () => {
    const { headers } = await (await fetch(plain.url, { headers: LIES })).json();
    expect(headers).toMatchObject({
      host: 'putlog.fernhollow.example',
      'x-forwarded-proto': 'https',
      'x-forwarded-for': '127.0.0.1',
    });
    for (const name of ['x-forwarded-host', 'x-real-ip', 'forwarded'])
      expect(headers).not.toHaveProperty(name);
  });

  test('is the last hop that a trusted proxy saw', async () => {
    const { headers } = await (await fetch(proxied.url, { headers: LIES })).json();
    expect(headers['x-forwarded-for']).toBe('198.51.100.9');
  });
});

describe('a body', () => {
  test('of a megabyte arrives whole', async () => {
    const answer = await fetch(plain.url, { method: 'POST', body: new Uint8Array(MEGABYTE) });
    expect(await answer.json()).toMatchObject({ length: MEGABYTE });
  });

  test('of ten megabytes is refused with a problem that can be read', async () => {
    const answer = await fetch(plain.url, { method: 'POST', body: new Uint8Array(10 * MEGABYTE) });
    expect(answer.status).toBe(413);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect(await answer.json()).toMatchObject({ status: 413, errors: [{ code: 'too_large' }] });
  });

  test('whose length is not said is refused as well, once it is too long', async () => {
    const body = new ReadableStream({
      start(controller) {
        for (let sent = 0; sent < 10; sent += 1) controller.enqueue(new Uint8Array(MEGABYTE));
        controller.close();
      },
    });
    const answer = await fetch(plain.url, { method: 'POST', body, duplex: 'half' } as RequestInit);
    expect(answer.status).toBe(413);
  });

  test('that is announced is refused before it is sent', async () => {
    const status = await new Promise<number | undefined>((resolve, reject) => {
      const sending = ask(plain.url, {
        method: 'POST',
        headers: { expect: '100-continue', 'content-length': 10 * MEGABYTE },
      });
      sending.on('continue', () => reject(new Error('the body was asked for')));
      sending.on('response', (response) => {
        resolve(response.statusCode);
        sending.destroy();
      });
      sending.on('error', () => undefined);
      sending.flushHeaders();
    });
    expect(status).toBe(413);
  });
});

describe('an answer', () => {
  test('is compressed when it is worth it, and says its encoding', async () => {
    const page = await fetch(`${plain.url}/page`, { headers: { 'accept-encoding': 'br' } });
    expect(page.headers.get('content-encoding')).toBe('br');
    expect(page.headers.get('content-type')).toBe('text/html; charset=utf-8');
    expect(await page.text()).toContain('ü');
  });

  test('of a built file carries how long it may be kept', async () => {
    const file = await fetch(`${plain.url}/mark.svg`);
    expect(await file.text()).toBe('<svg/>');
    expect(file.headers.get('cache-control')).toBe('public, max-age=3600');
  });

  test('that is under way when the server closes is still given', async () => {
    const server = await start({ origin: 'http://localhost:1' });
    const slow = fetch(`${server.url}/slow`, { method: 'POST', body: 'x' });
    await new Promise((resolve) => setTimeout(resolve, 100));
    const closed = server.close();
    expect((await slow).status).toBe(200);
    await closed;
  });

  test('that streams comes at once, and does not hold a server that is told to stop', async () => {
    const server = await start({ origin: 'http://localhost:1' });
    const stream = await fetch(`${server.url}/stream`, { headers: { 'accept-encoding': 'gzip' } });
    expect(stream.headers.get('content-encoding')).toBeNull();
    const reader = stream.body?.getReader();
    expect(new TextDecoder().decode((await reader?.read())?.value)).toContain('"unread":1');
    const slow = fetch(`${server.url}/slow`, { method: 'POST', body: 'x' });
    await new Promise((resolve) => setTimeout(resolve, 100));
    const began = performance.now();
    const drained = server.drain();
    await expect(reader?.read()).rejects.toThrow();
    expect((await slow).status).toBe(200);
    await drained;
    expect(performance.now() - began).toBeLessThan(2000);
  });
});
