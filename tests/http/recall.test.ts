import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { job } from '@/db/schema/job';
import { member as memberTable } from '@/db/schema/member';
import { withPractice } from '@/db/tenancy';
import { createApiToken } from '@/features/account/token.server';
import { holdForUse } from '@/features/review/pin.server';
import { takeStep } from '@/features/review/review.server';
import { type Answer, ask } from '../support/app';
import { issueCriteria, issueSections, issueTemplate, proveRevision } from '../support/library';
import { foundPractice, letGo, type Member, owner } from '../support/practice';

const SPAN = 'simple-span-uniform';
const REASON = 'The deflection lacks its factor 5.';

type Name = 'librarian' | 'checker' | 'engineer' | 'colleague' | 'principal' | 'reader';
let people: Record<Name, Member>;
let tokens: Record<Name | 'stranger', string>;

beforeAll(async () => {
  const [librarian, checker, engineer, colleague, principal, reader] = await foundPractice(
    ['librarian'],
    ['checker'],
    ['engineer'],
    ['engineer'],
    ['principal'],
    ['reader'],
  );
  const [stranger] = await foundPractice(['librarian', 'engineer']);
  people = { librarian, checker, engineer, colleague, principal, reader };
  const named = await Promise.all(
    Object.entries({ ...people, stranger }).map(async ([name, { email }]) => [
      name,
      await createApiToken(email),
    ]),
  );
  tokens = Object.fromEntries(named);
  const begin = (by: Name, json: object) => ask('POST', '/api/v1/jobs', { token: tokens[by], json });
  await begin('engineer', { number: 'OPEN', name: 'School hall' });
  await begin('engineer', { number: 'CLOSED', name: 'Old hall' });
  await begin('colleague', { number: 'NAMED', name: 'Quiet house', access: 'named', people: [] });
});

let count = 0;
/** A template of its own for each test, issued in a first revision. */
async function issued(revisions = 1) {
  const slug = `${SPAN}-${++count}`;
  const pair = { author: people.librarian, reviewer: people.checker };
  const ids: string[] = [];
  for (let n = 1; n <= revisions; n++) {
    const change = { slug, reference: `Beam ${count}`, summary: `Revision ${n}.` };
    ids.push((await issueTemplate(pair, SPAN, { change, slug })).revisionId);
  }
  return { slug, ids };
}

const place = (by: Name, job: string, mark: string, template: string) =>
  ask('POST', `/api/v1/jobs/${job}/members`, { token: tokens[by], json: { mark, template } });
const member = (by: Name, job: string, mark: string) =>
  ask('GET', `/api/v1/jobs/${job}/members/${mark}`, { token: tokens[by] });
const withdraw = (
  by: Name,
  slug: string,
  number = 1,
  json: object = { reason: REASON, severity: 'safety' },
) => ask('POST', `/api/v1/templates/${slug}/revisions/${number}/withdraw`, { token: tokens[by], json });
const recall = (id: string, by: Name | 'stranger' = 'librarian') =>
  ask('GET', `/api/v1/recalls/${id}`, { token: tokens[by] });
const decide = (by: Name, id: string, use: string, json: object) =>
  ask('PUT', `/api/v1/recalls/${id}/uses/${use}`, { token: tokens[by], json });
const close = (by: Name, id: string) =>
  ask('POST', `/api/v1/recalls/${id}/close`, { token: tokens[by], json: {} });
const faults = ({ json }: Answer): string[] =>
  json.errors.map(({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`);
const useOf = (json: Answer['json'], mark: string): string =>
  json.items.find((one: { mark: string }) => one.mark === mark).member;
const told = (who: Member, kind: string) =>
  owner.sql`select title, href from notice where person_id = ${who.personId} and kind = ${kind} order by created_at`;

describe('a withdrawn revision', () => {
  test('is recalled with every use and its owner, jobs for named people and closed jobs included', async () => {
    const { slug } = await issued();
    await place('engineer', 'OPEN', 'A1', slug);
    await place('colleague', 'NAMED', 'A2', slug);
    await place('engineer', 'CLOSED', 'A3', slug);
    await owner.sql`update job set status = 'closed' where number = 'CLOSED' and practice_id = ${people.engineer.practiceId}`;
    await ask('PUT', `/api/v1/jobs/OPEN/members/A1`, {
      token: tokens.colleague,
      json: { title: 'Changed by the colleague' },
      headers: { 'if-match': '"1"' },
    });
    const withdrawn = await withdraw('librarian', slug);
    expect([withdrawn.status, withdrawn.json.state]).toEqual([200, 'withdrawn']);
    const { json } = await recall(withdrawn.json.recall);
    expect(json).toMatchObject({
      slug,
      revision: 1,
      reason: REASON,
      severity: 'safety',
      uses: 3,
      decided: 0,
      hidden: 0,
    });
    expect(
      json.items.map((use: { job: { number: string }; mark: string; owner: string }) => [
        use.job.number,
        use.mark,
        use.owner,
      ]),
    ).toEqual([
      ['CLOSED', 'A3', 'Person 2'],
      ['NAMED', 'A2', 'Person 3'],
      ['OPEN', 'A1', 'Person 3'], // whoever changed it last
    ]);
    const direct =
      await owner.sql`select m.mark from member m join revision r on r.id = m.template_revision_id
      join document d on d.id = r.document_id where d.slug = ${slug} order by m.mark`;
    expect(direct.map(({ mark }) => mark)).toEqual(['A1', 'A2', 'A3']);
    await owner.sql`update job set status = 'open' where number = 'CLOSED' and practice_id = ${people.engineer.practiceId}`;

    const notices = await told(people.colleague, 'recall');
    expect(notices.at(-1)).toEqual({
      title: `Beam ${count}, revision 1 is recalled`,
      href: `/library/recalls/${withdrawn.json.recall}`,
    });
    const mails = await owner.sql`select mode, count(*)::int as count from mail where kind = 'recall'
      and person_id = ${people.colleague.personId} and dedupe = ${`recall ${withdrawn.json.recall}`} group by mode`;
    expect([...mails]).toEqual([{ mode: 'immediate', count: 1 }]);
  });

  test('shows whoever has no access to a job that there are uses, and not which', async () => {
    const { slug } = await issued();
    await place('colleague', 'NAMED', 'B1', slug);
    await place('engineer', 'OPEN', 'B1', slug);
    const { json: step } = await withdraw('librarian', slug);
    const { json } = await recall(step.recall, 'reader');
    expect([
      json.uses,
      json.hidden,
      json.items.map(({ job }: { job: { number: string } }) => job.number),
    ]).toEqual([2, 1, ['OPEN']]);
    expect(JSON.stringify(json)).not.toContain('Quiet house');
    expect((await recall(step.recall, 'stranger')).status).toBe(404);
    const uses = await ask('GET', `/api/v1/library/template/${slug}/uses`, { token: tokens.reader });
    expect([uses.json.total, uses.json.hidden, uses.json.items.length]).toEqual([2, 1, 1]);
    const all = await ask('GET', `/api/v1/library/template/${slug}/uses?limit=1`, {
      token: tokens.librarian,
    });
    expect([all.json.total, all.json.hidden, all.json.items[0].job.number]).toEqual([2, 0, 'NAMED']);
    const rest = await ask('GET', `/api/v1/library/template/${slug}/uses?limit=1&cursor=${all.json.next}`, {
      token: tokens.librarian,
    });
    expect([rest.json.items[0].job.number, rest.json.next]).toEqual(['OPEN', null]);
  });

  test('cannot be placed, and the refusal says why', async () => {
    const { slug } = await issued();
    await withdraw('principal', slug);
    const refused = await place('engineer', 'OPEN', 'C1', slug);
    expect([refused.status, ...faults(refused)]).toEqual([422, '/template not_issued']);
    expect(refused.json.detail).toContain(REASON);
  });

  test('that nobody uses opens no recall', async () => {
    const { slug } = await issued();
    expect((await withdraw('librarian', slug)).json.recall).toBeNull();
  });

  test('waits for a member that is being placed, and recalls it too', async () => {
    const { slug, ids } = await issued();
    const { practiceId, personId } = people.engineer;
    let withdrawn: Promise<Answer> | undefined;
    await withPractice(people.engineer, async (tx) => {
      await holdForUse(tx, practiceId, ids[0] ?? '', '/template');
      withdrawn = withdraw('librarian', slug);
      await new Promise((resolve) => setTimeout(resolve, 300));
      const [open] = await tx.select({ id: job.id }).from(job).where(eq(job.number, 'OPEN'));
      await tx.insert(memberTable).values({
        practiceId,
        jobId: open?.id ?? '',
        mark: 'RACE',
        templateRevisionId: ids[0] ?? '',
        parameters: {},
        settings: {},
        createdById: personId,
        changedById: personId,
      });
    });
    const { json } = await recall((await withdrawn)?.json.recall);
    expect(json.items.map(({ mark }: { mark: string }) => mark)).toEqual(['RACE']);
    await owner.sql`delete from recall_use where recall_id = ${json.id}`;
    await owner.sql`delete from member where mark = 'RACE'`; // it has no inputs that could be read
  });

  test('needs a reason, a severity, and a librarian or principal', async () => {
    const { slug } = await issued();
    expect(faults(await withdraw('librarian', slug, 1, { reason: ' ' }))).toEqual([
      '/reason out_of_range',
      '/severity missing',
    ]);
    for (const by of ['engineer', 'checker', 'reader'] as const)
      expect((await withdraw(by, slug)).status).toBe(403);
    expect((await withdraw('librarian', slug)).status).toBe(200);
    expect((await withdraw('librarian', slug)).status).toBe(409);
  });
});

describe('criteria and sections', () => {
  const pair = () => ({ author: people.librarian, reviewer: people.checker });
  const withCriteria = (mark: string) =>
    ask('POST', '/api/v1/jobs/OPEN/members', {
      token: tokens.engineer,
      json: {
        mark,
        template: 'plain-span',
        section: { designation: 'IPE 300', table: 'european-i', material: 's355' },
        criteria: 'steel-elastic-en',
      },
    });

  test('are recalled and refused by the same mechanism', { timeout: 60_000 }, async () => {
    const change = { slug: 'plain-span', reference: 'Plain 1' };
    await issueTemplate(pair(), SPAN, { slug: 'plain-span', change });
    const edition = await issueSections(pair(), 'european-i');
    const { slug } = await issueCriteria(pair(), 'steel-elastic-en');
    expect((await withCriteria('CR1')).status).toBe(201);
    const uses = await ask('GET', `/api/v1/library/section-table/european-i/uses`, {
      token: tokens.librarian,
    });
    expect(uses.json.items).toMatchObject([{ mark: 'CR1', revision: 1 }]);

    const table = await takeStep(people.librarian, edition.revisionId, {
      step: 'withdraw',
      reason: 'The columns were shifted.',
      severity: 'safety',
    });
    const noSection = await withCriteria('CR2');
    expect(faults(noSection)).toEqual(['/section/designation withdrawn']);
    expect(noSection.json.detail).toContain('The columns were shifted.');
    const { json: criteria } = await ask('POST', `/api/v1/library/criteria/${slug}/revisions/1/withdraw`, {
      token: tokens.principal,
      json: { reason: 'A factor is from the draft of the code.', severity: 'service' },
    });
    await issueSections(pair(), 'european-i');
    const noCriteria = await withCriteria('CR2');
    expect(faults(noCriteria)).toEqual(['/criteria not_issued']);
    expect(noCriteria.json.detail).toContain('A factor is from the draft of the code.');
    for (const id of [table.recallId, criteria.recall]) {
      const { json } = await recall(id);
      expect(json.items.map(({ mark }: { mark: string }) => mark)).toEqual(['CR1']);
    }
    const held = (await member('engineer', 'OPEN', 'CR1')).json;
    expect(held.section).toMatchObject({
      state: 'withdrawn',
      withdrawal_reason: 'The columns were shifted.',
      recall: { id: table.recallId, decided: false },
      newer: 2,
    });
    expect(held.criteria).toMatchObject({ state: 'withdrawn', recall: { id: criteria.recall } });
    const moved = await ask('PUT', '/api/v1/jobs/OPEN/members/CR1', {
      token: tokens.engineer,
      json: {
        parameters: held.parameters,
        section: { designation: 'IPE 300', table: 'european-i', material: 's355' },
        criteria: null,
        section_edition: 2,
      },
      headers: { 'if-match': '"1"' },
    });
    expect(moved.json.section).toMatchObject({ edition: 2, state: 'issued', recall: null });
    for (const id of [table.recallId, criteria.recall])
      expect((await recall(id)).json.items[0].decision).toBe('upgraded');
  });
});

describe('a recall', () => {
  async function opened(marks: readonly string[]) {
    const { slug } = await issued(2);
    for (const mark of marks) await place('engineer', 'OPEN', mark, slug);
    return slug;
  }

  test('closes when each use has a decision by name, and not before', async () => {
    const slug = await opened(['D1', 'D2']);
    const { json: step } = await withdraw('librarian', slug, 2);
    const { json } = await recall(step.recall, 'engineer');
    expect(json.mine).toBe(2);
    const early = await close('librarian', step.recall);
    expect([early.status, early.json.detail]).toEqual([
      409,
      '2 uses have no decision yet. A recall closes when each has one.',
    ]);
    const note = 'The beam carries a tenth of its load.';
    const decided = await decide('engineer', step.recall, useOf(json, 'D1'), {
      decision: 'unaffected',
      note,
    });
    expect(decided.json.use).toMatchObject({
      decision: 'unaffected',
      note,
      decided_by: 'Person 2',
      pinned: true,
    });
    await decide('principal', step.recall, useOf(json, 'D2'), {
      decision: 'accepted',
      note: 'Built and tested.',
    });
    expect((await close('engineer', step.recall)).status).toBe(403);
    const closed = await close('principal', step.recall);
    expect([closed.status, closed.json.closed_by, closed.json.decided]).toEqual([200, 'Person 4', 2]);
    expect(
      (await decide('engineer', step.recall, useOf(json, 'D1'), { decision: 'not_used', note })).status,
    ).toBe(409);
    expect((await close('principal', step.recall)).status).toBe(409);
    const events =
      await owner.sql`select action from audit_event where subject_id = ${step.recall} order by sequence`;
    expect(events.map(({ action }) => action)).toEqual([
      'recall.open',
      'recall.decide',
      'recall.decide',
      'recall.close',
    ]);
  });

  test('wants a reason for what stays as it is, and takes no member off that still uses it', async () => {
    const slug = await opened(['E1']);
    const { json: step } = await withdraw('librarian', slug, 2);
    const use = useOf((await recall(step.recall)).json, 'E1');
    expect(faults(await decide('engineer', step.recall, use, { decision: 'accepted' }))).toEqual([
      '/note required',
    ]);
    expect(faults(await decide('engineer', step.recall, use, { decision: 'upgraded' }))).toEqual([
      '/decision still_used',
    ]);
    expect(faults(await decide('engineer', step.recall, use, { decision: 'ignored' }))).toEqual([
      '/decision not_allowed',
    ]);
  });

  test('is decided by who has access to the job, and by no librarian, checker or reader', async () => {
    const { slug } = await issued();
    await place('colleague', 'NAMED', 'F1', slug);
    const { json: step } = await withdraw('librarian', slug);
    const use = useOf((await recall(step.recall)).json, 'F1');
    const given = { decision: 'not_used', note: 'Never built.' };
    expect((await decide('engineer', step.recall, use, given)).status).toBe(404);
    expect((await decide('librarian', step.recall, use, given)).status).toBe(404);
    expect((await decide('colleague', step.recall, use, given)).status).toBe(200);
  });

  test('is decided by the upgrade of the member, to an issued revision of its template alone', async () => {
    const { slug } = await issued();
    await place('engineer', 'OPEN', 'G1', slug);
    const { json: step } = await withdraw('librarian', slug);
    const change = { slug, reference: `Beam ${count}`, summary: 'Put right.' };
    await issueTemplate({ author: people.librarian, reviewer: people.checker }, SPAN, { change, slug });
    const before = await member('engineer', 'OPEN', 'G1');
    expect(before.json.template).toMatchObject({
      revision: 1,
      state: 'withdrawn',
      newer: 2,
      recall: { id: step.recall, decided: false, closed: false },
    });
    const list = await ask('GET', '/api/v1/jobs/OPEN/members?limit=200', { token: tokens.engineer });
    const listed = list.json.items.find(({ mark }: { mark: string }) => mark === 'G1');
    expect([listed.recalled, listed.template.state]).toEqual([true, 'withdrawn']);
    const save = (json: object, version = 1) =>
      ask('PUT', '/api/v1/jobs/OPEN/members/G1', {
        token: tokens.engineer,
        json: { parameters: before.json.parameters, ...json },
        headers: { 'if-match': `"${version}"` },
      });
    expect(faults(await save({ template_revision: 3 }))).toEqual(['/template_revision unknown_revision']);
    const tried = await ask('POST', '/api/v1/jobs/OPEN/members/G1/evaluate', {
      token: tokens.engineer,
      json: { template_revision: 2 },
    });
    expect(tried.status).toBe(200);
    const upgraded = await save({ template_revision: 2 });
    expect(upgraded.json.template).toMatchObject({ revision: 2, state: 'issued', recall: null });
    expect(upgraded.json.fingerprint).toBe(tried.json.fingerprint);
    const { json } = await recall(step.recall);
    expect(json.items[0]).toMatchObject({ pinned: false, decision: 'upgraded', decided_by: 'Person 2' });
    expect(faults(await save({ template_revision: 1 }, 2))).toEqual(['/template_revision withdrawn']);
    expect((await close('librarian', step.recall)).status).toBe(200);
  });

  test('is listed while it is open, and to its owners as theirs', async () => {
    const slug = await opened(['H1']);
    const { json: step } = await withdraw('librarian', slug, 2);
    const ids = async (query: string, by: Name) =>
      (await ask('GET', `/api/v1/recalls?limit=200${query}`, { token: tokens[by] })).json.items.map(
        ({ id }: { id: string }) => id,
      );
    expect(await ids('', 'reader')).toContain(step.recall);
    expect(await ids('&mine=true', 'engineer')).toContain(step.recall);
    expect(await ids('&mine=true', 'colleague')).not.toContain(step.recall);
    expect(await ids('&state=closed', 'reader')).not.toContain(step.recall);
  });

  test('gives its uses in pages, the reader’s own first', async () => {
    const slug = await opened(['P1', 'P2', 'P3']);
    await place('colleague', 'OPEN', 'P0', slug);
    const { json: step } = await withdraw('librarian', slug, 2);
    const page = (query: string, by: Name = 'engineer') =>
      ask('GET', `/api/v1/recalls/${step.recall}?limit=2${query}`, { token: tokens[by] });
    const first = (await page('')).json;
    const second = (await page(`&cursor=${first.next}`)).json;
    const marks = [...first.items, ...second.items].map(({ mark }: { mark: string }) => mark);
    expect([first.items.length, first.uses, second.next]).toEqual([2, 4, null]);
    expect(marks).toEqual(['P1', 'P2', 'P3', 'P0']);
    expect(faults(await page('&cursor=none'))).toEqual(['/cursor not_allowed']);
  });

  test('is listed in pages, the newest first', async () => {
    const newest: string[] = [];
    for (const mark of ['PL1', 'PL2']) {
      const { json } = await withdraw('librarian', await opened([mark]), 2);
      newest.unshift(json.recall);
    }
    const page = (query: string) => ask('GET', `/api/v1/recalls?limit=1${query}`, { token: tokens.reader });
    const first = (await page('')).json;
    const second = (await page(`&cursor=${first.next}`)).json;
    expect([first.items[0].id, second.items[0].id]).toEqual(newest);
    expect(first.total).toBeGreaterThanOrEqual(2);
  });

  test('of a superseded revision finds who stayed on it', async () => {
    const { slug, ids } = await issued();
    await place('engineer', 'OPEN', 'I1', slug);
    const change = { slug, reference: `Beam ${count}`, summary: 'The next.' };
    await issueTemplate({ author: people.librarian, reviewer: people.checker }, SPAN, { change, slug });
    await place('engineer', 'OPEN', 'I2', slug);
    const moved = await takeStep(people.librarian, ids[0] ?? '', {
      step: 'withdraw',
      reason: REASON,
      severity: 'service',
    });
    const { json } = await recall(moved.recallId ?? '');
    expect(json.items.map(({ mark }: { mark: string }) => mark)).toEqual(['I1']);
  });
});

test('a recall of the parent flags what was made from it, and its members, however far down', async () => {
  const { slug } = await issued();
  const derive = async (from: string, to: string) => {
    const made = await ask('POST', `/api/v1/templates/${to}/drafts`, {
      token: tokens.librarian,
      json: {
        from: { slug: from, revision: 1 },
        change_note: 'Own.',
        change_class: 'improvement',
        consequence: 'service',
      },
    });
    const url = `/api/v1/templates/${to}/revisions/1`;
    await ask('POST', `${url}/submit`, { token: tokens.librarian, json: {} });
    const [row] = await owner.sql`select r.id from revision r join document d on d.id = r.document_id
      where d.slug = ${to} and d.practice_id = ${people.librarian.practiceId}`;
    await proveRevision(people.checker, row?.['id']);
    await ask('POST', `${url}/issue`, { token: tokens.checker, json: {} });
    return made;
  };
  await derive(slug, 'child-span');
  await derive('child-span', 'grandchild-span');
  await place('engineer', 'OPEN', 'K1', 'grandchild-span');
  await withdraw('principal', slug);
  const read = (name: string) => ask('GET', `/api/v1/library/template/${name}`, { token: tokens.reader });
  expect((await read(slug)).json.derived.map((one: { slug: string }) => one.slug).sort()).toEqual([
    'child-span',
    'grandchild-span',
  ]);
  for (const name of ['child-span', 'grandchild-span'])
    expect((await read(name)).json.withdrawn_ancestor).toMatchObject({ slug, revision: 1, reason: REASON });
  expect((await member('engineer', 'OPEN', 'K1')).json.template.withdrawn_ancestor).toEqual({
    reference: `Beam ${count}`,
    revision: 1,
    reason: REASON,
  });
  const notices = await told(people.librarian, 'withdrawn');
  expect(notices.map(({ href }) => href)).toEqual(
    expect.arrayContaining(['/library/template/child-span', '/library/template/grandchild-span']),
  );
});

test('an owner who has left is told nothing, and somebody else decides', async () => {
  const [librarian, checker, leaver, stayer] = await foundPractice(
    ['librarian'],
    ['checker'],
    ['engineer'],
    ['engineer'],
  );
  const { revisionId } = await issueTemplate({ author: librarian, reviewer: checker }, SPAN);
  const by = async (who: Member) => createApiToken(who.email);
  await ask('POST', '/api/v1/jobs', { token: await by(leaver), json: { number: 'L1', name: 'Barn' } });
  await ask('POST', '/api/v1/jobs/L1/members', {
    token: await by(leaver),
    json: { mark: 'B1', template: SPAN },
  });
  await letGo(leaver);
  const { recallId } = await takeStep(librarian, revisionId, {
    step: 'withdraw',
    reason: REASON,
    severity: 'safety',
  });
  expect(await told(leaver, 'recall')).toHaveLength(0);
  const token = await by(stayer);
  const { json } = await ask('GET', `/api/v1/recalls/${recallId}`, { token });
  const decided = await ask('PUT', `/api/v1/recalls/${recallId}/uses/${useOf(json, 'B1')}`, {
    token,
    json: { decision: 'not_used', note: 'The barn was never built.' },
  });
  expect(decided.json.use.decided_by).toBe('Person 3');
});
