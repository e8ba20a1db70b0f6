import { createHash } from 'node:crypto';
import { deflateRawSync, gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, test } from 'vitest';
import type { Finding } from '@/features/section/import/contract';
import { ask, signInAs } from '../support/app';
import { refusal } from '../support/database';
import { ABOUT, CLEAN, csvOf, EN, importer } from '../support/imports';
import { foundPractice, type Member, owner, PASSWORD } from '../support/practice';

type Desk = ReturnType<typeof importer>;
let librarian: Member;
let theirs: Member;
let desk: Desk;
let asChecker: Desk;
let asEngineer: Desk;
let elsewhere: Desk;
let checkerCookie: string;

beforeAll(async () => {
  const [first, checker, engineer] = await foundPractice(['librarian'], ['checker'], ['engineer']);
  const [other] = await foundPractice(['librarian']);
  [librarian, theirs] = [first, other];
  const of = async ({ email, practiceId }: Member) => importer(await signInAs(email, PASSWORD), practiceId);
  checkerCookie = await signInAs(checker.email, PASSWORD);
  [desk, asEngineer, elsewhere] = await Promise.all([of(first), of(engineer), of(other)]);
  asChecker = importer(checkerCookie, checker.practiceId);
});

const count = async (table: string, practiceId = librarian.practiceId): Promise<number> => {
  const [found] =
    await owner.sql`select count(*)::int as n from ${owner.sql(table)} where practice_id = ${practiceId}`;
  return found?.['n'];
};

/** A file that is another one each time. */
let serial = 0;
const fresh = (rows = CLEAN) =>
  csvOf([...rows, `Note ${++serial}`]).replace(/Note \d+\r\n/, `\r\n${' '.repeat(serial)}\r\n`);

describe('a file that is brought', () => {
  test('is kept whole with its SHA-256, and recognised', async () => {
    const text = fresh();
    const { status, json, headers } = await desk.upload(text, 'C:\\catalogues\\ov 7.csv');
    expect(status).toBe(201);
    expect(headers.get('location')).toBe(`/api/v1/section-imports/${json.id}`);
    expect(json.file).toEqual({
      name: 'ov 7.csv',
      bytes: Buffer.byteLength(text),
      sha256: createHash('sha256').update(text).digest('hex'),
    });
    expect(json).toMatchObject({ state: 'mapping', open_questions: ['axes'] });
    expect(json.mapping).toMatchObject({ delimiter: ';', decimalMark: ',' });
    const original = await asEngineer.act('GET', json.id, '/file', undefined);
    expect(original.json).toBe(text);
    expect(original.headers.get('content-disposition')).toBe("attachment; filename*=UTF-8''ov%207.csv");
    expect(original.headers.get('content-type')).toBe('application/octet-stream');
  });

  test('is a librarian’s to bring, and another practice never sees it', async () => {
    expect((await asEngineer.upload(fresh())).status).toBe(403);
    expect((await asChecker.upload(fresh())).status).toBe(403);
    const { id } = (await desk.upload(fresh())).json;
    for (const step of ['', '/file', '/report', '/progress'])
      expect((await elsewhere.act('GET', id, step, undefined)).status).toBe(404);
    expect((await elsewhere.act('POST', id, '/cancel', undefined, 1)).status).toBe(404);
    expect((await asEngineer.act('POST', id, '/cancel', undefined, 1)).status).toBe(403);
    const cookie = await signInAs(theirs.email, PASSWORD);
    expect((await ask('GET', '/api/v1/section-imports', { cookie })).json).toEqual({
      items: [],
      next: null,
      total: 0,
    });
  });

  const zip = Buffer.concat([Buffer.from('PK\u0003\u0004'), deflateRawSync(Buffer.alloc(3000, 'a;b\n'))]);
  const wide = `${Array.from({ length: 10_000 }, (_, at) => `c${at}`).join(',')}\n${'1,'.repeat(9999)}1\n`;
  const MALFORMED: [string, BlobPart, RegExp][] = [
    ['nothing', '', /empty/],
    ['nothing but spaces', '  \n \n', /blank|empty/],
    ['headings alone', csvOf([]), /no rows/],
    ['one column', 'Name\nOV 1\nOV 2\n', /column/],
    ['ten thousand columns', wide, /columns/],
    ['a renamed archive', zip, /archive|zip/i],
    ['a renamed gzip', gzipSync('a;b'), /archive|compress|gzip/i],
    ['a PDF', '%PDF-1.7\n%âãÏÓ\n1 0 obj', /PDF/],
    ['a picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0]), /picture|image/i],
    ['a program', Buffer.concat([Buffer.from('\u007fELF'), Buffer.alloc(4000)]), /program/],
    ['zeros', Buffer.alloc(100_000), /binary|text/i],
    ['an old spreadsheet', Buffer.from('d0cf11e0a1b11ae1'.padEnd(4000, '0'), 'hex'), /Office/],
    [
      'a web page',
      '<!doctype html><html><body><table><tr><td>1</td></tr></table></body></html>',
      /page|markup|HTML/i,
    ],
    ['an XML file', '<?xml version="1.0"?><rows><row/></rows>', /markup|XML|page/i],
    ['one cell of 5 MB', `Name;h mm\nOV 1;"${'9'.repeat(5_000_000)}"\n`, /cell|quot/i],
    ['a quote that never ends', `Name;h mm\n"OV 1;12\n${'OV 2;13\n'.repeat(20_000)}`, /quot|cell/i],
    ['JSON', JSON.stringify([{ name: 'OV 1', h: 12 }]), /./],
    ['RTF', '{\\rtf1\\ansi OV 1}', /./],
    ['random bytes', Buffer.from(Array.from({ length: 5000 }, (_, at) => (at * 7919) % 256)), /./],
    ['mixed line ends and one column', 'Name\rOV 1\n\rOV 2\r\n', /column|row/i],
  ];
  test.each(MALFORMED)('is refused in words, and leaves nothing: %s', async (_, body, words) => {
    const before = await Promise.all([count('section_import'), count('section'), count('audit_event')]);
    const began = performance.now();
    const { status, json } = await desk.upload(body);
    expect(performance.now() - began).toBeLessThan(2000);
    expect([status, json.type]).toEqual([422, 'urn:putlog:problem:invalid']);
    expect(json.detail).toMatch(words);
    expect(await Promise.all([count('section_import'), count('section'), count('audit_event')])).toEqual(
      before,
    );
  });
});

describe('an import', () => {
  test('asks for what only a person can say, and keeps what was typed so far', async () => {
    const { id, version } = (await desk.upload(fresh())).json;
    expect((await desk.act('PUT', id, '/mapping', { about: {}, answers: [] })).status).toBe(428);
    const kept = await desk.act('PUT', id, '/mapping', { about: { supplier: 'Half' }, answers: [] }, version);
    expect([kept.status, kept.json.about, kept.json.version]).toEqual([
      200,
      { supplier: 'Half' },
      version + 1,
    ]);
    const stale = await desk.act('PUT', id, '/mapping', { about: {}, answers: [] }, version);
    expect([stale.status, stale.json.current.about]).toEqual([412, { supplier: 'Half' }]);
    const { status, json } = await desk.act('POST', id, '/check', undefined, version + 1);
    expect(status).toBe(422);
    const pointers = json.errors.map(({ pointer }: { pointer: string }) => pointer);
    expect(pointers).toEqual(
      expect.arrayContaining([
        '/mapping/axes',
        '/about/table',
        '/about/source',
        '/about/catalogue_date',
        '/about/licence',
      ]),
    );
    expect(
      (
        await desk.act(
          'POST',
          id,
          '/commit',
          { change_note: 'x', change_class: 'error', consequence: 'safety' },
          version + 1,
        )
      ).json.type,
    ).toBe('urn:putlog:problem:illegal_step');
  });

  test('of clean rows has nothing to clear, and becomes a draft edition that a second person issues', async () => {
    const text = fresh();
    const { id } = (await desk.upload(text, 'issue-7.csv')).json;
    const checked = (await desk.check(id, [EN])).json;
    expect(checked).toMatchObject({ state: 'findings', open: 0, rows: 5, unchecked: false });
    const { json } = await desk.commit(id);
    expect(json).toMatchObject({ state: 'committed', edition: { number: 1, state: 'draft' } });
    const at = `/api/v1/library/section-table/${ABOUT.table}/revisions/1`;
    const cookie = await signInAs(librarian.email, PASSWORD);
    const found = async () => (await ask('GET', '/api/v1/sections?q=OV+310', { cookie })).json.items.length;
    expect(await found()).toBe(0);
    expect((await ask('POST', `${at}/submit`, { cookie, json: {} })).status).toBe(200);
    expect((await ask('POST', `${at}/issue`, { cookie, json: {} })).status).toBe(403);
    expect((await ask('POST', `${at}/issue`, { cookie: checkerCookie, json: {} })).status).toBe(200);
    expect(await found()).toBe(1);
    const [item] = (await ask('GET', '/api/v1/sections?q=OV+310', { cookie })).json.items;
    // As printed in jobmap §9; I_z, W_pl and the rest of the row are as supplied.
    expect(item).toMatchObject({
      mass_kg_m: 42.8,
      area_cm2: 54.5,
      i_major_cm4: 8985,
      w_el_cm3: 583,
      w_pl_cm3: 657,
    });
  });

  test('names each fault with its place, takes a suggestion by one press, and a warning with a reason', async () => {
    const heavy = CLEAN.with(1, CLEAN[1]?.replace('24,4', '25,0') ?? '');
    const wrong = heavy.with(4, CLEAN[4]?.replace('53,0', '28,0') ?? '');
    const { id } = (await desk.upload(fresh(wrong))).json;
    const checked = (await desk.check(id, [EN], { table: 'faulty', name: 'Faulty', reference: 'ST-91' }))
      .json;
    const all = checked.report.groups.flatMap(({ findings }: { findings: Finding[] }) => findings);
    const finding = all.find(({ line, cause }: Finding) => line === 6 && cause === 'mass');
    // ρA = 7850 · 67.5e-4 = 52.99 kg/m, by hand.
    expect(finding).toMatchObject({
      line: 6,
      heading: 'G kg/m',
      read: '28,0',
      expected: '52.99 kg/m',
      severity: 'error',
    });
    const open = await desk.commit(id);
    expect([open.status, open.json.detail]).toEqual([409, expect.stringMatching(/open/)]);
    const reason = { keys: [finding.key], reason: 'The works say so.' };
    const refused = await desk.act('POST', id, '/accept', reason, checked.version);
    expect([refused.status, refused.json.errors[0].code]).toEqual([422, 'not_allowed']);
    // ρA = 7850 · 31.1e-4 = 24.41 kg/m, by hand: 25.0 is 2.4 % more, which may be so for a reason.
    const warned = all.filter(({ severity }: Finding) => severity === 'warning');
    const heavier = warned.find(({ line, cause }: Finding) => line === 3 && cause === 'mass');
    expect(heavier).toMatchObject({ read: '25,0', expected: '24.41 kg/m' });
    const keys = warned.map(({ key }: Finding) => key);
    const said = await desk.act('POST', id, '/accept', { keys, reason: 'Weighed.' }, checked.version);
    expect(said.json.acceptances[0]).toMatchObject({ reason: 'Weighed.', by: 'Person 0' });
    const fixed = (await desk.fix(id, { apply: [{ finding: finding.key, fix: 0 }] })).json;
    expect(fixed).toMatchObject({
      state: 'findings',
      open: 0,
      fixes: [{ label: 'Use 52.99 kg/m', by: 'Person 0' }],
    });
    expect((await desk.fix(id, { apply: [{ finding: finding.key, fix: 0 }] })).status).toBe(422);
    // The file itself is as it was brought.
    expect((await desk.act('GET', id, '/file', undefined)).json).toContain('28,0');
  });

  test('leaves a row out, and takes a value typed by hand', async () => {
    const wrong = [
      ...CLEAN.with(0, CLEAN[0]?.replace('1208', '12,08') ?? ''),
      'OV 400×180×60;398;x;7,6;12,4;12;60;76;20000;1000;1100;1200;30',
    ];
    const { id } = (await desk.upload(fresh(wrong))).json;
    const checked = (await desk.check(id, [EN], { table: 'typed', name: 'Typed', reference: 'ST-92' })).json;
    expect(checked.open).toBeGreaterThan(1);
    const headings = await desk.fix(id, { leave_out: [7, 1] });
    expect([headings.status, headings.json.errors[0].pointer]).toEqual([422, '/leave_out/1']);
    const typed = (await desk.fix(id, { cells: [{ line: 2, column: 8, value: '1208' }], leave_out: [7] }))
      .json;
    expect([typed.open, typed.rows]).toEqual([0, 5]);
    // What was put right stays in the report as it was found.
    const { json } = await desk.act('GET', id, '/report', undefined);
    expect(json.fixes[0]).toMatchObject({
      label: 'Line 2, “Iy cm4”: 1208',
      findings: [{ line: 2, read: '12,08' }],
    });
  });

  test('can be read in another encoding than the one that was said first', async () => {
    const bytes = Buffer.from(fresh(CLEAN.with(0, CLEAN[0]?.replace('OV', 'ÖV') ?? '')), 'latin1');
    const { id, recognised } = (await desk.upload(bytes)).json;
    expect(recognised.questions[0].kind).toBe('encoding');
    const say = async (value: string, version: number) =>
      (await desk.act('PUT', id, '/mapping', { answers: [{ kind: 'encoding', value }] }, version)).json;
    const wrong = await say('windows-1251', 1);
    expect([wrong.mapping.encoding, wrong.columns[0].samples[0]]).toEqual(['windows-1251', 'ЦV 180Ч90Ч18']);
    expect(wrong.recognised.questions[0].kind).toBe('encoding');
    const right = await say('windows-1252', wrong.version);
    expect([right.open_questions, right.columns[0].samples[0]]).toEqual([['axes'], 'ÖV 180×90×18']);
  });

  test('is cancelled at any time before it is an edition, and never after', async () => {
    const { id } = (await desk.upload(fresh())).json;
    expect((await desk.act('POST', id, '/cancel', undefined)).status).toBe(428);
    expect((await desk.act('POST', id, '/cancel', undefined, 2)).status).toBe(412);
    const cancelled = await desk.act('POST', id, '/cancel', undefined, 1);
    expect([cancelled.status, cancelled.json.state]).toEqual([200, 'cancelled']);
    expect((await desk.act('POST', id, '/cancel', undefined, 1)).json.type).toBe(
      'urn:putlog:problem:illegal_step',
    );
    // What the worker was asked for before is not done.
    const other = (await desk.upload(fresh())).json.id;
    const about = { ...ABOUT, table: 'other', reference: 'ST-93' };
    const mapped = await desk.act('PUT', other, '/mapping', { about, answers: [EN] }, 1);
    expect(mapped.json.state).toBe('checking');
    await desk.act('POST', other, '/cancel', undefined, mapped.json.version);
    await desk.work(other);
    expect(await desk.read(other)).toMatchObject({ state: 'cancelled', report: null });
  });
});

describe('the report of an edition', () => {
  test('stays as it was when the rows were written', async () => {
    const [first] =
      await owner.sql`select id from section_import where practice_id = ${librarian.practiceId} and state = 'committed' limit 1`;
    const id = first?.['id'];
    const report = await asEngineer.act('GET', id, '/report', undefined);
    expect(report.json).toMatchObject({ state: 'committed', supplier: ABOUT.supplier, rows: 5 });
    const change = owner.sql`update section_import set report = null where id = ${id}`;
    expect(await refusal(change)).toBe('PL001');
    expect(await refusal(owner.sql`delete from section_import where id = ${id}`)).toBe('PL001');
    const accept = owner.sql`insert into import_acceptance (practice_id, import_id, key, reason, person_id)
      values (${librarian.practiceId}, ${id}, 'x', 'late', ${librarian.personId})`;
    expect(await refusal(accept)).toBe('PL001');
    const { json } = await ask('GET', `/api/v1/library/section-table/${ABOUT.table}/drafts/1`, {
      cookie: checkerCookie,
    });
    expect(json.document.import).toMatchObject({ id, file: 'issue-7.csv' });
  });

  test('is where the next file of the supplier begins: its columns are known again', async () => {
    const next = [...CLEAN.slice(1), 'OV 410×180×62;408;180;8,0;13,2;12;61,7;78,6;22684;1112;1252;1287;36,9'];
    const heavier = next.with(0, 'OV 210×110×24;208;110;5,6;9,0;9;24,3;31,1;2342;225;254;200;7,4');
    const { json } = await desk.upload(fresh(heavier), 'issue-8.csv');
    expect(json.recognised.remembered.supplier).toBe(ABOUT.supplier);
    expect(json.open_questions).toEqual([]);
    expect(json.about).toMatchObject({ supplier: ABOUT.supplier, table: expect.any(String) });
    expect(json.about.catalogue_date).toBeUndefined();
    const checked = (await desk.check(json.id, [], { table: ABOUT.table })).json;
    const warnings = checked.report.groups.filter(
      ({ severity }: { severity: string }) => severity === 'warning',
    );
    // Two of five rows differ from edition 1: one changed, one gone; rule 40 wants a librarian to look.
    expect(warnings.map(({ cause }: { cause: string }) => cause)).toContain('many_changed');
    const keys = warnings.map(({ group }: { group: string }) => group);
    await desk.act('POST', json.id, '/accept', { keys, reason: 'A new catalogue.' }, checked.version);
    expect((await desk.commit(json.id, 'Issue 8.')).json.edition).toEqual({ number: 2, state: 'draft' });
    const cookie = await signInAs(librarian.email, PASSWORD);
    const changes = await ask('GET', `/api/v1/sections/${ABOUT.table}/changes?from=1&to=2`, { cookie });
    expect(changes.json.counts).toEqual({ changed: 1, added: 1, removed: 1, same: 3 });
    expect(changes.json.items[0].values).toEqual([
      { column: 'mass_kg_m', from: 24.4, to: 24.3, share: expect.closeTo(-0.1 / 24.4, 12) },
    ]);
  });

  test('is of one draft at a time', async () => {
    const { id } = (await desk.upload(fresh())).json;
    const checked = (await desk.check(id, [], { table: ABOUT.table })).json;
    const keys = checked.report.groups
      .filter(({ severity }: { severity: string }) => severity === 'warning')
      .map(({ group }: { group: string }) => group);
    if (keys.length > 0)
      await desk.act('POST', id, '/accept', { keys, reason: 'As it is.' }, checked.version);
    const { status, json } = await desk.commit(id);
    expect([status, json.detail]).toEqual([409, expect.stringMatching(/is a draft by Person 0 already/)]);
    expect(theirs.practiceId).not.toBe(librarian.practiceId);
  });
});
