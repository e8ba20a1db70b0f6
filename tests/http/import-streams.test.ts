import { PassThrough, Readable } from 'node:stream';
import { text } from 'node:stream/consumers';
import { afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { requireStore } from '@/services/store';
import { signInAs } from '../support/app';
import { ABOUT, CLEAN, csvOf, EN, importer } from '../support/imports';
import { foundPractice, type Member, PASSWORD } from '../support/practice';

let librarian: Member;
let desk: ReturnType<typeof importer>;

beforeAll(async () => {
  [librarian] = await foundPractice(['librarian']);
  desk = importer(await signInAs(librarian.email, PASSWORD), librarian.practiceId);
});
afterEach(() => vi.restoreAllMocks());

/** More rows than a batch has. */
const ROWS = Array.from(
  { length: 2500 },
  (_, at) => `OV ${at};${CLEAN[0]?.slice(CLEAN[0].indexOf(';') + 1)}`,
);

/** An import that a worker has been asked to check. */
async function asked(): Promise<string> {
  const { id } = (await desk.upload(csvOf(ROWS))).json;
  const { status } = await desk.act('PUT', id, '/mapping', { about: ABOUT, answers: [EN] }, 1);
  expect(status).toBe(200);
  return id;
}

async function cancel(id: string): Promise<void> {
  const { version } = await desk.read(id);
  expect((await desk.act('POST', id, '/cancel', undefined, version)).status).toBe(200);
}

/** All that a stream brings, and then nothing: it is still open. */
async function withoutEnd(whole: Readable): Promise<Readable> {
  const open = new PassThrough();
  open.write(await text(whole));
  return open;
}

const skipTurn = () => {
  const { now } = Date;
  vi.spyOn(Date, 'now').mockImplementation(() => now() + 10_000);
  return Promise.resolve();
};

describe('the file that a worker reads is let go', () => {
  test.each([
    ['its turn is over', skipTurn, 'checking', (done: number) => expect(done).toBeGreaterThanOrEqual(2000)],
    ['the import is cancelled', cancel, 'cancelled', (done: number) => expect(done).toBe(0)],
  ])('where %s while more is read ahead', async (_, cut, state, hasDone) => {
    const id = await asked();
    const store = requireStore();
    const { read } = store;
    const given: Readable[] = [];
    vi.spyOn(store, 'read').mockImplementation(async (key) => {
      const whole = (await read(key)) as Readable;
      given.push(given.length === 0 ? whole : await withoutEnd(whole));
      if (given.length === 2) await cut(id);
      return given.at(-1) as Readable;
    });
    await desk.work(id);
    expect(given.map(({ destroyed }) => destroyed)).toEqual([true, true]);
    vi.restoreAllMocks();
    const view = await desk.read(id);
    expect(view.state).toBe(state);
    hasDone(view.done);
  });

  test('where the import is cancelled at its first reading', async () => {
    const id = await asked();
    let at = 0;
    const endless = new Readable({
      read() {
        setTimeout(() => this.push(`${CLEAN[at++ % CLEAN.length]}\r\n`), 50);
      },
    });
    endless.push(csvOf([]));
    const read = vi.spyOn(requireStore(), 'read').mockImplementation(async () => {
      await cancel(id);
      return endless;
    });
    await desk.work(id);
    expect([read.mock.calls.length, endless.destroyed]).toEqual([1, true]);
  });
});
