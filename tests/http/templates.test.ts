import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { takeStep } from '@/features/review/review.server';
import { templateView } from '@/features/template/item';
import { evaluateAnswer } from '@/features/template/request';
import { ask } from '../support/app';
import { draftTemplate, issueSections, issueTemplate } from '../support/library';
import { foundPractice, type Member } from '../support/practice';

const CANOPY = 'propped-cantilever-overhang-uniform';
const SPAN = 'simple-span-uniform';

let librarian: Member;
let token: string;
let reader: string;
let stranger: string;

beforeAll(async () => {
  const [author, reviewer, guest] = await foundPractice(['librarian', 'engineer'], ['checker'], ['reader']);
  const [other] = await foundPractice(['principal']);
  librarian = author;
  const pair = { author, reviewer };
  await issueTemplate(pair, CANOPY);
  await issueTemplate(pair, SPAN);
  await issueTemplate(pair, SPAN, { change: { summary: 'Said better.' }, note: 'Clearer summary.' });
  await draftTemplate(author, 'cantilever-uniform');
  const recalled = await issueTemplate(pair, 'two-equal-spans-uniform');
  await takeStep(author, recalled.revisionId, {
    step: 'withdraw',
    reason: 'A coefficient was wrong.',
    severity: 'safety',
  });
  await issueSections(pair, 'european-i');
  token = await createApiToken(author.email);
  reader = await createApiToken(guest.email);
  stranger = await createApiToken(other.email);
});

const get = (path: string, as = token) => ask('GET', `/api/v1/templates${path}`, { token: as });
const evaluate = (slug: string, json: unknown, as = token) =>
  ask('POST', `/api/v1/templates/${slug}/evaluate`, { token: as, json });
const slugsOf = async (query: string) =>
  (await get(query)).json.items.map(({ slug }: { slug: string }) => slug);
const faultsOf = async (json: unknown, slug = CANOPY) => {
  const { status, json: problem } = await evaluate(slug, json);
  return [
    status,
    ...problem.errors.map((fault: { pointer: string; code: string }) => `${fault.pointer} ${fault.code}`),
  ];
};

describe('the list', () => {
  test('has each template once, by its issued revision or else the newest', async () => {
    const { status, json } = await get('');
    expect([status, json.total, json.next]).toEqual([200, 4, null]);
    const bySlug = new Map(json.items.map((item: { slug: string }) => [item.slug, item]));
    expect(bySlug.get(SPAN)).toMatchObject({
      revision: 2,
      status: 'issued',
      summary: 'Said better.',
      author: 'Person 0',
      reviewer: 'Person 1',
      uses: { members: 0, jobs: 0 },
    });
    expect(bySlug.get('cantilever-uniform')).toMatchObject({ status: 'draft', revision: 1 });
    expect(bySlug.get('two-equal-spans-uniform')).toMatchObject({ status: 'withdrawn' });
  });

  test('is found with a slip of the keyboard and without one', async () => {
    expect(await slugsOf('?q=cantilver%20overhng')).toEqual([CANOPY]);
    expect(await slugsOf('?q=simple%20span')).toEqual([SPAN]);
    expect(await slugsOf('?q=portal%20frame')).toEqual([]);
  });

  test('is narrowed by arrangement, tag and status', async () => {
    expect(await slugsOf('?arrangement=propped-cantilever')).toEqual([CANOPY]);
    expect(await slugsOf('?tag=canopy&status=issued')).toEqual([CANOPY]);
    expect(await slugsOf('?status=draft')).toEqual(['cantilever-uniform']);
  });

  test('is walked by its cursor, each template once', async () => {
    const seen: string[] = [];
    let cursor = '';
    do {
      const { json } = await get(`?limit=1${cursor}`);
      seen.push(json.items[0].slug);
      cursor = json.next === null ? '' : `&cursor=${json.next}`;
    } while (cursor);
    expect([...seen].sort()).toEqual((await slugsOf('')).sort());
  });

  test.each(['?status=good', '?arrangement=arch', '?limit=0', '?cursor=x', '?tags=a'])(
    '%s is 422',
    async (query) => {
      expect((await get(query)).status).toBe(422);
    },
  );

  test('of another practice is empty', async () => {
    expect((await get('', stranger)).json).toEqual({ items: [], next: null, total: 0 });
  });
});

describe('a template', () => {
  test('is read whole, with its history', async () => {
    const { status, headers, json } = await get(`/${SPAN}`, reader);
    expect(status).toBe(200);
    expect(headers.get('etag')).toMatch(/^"[0-9a-f]{64}"$/);
    expect(
      templateView
        .parse(json)
        .revisions.map(({ number, status, change_note }) => [number, status, change_note]),
    ).toEqual([
      [2, 'issued', 'Clearer summary.'],
      [1, 'superseded', 'First issue.'],
    ]);
  });

  test('keeps every revision', async () => {
    const { json } = await get(`/${SPAN}/revisions/1`);
    expect([json.revision, json.status]).toEqual([1, 'superseded']);
    expect(json.document.summary).not.toBe('Said better.');
  });

  test('that is unknown, of no such revision, or of another practice is 404', async () => {
    for (const path of ['/no-such', `/${SPAN}/revisions/3`, `/${SPAN}/revisions/0`, `/${SPAN}/revisions/one`])
      expect((await get(path)).status).toBe(404);
    for (const path of [`/${SPAN}`, `/${SPAN}/revisions/1`])
      expect((await get(path, stranger)).status).toBe(404);
    expect((await evaluate(SPAN, { parameters: {} }, stranger)).status).toBe(404);
    expect((await evaluate('no-such', { parameters: {} })).status).toBe(404);
  });

  test('needs a sign-in', async () => {
    for (const path of ['', `/${SPAN}`, `/${SPAN}/revisions/1`])
      expect((await ask('GET', `/api/v1/templates${path}`)).status).toBe(401);
    expect(
      (await ask('POST', `/api/v1/templates/${SPAN}/evaluate`, { json: { parameters: {} } })).status,
    ).toBe(401);
  });
});

describe('evaluating', () => {
  // R_prop = 3wL/8 + wa + 3wa²/4L: statics of the propped cantilever with the couple wa²/2 at its prop, which carries over half.
  const pairs = [
    [2.4, 0.3],
    [3.6, 1.2],
    [4.5, 0],
    [5, 4.5],
    [6, 1.8],
    [7.2, 2.527],
    [8.1, 0.9],
    [9.75, 6.5],
    [12, 3.333],
    [18.3, 7.1],
  ] as const;

  test.each(pairs)('a span of %f m with an overhang of %f m gives the prop’s reaction', async (L, a) => {
    const w = 12_500;
    const { status, json } = await evaluate(CANOPY, {
      parameters: { L: `${L} m`, a: `${a} m`, w: '12.5 kN/m' },
    });
    expect(status).toBe(200);
    const expected = (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L);
    expect(Math.abs(json.result.reactions[1].vertical - expected)).toBeLessThanOrEqual(1e-9 * expected);
    const solved = await ask('POST', '/api/v1/beams/solve', { token, json: json.beam });
    expect(solved.json).toEqual(json.result);
  });

  test('answers by the contract, with the derivation and the rules', async () => {
    const { json } = await evaluate(
      CANOPY,
      { parameters: { L: '7.2 m', a: '1.8 m', w: '12.5 kN/m' } },
      reader,
    );
    const answer = evaluateAnswer.parse(json);
    expect([answer.template, answer.revision]).toEqual([CANOPY, 1]);
    expect(answer.derivation.length).toBeGreaterThan(2);
    expect(answer.rules.find(({ rule }) => rule === 'overhang-length')).toMatchObject({
      ok: true,
      severity: 'block',
    });
    expect(answer.beam).toMatchObject({ length: 9, ei: 9_963_000 });
  });

  test('takes an older revision, EI, redundants of one’s own and a section with its own weight', async () => {
    expect((await evaluate(SPAN, { revision: 1, parameters: {} })).json.revision).toBe(1);
    expect((await evaluate(SPAN, { parameters: {}, ei: '20 000 kNm2' })).json.beam.ei).toBe(2e7);
    const redundants = [{ support: 0, component: 'rotation' }];
    const { json } = await evaluate(CANOPY, { parameters: {}, redundants });
    expect(json.result.force_method.redundants).toEqual(redundants);
    const section = { designation: 'ipe 300', material: 's355' };
    const made = await evaluate(SPAN, { parameters: {}, section, self_weight: true });
    expect(made.status).toBe(200);
    // IPE 300: I = 8356 cm4, 42.2 kg/m, European section tables (from memory); E = 210 GPa.
    expect(made.json.beam.ei / 210e9 / 8356e-8).toBeCloseTo(1, 2);
    expect(made.json.beam.loads.at(-1).w0 / 9.806_65).toBeCloseTo(42.2, 0);
  });

  test.each<[unknown, (number | string)[]]>([
    [{ parameters: { L: 0 } }, [422, '/parameters/L out_of_range']],
    [{ parameters: { L: '7,2,3 m' } }, [422, '/parameters/L not_a_number']],
    [{ parameters: { w: '12.5' } }, [422, '/parameters/w unit_missing']],
    [
      { parameters: { L: '1,234 m' }, ei: '-1 kNm2' },
      [422, '/parameters/L ambiguous_number', '/ei not_positive'],
    ],
    [{ parameters: { span: '7 m' } }, [422, '/parameters/span unknown_parameter']],
    [{ parameters: { L: '4 m', a: '3.8 m' } }, [422, '/parameters/a rule_broken']],
    [
      { parameters: {}, redundants: [{ support: 1, component: 'rotation' }] },
      [422, '/redundants/0 ineligible_redundant'],
    ],
    [{ parameters: {}, section: { designation: 'IPE 300' } }, [422, '/section/material missing']],
    [
      { parameters: {}, section: { designation: 'IPE 301', material: 's355' } },
      [422, '/section/designation unknown_section'],
    ],
    [
      { parameters: {}, section: { designation: 'IPE 300', material: 'iron' } },
      [422, '/section/material unknown_material'],
    ],
    [{ parameters: {}, self_weight: true }, [422, '/self_weight conflict']],
    [{ parameters: {}, stations: 5 }, [422, '/stations unknown_field']],
    [{}, [422, '/parameters missing']],
  ])('%j is refused at its place', async (body, faults) => {
    expect(await faultsOf(body)).toEqual(faults);
  });

  test('a draft can be tried by those who read the library', async () => {
    expect(librarian.roles).toContain('librarian');
    expect((await evaluate('cantilever-uniform', { parameters: {} })).status).toBe(200);
  });
});
