import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { verifyChain } from '@/features/audit/audit.server';
import { type Answer, ask } from '../support/app';
import { issueCombinations, issueTemplate, type Pair, proveRevision } from '../support/library';
import { foundPractice, type Member, owner } from '../support/practice';
import { writtenTemplates } from '../support/templates';

const SPAN = 'simple-span-uniform';
const CANOPY = 'propped-cantilever-overhang-uniform';
const written = (slug: string) => writtenTemplates.get(slug) as Record<string, unknown>;
const CHANGE = { change_note: 'First issue.', change_class: 'improvement', consequence: 'safety' };

let librarian: Member;
let pair: Pair;
let tokens: Record<'librarian' | 'other' | 'engineer' | 'checker' | 'reader' | 'stranger', string>;

beforeAll(async () => {
  const [author, other, engineer, checker, reader] = await foundPractice(
    ['librarian'],
    ['librarian'],
    ['engineer'],
    ['checker'],
    ['reader'],
  );
  const [stranger] = await foundPractice(['librarian']);
  librarian = author;
  pair = { author, reviewer: checker };
  await issueTemplate(pair, SPAN);
  tokens = {
    librarian: await createApiToken(author.email),
    other: await createApiToken(other.email),
    engineer: await createApiToken(engineer.email),
    checker: await createApiToken(checker.email),
    reader: await createApiToken(reader.email),
    stranger: await createApiToken(stranger.email),
  };
});

type By = keyof typeof tokens;
const at = (slug: string, rest = '') => `/api/v1/templates/${slug}/drafts${rest}`;
const begin = (slug: string, json: unknown = {}, by: By = 'librarian') =>
  ask('POST', at(slug), { token: tokens[by], json });
const read = (slug: string, number: number, by: By = 'librarian') =>
  ask('GET', at(slug, `/${number}`), { token: tokens[by] });
const save = (slug: string, number: number, version: number | null, json: object, by: By = 'librarian') =>
  ask('PUT', at(slug, `/${number}`), {
    token: tokens[by],
    json: { change_note: '', change_class: null, consequence: null, ...json },
    headers: version === null ? {} : { 'if-match': `"${version}"` },
  });
const step = (slug: string, number: number, name: string, by: By, json: unknown = {}) =>
  ask('POST', `/api/v1/templates/${slug}/revisions/${number}/${name}`, { token: tokens[by], json });
const faults = ({ json }: Answer): string[] =>
  (json.errors ?? json.faults).map(
    ({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`,
  );
/** A template of its own name, so that every test begins its own. */
const named = (slug: string, change: object = {}) => {
  const { reference: _, ...rest } = written(CANOPY);
  return { ...rest, slug, name: `Canopy of ${slug}`, ...change };
};

describe('a draft from nothing', () => {
  test('is begun empty, named by its address, with the next free reference and every missing part', async () => {
    const made = await begin('two-spans-tip-load');
    expect([made.status, made.headers.get('etag'), made.headers.get('location')]).toEqual([
      201,
      '"1"',
      '/api/v1/library/template/two-spans-tip-load/drafts/1',
    ]);
    expect(made.json).toMatchObject({
      revision: 1,
      state: 'draft',
      document: { slug: 'two-spans-tip-load', reference: 'Beam 1' },
      change_class: null,
      author: 'Person 0',
      derived_from: null,
    });
    expect(faults(made)).toEqual(
      expect.arrayContaining([
        '/name missing',
        '/parameters missing',
        '/beam missing',
        '/proof_cases missing',
      ]),
    );
    expect((await read('two-spans-tip-load', 1, 'reader')).json).toEqual(made.json);
  });

  test('takes its reference from its arrangement, after those that are there', async () => {
    const made = await begin('from-arrangement', { document: { arrangement: 'simple-span' } });
    expect(made.json.document.reference).toBe('Span 2');
  });

  test('is kept whatever it says, and out of the catalogue until it is whole', async () => {
    const document = { name: 'Half', beam: { supports: 'two' }, anything: [1, { deep: null }] };
    await begin('half', { document });
    const catalogue = () => ask('GET', '/api/v1/templates?status=draft', { token: tokens.reader });
    const slugs = async () => (await catalogue()).json.items.map(({ slug }: { slug: string }) => slug);
    expect(await slugs()).not.toContain('half');
    expect((await read('half', 1)).json.document).toMatchObject(document);
    expect((await ask('GET', '/api/v1/templates/half/revisions/1', { token: tokens.reader })).status).toBe(
      409,
    );
    expect(faults(await save('half', 1, 1, { document: named('half', { reference: 'Half 1' }) }))).toEqual(
      [],
    );
    expect(await slugs()).toContain('half');
    expect((await ask('GET', '/api/v1/templates/half', { token: tokens.reader })).json).toMatchObject({
      reference: 'Half 1',
      name: 'Canopy of half',
      status: 'draft',
    });
  });

  test('of a name that is taken, or that cannot be an address, is refused', async () => {
    const taken = await begin(SPAN, { document: written(SPAN) });
    expect([taken.status, taken.json.detail]).toEqual([
      409,
      'There is a template “simple-span-uniform” already. Begin from a revision of it, or choose another name.',
    ]);
    expect((await begin('Two%20spans')).status).toBe(422);
  });

  test('is begun by an engineer as a proposal, by no reader, checker or stranger', async () => {
    expect((await begin('proposal', {}, 'engineer')).status).toBe(201);
    expect((await begin('by-reader', {}, 'reader')).status).toBe(403);
    expect((await begin('by-checker', {}, 'checker')).status).toBe(403);
    expect((await read(SPAN, 1, 'stranger')).status).toBe(404);
  });
});

describe('a draft from what was issued', () => {
  test('is the next revision, as its author wrote it, one at a time', async () => {
    const made = await begin(SPAN, { from: 1 });
    expect([made.status, made.json.revision, faults(made)]).toEqual([201, 2, []]);
    expect(made.json.document).toEqual(written(SPAN));
    const second = await begin(SPAN, { from: 1 }, 'other');
    expect([second.status, second.json.detail]).toEqual([
      409,
      'Revision 2 of Span 1 is a draft by Person 0 already. Go on with that one.',
    ]);
  });

  test('of another document keeps where it came from', async () => {
    const made = await begin('own-span', { from: { slug: SPAN, revision: 1 } });
    expect([made.status, made.json.revision, made.json.derived_from]).toEqual([
      201,
      1,
      { slug: SPAN, name: written(SPAN)['name'], revision: 1, state: 'issued' },
    ]);
    expect(made.json.document.reference).toMatch(/^Span \d+$/);
    expect(made.json.document.reference).not.toBe('Span 1');
  });

  test('is not begun from what is missing or unfinished', async () => {
    expect((await begin(SPAN, { from: 9 })).status).toBe(404);
    expect((await begin('elsewhere', { from: { slug: 'two-spans-tip-load', revision: 1 } })).status).toBe(
      409,
    );
    expect(faults(await begin('both', { from: 1, document: {} }))).toEqual(['/from not_allowed']);
  });
});

describe('saving', () => {
  test('counts its version, keeps the whole text, and says what is wrong with each save', async () => {
    await begin('saved', { document: named('saved') });
    const good = await save('saved', 1, 1, { document: named('saved', { reference: 'Saved 1' }) });
    expect([good.status, good.headers.get('etag'), faults(good)]).toEqual([200, '"2"', []]);
    const beam = { ...Object(written(CANOPY)['beam']), length: 'L + w' };
    const bad = await save('saved', 1, 2, { document: named('saved', { beam }) });
    expect([bad.status, bad.json.document.beam.length, faults(bad)]).toEqual([
      200,
      'L + w',
      ['/reference missing', '/beam/length unsound'],
    ]);
    expect(bad.json.sha256).not.toBe(good.json.sha256);
  });

  test('text that no database keeps is refused at its place, and nothing is lost', async () => {
    await begin('nul', { document: { name: 'Beam' } });
    const at = async (document: object) => {
      const refused = await save('nul', 1, 1, { document });
      return [refused.status, ...faults(refused)];
    };
    expect(await at({ name: 'a\u0000b' })).toEqual([422, '/document/name bad_text']);
    expect(await at({ tags: ['fine', 'half \ud83d'] })).toEqual([422, '/document/tags/1 bad_text']);
    expect(await at({ '\u0000': 1 })).toEqual([422, '/document/\u0000 bad_text']);
    expect((await save('nul', 1, 1, { document: { name: 'whole 😀' } })).status).toBe(200);
  });

  test('over a version that somebody else saved is told what stands there now', async () => {
    await begin('merged', { document: named('merged') });
    await save('merged', 1, 1, { document: named('merged', { summary: 'Said by the other.' }) }, 'other');
    const late = await save('merged', 1, 1, { document: named('merged', { summary: 'Said by me.' }) });
    expect([late.status, late.json.current.version, late.json.current.document.summary]).toEqual([
      412,
      2,
      'Said by the other.',
    ]);
    expect(late.json.current.editors).toEqual(['Person 1']);
    expect((await save('merged', 1, null, { document: {} })).status).toBe(428);
  });

  test('at once by two: one is kept, the other told', async () => {
    await begin('raced', { document: named('raced') });
    const both = await Promise.all(
      (['librarian', 'other'] as const).map((by) => save('raced', 1, 1, { document: named('raced') }, by)),
    );
    expect(both.map(({ status }) => status).sort()).toEqual([200, 412]);
  });

  test('is for its author and the librarians', async () => {
    await begin('engineers-own', { document: {} }, 'engineer');
    expect((await save('engineers-own', 1, 1, { document: {} }, 'engineer')).status).toBe(200);
    expect((await save('engineers-own', 1, 2, { document: {} }, 'librarian')).status).toBe(200);
    await begin('librarians-own', { document: {} });
    expect((await save('librarians-own', 1, 1, { document: {} }, 'engineer')).status).toBe(403);
    expect((await save('librarians-own', 1, 1, { document: {} }, 'checker')).status).toBe(403);
  });

  test('warns of a reference that another document has', async () => {
    await begin('same-reference', { document: named('same-reference', { reference: 'Span 1' }) });
    expect(faults(await read('same-reference', 1))).toEqual(['/reference duplicate']);
    expect(faults(await step('same-reference', 1, 'submit', 'librarian'))).toContain(
      '/document/reference duplicate',
    );
  });

  test('of one who types is one event, of two who take turns one each', async () => {
    const { json } = await begin('typed', { document: {} });
    const by: By[] = ['librarian', 'librarian', 'librarian', 'other', 'other', 'librarian'];
    for (const [index, who] of by.entries()) await save('typed', 1, index + 1, { document: { index } }, who);
    const events =
      await owner.sql`select e.action, e.data from audit_event e join revision r on r.id::text = e.subject_id
      join document d on d.id = r.document_id where d.slug = 'typed' and d.practice_id = ${librarian.practiceId} order by e.sequence`;
    expect(events.map(({ action }) => action)).toEqual([
      'revision.draft',
      'revision.save',
      'revision.save',
      'revision.save',
    ]);
    expect(events[1]?.['data'].before).toEqual({ version: 1, sha256: json.sha256 });
    expect((await verifyChain(librarian.practiceId)).fault).toBeNull();
  });
});

test('a draft that is laid aside is out of the lists, and back when it is saved', async () => {
  await begin('aside', { document: named('aside', { reference: 'Aside 1' }) });
  const status = async () => (await ask('GET', '/api/v1/templates/aside', { token: tokens.reader })).status;
  expect(await status()).toBe(200);
  expect((await ask('DELETE', at('aside', '/1'), { token: tokens.engineer })).status).toBe(403);
  expect((await ask('DELETE', at('aside', '/1'), { token: tokens.librarian })).status).toBe(204);
  expect(await status()).toBe(404);
  expect((await read('aside', 1)).json.abandoned).toBe(true);
  const document = named('aside', { reference: 'Aside 1' });
  expect((await save('aside', 1, 1, { document })).json.abandoned).toBe(false);
  expect(await status()).toBe(200);
});

describe('on its way to issue', () => {
  const ready = async (slug: string, reference: string, by: By = 'librarian') => {
    const document = named(slug, { reference });
    await begin(slug, { document, ...CHANGE }, by);
    return document;
  };
  const prove = async (slug: string, passed = true) => {
    const { json } = await read(slug, 1);
    const [row] = await owner.sql`select r.id from revision r join document d on d.id = r.document_id
      where d.practice_id = ${librarian.practiceId} and d.slug = ${slug} and r.number = ${json.revision}`;
    await proveRevision(librarian, row?.['id'], passed);
  };

  const resolveAll = async (slug: string, by: By) => {
    const url = `/api/v1/library/template/${slug}/revisions/1/comments`;
    const { json } = await ask('GET', url, { token: tokens[by] });
    for (const { id } of json.items) await ask('PUT', `${url}/${id}/resolved`, { token: tokens[by] });
  };

  test('a draft that says too little or has faults is not sent to review, and every reason is named', async () => {
    await begin('unready');
    const refused = await step('unready', 1, 'submit', 'librarian');
    expect(refused.status).toBe(422);
    expect(faults(refused)).toEqual(
      expect.arrayContaining([
        '/change_note required',
        '/change_class required',
        '/consequence required',
        '/document/beam missing',
      ]),
    );
  });

  test('in review it is frozen; returned with what has to change, it is a draft again', async () => {
    const document = await ready('returned', 'Returned 1');
    expect((await step('returned', 1, 'submit', 'librarian')).json).toEqual({
      kind: 'template',
      slug: 'returned',
      revision: 1,
      state: 'in_review',
      recall: null,
    });
    const frozen = await save('returned', 1, 1, { document });
    expect([frozen.status, frozen.json.detail]).toEqual([
      409,
      'Revision 1 is in review and cannot be changed. Ask for it to be returned.',
    ]);
    expect(faults(await step('returned', 1, 'return', 'checker', { comment: ' ' }))).toEqual([
      '/comment out_of_range',
    ]);
    const comment = { comment: 'The prop is a roller, say so.', pointer: '/beam/supports/1' };
    expect((await step('returned', 1, 'return', 'checker', comment)).json.state).toBe('draft');
    const { json } = await ask('GET', '/api/v1/library/template/returned/revisions/1/comments', {
      token: tokens.reader,
    });
    expect(json.items).toMatchObject([
      { body: comment.comment, pointer: comment.pointer, author: 'Person 3', resolved_at: null },
    ]);
    expect((await save('returned', 1, 1, { document })).status).toBe(200);
  });

  test('it is issued only when it is proven as it stands', async () => {
    const document = await ready('proven', 'Proven 1');
    await prove('proven');
    await save('proven', 1, 1, { document: { ...document, summary: 'Said better.' }, ...CHANGE });
    await step('proven', 1, 'submit', 'librarian');
    const early = await step('proven', 1, 'issue', 'checker');
    expect([early.status, early.json.detail]).toEqual([
      409,
      'This revision has not been proven as it stands, by the engine of today. Run its proof first.',
    ]);
    await prove('proven', false);
    expect((await step('proven', 1, 'issue', 'checker')).json.detail).toMatch(
      /^The proof of this revision failed/,
    );
    await prove('proven');
    expect((await step('proven', 1, 'issue', 'checker')).json.state).toBe('issued');
    expect((await ask('GET', '/api/v1/templates/proven', { token: tokens.reader })).json).toMatchObject({
      status: 'issued',
      reviewer: 'Person 3',
      summary: 'Said better.',
    });
  });

  test('what is issued is the version that was reviewed, or nothing', async () => {
    const document = await ready('reviewed', 'Reviewed 1');
    await step('reviewed', 1, 'submit', 'librarian');
    const { headers } = await read('reviewed', 1, 'checker');
    await step('reviewed', 1, 'return', 'other', { comment: 'Say which table.' });
    await save('reviewed', 1, 1, { document: { ...document, summary: 'Not seen.' }, ...CHANGE });
    await step('reviewed', 1, 'submit', 'librarian');
    await prove('reviewed');
    const issue = (etag: string) =>
      ask('POST', '/api/v1/templates/reviewed/revisions/1/issue', {
        token: tokens.checker,
        headers: { 'if-match': etag },
      });
    expect((await issue(headers.get('etag') ?? '')).status).toBe(412);
    await resolveAll('reviewed', 'other');
    expect((await issue('"2"')).status).toBe(200);
  });

  test('neither its author nor whoever changed it issues it', async () => {
    const document = await ready('changed', 'Changed 1', 'engineer');
    await save('changed', 1, 1, { document, ...CHANGE }, 'other');
    await step('changed', 1, 'submit', 'engineer');
    await prove('changed');
    expect((await step('changed', 1, 'issue', 'engineer')).status).toBe(403);
    expect((await step('changed', 1, 'issue', 'other')).status).toBe(403);
    expect((await step('changed', 1, 'issue', 'librarian')).status).toBe(200);
  });

  test('an open comment stands in its way until whoever raised it resolves it', async () => {
    await ready('commented', 'Commented 1');
    await step('commented', 1, 'submit', 'librarian');
    await prove('commented');
    const comments = '/api/v1/library/template/commented/revisions/1/comments';
    const said = await ask('POST', comments, {
      token: tokens.checker,
      json: { body: 'Which edition?', pointer: '/sources/0/edition' },
    });
    const { id } = said.json.items[0];
    const answered = await ask('POST', comments, {
      token: tokens.librarian,
      json: { body: 'The 15th.', reply_to: id },
    });
    expect(answered.json.items[0]).toMatchObject({
      mine: false,
      replies: [{ body: 'The 15th.', author: 'Person 0' }],
    });
    expect((await step('commented', 1, 'issue', 'checker')).json.detail).toMatch(
      /^One comment is not resolved/,
    );
    expect((await ask('PUT', `${comments}/${id}/resolved`, { token: tokens.librarian })).status).toBe(403);
    expect((await ask('PUT', `${comments}/${id}/resolved`, { token: tokens.checker })).status).toBe(200);
    expect((await step('commented', 1, 'issue', 'checker')).status).toBe(200);
  });

  test('a comment at no place, of no words, or in another thread is refused', async () => {
    const comments = `/api/v1/library/template/${SPAN}/revisions/1/comments`;
    const say = (json: object) => ask('POST', comments, { token: tokens.checker, json });
    expect(faults(await say({ body: 'Here', pointer: 'beam' }))).toEqual(['/pointer wrong_format']);
    expect(faults(await say({ body: ' ' }))).toEqual(['/body out_of_range']);
    expect(faults(await say({ body: 'There', reply_to: crypto.randomUUID() }))).toEqual([
      '/reply_to unknown_comment',
    ]);
    expect((await ask('POST', comments, { token: tokens.reader, json: { body: 'I read' } })).status).toBe(
      403,
    );
  });
});

test('a section table is not drafted by hand, and there is no other kind', async () => {
  const kind = (name: string) =>
    ask('POST', `/api/v1/library/${name}/any/drafts`, { token: tokens.librarian, json: {} });
  expect([(await kind('section-table')).status, (await kind('beams')).status]).toEqual([409, 404]);
});

test('criteria are drafted by the same mechanism', async () => {
  const criteria = JSON.parse(readFileSync('data/criteria/steel-elastic-en.json', 'utf8'));
  const made = await ask('POST', `/api/v1/library/criteria/${criteria.slug}/drafts`, {
    token: tokens.librarian,
    json: { document: criteria, ...CHANGE },
  });
  // They refer to a combination set that this practice does not have yet.
  expect([made.status, faults(made)]).toEqual([201, ['/combinations unknown_revision']]);
  await issueCombinations(pair, criteria.combinations.set);
  const url = `/api/v1/library/criteria/${criteria.slug}/revisions/1`;
  await ask('POST', `${url}/submit`, { token: tokens.librarian, json: {} });
  expect((await ask('POST', `${url}/issue`, { token: tokens.checker, json: {} })).json).toMatchObject({
    kind: 'criteria',
    state: 'issued',
  });
});
