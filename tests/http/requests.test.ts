import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { type Answer, ask } from '../support/app';
import { issueTemplate } from '../support/library';
import { foundPractice, type Member, owner } from '../support/practice';

const SPAN = 'simple-span-uniform';
const URL = '/api/v1/requests';
let people: Record<'librarian' | 'engineer' | 'reader', Member>;
let tokens: Record<'librarian' | 'engineer' | 'reader' | 'stranger', string>;

beforeAll(async () => {
  const [librarian, engineer, reader, checker] = await foundPractice(
    ['librarian'],
    ['engineer'],
    ['reader'],
    ['checker'],
  );
  const [stranger] = await foundPractice(['librarian']);
  people = { librarian, engineer, reader };
  await issueTemplate({ author: librarian, reviewer: checker }, SPAN);
  tokens = {
    librarian: await createApiToken(librarian.email),
    engineer: await createApiToken(engineer.email),
    reader: await createApiToken(reader.email),
    stranger: await createApiToken(stranger.email),
  };
});

type By = keyof typeof tokens;
const raise = (json: object, by: By = 'engineer') => ask('POST', URL, { token: tokens[by], json });
const read = (number: number, by: By) => ask('GET', `${URL}/${number}`, { token: tokens[by] });
const answer = (number: number, version: number, json: object, by: By = 'librarian') =>
  ask('PUT', `${URL}/${number}`, {
    token: tokens[by],
    json: { answer: '', document: null, ...json },
    headers: { 'if-match': `"${version}"` },
  });
const list = async (query: string, by: By) =>
  (await ask('GET', `${URL}${query}`, { token: tokens[by] })).json;
const faults = ({ json }: Answer): string[] =>
  json.errors.map(({ pointer, code }: { pointer: string; code: string }) => `${pointer} ${code}`);

const DEFECT = {
  kind: 'defect',
  title: 'The help of w names the wrong side',
  body: 'It says up.',
  context: { path: `/templates/${SPAN}`, parameters: { L: '6 m' } },
  document: { kind: 'template', slug: SPAN },
};

describe('a request', () => {
  test('reaches the librarian’s queue with what stood on the screen, and comes back with its progress', async () => {
    const made = await raise(DEFECT);
    expect([made.status, made.headers.get('etag')]).toEqual([201, '"1"']);
    const { number } = made.json;
    expect(made.headers.get('location')).toBe(`${URL}/${number}`);
    const queued = await read(number, 'librarian');
    expect(queued.json).toMatchObject({
      ...DEFECT,
      document: { slug: SPAN, reference: 'Span 1' },
      state: 'open',
      raised_by: 'Person 1',
      mine: false,
      moves: ['accepted', 'declined', 'done'],
    });
    const told =
      await owner.sql`select title, href from notice where person_id = ${people.librarian.personId} and kind = 'request'`;
    expect(told.at(-1)).toEqual({
      title: `Defect ${number}: ${DEFECT.title}`,
      href: `/library/requests/${number}`,
    });
    await answer(number, 1, {
      state: 'accepted',
      answer: 'In the next revision.',
      document: DEFECT.document,
    });
    const progress = await read(number, 'engineer');
    expect(progress.json).toMatchObject({
      state: 'accepted',
      answer: 'In the next revision.',
      handled_by: 'Person 0',
      moves: [],
      mine: true,
    });
    const back =
      await owner.sql`select title from notice where person_id = ${people.engineer.personId} and kind = 'request'`;
    expect(back.at(-1)?.['title']).toBe(`Your defect ${number} is accepted: ${DEFECT.title}`);
  });

  test('is seen by whoever raised it and the librarians, and by nobody else', async () => {
    const { number } = (await raise({ kind: 'request', title: 'A hip beam, please' }, 'reader')).json;
    expect((await read(number, 'reader')).status).toBe(200);
    expect((await read(number, 'engineer')).status).toBe(404);
    expect((await read(number, 'stranger')).status).toBe(404);
    const own = await list('?limit=200', 'engineer');
    expect(own.items.every(({ mine }: { mine: boolean }) => mine)).toBe(true);
    const all = await list('?limit=200&kind=request', 'librarian');
    expect(all.items.map((one: { number: number }) => one.number)).toContain(number);
  });

  test('is numbered in the practice, of several at once each of its own', async () => {
    const made = await Promise.all([1, 2, 3].map((n) => raise({ kind: 'request', title: `Number ${n}` })));
    const numbers = made.map(({ json }) => json.number).sort((a, b) => a - b);
    expect(numbers[2] - numbers[0]).toBe(2);
    const { json } = await ask('POST', URL, {
      token: tokens.stranger,
      json: { kind: 'request', title: 'First' },
    });
    expect(json.number).toBe(1);
  });

  test.each([
    [{ kind: 'request', title: ' ' }, ['/title out_of_range']],
    [{ kind: 'praise', title: 'Well done' }, ['/kind not_allowed']],
    [
      { kind: 'request', title: 'x', document: { kind: 'template', slug: 'none' } },
      ['/document unknown_document'],
    ],
    [{ kind: 'request', title: 'x', context: { page: 'y'.repeat(30_000) } }, ['/context not_allowed']],
  ])('%j is refused at its place', async (json, expected) => {
    const refused = await raise(json);
    expect([refused.status, ...faults(refused)]).toEqual([422, ...expected]);
  });

  test('is answered by a librarian, over the version that was read', async () => {
    const { number } = (await raise({ kind: 'request', title: 'A rafter' })).json;
    expect((await answer(number, 1, { state: 'done' }, 'engineer')).status).toBe(403);
    expect(faults(await answer(number, 1, { state: 'declined' }))).toEqual(['/answer required']);
    expect((await answer(number, 1, { state: 'declined', answer: 'There is one: Rafter 1.' })).status).toBe(
      200,
    );
    const late = await answer(number, 1, { state: 'accepted' });
    expect([late.status, late.json.current.state]).toEqual([412, 'declined']);
    expect((await answer(number, 2, { state: 'done' })).status).toBe(409);
    expect((await answer(number, 2, { state: 'open' })).json.state).toBe('open');
  });

  test('is walked by a cursor, each once', async () => {
    const seen: number[] = [];
    let cursor = '';
    do {
      const page = await list(`?limit=2${cursor}`, 'librarian');
      seen.push(...page.items.map(({ number }: { number: number }) => number));
      cursor = page.next === null ? '' : `&cursor=${page.next}`;
    } while (cursor);
    const { total } = await list('', 'librarian');
    expect(seen).toHaveLength(total);
    expect(seen).toEqual([...new Set(seen)].sort((a, b) => b - a));
  });
});
