import { beforeAll, describe, expect, test } from 'vitest';
import { withPractice } from '@/db/tenancy';
import { createApiToken } from '@/features/account/token.server';
import { verifyChain } from '@/features/audit/audit.server';
import { findRevision } from '@/features/review/library.server';
import { createDraft, takeStep } from '@/features/review/review.server';
import { ask } from '../support/app';
import { proveRevision } from '../support/library';
import { foundPractice } from '../support/practice';
import { foundStockedPractice } from '../support/stocked';

type Stocked = Awaited<ReturnType<typeof foundStockedPractice>>;
let practice: Stocked;
let token: string;
let colleague: string;
let reader: string;
let stranger: string;

const IPE = { designation: 'ipe 300', table: 'european-i', material: 's355' };
const CANOPY = {
  mark: 'LF4',
  title: 'Hall canopy',
  template: 'propped-cantilever-overhang-uniform',
  parameters: { L: '6 m', a: '1.8 m', w: { G: '5.52 kN/m', S: '3.6 kN/m' } },
  section: IPE,
  criteria: 'steel-elastic-en',
};

beforeAll(async () => {
  practice = await foundStockedPractice();
  const [outside] = await foundPractice(['engineer']);
  token = await createApiToken(practice.engineer.email);
  colleague = await createApiToken(practice.colleague.email);
  reader = await createApiToken(practice.reader.email);
  stranger = await createApiToken(outside.email);
  await ask('POST', '/api/v1/jobs', { token, json: { number: 'J1', name: 'School hall' } });
}, 120_000);

const create = (json: unknown, by = token) => ask('POST', '/api/v1/jobs/J1/members', { token: by, json });
const at = (mark: string) => `/api/v1/jobs/J1/members/${mark}`;
const put = (mark: string, version: string | null, json: unknown, by = token) =>
  ask('PUT', at(mark), { token: by, json, headers: version === null ? {} : { 'if-match': version } });
const faultsOf = ({ json }: { json: { errors: { pointer: string; code: string }[] } }) =>
  json.errors.map(({ pointer, code }) => `${pointer} ${code}`);
const { mark: _mark, template: _template, ...SAVED } = CANOPY;

describe('a member', () => {
  test('is placed, evaluated, proven and read back as it was typed', async () => {
    const made = await create(CANOPY);
    expect([made.status, made.headers.get('etag'), made.headers.get('location')]).toEqual([
      201,
      '"1"',
      at('LF4'),
    ]);
    expect(made.json).toMatchObject({
      parameters: CANOPY.parameters,
      template: { slug: CANOPY.template, revision: 1, state: 'issued', newer: null },
      section: { designation: 'IPE 300', table: 'european-i', edition: 1, material: 's355' },
      criteria: { slug: 'steel-elastic-en', revision: 1 },
      self_weight: true,
      result: { kind: 'result', proof: { proven: true } },
    });
    expect(made.json.fingerprint).toMatch(/^[0-9a-f]{64}$/);
    const read = await ask('GET', at('LF4'), { token: reader });
    expect([read.status, read.headers.get('etag'), read.json]).toEqual([200, '"1"', made.json]);
    const { json } = await ask('GET', '/api/v1/jobs/J1/members', { token: reader });
    expect(json.items[0]).toMatchObject({
      mark: 'LF4',
      section: 'IPE 300',
      governing: { ratio: made.json.result.checks.rows[0].ratio },
    });
  });

  test('has the reactions of the template’s endpoint at the same inputs, and of the closed form', async () => {
    const made = await create({
      ...CANOPY,
      mark: 'EQ1',
      self_weight: false,
      self_weight_reason: 'Compared with the closed form',
    });
    const [L, a, w] = [6, 1.8, 9120];
    const prop = (3 * w * L) / 8 + w * a + (3 * w * a ** 2) / (4 * L);
    const reactions: { vertical: number; moment: number }[] = made.json.result.total.reactions;
    expect(Math.abs((reactions[1]?.vertical ?? 0) / prop - 1)).toBeLessThan(1e-9);
    const evaluated = await ask('POST', `/api/v1/templates/${CANOPY.template}/evaluate`, {
      token,
      json: { parameters: CANOPY.parameters, section: IPE },
    });
    expect(evaluated.json.result.reactions).toEqual(reactions);
  });

  test('of the groups: their reactions add up to those of all loads', async () => {
    const { json } = await ask('GET', at('LF4'), { token });
    const { groups, total } = json.result;
    expect(groups.map(({ group }: { group: string }) => group)).toEqual(['G', 'S']);
    for (const [index, { vertical }] of total.reactions.entries()) {
      const sum = groups.reduce(
        (all: number, { solution }: { solution: { reactions: { vertical: number }[] } }) =>
          all + (solution.reactions[index]?.vertical ?? 0),
        0,
      );
      expect(Math.abs(sum - vertical)).toBeLessThan(1e-9 * 1e5);
    }
  });

  test('is not placed by a reader, and not found from another practice', async () => {
    expect((await create({ ...CANOPY, mark: 'X1' }, reader)).status).toBe(403);
    expect((await create({ ...CANOPY, mark: 'X1' }, stranger)).status).toBe(404);
    expect((await ask('GET', at('LF4'), { token: stranger })).status).toBe(404);
    expect((await put('LF4', '"1"', SAVED, reader)).status).toBe(403);
    expect((await ask('POST', `${at('LF4')}/evaluate`, { token: stranger, json: {} })).status).toBe(404);
  });

  test('takes what it is not told from the template', async () => {
    const { json } = await create({ mark: 'D1', template: 'simple-span-uniform' });
    expect([json.parameters, json.result.checks, json.section]).toEqual([
      { L: '6 m', w: '10 kN/m' },
      null,
      null,
    ]);
  });
});

describe('refused inputs are named by their place', () => {
  const bad = async (change: object) => {
    const answer = await create({ ...CANOPY, mark: 'BAD', ...change });
    return [answer.status, ...faultsOf(answer)];
  };
  const withParameters = (change: object) => bad({ parameters: { ...CANOPY.parameters, ...change } });

  test('span 0', async () => {
    expect(await withParameters({ L: '0 m' })).toEqual([422, '/parameters/L out_of_range']);
  });
  test('“7,2,3 m”', async () => {
    expect((await withParameters({ L: '7,2,3 m' }))[0]).toBe(422);
    expect(String((await withParameters({ L: '7,2,3 m' }))[1])).toMatch(/^\/parameters\/L /);
  });
  test('“12.5” without a unit, in a group', async () => {
    expect(await withParameters({ w: { G: '12.5' } })).toEqual([422, '/parameters/w/G unit_missing']);
  });
  test('every fault at once', async () => {
    expect(await withParameters({ L: '0 m', w: '12.5', q: '3 m' })).toEqual([
      422,
      '/parameters/q unknown_parameter',
      '/parameters/L out_of_range',
      '/parameters/w unit_missing',
    ]);
  });
  test('an unknown template, section, material or set of criteria', async () => {
    expect(await bad({ template: 'no-such' })).toEqual([422, '/template unknown_template']);
    expect(await bad({ section: { ...IPE, designation: 'IPE 301' } })).toEqual([
      422,
      '/section/designation unknown_section',
    ]);
    expect(await bad({ section: { ...IPE, material: 'wood' } })).toEqual([
      422,
      '/section/material unknown_material',
    ]);
    expect(await bad({ criteria: 'none' })).toEqual([422, '/criteria unknown_criteria']);
  });
  test('own weight left out without a reason', async () => {
    expect(await bad({ self_weight: false })).toEqual([422, '/self_weight_reason required']);
  });
  test('redundants that leave a mechanism', async () => {
    const answer = await create({
      ...CANOPY,
      mark: 'BAD',
      redundants: [
        { support: 0, component: 'vertical' },
        { support: 1, component: 'vertical' },
      ],
    });
    expect(answer.status).toBe(422);
    expect(answer.json.errors[0].pointer).toMatch(/^\/redundants/);
  });
});

describe('saving', () => {
  test('needs the version that was read: 428 without, 412 with what stands there now', async () => {
    await create({ ...CANOPY, mark: 'S1' });
    expect((await put('S1', null, SAVED)).status).toBe(428);
    const saved = await put('S1', '"1"', { ...SAVED, title: 'Mine' });
    expect([saved.status, saved.headers.get('etag'), saved.json.version]).toEqual([200, '"2"', 2]);
    const stale = await put('S1', '"1"', { ...SAVED, title: 'Theirs' }, colleague);
    expect([stale.status, stale.json.current.title, stale.json.current.version]).toEqual([412, 'Mine', 2]);
  });

  test('of two at once, one is saved and the other is told', async () => {
    await create({ ...CANOPY, mark: 'S2' });
    const both = await Promise.all([
      put('S2', '"1"', { ...SAVED, title: 'One' }),
      put('S2', '"1"', { ...SAVED, title: 'Two' }, colleague),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 412]);
    const [won, lost] = both[0].status === 200 ? both : [both[1], both[0]];
    expect(lost.json.current.title).toBe(won.json.title);
  });

  test('the same inputs give the same fingerprint, and other inputs another', async () => {
    const { json: first } = await create({ ...CANOPY, mark: 'S3' });
    const { json: same } = await put('S3', '"1"', { ...SAVED, title: 'Renamed' });
    const { json: longer } = await put('S3', '"2"', {
      ...SAVED,
      parameters: { ...SAVED.parameters, L: '6.3 m' },
    });
    expect(same.fingerprint).toBe(first.fingerprint);
    expect(longer.fingerprint).not.toBe(first.fingerprint);
  });

  test('needs a section and criteria before a member is ready for check', async () => {
    await create({ ...CANOPY, mark: 'S4' });
    expect(faultsOf(await put('S4', '"1"', { ...SAVED, criteria: null, status: 'ready' }))).toEqual([
      '/status not_ready',
    ]);
    expect((await put('S4', '"1"', { ...SAVED, status: 'ready' })).json.status).toBe('ready');
  });

  test('removes a member with a reason, and its mark is never used again', async () => {
    await create({ ...CANOPY, mark: 'S5' });
    expect(faultsOf(await put('S5', '"1"', { ...SAVED, status: 'removed' }))).toEqual(['/reason required']);
    const removed = await put('S5', '"1"', { ...SAVED, status: 'removed', reason: 'The stair moved' });
    expect([removed.json.status, removed.json.reason]).toEqual(['removed', 'The stair moved']);
    const again = await create({ ...CANOPY, mark: 'S5' });
    expect([again.status, ...faultsOf(again)]).toEqual([422, '/mark duplicate']);
    expect(again.json.detail).toContain('never used again');
  });

  test('is recorded with what was there before, in a chain that is whole', async () => {
    expect((await verifyChain(practice.engineer.practiceId)).fault).toBeNull();
  });
});

describe('trying', () => {
  test('evaluates other values and saves nothing', async () => {
    const { json: before } = await create({ ...CANOPY, mark: 'T1' });
    const tried = await ask('POST', `${at('T1')}/evaluate`, {
      token: reader,
      json: { parameters: { L: '5 m' } },
    });
    expect([tried.status, tried.json.result.beam.length]).toEqual([200, 6.8]);
    const same = await ask('POST', `${at('T1')}/evaluate`, { token: reader, json: {} });
    expect(same.json.fingerprint).toBe(before.fingerprint);
    expect((await ask('GET', at('T1'), { token })).json.version).toBe(1);
  });
});

test('a member keeps its pins when newer revisions are issued, and says so', async () => {
  await create({ ...CANOPY, mark: 'P1' });
  const { librarian, checker } = practice;
  const slug = 'propped-cantilever-overhang-uniform';
  const issued = await withPractice(librarian, (tx) =>
    findRevision(tx, librarian.practiceId, { kind: 'template', slug }),
  );
  if (!issued) throw new Error('The library is stocked');
  const { kind, reference, name, body } = { kind: 'template' as const, ...issued };
  const draft = await withPractice(librarian, (tx) =>
    createDraft(tx, librarian, {
      kind,
      slug,
      reference,
      name,
      body,
      schemaVersion: 1,
      changeNote: 'Clearer help.',
      changeClass: 'wording',
      consequence: 'cosmetic',
    }),
  );
  await takeStep(librarian, draft.revisionId, { step: 'submit' });
  await proveRevision(checker, draft.revisionId);
  await takeStep(checker, draft.revisionId, { step: 'issue' });

  const { json } = await ask('GET', at('P1'), { token });
  expect(json.template).toMatchObject({
    revision: 1,
    state: 'superseded',
    newer: 2,
    newer_note: 'Clearer help.',
  });
  const saved = await put('P1', '"1"', { ...SAVED, title: 'Still on revision 1' });
  expect([saved.status, saved.json.template.revision]).toEqual([200, 1]);
  expect((await create({ ...CANOPY, mark: 'P2' })).json.template.revision).toBe(2);

  await takeStep(librarian, draft.revisionId, {
    step: 'withdraw',
    reason: 'Sign of the tip term',
    severity: 'safety',
  });
  expect(faultsOf(await create({ ...CANOPY, mark: 'P3' }))).toEqual(['/template not_issued']);
  expect((await ask('GET', at('P2'), { token })).json.template).toMatchObject({
    state: 'withdrawn',
    withdrawal_reason: 'Sign of the tip term',
  });
});
