import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { proofRun } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { ENGINE_VERSION } from '@/engine/version';
import { proveIssued, runProof } from '@/features/proof/prove.server';
import { takeStep } from '@/features/review/review.server';
import { asWritten } from '@/features/review/written';
import { ask, signInAs } from '../support/app';
import { draftTemplate, issueTemplate } from '../support/library';
import { foundPractice, type Member, owner, PASSWORD } from '../support/practice';
import { shippedTemplate } from '../support/templates';
import { startWorker, type Worker } from '../support/worker';

const SLUG = 'propped-cantilever-overhang-uniform';
const ATTEMPT = { isLast: true };

let people: Record<'librarian' | 'checker' | 'engineer' | 'reader', Member>;
let cookies: Record<keyof typeof people, string>;

beforeAll(async () => {
  const [librarian, checker, engineer, reader] = await foundPractice(
    ['librarian'],
    ['checker'],
    ['engineer'],
    ['reader'],
  );
  people = { librarian, checker, engineer, reader };
  const entries = Object.entries(people).map(async ([who, { email }]) => [
    who,
    await signInAs(email, PASSWORD),
  ]);
  cookies = Object.fromEntries(await Promise.all(entries));
}, 60_000);

const at = (slug: string, number = 1) => `/api/v1/templates/${slug}/revisions/${number}/proof`;
const post = (slug: string, by: keyof typeof people = 'librarian') =>
  ask('POST', at(slug), { cookie: cookies[by], json: {} });
const get = (slug: string, by: keyof typeof people = 'reader') =>
  ask('GET', at(slug), { cookie: cookies[by] });
const task = (runId: string) => ({ practiceId: people.librarian.practiceId, runId });

describe('the proof of a draft', () => {
  test('is asked for, worked by the worker, and read with all that it found', async () => {
    await draftTemplate(people.librarian, SLUG);
    expect((await get(SLUG)).status).toBe(404);
    const asked = await post(SLUG);
    expect(asked.status).toBe(202);
    expect(asked.json).toMatchObject({
      state: 'queued',
      done: 0,
      passed: null,
      report: null,
      asked_by: 'Person 0',
    });
    expect((await post(SLUG, 'checker')).json.id).toBe(asked.json.id);

    await runProof(task(asked.json.id), ATTEMPT);
    const { json } = await get(SLUG);
    expect(json).toMatchObject({
      state: 'finished',
      current: true,
      passed: true,
      engine_version: ENGINE_VERSION,
    });
    expect(json.done).toBe(json.total);
    const { report } = json;
    expect(report.reasons).toEqual([]);
    expect(report.sweep.points).toBeGreaterThanOrEqual(200);
    expect(report.sweep.agreement).toBeLessThan(1e-9);
    expect(report.same_results).toBeNull();
    expect(report.worst_case.parameters).toHaveProperty('a');
    expect((await post(SLUG)).json).toMatchObject({ id: asked.json.id, state: 'finished' });
  }, 60_000);

  test('lets it be issued, and not before', async () => {
    const { revisionId } = await draftTemplate(people.librarian, 'simple-span-uniform');
    await takeStep(people.librarian, revisionId, { step: 'submit' });
    const issue = () =>
      ask('POST', '/api/v1/templates/simple-span-uniform/revisions/1/issue', {
        cookie: cookies.checker,
        json: {},
      });
    expect((await issue()).status).toBe(409);
    const { json } = await post('simple-span-uniform', 'checker');
    await runProof(task(json.id), ATTEMPT);
    expect((await issue()).status).toBe(200);
  }, 60_000);

  test('that does not hold says why, and does not let it be issued', async () => {
    const shipped = shippedTemplate('simple-span-point-centre');
    const [first, ...others] = asWritten(shipped)['results'] as { expression: string }[];
    const results = [{ ...first, expression: `1.01*(${first?.expression})` }, ...others];
    const document = { ...asWritten(shipped), results };
    await ask('POST', '/api/v1/templates/simple-span-point-centre/drafts', {
      cookie: cookies.librarian,
      json: { document, change_note: 'A slip.', change_class: 'improvement', consequence: 'safety' },
    });
    const { json } = await post('simple-span-point-centre');
    await runProof(task(json.id), ATTEMPT);
    const proof = (await get('simple-span-point-centre')).json;
    expect(proof).toMatchObject({ state: 'finished', passed: false });
    expect(proof.report.reasons.join(' ')).toContain('closed form');
    const step = (name: string, by: keyof typeof people) =>
      ask('POST', `/api/v1/templates/simple-span-point-centre/revisions/1/${name}`, {
        cookie: cookies[by],
        json: {},
      });
    expect((await step('submit', 'librarian')).status).toBe(200);
    expect((await step('issue', 'checker')).json.detail).toContain('failed');
  }, 60_000);

  test('of what it was before an edit does not count for what it is', async () => {
    const slug = 'cantilever-uniform';
    const { revisionId } = await draftTemplate(people.librarian, slug);
    const asked = await post(slug);
    const path = `/api/v1/templates/${slug}/drafts/1`;
    const draft = await ask('GET', path, { cookie: cookies.librarian });
    const saved = await ask('PUT', path, {
      cookie: cookies.librarian,
      headers: { 'if-match': draft.headers.get('etag') ?? '' },
      json: {
        document: { ...draft.json.document, summary: 'Said otherwise.' },
        change_note: 'Wording.',
        change_class: 'wording',
        consequence: 'cosmetic',
      },
    });
    expect(saved.status).toBe(200);
    await runProof(task(asked.json.id), ATTEMPT);
    expect((await get(slug)).json).toMatchObject({
      state: 'failed',
      current: false,
      error: expect.stringContaining('changed'),
    });
    const again = await post(slug);
    expect(again.json).toMatchObject({ state: 'queued', current: true });
    expect(again.json.id).not.toBe(asked.json.id);
    expect(revisionId).toBeTruthy();
  }, 60_000);
});

describe('who may ask', () => {
  test.each([
    ['reader', 403],
    ['engineer', 202],
  ] as const)('%s: %i', async (who, status) => {
    expect((await post(SLUG, who)).status).toBe(status);
  });

  test('a draft with faults is not proven, nor what is no template, nor what is not there', async () => {
    const cookie = cookies.librarian;
    await ask('POST', '/api/v1/templates/half-done/drafts', {
      cookie,
      json: { document: { name: 'Half done' } },
    });
    expect((await post('half-done')).status).toBe(409);
    expect((await post('nowhere')).status).toBe(404);
    const criteria = '/api/v1/library/criteria/any/revisions/1/proof';
    expect((await ask('POST', criteria, { cookie, json: {} })).status).toBe(404);
  });
});

test('what is issued and was proven by its cases alone is proven whole, once', async () => {
  const pair = { author: people.librarian, reviewer: people.checker };
  const { revisionId } = await issueTemplate(pair, 'fixed-ends-point');
  await proveIssued();
  await proveIssued();
  const runs = await withPractice(people.librarian, (tx) =>
    tx
      .select({ id: proofRun.id, state: proofRun.state, askedById: proofRun.askedById })
      .from(proofRun)
      .where(and(eq(proofRun.practiceId, people.librarian.practiceId), eq(proofRun.revisionId, revisionId))),
  );
  expect(runs.map(({ state }) => state).sort()).toEqual(['finished', 'queued']);
  expect(runs.find(({ state }) => state === 'queued')?.askedById).toBe(people.checker.personId);
}, 60_000);

test('a revision is proven against the issued one: the same results are proven, or not said', async () => {
  const slug = 'overhang-tip-point';
  const pair = { author: people.librarian, reviewer: people.checker };
  await issueTemplate(pair, slug);
  await draftTemplate(people.librarian, slug, { summary: 'The same, said otherwise.' });
  const asked = await ask('POST', at(slug, 2), { cookie: cookies.librarian, json: {} });
  await runProof(task(asked.json.id), ATTEMPT);
  const { json } = await ask('GET', at(slug, 2), { cookie: cookies.librarian });
  expect(json.report.same_results).toMatchObject({ proven: true, differing: 0, lost: 0 });
}, 60_000);

describe('a worker that is killed', () => {
  let worker: Worker | undefined;
  afterAll(() => worker?.stop());

  test('leaves a run that the next one goes on with, from where it was kept', async () => {
    const slug = 'four-equal-spans-patterns';
    await draftTemplate(people.librarian, slug);
    worker = await startWorker({});
    const { json } = await post(slug);
    const read = async () => (await get(slug)).json;
    // Asked of the row itself: the whole proof takes two seconds, and the endpoint may be slow to answer beside it.
    const begun = async () =>
      (await owner.sql`select from proof_run where id = ${json.id} and done > 0`).length;
    await vi.waitFor(async () => expect(await begun()).toBe(1), { timeout: 60_000, interval: 5 });
    await worker.kill();
    const left = await read();
    expect(left.state).toBe('running');
    expect(left.done).toBeLessThan(left.total);
    // What was done is not done again: what it found is taken away here, and stays away.
    await owner.sql`update proof_run set report = jsonb_set(report, '{progress,limits}', '[]') where id = ${json.id}`;
    worker = await startWorker({});
    await vi.waitFor(async () => expect((await read()).state).toBe('finished'), {
      timeout: 90_000,
      interval: 200,
    });
    const found = await read();
    expect(found).toMatchObject({ id: json.id, passed: true, done: left.total });
    expect(found.report.limits.length).toBeLessThan(10);
  }, 180_000);
});

test('a task that another worker has at hand is left to it', async () => {
  const slug = 'support-settlement';
  await draftTemplate(people.librarian, slug);
  const { json } = await post(slug);
  await owner.sql.begin(async (tx) => {
    await tx`select from proof_run where id = ${json.id} for update`;
    await runProof(task(json.id), ATTEMPT);
  });
  expect((await get(slug)).json).toMatchObject({ state: 'queued', done: 0 });
});

test('what breaks in a proof is told in its run at the last attempt, and tried again before', async () => {
  const slug = 'simple-span-couple';
  await draftTemplate(people.librarian, slug);
  const { json } = await post(slug);
  await owner.sql`update proof_run set report = '{"progress": {"done": 1, "total": 9}}', state = 'running' where id = ${json.id}`;
  await expect(runProof(task(json.id), { isLast: false })).rejects.toThrow();
  expect((await get(slug)).json.state).toBe('running');
  await runProof(task(json.id), ATTEMPT);
  expect((await get(slug)).json).toMatchObject({
    state: 'failed',
    error: expect.stringContaining('Ask again'),
  });
  expect((await post(slug)).json).toMatchObject({ state: 'queued' });
});
