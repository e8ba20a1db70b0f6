import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { remindOfReviews } from '@/features/review/remind.server';
import { takeStep } from '@/features/review/review.server';
import { type Answer, ask } from '../support/app';
import { draftOf } from '../support/database';
import { draftTemplate, issueTemplate, type Pair, proveRevision } from '../support/library';
import { foundPractice, type Member, owner } from '../support/practice';

const SPAN = 'simple-span-uniform';
const DAY = 86_400_000;
const dayFromNow = (days: number) => new Date(Date.now() + days * DAY).toISOString().slice(0, 10);

type Name = 'librarian' | 'other' | 'checker' | 'engineer' | 'reader';
let people: Record<Name, Member>;
let tokens: Record<Name | 'stranger', string>;
let pair: Pair;

beforeAll(async () => {
  const [librarian, other, checker, engineer, reader] = await foundPractice(
    ['librarian'],
    ['librarian'],
    ['checker'],
    ['engineer'],
    ['reader'],
  );
  const [stranger] = await foundPractice(['librarian']);
  people = { librarian, other, checker, engineer, reader };
  pair = { author: librarian, reviewer: checker };
  const named = await Promise.all(
    Object.entries({ ...people, stranger }).map(async ([name, { email }]) => [
      name,
      await createApiToken(email),
    ]),
  );
  tokens = Object.fromEntries(named);
  await ask('POST', '/api/v1/jobs', { token: tokens.engineer, json: { number: 'J1', name: 'School hall' } });
});

let count = 0;
async function issued(change: object = {}) {
  const slug = `${SPAN}-${++count}`;
  const reference = `Case ${count}`;
  const { revisionId } = await issueTemplate(pair, SPAN, { slug, change: { slug, reference, ...change } });
  return { slug, reference, revisionId };
}

const at = (slug: string, rest = '') => `/api/v1/library/template/${slug}${rest}`;
const read = (slug: string, by: keyof typeof tokens = 'reader') =>
  ask('GET', at(slug), { token: tokens[by] });
const send = (method: string, path: string, by: Name, json: object = {}) =>
  ask(method, path, { token: tokens[by], json });
const faults = ({ json }: Answer): string[] =>
  json.errors.map(({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`);
const noticesOf = async (who: Member, kind: string): Promise<string[]> =>
  (
    await owner.sql`select title from notice where person_id = ${who.personId} and kind = ${kind} order by created_at`
  ).map(({ title }) => title);

describe('a document', () => {
  test('is read with every revision, its proof, and what the reader may do', async () => {
    const { slug, reference } = await issued();
    await issueTemplate(pair, SPAN, {
      slug,
      change: { slug, reference, summary: 'Better.' },
      note: 'Better said.',
    });
    const { status, json } = await read(slug, 'librarian');
    expect([status, json.reference, json.uses, json.review, json.watching]).toEqual([
      200,
      reference,
      0,
      'none',
      false,
    ]);
    expect(json.revisions).toMatchObject([
      {
        number: 2,
        state: 'issued',
        change_note: 'Better said.',
        proven: true,
        confirmed: null,
        steps: ['withdraw'],
      },
      { number: 1, state: 'superseded', reviewer: 'Person 2', steps: ['withdraw'] },
    ]);
    expect((await read(slug, 'reader')).json.revisions[0].steps).toEqual([]);
    expect((await read(slug, 'stranger')).status).toBe(404);
    expect((await read('no-such')).status).toBe(404);
  });

  test('that is watched tells of every step, and no longer when it is not', async () => {
    const { slug, reference } = await issued();
    expect((await send('PUT', at(slug, '/watch'), 'engineer')).status).toBe(204);
    expect((await read(slug, 'engineer')).json.watching).toBe(true);
    await issueTemplate(pair, SPAN, { slug, change: { slug, reference, summary: 'Second.' } });
    expect(await noticesOf(people.engineer, 'submitted')).toContain(
      `${reference}, revision 2 is ready for review`,
    );
    expect(await noticesOf(people.engineer, 'issued')).toContain(`${reference}, revision 2 is issued`);
    await ask('DELETE', at(slug, '/watch'), { token: tokens.engineer });
    await issueTemplate(pair, SPAN, { slug, change: { slug, reference, summary: 'Third.' } });
    expect(await noticesOf(people.engineer, 'issued')).not.toContain(`${reference}, revision 3 is issued`);
  });

  test('is confirmed against its source once, by a librarian, by name', async () => {
    const { slug } = await issued();
    const confirm = (by: Name) => send('POST', at(slug, '/revisions/1/confirm'), by, { note: 'Table 3-23.' });
    expect((await confirm('engineer')).status).toBe(403);
    expect((await confirm('other')).json.revisions[0].confirmed).toMatchObject({
      by: 'Person 1',
      note: 'Table 3-23.',
    });
    expect((await confirm('librarian')).status).toBe(409);
    await draftOf(people.librarian, 'unsure');
    expect(
      (await send('POST', '/api/v1/library/criteria/unsure/revisions/1/confirm', 'librarian')).status,
    ).toBe(409);
  });
});

describe('a review date', () => {
  const setReview = (slug: string, json: object, by: Name = 'librarian') =>
    send('PUT', at(slug, '/review-by'), by, json);
  const place = (mark: string, template: string) =>
    send('POST', '/api/v1/jobs/J1/members', 'engineer', { mark, template });

  test('warns once it is past, and after the grace keeps new members out and leaves old ones alone', async () => {
    const { slug, reference } = await issued();
    expect((await setReview(slug, { review_by: dayFromNow(-10), grace_days: 30 })).json.review).toBe('due');
    const placed = await place('R1', slug);
    expect([placed.status, placed.json.template.review]).toEqual([201, 'due']);
    await setReview(slug, { review_by: dayFromNow(-31), grace_days: 30 });
    const refused = await place('R2', slug);
    expect([refused.status, ...faults(refused)]).toEqual([422, '/template review_expired']);
    expect(refused.json.detail).toContain(`${reference} was to be reviewed by ${dayFromNow(-31)}`);
    const old = await ask('PUT', '/api/v1/jobs/J1/members/R1', {
      token: tokens.engineer,
      json: { title: 'Still here', parameters: placed.json.parameters },
      headers: { 'if-match': '"1"' },
    });
    expect([old.status, old.json.template.review]).toEqual([200, 'expired']);
    await setReview(slug, { review_by: null });
    expect((await place('R2', slug)).json.template.review).toBe('none');
  });

  test('is set by a librarian, to a day', async () => {
    const { slug } = await issued();
    expect((await setReview(slug, { review_by: dayFromNow(10) }, 'engineer')).status).toBe(403);
    expect(faults(await setReview(slug, { review_by: '31.12.2026' }))).toEqual(['/review_by wrong_format']);
    expect(faults(await setReview(slug, { review_by: null, grace_days: -1 }))).toEqual([
      '/grace_days out_of_range',
    ]);
    expect((await setReview(slug, { review_by: dayFromNow(10) })).json).toMatchObject({
      review: 'current',
      grace_days: 90,
    });
  });

  test('is listed when it is due, and the librarians are told once of each turn', async () => {
    const { slug, reference } = await issued();
    await setReview(slug, { review_by: dayFromNow(-5), grace_days: 10 });
    const due = await ask('GET', '/api/v1/library/reviews-due', { token: tokens.reader });
    expect(due.json.items).toContainEqual({
      kind: 'template',
      slug,
      reference,
      name: 'Simple span, uniform load',
      review_by: dayFromNow(-5),
      last_day: dayFromNow(5),
      review: 'due',
    });
    const title = `${reference} was to be reviewed by ${dayFromNow(-5)}`;
    const times = async () =>
      (await noticesOf(people.other, 'review_due')).filter((one) => one === title).length;
    await remindOfReviews();
    await remindOfReviews();
    expect(await times()).toBe(1);
    await remindOfReviews(new Date(Date.now() + 30 * DAY));
    expect(await times()).toBe(2);
  });
});

describe('what waits', () => {
  const open = async (query = '') =>
    (await ask('GET', `/api/v1/library/revisions${query}`, { token: tokens.librarian })).json.items;

  test('is listed: drafts, proposals of engineers, and what is in review, with what may be done', async () => {
    await draftTemplate(people.librarian, 'cantilever-uniform');
    const proposal = await ask('POST', at('proposed-beam', '/drafts'), { token: tokens.engineer, json: {} });
    expect(proposal.status).toBe(201);
    const sent = await draftTemplate(people.other, 'two-equal-spans-uniform');
    await takeStep(people.other, sent.revisionId, { step: 'submit' });
    await proveRevision(people.checker, sent.revisionId);
    const bySlug = new Map((await open()).map((one: { slug: string }) => [one.slug, one]));
    expect(bySlug.get('cantilever-uniform')).toMatchObject({ state: 'draft', proposal: false, proven: null });
    expect(bySlug.get('proposed-beam')).toMatchObject({
      unfinished: true,
      proposal: true,
      author: 'Person 3',
    });
    expect(bySlug.get('two-equal-spans-uniform')).toMatchObject({
      state: 'in_review',
      proven: true,
      open_comments: 0,
      steps: ['return', 'issue'],
    });
    expect((await open('?state=in_review')).map((one: { slug: string }) => one.slug)).toEqual([
      'two-equal-spans-uniform',
    ]);
  });

  test('tells the other librarian what is ready for review, and the author what came of it', async () => {
    await issued();
    const draft = await draftTemplate(people.librarian, 'cantilever-tip-point');
    await takeStep(people.librarian, draft.revisionId, { step: 'submit' });
    expect(await noticesOf(people.other, 'submitted')).toContain('Case 1, revision 1 is ready for review');
    expect(await noticesOf(people.librarian, 'submitted')).not.toContain(
      'Case 1, revision 1 is ready for review',
    );
    await takeStep(people.checker, draft.revisionId, { step: 'return', comment: 'The tip.', pointer: '' });
    expect((await noticesOf(people.librarian, 'returned')).at(-1)).toMatch(/was returned$/);
    expect(await noticesOf(people.librarian, 'commented')).toEqual([]);
  });
});
