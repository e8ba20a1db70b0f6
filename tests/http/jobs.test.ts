import { beforeAll, describe, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { ask } from '../support/app';
import { foundPractice, type Member } from '../support/practice';

let engineer: string;
let colleague: string;
let reader: string;
let principal: string;
let stranger: string;
let people: readonly Member[];

const tokenOf = ({ email }: Member) => createApiToken(email);

beforeAll(async () => {
  const staff = await foundPractice(['engineer'], ['engineer'], ['reader'], ['principal']);
  const [elsewhere] = await foundPractice(['engineer']);
  people = staff;
  [engineer, colleague, reader, principal] = await Promise.all([
    tokenOf(staff[0]),
    tokenOf(staff[1]),
    tokenOf(staff[2]),
    tokenOf(staff[3]),
  ]);
  stranger = await tokenOf(elsewhere);
});

const begin = (token: string, json: unknown) => ask('POST', '/api/v1/jobs', { token, json });
const faultsOf = ({ json }: { json: { errors: { pointer: string; code: string }[] } }) =>
  json.errors.map(({ pointer, code }) => `${pointer} ${code}`);

describe('a job', () => {
  test('is begun by an engineer, and read back with its tag', async () => {
    const made = await begin(engineer, {
      number: 'J-1',
      name: 'Boat shed',
      client: 'Trust',
      basis: 'EN 1990',
    });
    expect([made.status, made.headers.get('location'), made.headers.get('etag')]).toEqual([
      201,
      '/api/v1/jobs/J-1',
      '"1"',
    ]);
    const read = await ask('GET', '/api/v1/jobs/J-1', { token: reader });
    expect([read.status, read.headers.get('etag'), read.json]).toEqual([200, '"1"', made.json]);
    expect(made.json).toMatchObject({
      name: 'Boat shed',
      unit_system: 'metric',
      access: 'practice',
      members: 0,
    });
  });

  test('is not begun by a reader', async () => {
    expect((await begin(reader, { number: 'J-2', name: 'Shed' })).status).toBe(403);
  });

  test('has a number of its own: the second is a fault at the field', async () => {
    await begin(engineer, { number: 'J-3', name: 'Shed' });
    const again = await begin(colleague, { number: 'J-3', name: 'Other shed' });
    expect([again.status, ...faultsOf(again)]).toEqual([422, '/number duplicate']);
  });

  test('may have the number of another practice’s job', async () => {
    await begin(engineer, { number: 'J-4', name: 'Shed' });
    expect((await begin(stranger, { number: 'J-4', name: 'Barn' })).status).toBe(201);
    expect((await ask('GET', '/api/v1/jobs/J-4', { token: stranger })).json.name).toBe('Barn');
  });

  test('of another practice is not found', async () => {
    await begin(engineer, { number: 'J-5', name: 'Shed' });
    expect((await ask('GET', '/api/v1/jobs/J-5', { token: stranger })).status).toBe(404);
    expect((await ask('GET', '/api/v1/jobs/J-5/members', { token: stranger })).status).toBe(404);
  });

  test('with a name left out, a number with a space and an unknown field is 422 at each', async () => {
    const refused = await begin(engineer, { number: 'J 6', colour: 'red' });
    expect(faultsOf(refused)).toEqual(['/number wrong_format', '/name missing', '/colour unknown_field']);
  });
});

describe('a job of named people', () => {
  beforeAll(async () => {
    await begin(engineer, {
      number: 'N-1',
      name: 'Quiet house',
      access: 'named',
      people: [people[2]?.email.toUpperCase()],
    });
  });

  test('is open to whoever began it, the people named and principals', async () => {
    for (const token of [engineer, reader, principal])
      expect((await ask('GET', '/api/v1/jobs/N-1', { token })).status).toBe(200);
  });

  test('is to everybody else as if it were not there', async () => {
    expect((await ask('GET', '/api/v1/jobs/N-1', { token: colleague })).status).toBe(404);
    const { json } = await ask('GET', '/api/v1/jobs?q=quiet', { token: colleague });
    expect(json).toEqual({ items: [], next: null, total: 0 });
  });

  test('cannot be opened to an address that is nobody’s', async () => {
    const refused = await begin(engineer, {
      number: 'N-2',
      name: 'House',
      access: 'named',
      people: [people[1]?.email, 'nobody@nowhere.example'],
    });
    expect([refused.status, ...faultsOf(refused)]).toEqual([422, '/people/1 unknown_person']);
  });
});

test('the list goes on from page to page by number, and is searched by words', async () => {
  const [one] = await foundPractice(['engineer']);
  const token = await tokenOf(one);
  for (const number of ['L-3', 'L-1', 'L-2'])
    await begin(token, { number, name: `Hall ${number}`, client: '50% trust' });
  const numbers = ({ json }: { json: { items: { number: string }[] } }) =>
    json.items.map((job) => job.number);
  const first = await ask('GET', '/api/v1/jobs?limit=2', { token });
  const second = await ask('GET', `/api/v1/jobs?limit=2&cursor=${first.json.next}`, { token });
  expect([numbers(first), numbers(second), second.json.next, first.json.total]).toEqual([
    ['L-1', 'L-2'],
    ['L-3'],
    null,
    3,
  ]);
  expect(numbers(await ask('GET', '/api/v1/jobs?q=l-2', { token }))).toEqual(['L-2']);
  expect((await ask('GET', '/api/v1/jobs?q=50%25%20t', { token })).json.total).toBe(3);
  expect((await ask('GET', '/api/v1/jobs?q=_', { token })).json.total).toBe(0);
});
