import { beforeAll, expect, test } from 'vitest';
import { asWritten } from '@/features/review/written';
import { ask, signInAs } from '../support/app';
import { draftOf, issuedOf } from '../support/database';
import { issueTemplate } from '../support/library';
import { foundPractice, type Member, PASSWORD } from '../support/practice';
import { shippedTemplate } from '../support/templates';

const SLUG = 'propped-cantilever-uniform';
let librarian: Member;
let checker: Member;
let cookie: string;

beforeAll(async () => {
  [librarian, checker] = await foundPractice(['librarian'], ['checker']);
  cookie = await signInAs(librarian.email, PASSWORD);
  await issueTemplate({ author: librarian, reviewer: checker }, SLUG);
});

interface Result {
  id: string;
  name: string;
  expression: string;
}

const compare = (query = '', path = `templates/${SLUG}`) =>
  ask('GET', `/api/v1/${path}/compare${query}`, { cookie });

test('of a first revision there is nothing to compare with', async () => {
  expect((await compare()).status).toBe(409);
  expect((await compare('?from=1&to=9')).status).toBe(404);
  expect((await compare('?to=none')).status).toBe(422);
  expect((await compare('', 'templates/none')).status).toBe(404);
});

test('one coefficient 1 % larger shows that formula and every benchmark that moved', async () => {
  const written = asWritten(shippedTemplate(SLUG));
  const results = written['results'] as Result[];
  const prop = results.find(({ id }) => id === 'prop');
  if (!prop) throw new Error('the reaction at the prop was shipped');
  const expression = prop.expression.replace('3', '3.03');
  const document = {
    ...written,
    summary: 'Said better.',
    results: results.map((one) => (one === prop ? { ...one, expression } : one)),
  };
  const begun = await ask('POST', `/api/v1/templates/${SLUG}/drafts`, { cookie, json: { from: 1 } });
  const saved = await ask('PUT', `/api/v1/templates/${SLUG}/drafts/2`, {
    cookie,
    headers: { 'if-match': begun.headers.get('etag') ?? '' },
    json: { document, change_note: 'A coefficient.', change_class: 'error', consequence: 'safety' },
  });
  expect([saved.status, saved.json.faults]).toEqual([200, []]);

  const { status, json } = await compare();
  expect(status).toBe(200);
  expect([json.from, json.to]).toEqual([
    { number: 1, state: 'issued' },
    { number: 2, state: 'draft' },
  ]);
  const index = results.indexOf(prop);
  expect(json.changes).toEqual([
    {
      part: 'formulas',
      pointer: `/results/${index}/expression`,
      name: `Formula ${prop.name}, expression`,
      from: prop.expression,
      to: expression,
    },
    { part: 'text', pointer: '/summary', name: 'Summary', from: written['summary'], to: 'Said better.' },
  ]);
  const cases = shippedTemplate(SLUG).proof_cases.flatMap(({ name, expect: all }) =>
    all.some((one) => 'result' in one && one.result === 'prop') ? [name] : [],
  );
  expect(json.benchmarks.moved.map((one: { case: string }) => one.case)).toEqual(cases);
  for (const { name, share } of json.benchmarks.moved) {
    expect(name).toBe(prop.name);
    expect(share).toBeCloseTo(0.01, 12);
  }
});

test('a range of a parameter is a limit; what is gone has its place in the first', async () => {
  const backward = (await compare('?from=2&to=1')).json;
  expect(backward.benchmarks.moved[0].share).toBeCloseTo(1 / 1.01 - 1, 12);
  const written = asWritten(shippedTemplate(SLUG));
  const parameters = (written['parameters'] as { symbol: string }[]).map((one) =>
    one.symbol === 'L' ? { ...one, max: '24 m' } : one,
  );
  const { tags: _, ...rest } = written;
  const draft = await ask('GET', `/api/v1/templates/${SLUG}/drafts/2`, { cookie });
  await ask('PUT', `/api/v1/templates/${SLUG}/drafts/2`, {
    cookie,
    headers: { 'if-match': draft.headers.get('etag') ?? '' },
    json: { document: { ...rest, parameters }, change_note: '', change_class: null, consequence: null },
  });
  const { json } = await compare();
  expect(json.changes[0]).toMatchObject({ part: 'limits', name: 'Parameter Span, max', to: '24 m' });
  expect(json.changes.at(-1)).toMatchObject({ part: 'text', pointer: '/tags', to: null });
  // A draft with faults is compared as it is written, and not worked.
  expect(json.benchmarks).toBeNull();
});

test('any other kind of document is compared by its parts', async () => {
  await issuedOf(librarian, checker, 'deflections');
  await draftOf(librarian, 'deflections', {
    text: 'deflections',
    deflection: [{ name: 'Total', span_ratio: 250 }],
  });
  const { json } = await compare('', 'library/criteria/deflections');
  expect(json.changes).toMatchObject([{ part: 'limits', pointer: '/deflection', from: null }]);
  expect(json.benchmarks).toBeNull();
});
