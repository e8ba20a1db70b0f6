import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { contentHash } from '@/lib/fingerprint';
import { type Answer, ask } from '../support/app';
import { issueTemplate } from '../support/library';
import { foundPractice } from '../support/practice';
import { writtenTemplates } from '../support/templates';

const CANOPY = 'propped-cantilever-overhang-uniform';
let giver: string;
let taker: string;

beforeAll(async () => {
  const [author, reviewer] = await foundPractice(['librarian'], ['checker']);
  const [other] = await foundPractice(['librarian']);
  await issueTemplate({ author, reviewer }, CANOPY);
  giver = await createApiToken(author.email);
  taker = await createApiToken(other.email);
});

const take = (bundle: unknown, slug = `taken-${crypto.randomUUID().slice(0, 8)}`) =>
  ask('POST', `/api/v1/templates/b${slug}/drafts`, { token: taker, json: { bundle } });
const bundleOf = async () =>
  (await ask('GET', `/api/v1/templates/${CANOPY}/revisions/1/bundle`, { token: giver })).json;
/** With the hash that its content has: a file that was made, not damaged. */
const hashed = ({ sha256: _, ...content }: Record<string, unknown>) => ({
  ...content,
  sha256: contentHash(content),
});
const faults = ({ json }: Answer): string[] =>
  json.errors.map(({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`);

test('a revision travels to another practice, where it is a draft that says the same', async () => {
  const { status, headers, json } = await ask('GET', `/api/v1/templates/${CANOPY}/revisions/1/bundle`, {
    token: giver,
  });
  expect([status, headers.get('content-disposition')]).toEqual([
    200,
    `attachment; filename="${CANOPY}-1.json"`,
  ]);
  expect(json).toMatchObject({ format: 'putlog-document', schema_version: 1, kind: 'template', revision: 1 });
  expect(json.document).toEqual(writtenTemplates.get(CANOPY));
  const taken = await ask('POST', `/api/v1/templates/${CANOPY}/drafts`, {
    token: taker,
    json: { bundle: json },
  });
  expect([taken.status, taken.json.state, taken.json.faults]).toEqual([201, 'draft', []]);
  expect(taken.json.document).toEqual(json.document);
  expect(
    (await ask('GET', `/api/v1/templates/${CANOPY}/revisions/1/bundle`, { token: taker })).json,
  ).toMatchObject({
    document: json.document,
  });
});

test('an unfinished draft, and another practice’s revision, are not given away', async () => {
  await ask('POST', '/api/v1/templates/unfinished/drafts', { token: giver, json: {} });
  const url = '/api/v1/templates/unfinished/revisions/1/bundle';
  expect((await ask('GET', url, { token: giver })).status).toBe(409);
  expect((await ask('GET', url, { token: taker })).status).toBe(404);
});

describe('a bundle is refused', () => {
  test('when its content is not what was hashed', async () => {
    const bundle = await bundleOf();
    const refused = await take({ ...bundle, document: { ...bundle.document, name: 'Another' } });
    expect([refused.status, ...faults(refused)]).toEqual([422, '/bundle/sha256 hash_mismatch']);
    expect(faults(await take({ ...bundle, sha256: 'f'.repeat(64) }))).toEqual([
      '/bundle/sha256 hash_mismatch',
    ]);
    expect(faults(await take({ ...bundle, sha256: 'none' }))).toEqual(['/bundle/sha256 wrong_format']);
  });

  test('when its schema version is not known, before anything else is looked at', async () => {
    const refused = await take(hashed({ ...(await bundleOf()), schema_version: 2, layers: [] }));
    expect([refused.status, ...faults(refused), refused.json.detail]).toEqual([
      422,
      '/bundle/schema_version unknown_version',
      'This bundle has schema version 2, which is not read here. Export it again as version 1.',
    ]);
  });

  test.each([
    ['method', 'See <script>fetch("/api/v1/me")</script>.'],
    ['method', '<img src=x onerror="alert(1)">'],
    ['method', '[Open](javascript:alert(1))'],
    ['method', '<a href="javascript:alert(1)">Open</a>'],
    ['method', '<svg/onload=alert(1)>'],
  ])('when its %s holds %s, though its hash is right', async (field, text) => {
    const bundle = await bundleOf();
    const refused = await take(hashed({ ...bundle, document: { ...bundle.document, [field]: text } }));
    expect([refused.status, ...faults(refused)]).toEqual([422, `/bundle/document/${field} html`]);
  });

  test('when it is another kind of document, or no bundle at all', async () => {
    expect(faults(await take(hashed({ ...(await bundleOf()), kind: 'criteria' })))).toEqual([
      '/bundle/kind not_allowed',
    ]);
    expect((await take({ hello: 'world' })).status).toBe(422);
    expect((await take([1, 2, 3])).status).toBe(422);
  });

  test('when it has 20 MB, before it is read', async () => {
    const bundle = await bundleOf();
    const padded = JSON.stringify({ bundle: { ...bundle, change_note: 'x'.repeat(20_000_000) } });
    const started = performance.now();
    const refused = await ask('POST', '/api/v1/templates/huge/drafts', {
      token: taker,
      body: padded,
      headers: { 'content-type': 'application/json' },
    });
    expect([refused.status, ...faults(refused)]).toEqual([413, ' too_large']);
    expect(performance.now() - started).toBeLessThan(2000);
  });
});

test('what an expression of a bundle says is read anew, and never its tree', async () => {
  const bundle = await bundleOf();
  const beam = { ...bundle.document.beam, length: { text: 'L + a', tree: ['import', 'fs'] } };
  const taken = await take(hashed({ ...bundle, document: { ...bundle.document, beam } }));
  expect([taken.status, taken.json.faults[0]]).toMatchObject([
    201,
    { pointer: '/beam/length', code: 'wrong_type' },
  ]);
});
