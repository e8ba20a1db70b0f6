import { beforeAll, describe, expect, test } from 'vitest';
import { readShipped, readShippedJson } from '@/db/seed/files';
import { issueShipped } from '@/db/seed/library';
import { seedSections } from '@/db/seed/sections';
import { createApiToken } from '@/features/account/token.server';
import { verifyChain } from '@/features/audit/audit.server';
import { editionBody, fillEdition } from '@/features/section/edition.server';
import { readSectionTable } from '@/features/section/import';
import { type SectionItem, sectionTableMetaSchema } from '@/features/section/section';
import { ask } from '../support/app';
import { refusal, webConnection } from '../support/database';
import { foundPractice, type Member, owner } from '../support/practice';

const web = webConnection();
let librarian: Member;
let token: string;
let junior: string;
let stranger: string;

beforeAll(async () => {
  const [keeper, engineer, checker] = await foundPractice(['librarian'], ['engineer'], ['checker']);
  const [other] = await foundPractice(['librarian', 'principal']);
  librarian = keeper;
  const people = new Map([
    ['Priyanka Velloor', keeper],
    ['Imogen Fairlocke', checker],
  ]);
  await seedSections(people);
  await issueAgain(people, 'IPE 600');
  token = await createApiToken(keeper.email);
  junior = await createApiToken(engineer.email);
  stranger = await createApiToken(other.email);
  return () => web.end();
}, 120_000);

/** A second table that has a section of the European one too. */
async function issueAgain(people: Parameters<typeof seedSections>[0], designation: string) {
  const slug = 'second-i';
  const name = 'Second I';
  const shipped = sectionTableMetaSchema.parse(await readShippedJson('sections', 'european-i'));
  const meta = { ...shipped, slug, reference: 'ST-99', name };
  const reading = readSectionTable(await readShipped('sections', 'european-i.csv'), meta);
  if (!reading.ok) throw new Error('The shipped table has faults');
  const rows = reading.rows.filter((row) => row.designation === designation);
  const document = {
    kind: 'section-table',
    slug,
    reference: 'I2',
    name: 'Second I',
    schemaVersion: 1,
  } as const;
  await issueShipped(
    people,
    { ...document, body: editionBody(meta, rows) },
    { fill: (tx, practiceId, revisionId) => fillEdition(tx, { practiceId, revisionId, table: slug }, rows) },
  );
}

const LIST = '/api/v1/stock';
let made = 0;

/** A new list of a supplier of its own. */
async function begin(): Promise<string> {
  made += 1;
  const json = { supplier: `Supplier ${made} under Test`, as_of: '2026-11-19' };
  const answer = await ask('POST', LIST, { token, json });
  expect(answer.status).toBe(201);
  expect(answer.headers.get('location')).toBe(`${LIST}/supplier-${made}-under-test`);
  return `${LIST}/supplier-${made}-under-test`;
}

const match = (version: number) => ({ 'if-match': `"${version}"` });
const put = (list: string, csv: BodyInit, version = 1, by = token) =>
  ask('PUT', `${list}/lines?as_of=2026-11-26`, { token: by, body: csv, headers: match(version) });
const check = (list: string, csv: BodyInit) => ask('POST', `${list}/check`, { token, body: csv });

const CSV = `designation,table,stock lengths (m),lead time (days),price band
IPE 300,,"12; 6",3,B
hea200,,15.1,0,A
W12x26,american-wide-flange,40 ft,2 weeks,
`;

/** With three lines, at version 2. */
async function stocked(): Promise<string> {
  const list = await begin();
  expect(await put(list, CSV)).toMatchObject({ status: 200, json: { lines: 3, version: 2 } });
  return list;
}

const eventsOf = async (list: string) => {
  const rows = await owner.sql`select action, actor_id, data from audit_event
    where practice_id = ${librarian.practiceId} and subject_kind = 'stock'
    and (data::text like ${`%${list.split('/').at(-1)}%`} or data::text like ${`%Supplier ${made} under%`}) order by sequence`;
  return rows.map(
    (row) => row as unknown as { action: string; actor_id: string; data: { before: object; after: object } },
  );
};

describe('a stock list', () => {
  test('is begun, filled from a CSV, read, and given out as it was', async () => {
    const list = await stocked();
    const { json, headers } = await ask('GET', `${list}/lines`, { token: junior });
    expect(headers.get('etag')).toBe('"2"');
    expect(json).toMatchObject({
      total: 3,
      next: null,
      items: [
        {
          table: 'american-wide-flange',
          designation: 'W12x26',
          lengths_m: [12.192],
          lead_time_days: 14,
          price_band: null,
        },
        {
          table: 'european-h',
          designation: 'HE 200 A',
          lengths_m: [15.1],
          lead_time_days: 0,
          price_band: 'A',
        },
        {
          table: 'european-i',
          designation: 'IPE 300',
          lengths_m: [6, 12],
          lead_time_days: 3,
          price_band: 'B',
          in_library: true,
        },
      ],
    });
    const csv = await ask('GET', `${list}/csv`, { token: junior });
    expect(csv.headers.get('content-disposition')).toContain('attachment');
    const again = await begin();
    expect((await put(again, csv.json)).status).toBe(200);
    const strip = (page: { items: object[] }) => page.items.map((line) => ({ ...line, id: '' }));
    expect(strip((await ask('GET', `${again}/lines`, { token })).json)).toEqual(strip(json));
  });

  test('is found line by line, however a designation is typed, a page at a time', async () => {
    const list = await stocked();
    const found = await ask('GET', `${list}/lines?q=w%2012%20%C3%97`, { token });
    expect(found.json.items).toMatchObject([{ designation: 'W12x26' }]);
    expect((await ask('GET', `${list}/lines?q=%25`, { token })).json.total).toBe(0);
    const first = await ask('GET', `${list}/lines?limit=2`, { token });
    const rest = await ask('GET', `${list}/lines?limit=2&cursor=${first.json.next}`, { token });
    expect([first.json.items.length, rest.json.items.length, rest.json.next]).toEqual([2, 1, null]);
  });

  test('is replaced whole: what is no longer named is gone', async () => {
    const list = await stocked();
    expect((await put(list, 'designation\nIPE 300', 2)).json).toMatchObject({
      lines: 1,
      as_of: '2026-11-26',
    });
    const { json } = await ask('GET', `${list}/lines`, { token });
    expect(json.items).toMatchObject([{ designation: 'IPE 300', lengths_m: [], lead_time_days: null }]);
  });

  test('is changed by what is given of it, and by nothing else', async () => {
    const list = await stocked();
    const change = (json: object, version: number) =>
      ask('PATCH', list, { token, json, headers: match(version) });
    expect(await change({ note: 'Ring first' }, 2)).toMatchObject({
      status: 200,
      json: { note: 'Ring first', as_of: '2026-11-26', version: 3 },
    });
    for (const json of [{}, { slug: 'other' }, { as_of: '2199-01-01' }, { supplier: ' ' }])
      expect((await change(json, 3)).status).toBe(422);
  });

  test('of a supplier who has one is refused at the name', async () => {
    await begin();
    const json = { supplier: `supplier ${made} UNDER test`, as_of: '2026-11-19' };
    const again = await ask('POST', LIST, { token, json });
    expect(again).toMatchObject({ status: 409, json: { errors: [{ pointer: '/supplier', code: 'taken' }] } });
  });

  test('is not renamed to what another is called; a list at the address of a name is named', async () => {
    const [one, other] = [await begin(), await begin()];
    const name = `SUPPLIER ${made} under Tést`;
    const rename = (list: string, supplier: string, version: number) =>
      ask('PATCH', list, { token, json: { supplier }, headers: match(version) });
    const refused = await rename(one, name, 1);
    expect([refused.status, refused.json.errors[0].pointer]).toEqual([409, '/supplier']);
    expect(refused.json.detail).toContain(other.split('/').at(-1));
    expect((await rename(other, name, 1)).status).toBe(200);
    expect((await rename(other, `Yard ${made}`, 2)).status).toBe(200);
    expect((await rename(one, name, 1)).status).toBe(200);
    for (const supplier of [name, `Yard ${made}`]) {
      const again = await ask('POST', LIST, { token, json: { supplier, as_of: '2026-11-19' } });
      expect([again.status, again.json.errors[0].code]).toEqual([409, 'taken']);
    }
    await rename(one, `Depot ${made}`, 2);
    const atAddress = await ask('POST', LIST, { token, json: { supplier: name, as_of: '2026-11-19' } });
    expect(atAddress.json.detail).toContain(`“Yard ${made}”`);
  });

  test.each([
    [{ supplier: '', as_of: '2026-11-19' }, '/supplier'],
    [{ supplier: '???', as_of: '2026-11-19' }, '/supplier'],
    [{ supplier: 'A', as_of: '2026-02-30' }, '/as_of'],
    [{ supplier: 'A', as_of: '2199-01-01' }, '/as_of'],
    [{ supplier: 'A', as_of: '2026-11-19', price: 1 }, '/price'],
  ])('%j is refused', async (json, pointer) => {
    const { status, json: problem } = await ask('POST', LIST, { token, json });
    expect([status, problem.errors[0].pointer]).toEqual([422, pointer]);
  });
});

describe('a line', () => {
  const lineOf = async (list: string, q: string) =>
    (await ask('GET', `${list}/lines?q=${encodeURIComponent(q)}`, { token })).json.items[0];
  const HELD = { lengths_m: [6, 9], lead_time_days: null, price_band: 'C', note: 'Mill finish' };

  test('is added, changed and taken out by hand', async () => {
    const list = await stocked();
    const json = { designation: 'ipe-330', ...HELD };
    const added = await ask('POST', `${list}/lines`, { token, json, headers: match(2) });
    expect(added).toMatchObject({
      status: 201,
      json: { table: 'european-i', designation: 'IPE 330', ...HELD },
    });
    const change = { ...HELD, lead_time_days: 9 };
    const at = `${list}/lines/${added.json.id}`;
    const changed = await ask('PATCH', at, { token, json: change, headers: match(3) });
    expect([changed.status, changed.headers.get('etag')]).toEqual([200, '"4"']);
    expect(await lineOf(list, 'IPE 330')).toMatchObject(change);
    expect((await ask('DELETE', at, { token, headers: match(4) })).status).toBe(204);
    expect(await lineOf(list, 'IPE 330')).toBeUndefined();
    expect((await ask('DELETE', at, { token, headers: match(5) })).status).toBe(404);
  });

  test('that the list has, or of no section, or with lengths out of order, is refused and changes nothing', async () => {
    const list = await stocked();
    const add = (designation: string, more: object = {}) =>
      ask('POST', `${list}/lines`, { token, json: { designation, ...HELD, ...more }, headers: match(2) });
    expect((await add('IPE 300')).json).toMatchObject({ status: 409, errors: [{ code: 'duplicate' }] });
    expect((await add('IPE 305')).json).toMatchObject({ status: 422, errors: [{ pointer: '/designation' }] });
    expect((await add('IPE 360', { lengths_m: [9, 6] })).json.errors[0].pointer).toBe('/lengths_m');
    expect((await add('IPE 360', { lengths_m: [600] })).json.errors[0].pointer).toBe('/lengths_m/0');
    expect((await ask('GET', list, { token })).json).toMatchObject({ version: 2, lines: 3 });
  });

  test('of a list is not reached through another list', async () => {
    const [one, other] = [await stocked(), await stocked()];
    const { id } = await lineOf(one, 'IPE 300');
    const crossed = await ask('PATCH', `${other}/lines/${id}`, { token, json: HELD, headers: match(2) });
    expect(crossed.status).toBe(404);
  });
});

describe('whoever', () => {
  test('is not a librarian reads, and changes nothing', async () => {
    const list = await stocked();
    const by = { token: junior, headers: match(2) };
    expect((await ask('GET', LIST, { token: junior })).status).toBe(200);
    const json = { supplier: 'Another', as_of: '2026-11-19' };
    const held = { lengths_m: [], lead_time_days: null, price_band: null, note: '' };
    const refused = await Promise.all([
      ask('POST', LIST, { token: junior, json }),
      put(list, CSV, 2, junior),
      ask('POST', `${list}/check`, { token: junior, body: CSV }),
      ask('PATCH', list, { ...by, json: { note: 'mine' } }),
      ask('DELETE', list, by),
      ask('POST', `${list}/lines`, { ...by, json: { designation: 'IPE 330', ...held } }),
      ask('PATCH', `${list}/lines/${crypto.randomUUID()}`, { ...by, json: held }),
      ask('DELETE', `${list}/lines/${crypto.randomUUID()}`, by),
    ]);
    expect(refused.map(({ status }) => status)).toEqual(Array(8).fill(403));
    expect(refused[0]?.json.detail).toBe('Stock lists are kept by a librarian.');
    expect((await ask('GET', list, { token })).json).toMatchObject({ version: 2, lines: 3 });
  });

  test('is of another practice sees none of it, and may call a list the same', async () => {
    const list = await stocked();
    expect((await ask('GET', LIST, { token: stranger })).json.items).toEqual([]);
    const by = { token: stranger, headers: match(2) };
    const answers = await Promise.all([
      ask('GET', list, by),
      ask('GET', `${list}/lines`, by),
      ask('GET', `${list}/csv`, by),
      ask('POST', `${list}/check`, { ...by, body: CSV }),
      put(list, CSV, 2, stranger),
      ask('DELETE', list, by),
    ]);
    expect(answers.map(({ status }) => status)).toEqual(Array(6).fill(404));
    const json = { supplier: `Supplier ${made} under Test`, as_of: '2026-11-19' };
    expect((await ask('POST', LIST, { token: stranger, json })).status).toBe(201);
  });

  test('forgets the WHERE is kept to the own practice by the database, and sees nothing before one is set', async () => {
    await stocked();
    for (const table of ['stock_list', 'stock_line']) {
      expect(await web.unsafe(`select * from ${table}`)).toHaveLength(0);
      const rows = await web.begin(async (tx) => {
        await tx`select set_config('app.practice_id', ${librarian.practiceId}, true)`;
        return tx.unsafe(`select distinct practice_id from ${table}`);
      });
      expect(rows.map((row) => row['practice_id'])).toEqual([librarian.practiceId]);
    }
    const moved = web.begin(async (tx) => {
      await tx`select set_config('app.practice_id', ${librarian.practiceId}, true)`;
      await tx.unsafe(`update stock_line set table_slug = 'other'`);
    });
    expect(await refusal(moved)).toBe('42501');
  });
});

describe('of two people who change a list', () => {
  test('the second is told, with the list as it stands, and nothing of hers is half done', async () => {
    const list = await stocked();
    expect((await put(list, 'designation\nIPE 300', 2)).status).toBe(200);
    const late = await put(list, CSV, 2);
    expect(late).toMatchObject({ status: 412, json: { current: { version: 3, lines: 1 } } });
    expect((await ask('GET', list, { token })).json.lines).toBe(1);
    expect((await ask('PUT', `${list}/lines?as_of=2026-11-26`, { token, body: CSV })).status).toBe(428);
  });

  test('at once, one wins', async () => {
    const list = await stocked();
    const answers = await Promise.all([put(list, CSV, 2), put(list, CSV, 2), put(list, CSV, 2)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412, 412]);
  });
});

test('every change is in the record, with who and what', async () => {
  const list = await stocked();
  const line = { lengths_m: [], lead_time_days: 1, price_band: null, note: '' };
  const added = await ask('POST', `${list}/lines`, {
    token,
    json: { designation: 'IPE 330', ...line },
    headers: match(2),
  });
  const at = `${list}/lines/${added.json.id}`;
  await ask('PATCH', at, { token, json: { ...line, lead_time_days: 2 }, headers: match(3) });
  await ask('DELETE', at, { token, headers: match(4) });
  await ask('PATCH', list, { token, json: { note: 'Rang them' }, headers: match(5) });
  await put(list, 'designation,price band\nIPE 300,A\nIPE 360,A', 6);
  expect((await ask('DELETE', list, { token, headers: match(7) })).status).toBe(204);
  const events = await eventsOf(list);
  expect(events.map(({ action }) => action)).toEqual([
    'stock.create',
    'stock.replace',
    'stock.add-line',
    'stock.change-line',
    'stock.remove-line',
    'stock.change',
    'stock.replace',
    'stock.remove',
  ]);
  expect(new Set(events.map(({ actor_id }) => actor_id))).toEqual(new Set([librarian.personId]));
  expect(events[3]?.data).toMatchObject({ before: { lead_time_days: 1 }, after: { lead_time_days: 2 } });
  expect(events[6]?.data.after).toMatchObject({ lines: 2, added: 1, removed: 2, changed: 1 });
  expect((await verifyChain(librarian.practiceId)).fault).toBeNull();
});

describe('a CSV', () => {
  test('is checked with nothing kept: each bad line with its value, the reason, and what may be meant', async () => {
    const list = await begin();
    const csv =
      'designation;table;lengths;lead time;price band\nIPE 300;;12;;\nIPE 305;;7,5;;\nIPE 600;;6;;\nipe300;;;;\nHE 200 A;;long;soon;Z';
    const { status, json } = await check(list, csv);
    expect([status, json.rows, json.good, json.fault_count]).toEqual([200, 5, 1, 6]);
    expect(json.read_as).toMatchObject({ delimiter: ';', decimal_mark: ',', length_unit: 'm' });
    expect(json.faults).toMatchObject([
      { line: 3, field: 'designation', value: 'IPE 305', code: 'unknown_section' },
      { line: 4, field: 'table', code: 'several_tables' },
      { line: 5, code: 'duplicate' },
      { line: 6, field: 'lengths', value: 'long' },
      { line: 6, field: 'lead_time', value: 'soon' },
      { line: 6, field: 'price_band', value: 'Z' },
    ]);
    const offered = json.faults[0].suggestions.map((one: SectionItem) => one.designation);
    expect(offered).toEqual(expect.arrayContaining(['IPE 300']));
    const tables = json.faults[1].suggestions.map((one: SectionItem) => one.table);
    expect(tables).toEqual(['european-i', 'second-i']);
    expect((await ask('GET', list, { token })).json).toMatchObject({ version: 1, lines: 0 });

    const refused = await put(list, csv);
    expect(refused.status).toBe(422);
    expect(refused.json.errors[0]).toMatchObject({
      pointer: '/lines/3/designation',
      code: 'unknown_section',
    });
    expect((await ask('GET', list, { token })).json).toMatchObject({ version: 1, lines: 0 });
  });

  test('has the decimal mark that is said, whatever its cells look like', async () => {
    const csv = 'designation,lengths (ft)\nIPE 300,"30,40"\nIPE 330,20.5';
    const list = await begin();
    const readAs = (mark: string) => ask('POST', `${list}/check?mark=${mark}`, { token, body: csv });
    expect((await check(list, csv)).json).toMatchObject({ good: 2, read_as: { decimal_mark: '.' } });
    expect((await readAs('none')).json.faults).toMatchObject([{ line: 2, code: 'ambiguous_number' }]);
    expect((await readAs('dot')).status).toBe(422);
    const kept = (mark: string) =>
      ask('PUT', `${list}/lines?as_of=2026-11-26&mark=${mark}`, { token, body: csv, headers: match(1) });
    expect((await kept('none')).json.errors).toMatchObject([{ pointer: '/lines/2/lengths' }]);
    expect((await kept('comma')).status).toBe(200);
    const { items } = (await ask('GET', `${list}/lines?q=IPE 300`, { token })).json;
    expect(items).toMatchObject([{ lengths_m: [9.26592] }]); // 30.4 × 0.3048 m
  });

  test.each([
    ['nothing', '', 'empty'],
    ['no text', new Uint8Array(200).fill(7), 'binary'],
    ['a workbook by its name', new TextEncoder().encode('PK\u0003\u0004xl/worksheets'), 'spreadsheet'],
    ['a page', '<!doctype html><table>', 'markup'],
    ['no headings', 'one,two\n1,2', 'no_headings'],
    ['an open quote', 'designation\n"IPE 300\nIPE 330', 'unclosed_quote'],
    ['too many lines', `designation\n${'a1\n'.repeat(20_001)}`, 'too_many_rows'],
  ])('of %s is refused, and the list stays', async (_, body, code) => {
    const list = await stocked();
    const answer = await put(list, body, 2);
    expect([answer.status, answer.json.errors[0].code]).toEqual([422, code]);
    expect((await ask('GET', list, { token })).json).toMatchObject({ version: 2, lines: 3 });
  });

  test('of more than 5 MB is not read to its end', async () => {
    const list = await begin();
    const piece = new Uint8Array(1_000_000).fill(0x61);
    let pulled = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        pulled += 1;
        controller.enqueue(piece);
      },
    });
    expect((await put(list, endless)).status).toBe(413);
    expect(pulled).toBeLessThan(10);
  });

  test('with formulas, SQL and markup is text, and comes out harmless', async () => {
    const list = await begin();
    const note = `=1+1'); drop table stock_line; --`;
    expect(
      (await put(list, `designation,note\nIPE 300,"${note}"\nIPE 330,<script>alert(1)</script>`)).status,
    ).toBe(200);
    const { json } = await ask('GET', `${list}/lines`, { token });
    expect(json.items).toMatchObject([{ note }, { note: '<script>alert(1)</script>' }]);
    expect((await ask('GET', `${list}/csv`, { token })).json).toContain(`"'${note}"`);
    for (const bad of ['"\u0007IPE 300"', '%', "' or 1=1 --"])
      expect((await put(list, `designation\n${bad}`, 2)).status).toBe(422);
  });

  test('of every shipped section is loaded in one go', async () => {
    const list = await begin();
    const rows =
      await owner.sql`select table_slug, designation from section where practice_id = ${librarian.practiceId}`;
    const csv = [
      'designation,table,lengths',
      ...rows.map((row) => `"${row['designation']}",${row['table_slug']},6;12`),
    ];
    const answer = await put(list, csv.join('\n'));
    expect([answer.status, answer.json.errors, answer.json.lines]).toEqual([200, undefined, rows.length]);
    expect(rows.length).toBeGreaterThan(1000);
  });
});

describe('the list of sections', () => {
  const sections = (query: string, by = junior) => ask('GET', `/api/v1/sections?${query}`, { token: by });

  test('is narrowed to what is in stock, and to one supplier; each says who holds it', async () => {
    await Promise.all(
      (await ask('GET', LIST, { token })).json.items.map((one: { slug: string; version: number }) =>
        ask('DELETE', `${LIST}/${one.slug}`, { token, headers: match(one.version) }),
      ),
    );
    expect((await sections('stock=1')).json.total).toBe(0);
    const [one, other] = [await stocked(), await begin()];
    await put(other, 'designation,price band\nIPE 300,D\nIPE 400,A');
    const slug = (list: string) => list.split('/').at(-1) ?? '';
    const named = async (query: string) =>
      (await sections(query)).json.items.map((item: SectionItem) => item.designation);
    expect((await named('stock=1&sort=mass')).sort()).toEqual(['HE 200 A', 'IPE 300', 'IPE 400', 'W12x26']);
    expect((await named(`supplier=${slug(other)}`)).sort()).toEqual(['IPE 300', 'IPE 400']);
    expect(await named('stock=1&table=european-i&depth_max=350')).toEqual(['IPE 300']);
    expect(await named('supplier=nobody')).toEqual([]);

    const { json } = await sections('q=IPE 300');
    expect(json.items[0].stock).toEqual([
      { supplier: slug(one), lengths_m: [6, 12], lead_time_days: 3, price_band: 'B' },
      { supplier: slug(other), lengths_m: [], lead_time_days: null, price_band: 'D' },
    ]);
    expect((await sections('q=IPE 330')).json.items[0]).not.toHaveProperty('stock');
    const { json: spread } = await ask('GET', '/api/v1/sections/spread?stock=1', { token: junior });
    expect(spread.depth.within).toBe(4);
    expect((await sections('stock=1', stranger)).json.total).toBe(0);
    expect((await sections('stock=2')).status).toBe(422);
  });
});
