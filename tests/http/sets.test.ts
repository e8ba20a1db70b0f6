import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { runImpact } from '@/features/impact/weigh.server';
import { ask, signInAs } from '../support/app';
import { PASSWORD } from '../support/practice';
import { foundStockedPractice } from '../support/stocked';

type People = Awaited<ReturnType<typeof foundStockedPractice>>;
type Who = keyof People;
let people: People;
let cookies: Record<Who, string>;

const CHANGE = { change_note: 'Read again.', change_class: 'error', consequence: 'safety' };
const MEMBER = {
  template: 'simple-span-uniform',
  parameters: { L: '6 m', w: { G: '4 kN/m', Q: '5 kN/m' } },
  section: { designation: 'IPE 300', table: 'european-i', material: 's355' },
  criteria: 'steel-elastic-en',
};

interface Kind {
  readonly kind: string;
  readonly slug: string;
  readonly folder: string;
  /** The member's pin of it. */
  readonly pin: 'materials' | 'combinations';
  readonly move: string;
  /** Something of the document that makes a member's figures others. */
  readonly change: (document: Written) => Written;
  /** A slip of whoever types it, and the place at which it is said. */
  readonly slip: (document: Written) => Written;
  readonly at: string;
  /** By how much the bending ratio grows: of S355 to 300 N/mm², 355/300; of 1.5 Q to 1.65 Q with G, by hand. */
  readonly grows: number;
}
// biome-ignore lint/suspicious/noExplicitAny: a document as its author writes it is JSON of any form
type Written = any;

const OWN_WEIGHT = 42.2 * 9.80665;
const ultimate = (q: number) => 1.35 * (4000 + OWN_WEIGHT) + q * 5000;

const KINDS: readonly Kind[] = [
  {
    kind: 'material-set',
    slug: 'en-10025-2004',
    folder: 'materials',
    pin: 'materials',
    move: 'material_revision',
    change: (document) => {
      for (const one of document.materials)
        if (one.id === 's355') for (const band of one.strength) band.fy = '300 N/mm2';
      return document;
    },
    slip: (document) => {
      document.materials[0].strength[0].fu = '36 N/mm2';
      return document;
    },
    at: '/materials/0/strength/0/fu',
    grows: 355 / 300,
  },
  {
    kind: 'combination-set',
    slug: 'en-1990-6-10',
    folder: 'combinations',
    pin: 'combinations',
    move: 'combinations_revision',
    change: (document) => {
      for (const { factors } of document.strength) if (factors.Q === 1.5) factors.Q = 1.65;
      return document;
    },
    slip: (document) => {
      document.strength[1].factors.Q = '1.5 p';
      return document;
    },
    at: '/strength/1/factors/Q',
    grows: ultimate(1.65) / ultimate(1.5),
  },
];

const at = (path: string, who: Who = 'librarian') => ask('GET', path, { cookie: cookies[who] });
const post = (path: string, json: object = {}, who: Who = 'librarian') =>
  ask('POST', path, { cookie: cookies[who], json });
const bending = (member: Written): number =>
  member.result.checks.rows.find(({ kind }: { kind: string }) => kind === 'bending').ratio;
const put = (mark: string, version: number, json: object) =>
  ask('PUT', `/api/v1/jobs/S-1/members/${mark}`, {
    cookie: cookies.engineer,
    json: { ...MEMBER_BODY, ...json },
    headers: { 'if-match': `"${version}"` },
  });
const { template: _template, ...MEMBER_BODY } = MEMBER;

beforeAll(async () => {
  people = await foundStockedPractice();
  const entries = Object.entries(people).map(async ([who, { email }]) => [
    who,
    await signInAs(email, PASSWORD),
  ]);
  cookies = Object.fromEntries(await Promise.all(entries));
  const job = { number: 'S-1', name: 'Sets', unit_system: 'metric', access: 'practice' };
  expect((await post('/api/v1/jobs', job, 'engineer')).status).toBe(201);
}, 180_000);

describe.each(KINDS)('a $kind', ({ kind, slug, folder, pin, move, change, slip, at: place, grows }) => {
  const mark = `M-${pin}`;
  const url = `/api/v1/library/${kind}/${slug}`;
  const written = () => JSON.parse(readFileSync(`data/${folder}/${slug}.json`, 'utf8'));

  test('is pinned by a member, which is among its uses', async () => {
    const made = await post('/api/v1/jobs/S-1/members', { ...MEMBER, mark }, 'engineer');
    expect([made.status, made.json[pin]]).toMatchObject([
      201,
      { slug, revision: 1, state: 'issued', newer: null },
    ]);
    const uses = (await at(`${url}/uses`)).json;
    expect(uses.items).toContainEqual(expect.objectContaining({ mark, revision: 1 }));
    expect((await at(url)).json.uses).toBeGreaterThan(0);
  });

  test('is unverified until a librarian compares it with its source', async () => {
    expect((await at(url)).json.revisions[0].confirmed).toBeNull();
    expect((await post(`${url}/revisions/1/confirm`, { note: 'By the print.' }, 'engineer')).status).toBe(
      403,
    );
    expect((await post(`${url}/revisions/1/confirm`, { note: 'By the print.' })).status).toBe(200);
    expect((await at(url)).json.revisions[0].confirmed).toMatchObject({
      by: 'Person 3',
      note: 'By the print.',
    });
    expect((await at(`/api/v1/jobs/S-1/members/${mark}`, 'engineer')).json[pin].confirmed).toBe(true);
  });

  test('is drafted with its faults at their places, and refused to review with them', async () => {
    const broken = { ...written(), name: '' };
    const made = await post(`${url}/drafts`, { document: broken, from: undefined, ...CHANGE });
    expect(made.status).toBe(409);
    const draft = await post(`${url}/drafts`, { from: 1, ...CHANGE });
    expect([draft.status, draft.json.faults]).toEqual([201, []]);
    const save = (document: object, version: number) =>
      ask('PUT', `${url}/drafts/2`, {
        cookie: cookies.librarian,
        json: { document, ...CHANGE },
        headers: { 'if-match': `"${version}"` },
      });
    const wrong = await save(broken, 1);
    expect(wrong.json.faults.map(({ pointer }: { pointer: string }) => pointer)).toEqual(['/name']);
    expect((await post(`${url}/revisions/2/submit`)).status).toBe(422);
    const slipped = await save(slip(written()), 2);
    expect(slipped.json.faults[0].pointer).toBe(place);
    expect(slipped.json.document).toEqual(slip(written()));
    expect((await post(`${url}/revisions/2/submit`)).status).toBe(422);
    expect((await save(change(written()), 3)).json.faults).toEqual([]);
  });

  test('is weighed before it is issued', async () => {
    const asked = await post(`${url}/revisions/2/impact`);
    expect([asked.status, asked.json.against]).toEqual([202, 1]);
    await runImpact({ practiceId: people.librarian.practiceId, runId: asked.json.id }, { isLast: true });
    const { json } = await at(`${url}/revisions/2/impact`);
    const mine = json.items.find((item: { mark: string }) => item.mark === mark);
    expect(mine.outcome).toBe('changed');
    const check = mine.checks.find(({ title }: { title: string }) => title.startsWith('Bending'));
    expect(check.to / check.from).toBeCloseTo(grows, 9);
  });

  test('is reviewed and issued by somebody else; the member keeps what it pins, and is told', async () => {
    await post(`${url}/revisions/2/submit`);
    expect((await post(`${url}/revisions/2/issue`)).status).toBe(403);
    expect((await post(`${url}/revisions/2/issue`, {}, 'checker')).json.state).toBe('issued');
    const member = (await at(`/api/v1/jobs/S-1/members/${mark}`, 'engineer')).json;
    expect(member[pin]).toMatchObject({
      revision: 1,
      state: 'superseded',
      newer: 2,
      newer_note: 'Read again.',
    });
    const saved = await put(mark, 1, { title: 'As it was' });
    expect([saved.status, saved.json[pin].revision, bending(saved.json)]).toEqual([200, 1, bending(member)]);
  });

  test('is upgraded by its number, and changes the figures by what was changed in it', async () => {
    const before = (await at(`/api/v1/jobs/S-1/members/${mark}`, 'engineer')).json;
    const url = `/api/v1/jobs/S-1/members/${mark}/evaluate`;
    const tried = await post(url, { [move]: 2 }, 'engineer');
    expect(bending(tried.json) / bending(before)).toBeCloseTo(grows, 9);
    expect((await put(mark, 2, { [move]: 7 })).status).toBe(422);
    const moved = await put(mark, 2, { [move]: 2 });
    expect([moved.status, moved.json[pin].revision]).toEqual([200, 2]);
    expect(bending(moved.json) / bending(before)).toBeCloseTo(grows, 9);
  });

  test('is withdrawn with a recall of every use, and placed in no new member', async () => {
    const step = { reason: 'A figure was misread.', severity: 'safety' };
    const withdrawn = await post(`${url}/revisions/2/withdraw`, step);
    expect(withdrawn.status).toBe(200);
    const recalled = (await at(`/api/v1/recalls/${withdrawn.json.recall}`)).json;
    expect(recalled.items.map((use: { mark: string }) => use.mark)).toEqual([mark]);
    const refused = await post('/api/v1/jobs/S-1/members', { ...MEMBER, mark: `${mark}-2` }, 'engineer');
    expect(refused.status).toBe(422);
    const member = (await at(`/api/v1/jobs/S-1/members/${mark}`, 'engineer')).json;
    expect(member[pin]).toMatchObject({ state: 'withdrawn', recall: { id: withdrawn.json.recall } });
  });

  test('is issued anew for the members that come after', async () => {
    await post(`${url}/drafts`, { from: 1, ...CHANGE });
    await post(`${url}/revisions/3/submit`);
    expect((await post(`${url}/revisions/3/issue`, {}, 'checker')).status).toBe(200);
    const made = await post('/api/v1/jobs/S-1/members', { ...MEMBER, mark: `${mark}-3` }, 'engineer');
    expect([made.status, made.json[pin]?.revision]).toEqual([201, 3]);
  });

  test('travels as a bundle', async () => {
    const bundle = (await at(`${url}/revisions/3/bundle`)).json;
    expect(bundle).toMatchObject({ format: 'putlog-document', kind, slug, document: { slug } });
    const there = await post(`/api/v1/library/${kind}/${slug}-taken-in/drafts`, { bundle });
    expect([there.status, there.json.faults.map(({ code }: { code: string }) => code)]).toEqual([
      201,
      ['duplicate'],
    ]);
  });
});

describe('combinations of a member', () => {
  test('are another set that fits, with the categories that are chosen', async () => {
    const json = { ...MEMBER, mark: 'C1', combinations: 'en-1990-6-10ab-uk', categories: { Q: 'e' } };
    const made = await post('/api/v1/jobs/S-1/members', json, 'engineer');
    expect([made.status, made.json.combinations.slug, made.json.categories]).toEqual([
      201,
      'en-1990-6-10ab-uk',
      { Q: 'e' },
    ]);
    // Storage has ψ0 = 1.0, so 6.10a governs: 1.35 G + 1.5 Q.
    const row = made.json.result.checks.rows.find(({ kind }: { kind: string }) => kind === 'bending');
    expect(row.combination).toBe('1.35 G + 1.5 Q');
  });

  test('that do not fit are refused with the reason', async () => {
    const json = { ...MEMBER, mark: 'C2', combinations: 'asce-7-22-strength' };
    const made = await post('/api/v1/jobs/S-1/members', json, 'engineer');
    expect([made.status, made.json.errors[0]]).toMatchObject([
      422,
      { pointer: '/combinations', code: 'does_not_fit' },
    ]);
    const unknown = { ...MEMBER, mark: 'C2', categories: { Q: 'z' } };
    const refused = await post('/api/v1/jobs/S-1/members', unknown, 'engineer');
    expect(refused.json.errors).toMatchObject([{ pointer: '/categories/Q', code: 'unknown_category' }]);
    const none = await post('/api/v1/jobs/S-1/members', { ...json, combinations: 'none' }, 'engineer');
    expect(none.json.errors[0]).toMatchObject({ pointer: '/combinations', code: 'unknown_combinations' });
  });
});

test('a material is named by its set where two sets have it', async () => {
  const older = JSON.parse(readFileSync('data/materials/en-338-2016.json', 'utf8'));
  const document = { ...older, reference: 'Materials EN 338 old', name: 'Sawn softwood, EN 338:2009' };
  const url = '/api/v1/library/material-set/en-338-2009';
  await post(`${url}/drafts`, { document, ...CHANGE });
  await post(`${url}/revisions/1/submit`);
  expect((await post(`${url}/revisions/1/issue`, {}, 'checker')).status).toBe(200);
  const section = { designation: '47x220', material: 'c24' };
  const timber = { ...MEMBER, mark: 'T1', section, criteria: 'timber-elastic-en' };
  const asked = await post('/api/v1/jobs/S-1/members', timber, 'engineer');
  expect(asked.json.errors).toMatchObject([{ pointer: '/section/material', code: 'ambiguous_material' }]);
  const named = { ...timber, section: { ...section, material: 'en-338-2016/c24' } };
  const made = await post('/api/v1/jobs/S-1/members', named, 'engineer');
  expect([made.status, made.json.section?.material, made.json.materials?.slug]).toEqual([
    201,
    'c24',
    'en-338-2016',
  ]);
});
