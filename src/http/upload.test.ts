import { describe, expect, test, vi } from 'vitest';
import { takeFile } from './upload';

const TYPE = 'multipart/form-data; boundary=x';
const DISPOSITION = 'Content-Disposition: form-data; name="file"; filename="a.csv"';
const part = (head: string, content: string) => `--x\r\n${head}\r\n\r\n${content}\r\n`;
const FILE = part(`${DISPOSITION}\r\nContent-Type: text/csv`, 'a;b\r\n1;2');

const streamed = (body: ReadableStream, headers: Record<string, string>) => {
  const init = { method: 'POST', body, headers, duplex: 'half' };
  return new Request('http://localhost/', init);
};

/** A form sent in pieces of so many bytes, and what is taken of it. */
async function send(body: BodyInit, { type = TYPE as string | null, piece = 7 } = {}) {
  const bytes = new Uint8Array(await new Response(body).arrayBuffer());
  let at = 0;
  const stream = new ReadableStream<Uint8Array>({
    pull(controller) {
      if (at >= bytes.length) return controller.close();
      controller.enqueue(bytes.subarray(at, at + piece));
      at += piece;
    },
  });
  const request = streamed(stream, type === null ? {} : { 'content-type': type });
  return takeFile({ request }, async ({ name, type: kind, body: content }) => {
    const chunks: Uint8Array[] = [];
    for await (const chunk of content) chunks.push(chunk);
    return { name, kind, text: Buffer.concat(chunks).toString() };
  });
}

describe('the file of a form', () => {
  test.each([1, 7, 1000])('is taken whole, in pieces of %d', async (piece) => {
    expect(await send(`${FILE}--x--\r\n`, { piece })).toEqual({
      name: 'a.csv',
      kind: 'text/csv',
      text: 'a;b\r\n1;2',
    });
  });

  test('comes as browsers and programs send it: any name, any type, or no bytes at all', async () => {
    const form = new FormData();
    form.set('file', new File(['--x\r\n'], 'Träger “7”; neu.csv'));
    const request = new Request('http://localhost/', { method: 'POST', body: form });
    const taken = await takeFile({ request }, async ({ name, type, body }) => {
      const chunks: Uint8Array[] = [];
      for await (const chunk of body) chunks.push(chunk);
      return [name, type, Buffer.concat(chunks).toString()];
    });
    expect(taken).toEqual(['Träger “7”; neu.csv', 'application/octet-stream', '--x\r\n']);
    expect(await send(`${part(DISPOSITION, '')}--x--`)).toMatchObject({ text: '' });
  });

  const named = (name: string) => part(`Content-Disposition: form-data; name="${name}"`, 'b');
  test.each([
    [415, 'no type', FILE, null, /multipart/],
    [415, 'JSON', '{}', 'application/json', /multipart/],
    [415, 'the file itself', 'a;b', 'text/csv', /multipart/],
    [415, 'a form without parts', 'a=b', 'application/x-www-form-urlencoded', /multipart/],
    [422, 'no boundary', FILE, 'multipart/form-data', /form/],
    [422, 'another boundary', `${FILE}--x--`, 'multipart/form-data; boundary=y', /form/],
    [422, 'nothing', '', TYPE, /form/],
    [422, 'no parts', '--x--\r\n', TYPE, /no file/],
    [422, 'a field before the file', `${named('supplier')}${FILE}--x--`, TYPE, /“supplier” is not a field/],
    [422, 'a field after the file', `${FILE}${named('supplier')}--x--`, TYPE, /more than the file/],
    [422, 'two files', `${FILE}${FILE}--x--`, TYPE, /more than the file/],
    [422, 'a part without a name', part('Content-Type: text/csv', 'a;b').concat('--x--'), TYPE, /no file/],
    [422, 'text in the place of the file', `${named('file')}--x--`, TYPE, /No file was chosen/],
    [
      422,
      'a file that nobody chose',
      `${part(DISPOSITION.replace('a.csv', ''), '')}--x--`,
      TYPE,
      /No file was chosen/,
    ],
    [422, 'a form cut off in the file', FILE.slice(0, -4), TYPE, /broke off/],
    [422, 'a form without its end', FILE, TYPE, /broke off/],
    [422, 'a form cut off in a head', FILE.slice(0, 30), TYPE, /broke off/],
    [422, 'a head without end', `--x\r\n${'a'.repeat(200_000)}`, TYPE, /broke off|form/],
  ])('is refused with %d: %s', async (status, _, body, type, words) => {
    await expect(send(body, { type, piece: 100 })).rejects.toMatchObject({
      status,
      message: expect.stringMatching(words),
    });
  });

  test('is not read at all where it is announced as larger', async () => {
    const sent = (bytes: number) => {
      const headers = { 'content-type': TYPE, 'content-length': String(bytes) };
      return new Request('http://localhost/', { method: 'POST', body: `${FILE}--x--`, headers });
    };
    const MB = 1024 * 1024;
    const take = vi.fn(async () => 'taken');
    const request = sent(51 * MB + 1);
    await expect(takeFile({ request }, take)).rejects.toMatchObject({ status: 413 });
    expect([take.mock.calls, request.bodyUsed]).toEqual([[], false]);
    expect(await takeFile({ request: sent(51 * MB) }, take)).toBe('taken');
  });

  test('is read no further than 51 MB, and no further once it is refused', async () => {
    const piece = new Uint8Array(64 * 1024).fill(97);
    const endless = (first: string) => {
      let sent = 0;
      const body = new ReadableStream<Uint8Array>({
        pull(controller) {
          controller.enqueue(sent === 0 ? new TextEncoder().encode(first) : piece);
          sent += piece.length;
        },
      });
      const request = streamed(body, { 'content-type': TYPE });
      return { request, sent: () => sent / 1024 / 1024 };
    };
    const read = async ({ body }: { body: AsyncIterable<Uint8Array> }) => {
      for await (const _ of body);
    };
    for (const head of [`--x\r\n${DISPOSITION}\r\n\r\n`, 'before the form', '--x\r\nA: b\r\n\r\n']) {
      const { request, sent } = endless(head);
      await expect(takeFile({ request }, read)).rejects.toMatchObject({ status: 413 });
      expect(sent()).toBeLessThan(53);
    }
    const { request, sent } = endless(`--x\r\n${DISPOSITION}\r\n\r\n`);
    const stop = takeFile({ request }, async () => {
      throw new Error('no more');
    });
    await expect(stop).rejects.toThrow('no more');
    expect(sent()).toBeLessThan(1);
  });
});
