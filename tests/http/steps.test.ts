import { beforeAll, describe, expect, test } from 'vitest';
import { ROLES } from '@/features/account/roles';
import { createApiToken } from '@/features/account/token.server';
import { REVISION_STATES, type RevisionState } from '@/features/review/review';
import { takeStep } from '@/features/review/review.server';
import { ask } from '../support/app';
import { draftOf } from '../support/database';
import { foundPractice, type Member } from '../support/practice';

/** Who tries: one person of each role alone, and the engineer who wrote the revision. */
const WHO = [...ROLES, 'author'] as const;
type Who = (typeof WHO)[number];

/** From library.md, written down a second time: who may take a step, and from which states it leads on. */
const STEPS: Record<string, { by: Who[]; from: RevisionState[] }> = {
  save: { by: ['author', 'librarian'], from: ['draft'] },
  abandon: { by: ['author', 'librarian'], from: ['draft'] },
  submit: { by: ['author', 'librarian'], from: ['draft'] },
  return: { by: ['checker', 'librarian'], from: ['in_review'] },
  issue: { by: ['checker', 'librarian'], from: ['in_review'] },
  withdraw: { by: ['librarian', 'principal'], from: ['issued', 'superseded'] },
};

let author: Member;
let checker: Member;
let librarian: Member;
let tokens: Map<Who, string>;

beforeAll(async () => {
  const staff = await foundPractice(...ROLES.map((role) => [role]), ['engineer']);
  tokens = new Map();
  for (const [index, who] of WHO.entries()) tokens.set(who, await createApiToken(staff[index]?.email ?? ''));
  const member = (who: Who) => {
    const found = staff[WHO.indexOf(who)];
    if (!found) throw new Error(`${who} was founded`);
    return found;
  };
  author = member('author');
  checker = member('checker');
  librarian = member('librarian');
});

/** A revision of its own in a state, brought there by those who may. */
async function revisionIn(state: RevisionState): Promise<string> {
  const slug = `c-${crypto.randomUUID()}`;
  const { revisionId } = await draftOf(author, slug);
  const submit = () => takeStep(author, revisionId, { step: 'submit' });
  const issue = (id: string) => takeStep(checker, id, { step: 'issue' });
  if (state === 'draft') return slug;
  await submit();
  if (state === 'in_review') return slug;
  await issue(revisionId);
  if (state === 'superseded') {
    const next = await draftOf(author, slug);
    await takeStep(author, next.revisionId, { step: 'submit' });
    await issue(next.revisionId);
  }
  if (state === 'withdrawn')
    await takeStep(librarian, revisionId, { step: 'withdraw', reason: 'Wrong.', severity: 'cosmetic' });
  return slug;
}

async function attempt(step: string, slug: string, who: Who): Promise<number> {
  const token = tokens.get(who) ?? '';
  const base = `/api/v1/library/criteria/${slug}`;
  if (step === 'abandon') return (await ask('DELETE', `${base}/drafts/1`, { token })).status;
  if (step === 'save')
    return (
      await ask('PUT', `${base}/drafts/1`, {
        token,
        json: { document: {}, change_note: 'n', change_class: 'wording', consequence: 'cosmetic' },
        headers: { 'if-match': '"1"' },
      })
    ).status;
  const bodies: Record<string, object> = {
    return: { comment: 'Not yet.' },
    withdraw: { reason: 'Wrong.', severity: 'safety' },
  };
  return (await ask('POST', `${base}/revisions/1/${step}`, { token, json: bodies[step] ?? {} })).status;
}

describe.each(REVISION_STATES)('of a revision that is %s', (state) => {
  test.each(Object.keys(STEPS))(
    '%s is taken by who may, from where it leads on, and by nobody else',
    async (step) => {
      const rule = STEPS[step];
      if (!rule) throw new Error('the step is in the table');
      const isFrom = rule.from.includes(state);
      let slug = await revisionIn(state);
      for (const who of WHO) {
        const expected = !rule.by.includes(who) ? 403 : !isFrom ? 409 : step === 'abandon' ? 204 : 200;
        expect([who, await attempt(step, slug, who)]).toEqual([who, expected]);
        if (expected < 300) slug = await revisionIn(state);
      }
    },
  );
});

test('in a practice with one librarian the checker reviews what the librarian wrote', async () => {
  const [only, reviewer] = await foundPractice(['librarian', 'checker', 'principal'], ['checker']);
  const { revisionId } = await draftOf(only, 'by-the-librarian');
  await takeStep(only, revisionId, { step: 'submit' });
  const url = '/api/v1/library/criteria/by-the-librarian/revisions/1/issue';
  const own = await ask('POST', url, { token: await createApiToken(only.email), json: {} });
  expect([own.status, own.json.detail]).toEqual([
    403,
    'A document is reviewed and issued by a checker or a librarian who did not write or change it.',
  ]);
  expect((await ask('POST', url, { token: await createApiToken(reviewer.email), json: {} })).status).toBe(
    200,
  );
  const { json } = await ask('GET', '/api/v1/library/criteria/by-the-librarian', {
    token: await createApiToken(reviewer.email),
  });
  expect(json.revisions[0]).toMatchObject({
    state: 'issued',
    reviewer: 'Person 1',
    author: 'Person 0',
    steps: [],
  });
});

test('of two who issue at once over the interface one is told that it was taken', async () => {
  const [writer, first, second] = await foundPractice(['librarian'], ['checker'], ['checker']);
  const { revisionId } = await draftOf(writer, 'raced');
  await takeStep(writer, revisionId, { step: 'submit' });
  const url = '/api/v1/library/criteria/raced/revisions/1/issue';
  const both = await Promise.all(
    [first, second].map(async ({ email }) =>
      ask('POST', url, { token: await createApiToken(email), json: {} }),
    ),
  );
  expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
  expect(both.find(({ status }) => status === 409)?.json.detail).toBe(
    'Revision 1 cannot be issued: it is not in review any more. Read it again.',
  );
});
