import { beforeAll, describe, expect, test, vi } from 'vitest';
import { requireStore } from '@/services/store';
import { ask, signInAs } from '../support/app';
import { ABOUT, CLEAN, csvOf, EN, formOf, importer } from '../support/imports';
import { foundPractice, type Member, owner, PASSWORD } from '../support/practice';

let librarian: Member;
let cookie: string;
let desk: ReturnType<typeof importer>;

beforeAll(async () => {
  [librarian] = await foundPractice(['librarian']);
  cookie = await signInAs(librarian.email, PASSWORD);
  desk = importer(cookie, librarian.practiceId);
});

const ADDRESS = '/api/v1/section-imports';

/** What there is of imports. */
async function traces() {
  const [found] = await owner.sql`select
    (select count(*)::int from section_import where practice_id = ${librarian.practiceId}) as imports,
    (select count(*)::int from audit_event where practice_id = ${librarian.practiceId}) as events`;
  return found;
}

/** The keys that were put into the store while `work` ran, and are still there. */
async function keptBy(work: () => Promise<unknown>): Promise<string[]> {
  const store = requireStore();
  const put = vi.spyOn(store, 'put');
  try {
    await work();
    const found = put.mock.calls.map(async ([key]) => ((await store.read(key)) ? [key] : []));
    return (await Promise.all(found)).flat();
  } finally {
    put.mockRestore();
  }
}

describe('the interface of imports, as it is agreed', () => {
  test('takes a form, answers with columns and guesses, is told the mapping, reports and commits', async () => {
    const { status, json, headers } = await desk.upload(csvOf(CLEAN), 'issue 7.csv');
    expect([status, headers.get('etag'), headers.get('location')]).toEqual([
      201,
      '"1"',
      `${ADDRESS}/${json.id}`,
    ]);
    expect(json.columns).toHaveLength(13);
    expect(json.columns[3]).toEqual({ index: 3, heading: 'tw mm', samples: ['5,0', '5,6', '6,2'] });
    const guess = (column: number) => json.guesses.find((one: { column: number }) => one.column === column);
    expect(guess(1)).toMatchObject({ field: 'h', unit: 'mm', factor: 1, open: [] });
    // Which axis y is, only a person can say.
    expect(guess(8)).toMatchObject({ column: 8, unit: 'cm4', open: ['axes'] });
    const early = await desk.act('GET', json.id, '/report', undefined);
    expect([early.json.report, early.headers.get('etag')]).toEqual([null, '"1"']);

    const half = await desk.act('PUT', json.id, '/mapping', { answers: [EN] }, 1);
    expect([half.status, half.json.state, half.headers.get('etag')]).toEqual([200, 'mapping', '"2"']);
    const whole = await desk.act('PUT', json.id, '/mapping', { about: ABOUT }, 2);
    expect([whole.status, whole.json.state, whole.json.mapping.axes]).toEqual([200, 'checking', 'en']);
    await desk.work(json.id);
    const report = await desk.act('GET', json.id, '/report', undefined);
    expect(report.json).toMatchObject({ state: 'findings', rows: 5, report: { errors: 0 } });
    const said = { change_note: 'First.', change_class: 'improvement', consequence: 'service' };
    const asked = await desk.act('POST', json.id, '/commit', said, Number(report.headers.get('etag')?.at(1)));
    expect([asked.status, asked.json.edition]).toEqual([202, { number: 1, state: 'draft' }]);
  });

  test('has one address and one way to send a file', async () => {
    await expect(ask('POST', '/api/v1/imports', { cookie, body: 'a;b' })).resolves.toMatchObject({
      status: 404,
    });
    const raw = await ask('POST', ADDRESS, { cookie, body: 'a;b', headers: { 'content-type': 'text/csv' } });
    expect([raw.status, raw.headers.get('accept')]).toEqual([415, 'multipart/form-data']);
    const form = formOf(csvOf(CLEAN), 'a.csv', 'text/csv');
    form.set('supplier', 'Ottervane');
    const more = await ask('POST', ADDRESS, { cookie, body: form });
    expect([more.status, more.json.detail]).toEqual([422, expect.stringMatching(/more than the file/)]);
    expect((await ask('POST', ADDRESS, { cookie, body: new FormData() })).status).toBe(422);
  });

  test('is described with its form', async () => {
    const { json } = await ask('GET', '/api/v1/openapi.json', { cookie });
    const { requestBody } = json.paths[ADDRESS].post;
    expect(requestBody.content['multipart/form-data'].schema.required).toEqual(['file']);
    expect(json.paths['/api/v1/imports']).toBeUndefined();
  });
});

describe('a file that is refused', () => {
  const long = csvOf(Array.from({ length: 6000 }, (_, at) => CLEAN[at % CLEAN.length] ?? ''));
  const LATE: [string, BlobPart[], RegExp][] = [
    ['a quote that never ends', [long, '"OV 1;1\r\n', long], /quote that opens in line 6002 never closes/],
    ['a line of 2 MB', [long, 'x'.repeat(2_000_000)], /Line 6002 goes on for more/],
    ['a stretch of zeros', [long, new Uint8Array(5000), long], /After line \d+ the file is no text/],
  ];
  test.each(LATE)('far beyond its beginning leaves nothing: %s', async (_, parts, words) => {
    expect(await keptBy(() => desk.upload(long))).toHaveLength(1);
    const before = await traces();
    const kept = await keptBy(async () => {
      const { status, json } = await desk.upload(new Blob(parts));
      expect([status, json.errors]).toEqual([422, [expect.objectContaining({ pointer: '/file' })]]);
      expect(json.detail).toMatch(words);
    });
    expect([kept, await traces()]).toEqual([[], before]);
  });

  test('because it is no table is told so before it is read', async () => {
    for (const type of ['application/pdf', 'image/png', 'application/zip', 'text/html']) {
      const { status, json } = await desk.upload(csvOf(CLEAN), 'x.csv', type);
      expect([type, status, json.errors[0].pointer]).toEqual([type, 415, '/file']);
    }
    expect((await desk.upload(csvOf(CLEAN), 'x.csv', 'application/vnd.ms-excel')).status).toBe(201);
    expect((await desk.upload(csvOf(CLEAN), 'x.csv', '')).status).toBe(201);
  });

  test('beyond 50 MB is counted as it comes, and let go', async () => {
    let sent = 0;
    const row = Buffer.from(`${CLEAN[0]?.replace(' ', ' '.repeat(500))}\r\n`.repeat(500));
    const head =
      '--x\r\nContent-Disposition: form-data; name="file"; filename="endless.csv"\r\nContent-Type: text/csv\r\n\r\n';
    const body = new ReadableStream({
      pull(controller) {
        controller.enqueue(sent === 0 ? Buffer.from(head + csvOf([])) : row);
        sent += row.length;
      },
    });
    const before = await traces();
    const kept = await keptBy(async () => {
      const headers = { 'content-type': 'multipart/form-data; boundary=x' };
      const { status, json } = await ask('POST', ADDRESS, { cookie, body, headers });
      expect([status, json.detail]).toEqual([
        413,
        'The file is larger than 50 MB. Split the table, or leave columns out.',
      ]);
    });
    expect(sent).toBeLessThan(60 * 1024 * 1024);
    expect([kept, await traces()]).toEqual([[], before]);
  }, 60_000);

  test('because it is announced as larger is not begun', async () => {
    const before = await traces();
    const put = vi.spyOn(requireStore(), 'put');
    try {
      const headers = {
        'content-type': 'multipart/form-data; boundary=x',
        'content-length': String(60 * 1024 * 1024),
      };
      const { status } = await ask('POST', ADDRESS, { cookie, body: '--x', headers });
      expect([status, put.mock.calls, await traces()]).toEqual([413, [], before]);
    } finally {
      put.mockRestore();
    }
  });

  test('because the sender went away leaves nothing either', async () => {
    const before = await traces();
    const kept = await keptBy(async () => {
      const form = new Response(formOf(csvOf(CLEAN), 'a.csv', 'text/csv'));
      const headers = { 'content-type': form.headers.get('content-type') ?? '' };
      const whole = new Uint8Array(await form.arrayBuffer());
      const { status } = await ask('POST', ADDRESS, { cookie, body: whole.slice(0, -20), headers });
      expect(status).toBe(422);
    });
    expect([kept, await traces()]).toEqual([[], before]);
  });
});

test('an import takes the document that it was made from, which a program’s file is not', async () => {
  const { id } = (await desk.upload(csvOf(CLEAN))).json;
  const bring = (type: string, version = '"1"', content = '%PDF-1.7') =>
    ask('PUT', `${ADDRESS}/${id}/source`, {
      cookie,
      body: formOf(content, 'page.pdf', type),
      headers: { 'if-match': version },
    });
  expect((await bring('application/x-msdownload')).status).toBe(415);
  expect((await bring('application/pdf', '')).status).toBe(428);
  expect((await bring('application/pdf', '"7"')).status).toBe(412);
  expect(
    await keptBy(async () => expect((await bring('application/pdf', '"1"', '')).status).toBe(422)),
  ).toEqual([]);
  const { status, json } = await bring('application/pdf');
  expect([status, json.source_document.name]).toEqual([200, 'page.pdf']);
  expect((await desk.act('GET', id, '/source', undefined)).json).toBe('%PDF-1.7');
  const [other] = await foundPractice(['librarian']);
  const elsewhere = importer(await signInAs(other.email, PASSWORD), other.practiceId);
  expect((await elsewhere.act('GET', id, '/source', undefined)).status).toBe(404);
});

test('a document that another takes the place of is kept no longer', async () => {
  const { id, changed_at } = (await desk.upload(csvOf(CLEAN))).json;
  const bring = async (content: string) => {
    const body = formOf(content, 'page.pdf', 'application/pdf');
    const sent = await ask('PUT', `${ADDRESS}/${id}/source`, {
      cookie,
      body,
      headers: { 'if-match': '"1"' },
    });
    expect(sent.status).toBe(200);
    return sent.json;
  };
  const kept = await keptBy(async () => {
    const first = await bring('%PDF-1.4');
    expect(Date.parse(first.changed_at)).toBeGreaterThan(Date.parse(changed_at));
    await bring('%PDF-1.7');
  });
  const [row] = await owner.sql`select source_key from section_import where id = ${id}`;
  expect(kept).toEqual([row?.['source_key']]);
  expect((await desk.act('GET', id, '/source', undefined)).json).toBe('%PDF-1.7');
});
