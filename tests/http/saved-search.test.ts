import { beforeAll, describe, expect, test, vi } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { MOST_SAVED } from '@/features/section/saved/saved';
import { ask } from '../support/app';
import { webConnection } from '../support/database';
import { foundPractice, type Member, owner } from '../support/practice';

const URL = '/api/v1/sections/searches';
const ROLES = ['reader', 'engineer', 'librarian', 'checker'] as const;
type Who = (typeof ROLES)[number] | 'stranger';

const people = {} as Record<Who, Member>;
const tokens = {} as Record<Who, string>;

beforeAll(async () => {
  const staff = await foundPractice(['reader'], ['engineer'], ['librarian'], ['checker']);
  const [stranger] = await foundPractice(['engineer', 'librarian']);
  for (const [i, role] of ROLES.entries()) people[role] = staff[i] as Member;
  people.stranger = stranger;
  for (const [who, { email }] of Object.entries(people)) tokens[who as Who] = await createApiToken(email);
});

let named = 0;
const save = (body: object, by: Who = 'engineer') =>
  ask('POST', URL, {
    token: tokens[by],
    json: { name: `Search ${++named}`, query: '?q=w12&depth_max=310', ...body },
  });
const change = (id: string, json: object, by: Who = 'engineer') =>
  ask('PATCH', `${URL}/${id}`, { token: tokens[by], json });
const remove = (id: string, by: Who = 'engineer') => ask('DELETE', `${URL}/${id}`, { token: tokens[by] });
const list = async (by: Who = 'engineer') => (await ask('GET', URL, { token: tokens[by] })).json;
const namesOf = async (by: Who) => (await list(by)).items.map(({ name }: { name: string }) => name);
const faults = ({
  status,
  json,
}: {
  status: number;
  json: { errors: { pointer: string; code: string }[] };
}) => [status, ...json.errors.map(({ pointer, code }) => `${pointer} ${code}`)];

describe('a search that is saved', () => {
  test('is listed by its name, and its query opens the page as it was', async () => {
    const query = '?shape=i&sort=-mass&i_minor_min=100&columns=mass+j&pin=a%2FW12x26';
    const { status, headers, json } = await save({ name: 'Stiff sideways', query });
    expect([status, headers.get('location')]).toEqual([201, `${URL}/${json.id}`]);
    const { items, next, total } = await list();
    expect([next, total]).toEqual([null, items.length]);
    expect(items).toContainEqual({
      id: json.id,
      name: 'Stiff sideways',
      query,
      shared: false,
      mine: true,
      by: 'Person 1',
    });
  });

  test('keeps what the page understands, and nothing else', async () => {
    const { json } = await save({ query: 'depth_max=310&nonsense=1&sort=colour' });
    expect(json.query).toBe('?depth_max=310');
  });

  test.each([
    [{ name: '  ' }, ['/name out_of_range']],
    [{ name: 'x'.repeat(61) }, ['/name out_of_range']],
    [{ query: '' }, ['/query not_allowed']],
    [{ query: '?nonsense=1' }, ['/query not_allowed']],
    [{ query: `?q=${'x'.repeat(2000)}` }, ['/query out_of_range']],
    [{ colour: 'red' }, ['/colour unknown_field']],
  ])('%j is refused at its place', async (body, expected) => {
    expect(faults(await save(body))).toEqual([422, ...expected]);
  });

  test('has a name that its owner uses once, however written, and anybody else too', async () => {
    await save({ name: 'Lintels' });
    expect(faults(await save({ name: ' LINTELS ' }))).toEqual([422, '/name duplicate']);
    expect((await save({ name: 'Lintels' }, 'reader')).status).toBe(201);
    const { json } = await save({ name: 'Purlins' });
    expect(faults(await change(json.id, { name: 'lintels' }))).toEqual([422, '/name duplicate']);
    expect((await change(json.id, { name: 'PURLINS' })).json.name).toBe('PURLINS');
  });

  test('of two with one name at once is saved once', async () => {
    const both = await Promise.all([save({ name: 'At once' }), save({ name: 'At once' })]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 422]);
  });

  test('is renamed, and replaced by another query', async () => {
    const { json } = await save({});
    expect((await change(json.id, { name: 'Renamed', query: '?mass_max=45' })).json).toEqual({
      ...json,
      name: 'Renamed',
      query: '?mass_max=45',
    });
    expect(faults(await change(json.id, {}))).toEqual([422, ' not_allowed']);
    expect(faults(await change(json.id, { query: '?' }))).toEqual([422, '/query not_allowed']);
  });

  test('is deleted, and is then nowhere', async () => {
    const { json } = await save({});
    expect((await remove(json.id)).status).toBe(204);
    expect((await remove(json.id)).status).toBe(404);
    expect((await change(json.id, { name: 'Gone' })).status).toBe(404);
    expect((await remove('no-identifier')).status).toBe(404);
  });

  /** Begins both while the row and its owner's turn are held, and lets them go once both wait. */
  const atOnce = (id: string, work: () => ReturnType<typeof remove>[]) =>
    owner.sql
      .begin(async (sql) => {
        await sql`select pg_advisory_xact_lock(hashtext(${people.engineer.personId}))`;
        await sql`select id from saved_search where id = ${id} for update`;
        const both = work();
        await vi.waitFor(async () => {
          const [found] = await owner.sql`select count(*)::int as n from pg_stat_activity
            where datname = current_database() and wait_event_type = 'Lock'`;
          expect(found?.['n']).toBe(both.length);
        });
        return { both };
      })
      .then(({ both }) => Promise.all(both));

  test('keeps both of two changes at once', async () => {
    const { json } = await save({ name: 'Changed twice' });
    const both = await atOnce(json.id, () => [
      change(json.id, { name: 'Changed by two' }),
      change(json.id, { query: '?mass_max=77' }),
    ]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
    const { items } = await list();
    expect(items).toContainEqual({ ...json, name: 'Changed by two', query: '?mass_max=77' });
  });

  test('is deleted once by two at once, and recorded once', async () => {
    const { json } = await save({ shared: true, name: 'Deleted twice' }, 'librarian');
    const both = await atOnce(json.id, () => [remove(json.id, 'librarian'), remove(json.id, 'librarian')]);
    expect(both.map(({ status }) => status).sort()).toEqual([204, 404]);
    const [found] = await owner.sql`select count(*)::int as n from audit_event
      where action = 'search.remove' and subject_id = ${json.id}`;
    expect(found?.['n']).toBe(1);
  });

  test('stands in the record with each of its steps', async () => {
    const { json } = await save({ name: 'Recorded' });
    await change(json.id, { shared: true });
    await remove(json.id);
    const events =
      await owner.sql`select action, data from audit_event where subject_kind = 'search' and subject_id = ${json.id} order by sequence`;
    expect(events.map(({ action }) => action)).toEqual(['search.save', 'search.change', 'search.remove']);
    expect(events[1]?.['data']).toMatchObject({ before: { shared: false }, after: { shared: true } });
  });
});

describe('a person’s own', () => {
  test('are saved by anybody, and seen by nobody else', async () => {
    const { json } = await save({ name: 'A reader’s own' }, 'reader');
    expect(await namesOf('reader')).toContain('A reader’s own');
    for (const other of ['engineer', 'librarian', 'stranger'] as const) {
      expect(await namesOf(other)).not.toContain('A reader’s own');
      expect((await change(json.id, { name: 'Mine now' }, other)).status).toBe(404);
      expect((await remove(json.id, other)).status).toBe(404);
    }
  });

  test('are so many at most', async () => {
    const [hoarder] = await foundPractice(['reader']);
    const token = await createApiToken(hoarder.email);
    const saveOne = (n: number) => ask('POST', URL, { token, json: { name: `${n}`, query: '?q=w12' } });
    for (let n = 0; n < MOST_SAVED; n++) expect((await saveOne(n)).status).toBe(201);
    const { status, json } = await saveOne(MOST_SAVED);
    expect([status, json.errors[0].code]).toEqual([409, 'conflict']);
    expect((await ask('GET', URL, { token })).json.total).toBe(MOST_SAVED);
  });
});

describe('sharing with the practice', () => {
  test('is for engineers and librarians', async () => {
    for (const who of ['reader', 'checker'] as const) {
      expect((await save({ shared: true }, who)).status).toBe(403);
      const { json } = await save({}, who);
      expect((await change(json.id, { shared: true }, who)).status).toBe(403);
    }
    for (const who of ['engineer', 'librarian'] as const)
      expect((await save({ shared: true }, who)).json.shared).toBe(true);
  });

  test('lets everybody of it open the search, after their own, and nobody of another practice', async () => {
    const { json } = await save({ name: 'A shared one', shared: true });
    await save({ name: 'Zebra' }, 'reader');
    const { items } = await list('reader');
    const shared = items.find(({ id }: { id: string }) => id === json.id);
    expect(shared).toMatchObject({ mine: false, by: 'Person 1', query: json.query });
    const mine = items.map((one: { mine: boolean }) => one.mine);
    expect(mine).toEqual([...mine].sort((a, b) => Number(b) - Number(a)));
    expect(await namesOf('stranger')).not.toContain('A shared one');
    expect((await remove(json.id, 'stranger')).status).toBe(404);
  });

  test('leaves it to its owner to change, and to a librarian to delete', async () => {
    const { json } = await save({ shared: true });
    expect((await change(json.id, { name: 'Taken over' }, 'reader')).status).toBe(403);
    expect((await change(json.id, { name: 'Taken over' }, 'librarian')).status).toBe(403);
    expect((await remove(json.id, 'checker')).status).toBe(403);
    expect((await remove(json.id, 'librarian')).status).toBe(204);
    expect(await namesOf('engineer')).not.toContain(json.name);
  });

  test('ends when its owner says so', async () => {
    const { json } = await save({ shared: true });
    expect((await change(json.id, { shared: false })).json.shared).toBe(false);
    expect(await namesOf('reader')).not.toContain(json.name);
  });
});

describe('the database itself', () => {
  const web = webConnection();
  const as = ({ practiceId, personId }: Member, statement: string) =>
    web.begin(async (tx) => {
      await tx`select set_config('app.practice_id', ${practiceId}, true), set_config('app.person_id', ${personId}, true)`;
      return tx.unsafe(statement);
    });

  test('keeps a search from everybody but its owner, and a shared one in its practice', async () => {
    const own = (await save({ name: 'Unshared' })).json.id;
    const shared = (await save({ name: 'Shared', shared: true })).json.id;
    const seenBy = async (who: Who) =>
      (await as(people[who], 'select id from saved_search')).map(({ id }) => id as string);
    expect(await seenBy('engineer')).toEqual(expect.arrayContaining([own, shared]));
    expect(await seenBy('librarian')).toContain(shared);
    expect(await seenBy('librarian')).not.toContain(own);
    expect(await seenBy('stranger')).not.toContain(shared);
    expect(
      await as(people.librarian, `delete from saved_search where id = '${own}' returning id`),
    ).toHaveLength(0);
    await web.end();
  });
});

describe('the columns of sections', () => {
  const COLUMNS = '/api/v1/me/section-columns';
  const put = (columns: unknown, by: Who = 'engineer') =>
    ask('PUT', COLUMNS, { token: tokens[by], json: { columns } });
  const read = async (by: Who) => (await ask('GET', COLUMNS, { token: tokens[by] })).json.columns;

  test('are each person’s own, in their order, and the usual ones again', async () => {
    expect(await read('engineer')).toBeNull();
    expect((await put(['j', 'mass'])).json).toEqual({ columns: ['j', 'mass'] });
    expect([await read('engineer'), await read('reader')]).toEqual([['j', 'mass'], null]);
    await put(null);
    expect(await read('engineer')).toBeNull();
  });

  test.each([[[]], [['colour']], [['mass', 'mass']], ['mass']])('%j are refused', async (columns) => {
    expect((await put(columns)).status).toBe(422);
  });
});
