import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { withPractice } from '@/db/tenancy';
import { runImpact } from '@/features/impact/weigh.server';
import { createDraft } from '@/features/review/review.server';
import { ask, signInAs } from '../support/app';
import { draftTemplate, issueTemplate } from '../support/library';
import { owner, PASSWORD } from '../support/practice';
import { foundStockedPractice } from '../support/stocked';
import { shippedTemplate } from '../support/templates';
import { startWorker, type Worker } from '../support/worker';

const SLUG = 'simple-span-uniform';
const ATTEMPT = { isLast: true };

type People = Awaited<ReturnType<typeof foundStockedPractice>>;
let people: People;
let cookies: Record<keyof People, string>;

const member = (mark: string, parameters: object = {}, more: object = {}) => ({
  mark,
  template: SLUG,
  parameters: { L: '7.8 m', w: { G: '3.18 kN/m', S: '2.52 kN/m' }, ...parameters },
  section: { designation: 'IPE 300', table: 'european-i', material: 's355' },
  criteria: 'steel-elastic-en',
  ...more,
});

async function job(
  number: string,
  marks: readonly object[],
  by: keyof People = 'engineer',
  access = 'practice',
) {
  const cookie = cookies[by];
  const made = await ask('POST', '/api/v1/jobs', {
    cookie,
    json: { number, name: `Job ${number}`, unit_system: 'metric', access },
  });
  expect(made.status, JSON.stringify(made.json)).toBe(201);
  for (const json of marks) {
    const { status, json: said } = await ask('POST', `/api/v1/jobs/${number}/members`, { cookie, json });
    expect(status, JSON.stringify(said)).toBe(201);
  }
}

beforeAll(async () => {
  people = await foundStockedPractice();
  const entries = Object.entries(people).map(async ([who, { email }]) => [
    who,
    await signInAs(email, PASSWORD),
  ]);
  cookies = Object.fromEntries(await Promise.all(entries));
  await job('I-1', [member('B1'), member('B2', { L: '9 m' }), member('B3', { L: '0.7 m' })]);
  await job('I-2', [member('C1')], 'colleague', 'named');
}, 180_000);

const at = (kind: string, slug: string, number: number) =>
  `/api/v1/library/${kind}/${slug}/revisions/${number}/impact`;
const post = (url: string, by: keyof People = 'librarian') =>
  ask('POST', url, { cookie: cookies[by], json: {} });
const get = (url: string, by: keyof People = 'librarian') => ask('GET', url, { cookie: cookies[by] });
const work = (runId: string) => runImpact({ practiceId: people.librarian.practiceId, runId }, ATTEMPT);

const tenthMore = (symbol: string) => ({ text: `1.1*${symbol}`, tree: ['*', 1.1, symbol] as const });

/** The shipped template with its load 10 % heavier than it is said to be, and no span below 1 m. */
function heavier(slug: string) {
  const { parameters, beam } = shippedTemplate(slug);
  const loads = beam.loads.map((load) => {
    if (load.kind === 'line') return { ...load, w0: tenthMore('w'), w1: tenthMore('w') };
    return { ...load, p: tenthMore('P') };
  });
  return {
    parameters: parameters.map((one) => (one.symbol === 'L' ? { ...one, min: '1 m' } : one)),
    beam: { ...beam, loads },
  };
}

describe('the impact of a template’s draft', () => {
  const url = at('template', SLUG, 2);

  test('evaluates every member that pins the issued revision, worst first', async () => {
    await draftTemplate(people.librarian, SLUG, heavier(SLUG));
    expect((await get(url)).status).toBe(404);
    const asked = await post(url);
    expect([asked.status, asked.json.state, asked.json.against]).toEqual([202, 'queued', 1]);
    expect((await post(url, 'checker')).json.id).toBe(asked.json.id);
    await work(asked.json.id);

    const { json } = await get(url);
    expect(json).toMatchObject({ state: 'finished', done: 4, total: 4, current: true });
    expect(json.counts).toMatchObject({ lost: 1, changed: 3, unchanged: 0, unread: 0 });
    expect(json.items.map(({ mark }: { mark: string }) => mark)[0]).toBe('B3');
    expect(json.items[0]).toMatchObject({ outcome: 'lost', largest_change: null });
    expect(json.items[0].message).toMatch(/Give 1\sm to/);
    // What acts besides is the section's own weight: R_A grows by 10 % of wL/2, by hand 0.1·5.7·7.8/2 = 2.223 kN.
    const b1 = json.items.find(({ mark }: { mark: string }) => mark === 'B1');
    const reaction = b1.figures.find(({ name }: { name: string }) => name === 'Reaction at A');
    expect(reaction.to - reaction.from).toBeCloseTo(2223, 6);
    const ownWeight = 42.2 * 9.80665;
    expect(reaction.share).toBeCloseTo(570 / (5700 + ownWeight), 9);
    expect(b1.checks.length).toBeGreaterThan(0);
  }, 60_000);

  test('tells who has no access to a job how much changes, and nothing of its loads', async () => {
    const hidden = (await get(url)).json.items.find(({ mark }: { mark: string }) => mark === 'C1');
    expect(hidden).toMatchObject({ open: false, outcome: 'changed', job: { number: 'I-2' } });
    for (const { from, to, share } of [...hidden.figures, ...hidden.checks]) {
      expect([from, to]).toEqual([null, null]);
      expect(share).toBeGreaterThan(0);
    }
    const seen = (await get(url, 'engineer')).json;
    expect([seen.hidden, seen.total, seen.items.length]).toEqual([1, 4, 3]);
  });

  test('is read a page at a time, and by what became of the members', async () => {
    const first = (await get(`${url}?limit=2`)).json;
    const second = (await get(`${url}?limit=2&cursor=${first.next}`)).json;
    const marks = [...first.items, ...second.items].map(({ mark }: { mark: string }) => mark);
    expect(new Set(marks)).toEqual(new Set(['B1', 'B2', 'B3', 'C1']));
    expect(second.next).toBeNull();
    expect((await get(`${url}?outcome=lost`)).json).toMatchObject({ total: 1, items: [{ mark: 'B3' }] });
    expect((await get(`${url}?outcome=worse`)).status).toBe(422);
  });

  test('of nothing that changes a result is that nothing changes', async () => {
    const slug = 'simple-span-point-centre';
    await job('I-3', [{ ...member('P1'), template: slug, parameters: { L: '6 m', P: '20 kN' } }]);
    await draftTemplate(people.librarian, slug, { summary: 'Said better.' });
    const asked = await post(at('template', slug, 2));
    await work(asked.json.id);
    expect((await get(at('template', slug, 2))).json).toMatchObject({
      counts: { unchanged: 1, changed: 0 },
      items: [{ outcome: 'unchanged', flips: 0, largest_change: 0, figures: [], checks: [] }],
    });
  }, 60_000);

  test('is refused where there is nothing to weigh', async () => {
    await ask('POST', '/api/v1/templates/brand-new/drafts', {
      cookie: cookies.librarian,
      json: { from: { slug: SLUG, revision: 1 } },
    });
    expect((await post(at('template', 'brand-new', 1))).status).toBe(409);
    expect((await post(at('template', SLUG, 1))).status).toBe(409);
    expect((await post(url, 'reader')).status).toBe(403);
  });
});

test('criteria: a check that passes with the one and fails with the other flips', async () => {
  const { json: document } = await ask('POST', '/api/v1/library/criteria/steel-elastic-en/drafts', {
    cookie: cookies.librarian,
    json: { from: 1, change_note: 'Stricter.', change_class: 'improvement', consequence: 'service' },
  });
  const stricter = structuredClone(document.document);
  for (const limit of stricter.deflection) limit.span_ratio *= 100;
  const path = '/api/v1/library/criteria/steel-elastic-en/drafts/2';
  const saved = await ask('PUT', path, {
    cookie: cookies.librarian,
    headers: { 'if-match': '"1"' },
    json: {
      document: stricter,
      change_note: 'Stricter.',
      change_class: 'improvement',
      consequence: 'service',
    },
  });
  expect([saved.status, saved.json.faults]).toEqual([200, []]);
  const url = at('criteria', 'steel-elastic-en', 2);
  await work((await post(url)).json.id);
  const b1 = (await get(url)).json.items.find(({ mark }: { mark: string }) => mark === 'B1');
  expect(b1.flips).toBeGreaterThan(0);
  expect(b1.figures).toEqual([]);
  expect(b1.checks.every(({ title }: { title: string }) => title.startsWith('Deflection'))).toBe(true);
  // 100 times the ratio allows a hundredth of the movement.
  for (const { from, to } of b1.checks) expect(to / from).toBeCloseTo(100, 9);
}, 60_000);

test('an edition of a section table: the section’s row in it, or none', async () => {
  const section = { designation: 'IPE 330', table: 'european-i', material: 's355' };
  await job('I-7', [{ ...member('E1'), section }]);
  const [edition] =
    await owner.sql`select r.id, r.body from revision r join document d on d.id = r.document_id
    where d.practice_id = ${people.librarian.practiceId} and d.slug = 'european-i'`;
  const next = await withPractice(people.librarian, (tx) =>
    createDraft(tx, people.librarian, {
      kind: 'section-table',
      slug: 'european-i',
      reference: 'unused',
      name: 'unused',
      body: { ...edition?.['body'], note: 'heavier' },
      schemaVersion: 1,
      changeNote: 'Another mass.',
      changeClass: 'code edition',
      consequence: 'service',
    }),
  );
  const columns = (
    await owner.sql`select string_agg(quote_ident(column_name), ', ') as list from information_schema.columns
    where table_name = 'section' and is_generated = 'NEVER' and column_name not in ('id', 'revision_id', 'i_major_cm4')`
  )[0]?.['list'];
  await owner.sql.unsafe(
    `insert into section (id, revision_id, i_major_cm4, ${columns}) select gen_random_uuid(), $1, 2 * i_major_cm4, ${columns}
     from section where revision_id = $2 and designation_key like '%300'`,
    [next.revisionId, edition?.['id']],
  );
  const url = at('section-table', 'european-i', next.number);
  await work((await post(url)).json.id);
  const { json } = await get(url);
  const b1 = json.items.find(({ mark }: { mark: string }) => mark === 'B1');
  // Twice the second moment of area: half the deflection, and of a simple span nothing else.
  expect(b1.figures.map(({ name }: { name: string }) => name)).toEqual(['Largest deflection down']);
  expect(b1.figures[0].share).toBeCloseTo(-0.5, 9);
  const e1 = json.items.find(({ mark }: { mark: string }) => mark === 'E1');
  expect(e1).toMatchObject({ outcome: 'lost', message: 'Its section IPE 330 is not in the new edition.' });
}, 60_000);

test('a member is evaluated as whoever changed it last may, and said to be unread where they may not', async () => {
  const slug = 'simple-span-point';
  const placed = { ...member('N1'), template: slug, parameters: { L: '6 m', a: '2 m', P: '20 kN' } };
  await job('I-6', [placed], 'colleague', 'named');
  await owner.sql`update member set changed_by_id = ${people.engineer.personId} where mark = 'N1' and practice_id = ${people.engineer.practiceId}`;
  await draftTemplate(people.librarian, slug, heavier(slug));
  const url = at('template', slug, 2);
  await work((await post(url)).json.id);
  expect((await get(url)).json).toMatchObject({
    state: 'finished',
    counts: { unread: 1, changed: 0 },
    items: [{ mark: 'N1', outcome: 'unread', figures: [], checks: [] }],
  });
});

describe('a member’s owner', () => {
  test('sees before and after, and upgrades with one press', async () => {
    const slug = 'cantilever-uniform';
    const pair = { author: people.librarian, reviewer: people.checker };
    await job('I-4', [{ ...member('U1'), template: slug, parameters: { L: '2 m', w: '4 kN/m' } }]);
    const template = shippedTemplate(slug);
    await issueTemplate(pair, slug, {
      change: { summary: `${template.summary} Again.` },
      note: 'Said better.',
    });
    const path = '/api/v1/jobs/I-4/members/U1';
    const cookie = cookies.engineer;
    const before = await ask('GET', path, { cookie });
    expect(before.json.template).toMatchObject({ revision: 1, newer: 2 });
    const tried = await ask('POST', `${path}/evaluate`, { cookie, json: { template_revision: 2 } });
    expect(tried.json.result.total.reactions).toEqual(before.json.result.total.reactions);
    const { title, purpose, status, reason, parameters, self_weight, self_weight_reason } = before.json;
    const { patterns, patterns_reason, redundants } = before.json;
    const saved = await ask('PUT', path, {
      cookie,
      headers: { 'if-match': before.headers.get('etag') ?? '' },
      json: {
        ...{ title, purpose, status, reason, parameters, self_weight, self_weight_reason },
        ...{ patterns, patterns_reason, redundants, criteria: 'steel-elastic-en' },
        section: { designation: 'IPE 300', table: 'european-i', material: 's355' },
        template_revision: 2,
      },
    });
    expect([saved.status, saved.json.template?.revision]).toEqual([200, 2]);
  }, 60_000);
});

describe('a worker that is killed', () => {
  let worker: Worker | undefined;
  afterAll(() => worker?.stop());

  test('leaves an impact that the next one goes on with; no member is weighed twice', async () => {
    const slug = 'fixed-ends-point';
    await job('I-5', [{ ...member('K0'), template: slug, parameters: { L: '6 m', a: '2 m', P: '20 kN' } }]);
    await owner.sql`insert into member (practice_id, id, job_id, mark, title, purpose, template_revision_id, section_id, material,
        criteria_revision_id, material_revision_id, combination_revision_id, parameters, settings, status, result, fingerprint, engine_version, evaluated_at, evaluated_by_id, created_by_id, changed_by_id)
      select practice_id, gen_random_uuid(), job_id, 'K' || n, title, purpose, template_revision_id, section_id, material,
        criteria_revision_id, material_revision_id, combination_revision_id, parameters, settings, status, result, fingerprint, engine_version, evaluated_at, evaluated_by_id, created_by_id, changed_by_id
      from member, generate_series(1, 1999) n where mark = 'K0' and practice_id = ${people.engineer.practiceId}`;
    await draftTemplate(people.librarian, slug, heavier(slug));
    const url = at('template', slug, 2);
    worker = await startWorker({});
    const { json } = await post(url);
    const read = async () => (await get(`${url}?limit=1`)).json;
    await vi.waitFor(async () => expect((await read()).done).toBeGreaterThan(0), {
      timeout: 60_000,
      interval: 20,
    });
    await worker.kill();
    const left = await read();
    expect(left.state).toBe('running');
    expect(left.done).toBeLessThan(2000);
    await owner.sql`update impact_member set flips = 77 where run_id = ${json.id}`; // what was found stays found
    worker = await startWorker({});
    await vi.waitFor(async () => expect((await read()).state).toBe('finished'), {
      timeout: 120_000,
      interval: 200,
    });
    expect(await read()).toMatchObject({
      done: 2000,
      total: 2000,
      counts: { changed: 2000, flipped: left.done },
    });
  }, 240_000);
});
