import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { person } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import { createApiToken } from '@/features/account/token.server';
import { ask } from '../support/app';
import { webConnection } from '../support/database';
import { issueSections, issueTemplate } from '../support/library';
import { foundPractice, letGo, type Member, owner } from '../support/practice';

const PROP = 'propped-cantilever-overhang-uniform';
const SPAN = 'simple-span-uniform';

interface Office {
  readonly people: Readonly<Record<Who, Member>>;
  readonly tokens: Readonly<Record<Who, string>>;
}
const WHO = ['engineer', 'colleague', 'reader', 'librarian', 'principal', 'leaver', 'checker'] as const;
type Who = (typeof WHO)[number];

const web = webConnection();
let ours: Office;
let theirs: Office;

beforeAll(async () => {
  ours = await office();
  theirs = await office();
});
afterAll(() => web.end());

async function office(): Promise<Office> {
  const [engineer, colleague, reader, librarian, principal, leaver, checker] = await foundPractice(
    ['engineer'],
    ['engineer'],
    ['reader'],
    ['librarian'],
    ['principal'],
    ['engineer'],
    ['checker'],
  );
  const people = { engineer, colleague, reader, librarian, principal, leaver, checker };
  const pair = { author: librarian, reviewer: checker };
  await issueTemplate(pair, PROP);
  await issueTemplate(pair, SPAN);
  await issueSections(pair, 'american-wide-flange');
  const tokens = Object.fromEntries(
    await Promise.all(WHO.map(async (who) => [who, await createApiToken(people[who].email)] as const)),
  ) as Record<Who, string>;
  return { people, tokens };
}

const get = (query: Record<string, string>, who: Who = 'engineer', at: Office = ours) =>
  ask('GET', `/api/v1/search?${new URLSearchParams(query)}`, { token: at.tokens[who] });

interface Hit {
  readonly kind: string;
  readonly mark: { readonly text: string; readonly marks: readonly [number, number][] };
  readonly title: { readonly text: string; readonly marks: readonly [number, number][] };
  readonly href: string;
}
const hits = async (q: string, who?: Who, at?: Office): Promise<Hit[]> =>
  (await get({ q }, who, at)).json.items;
const addresses = async (q: string, who?: Who, at?: Office) =>
  (await hits(q, who, at)).map(({ href }) => href);

const send = async (path: string, json: object, who: Who = 'engineer', at: Office = ours) => {
  const answer = await ask('POST', path, { token: at.tokens[who], json });
  expect([201, 200], JSON.stringify(answer.json)).toContain(answer.status);
  return answer.json;
};
const begin = (number: string, name: string, more: object = {}, who?: Who, at?: Office) =>
  send('/api/v1/jobs', { number, name, ...more }, who, at);
const place = (job: string, mark: string, title: string, who?: Who) =>
  send(`/api/v1/jobs/${job}/members`, { mark, title, template: SPAN }, who);

describe('a section', () => {
  test.each(['12x26', 'W12×26', 'w 12 x 26', 'W12X26', 'w12*26'])('typed as %s comes first', async (q) => {
    const [first] = await hits(q);
    expect(first).toMatchObject({ kind: 'section', href: '/sections/american-wide-flange/W12x26' });
    expect(first?.mark.marks).toEqual([[0, first?.mark.text.length]]);
  });

  test('finds the members that are made of it', async () => {
    await begin('S-1', 'Sawmill');
    await place('S-1', 'SB1', 'Saw bench');
    const { practiceId } = ours.people.engineer;
    await owner.sql`update member set section_id = (select id from section where practice_id = ${practiceId} and designation = 'W12x26')
      where practice_id = ${practiceId} and mark = 'SB1'`;
    expect(await addresses('w 12 × 26')).toContain('/jobs/S-1/members/SB1');
  });
});

describe('an answer', () => {
  test('is first what has the mark that was typed, in however many titles it stands', async () => {
    await begin('Q-77', 'Boat shed');
    await begin('Q-78', 'Annexe to Q-77');
    for (const q of ['Q-77', 'q77', 'q 77']) expect((await addresses(q))[0]).toBe('/jobs/Q-77');
    await place('Q-77', 'LF4', 'Loft beam');
    expect((await addresses('lf4'))[0]).toBe('/jobs/Q-77/members/LF4');
    expect((await addresses('Q-77 LF4'))[0]).toBe('/jobs/Q-77/members/LF4');
  });

  test('is a title before a mere mention', async () => {
    await begin('M-1', 'Quay', { basis: 'The lighthouse drawings' });
    await begin('M-2', 'Lighthouse');
    expect(await addresses('lighthouse')).toEqual(['/jobs/M-2', '/jobs/M-1']);
  });

  test('is what is issued before what was withdrawn', async () => {
    const pair = { author: ours.people.librarian, reviewer: ours.people.checker };
    for (const [slug, reference] of [
      ['walkway-one', 'Walk 1'],
      ['walkway-two', 'Walk 2'],
    ] as const)
      await issueTemplate(pair, SPAN, { slug, change: { reference, name: 'Walkway' } });
    expect((await addresses('walkway'))[0]).toBe('/templates/walkway-two');
    await send(
      '/api/v1/templates/walkway-two/revisions/1/withdraw',
      { reason: 'The deflection is wrong.', severity: 'safety' },
      'librarian',
    );
    expect((await addresses('walkway')).slice(0, 2)).toEqual([
      '/templates/walkway-one',
      '/templates/walkway-two',
    ]);
    expect(await addresses('withdrawn walkway')).toContain('/templates/walkway-two');
  });

  test('is one’s own job before another’s', async () => {
    await begin('O-1', 'Orangery');
    await begin('O-2', 'Orangery', {}, 'colleague');
    expect(await addresses('orangery', 'engineer')).toEqual(['/jobs/O-1', '/jobs/O-2']);
    expect(await addresses('orangery', 'colleague')).toEqual(['/jobs/O-2', '/jobs/O-1']);
  });

  test('is found by a word with a slip, and says how it was read', async () => {
    for (const q of ['proped', 'propepd', 'prpped canti', 'overhagn']) {
      const { json } = await get({ q });
      expect(json.items[0].href, q).toBe(`/templates/${PROP}`);
      expect(json.instead.length, q).toBeGreaterThan(0);
    }
    expect((await get({ q: 'propped' })).json.instead).toEqual([]);
  });

  test.each([
    ['udl', SPAN],
    ['overhang prop', PROP],
    ['span L', SPAN],
    ['Prop 5', PROP],
  ])('to %s is by arrangement, tag, symbol or reference', async (q, slug) => {
    expect(await addresses(q)).toContain(`/templates/${slug}`);
  });

  test('sets off what was typed', async () => {
    const found = (await hits('propped over')).find(({ kind }) => kind === 'template');
    const words = found?.title.marks.map(([from, to]) => found.title.text.slice(from, to));
    expect(words).toEqual(['Propped', 'over']);
  });
});

const REQUEST = { kind: 'defect', title: 'Zither sag', body: 'The quagmire figure is off.', context: {} };

describe('what the person may not read', () => {
  beforeAll(async () => {
    await begin('N-1', 'Hermitage', { access: 'named' });
    await place('N-1', 'HB1', 'Oratory beam');
    await send('/api/v1/requests', REQUEST, 'reader');
  });

  test.each([
    ['hermitage', 'engineer', ['/jobs/N-1', '/jobs/N-1/members/HB1']],
    ['oratory', 'engineer', ['/jobs/N-1/members/HB1']],
    ['oratory', 'principal', ['/jobs/N-1/members/HB1']],
  ] as const)('%s is found by its %s', async (q, who, found) => {
    expect(await addresses(q, who)).toEqual(found);
  });

  test.each(['hermitage', 'oratory', 'HB1', 'oratry'])('%s is neither found nor counted', async (q) => {
    for (const who of ['colleague', 'reader', 'librarian'] as const) {
      const { json } = await get({ q }, who);
      expect(json, who).toMatchObject({ items: [], total: 0, kinds: [], instead: [] });
    }
  });

  test('a request is found by whoever raised it and by the librarian alone', async () => {
    for (const q of ['zither', 'quagmire']) {
      expect(await addresses(q, 'reader')).toEqual(['/library/requests/1']);
      expect(await addresses(q, 'librarian')).toEqual(['/library/requests/1']);
      for (const who of ['engineer', 'principal', 'colleague'] as const)
        expect((await get({ q }, who)).json, who).toMatchObject({ items: [], total: 0 });
    }
  });

  test('another practice finds nothing of it, however it asks', async () => {
    for (const q of ['hermitage', 'quagmire', 'oratry', 'lighthouse', 'orangery'])
      for (const who of ['engineer', 'librarian', 'principal'] as const)
        expect((await get({ q }, who, theirs)).json, `${q} ${who}`).toMatchObject({ items: [], total: 0 });
  });

  /** SQL by web's role, as `who`, with nothing in it that names a practice. */
  const as = (who: Member | null, statement: string) =>
    web.begin(async (tx) => {
      if (who)
        await tx`select set_config('app.practice_id', ${who.practiceId}, true), set_config('app.person_id', ${who.personId}, true)`;
      return tx.unsafe(statement);
    });
  const MATCHES = `select * from search_matches('hermitage | zither', 'hermitage', 'n1', 'hermitage')`;
  const SAID = /hermitage|oratory|zither|quagmire/i;

  test('nor does the web’s role in the other practice’s name', async () => {
    const { engineer } = theirs.people;
    for (const statement of ['select * from search_entry', 'select * from search_word']) {
      const text = JSON.stringify(await as(engineer, statement));
      expect(text.length).toBeGreaterThan(2);
      expect(text).not.toMatch(SAID);
      expect(text).not.toContain(ours.people.engineer.practiceId);
    }
    expect(await as(engineer, MATCHES)).toHaveLength(0);
  });

  test('nor, before a practice is set, anybody', async () => {
    for (const statement of ['select * from search_entry', 'select * from search_word', MATCHES])
      expect(await as(null, statement)).toHaveLength(0);
  });

  test('in SQL too: entries are read under the job’s own policy, and keys say nothing', async () => {
    const entries = await as(
      ours.people.colleague,
      `select * from search_entry where kind in ('job', 'member', 'note')`,
    );
    expect(entries.length).toBeGreaterThan(0);
    expect(JSON.stringify(entries)).not.toMatch(SAID);
    const keys = await as(ours.people.colleague, MATCHES);
    expect(keys.length).toBeGreaterThan(0);
    expect(JSON.stringify(keys)).not.toMatch(SAID);
  });
});

describe('an entry follows what it is about', () => {
  test('a member that is saved under another title', async () => {
    await begin('F-1', 'Granary');
    const made = await place('F-1', 'G1', 'Hoist beam');
    expect(await addresses('hoist beam granary')).toEqual(['/jobs/F-1/members/G1']);
    const kept = [
      'purpose',
      'status',
      'reason',
      'parameters',
      'self_weight',
      'self_weight_reason',
      'redundants',
    ];
    const json = {
      ...Object.fromEntries(kept.map((name) => [name, made[name]])),
      title: 'Trolley rail',
      section: null,
      criteria: null,
    };
    const headers = { 'if-match': `"${made.version}"` };
    const saved = await ask('PUT', '/api/v1/jobs/F-1/members/G1', {
      token: ours.tokens.engineer,
      headers,
      json,
    });
    expect(saved.status, JSON.stringify(saved.json)).toBe(200);
    expect(await addresses('trolley rail')).toEqual(['/jobs/F-1/members/G1']);
    expect(await addresses('hoist beam granary')).toEqual([]);
  });

  test('a comment that is made', async () => {
    const url = `/api/v1/library/template/${SPAN}/revisions/1/comments`;
    await send(url, { body: 'The periwinkle term is missing.' }, 'checker');
    const [found] = await hits('periwinkle');
    expect(found).toMatchObject({ kind: 'note', href: `/library/template/${SPAN}/revisions/1` });
  });

  test('a person who takes another name, with the jobs begun under the old one', async () => {
    await begin('Z-1', 'Kiln', {}, 'colleague');
    await withPractice(ours.people.colleague, (tx) =>
      tx.update(person).set({ name: 'Quentin Zephyr' }).where(eq(person.id, ours.people.colleague.personId)),
    );
    expect(await addresses('zephyr')).toEqual(
      expect.arrayContaining(['/search?q=Quentin+Zephyr', '/jobs/Z-1']),
    );
  });

  test('a person who is let go', async () => {
    const find = async () => (await hits('person 5')).filter(({ kind }) => kind === 'person').length;
    expect(await find()).toBe(1);
    await letGo(ours.people.leaver);
    expect(await find()).toBe(0);
  });
});

describe('the list', () => {
  test('gives five of each kind, and all of one in pages', async () => {
    await begin('P-1', 'Pergola');
    for (let n = 1; n <= 7; n++) await place('P-1', `P${n}`, `Pergola slat ${n}`);
    const { json: all } = await get({ q: 'pergola' });
    expect(all.kinds).toEqual([
      { kind: 'job', total: 1 },
      { kind: 'member', total: 7 },
    ]);
    expect([all.items.length, all.total, all.next]).toEqual([6, 8, null]);
    const seen: string[] = [];
    let cursor: string | null = null;
    do {
      const page: Record<string, string> = {
        q: 'pergola',
        kind: 'member',
        limit: '3',
        ...(cursor && { cursor }),
      };
      const { json } = await get(page);
      expect(json.total).toBe(7);
      seen.push(...json.items.map(({ href }: Hit) => href));
      cursor = json.next;
    } while (cursor !== null);
    expect(seen).toHaveLength(7);
    expect(new Set(seen).size).toBe(7);
  });

  test.each<[Record<string, string>, string]>([
    [{ q: ' ' }, '/q'],
    [{}, '/q'],
    [{ q: 'x', kind: 'secret' }, '/kind'],
    [{ q: 'x', limit: '0' }, '/limit'],
    [{ q: 'x'.repeat(201) }, '/q'],
    [{ q: 'x', page: '2' }, '/page'],
    [{ q: 'x', kind: 'job', cursor: 'zz' }, '/cursor'],
  ])('refuses %j at %s', async (query, pointer) => {
    const { status, json } = await get(query);
    expect([status, json.errors.map((fault: { pointer: string }) => fault.pointer)]).toEqual([
      422,
      [pointer],
    ]);
  });

  test.each([
    "'",
    "a'b",
    "'':*",
    '\\',
    'a\\',
    'a & !b | (c <-> d):*',
    '%_',
    '…',
    '🙂',
    'a\u0000b',
    'ﬁ ½ ǅ',
    '1/0',
  ])('takes %j as words and nothing else', async (q) => {
    expect((await get({ q })).status).toBe(200);
  });

  test('is for people who have signed in', async () => {
    expect((await ask('GET', '/api/v1/search?q=x')).status).toBe(401);
  });
});
