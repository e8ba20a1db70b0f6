import { execFile } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { promisify } from 'node:util';
import PgBoss from 'pg-boss';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { workQueue } from '@/services/queue';
import { freshDatabase, refusal } from '../support/database';

let fresh: Awaited<ReturnType<typeof freshDatabase>>;
let owner: postgres.Sql;
let web: postgres.Sql;
let appUrl: string;

const prepare = () =>
  promisify(execFile)(process.execPath, ['--import', 'tsx', 'scripts/prepare.ts', '--demo'], {
    env: { ...process.env, DATABASE_URL: fresh.url, APP_DATABASE_URL: appUrl },
  });

beforeAll(async () => {
  fresh = await freshDatabase();
  const url = new URL(fresh.url);
  url.username = `web_of${url.pathname.replace('/', '_')}`;
  url.password = `quote ' and space`;
  appUrl = url.href;
  owner = postgres(fresh.url, { max: 1, onnotice: () => undefined });
  // As two machines would that are started together.
  await Promise.all([prepare(), prepare()]);
  web = postgres(appUrl, { max: 1 });
}, 120_000);

afterAll(async () => {
  await web.end();
  await owner`drop owned by ${owner(new URL(appUrl).username)}`;
  await owner`drop role ${owner(new URL(appUrl).username)}`;
  await owner.end();
  await fresh.drop();
});

const shipped = (folder: string) =>
  readdirSync(new URL(`../../data/${folder}`, import.meta.url)).filter((name) => name.endsWith('.json'))
    .length;

describe('preparing an empty database', () => {
  test('founds one demo practice with its people and jobs', async () => {
    const [count] = await owner`select (select count(*) from practice)::int as practices,
      (select count(*) from membership)::int as people, (select count(*) from credential)::int as credentials,
      (select array_agg(number order by number) from job) as jobs`;
    expect(count).toEqual({ practices: 1, people: 6, credentials: 6, jobs: ['Q-2417', 'Q-2431', 'Q-2440'] });
  });

  test('issues every shipped document once, by somebody other than its author', async () => {
    const found =
      await owner`select kind, count(*)::int as count, bool_and(state = 'issued' and number = 1) as issued,
      bool_and(author_id <> reviewer_id) as reviewed from document d join revision r on r.document_id = d.id group by kind`;
    const whole = (kind: string, count: number) => ({ kind, count, issued: true, reviewed: true });
    expect(found).toHaveLength(5);
    expect(found).toEqual(
      expect.arrayContaining([
        whole('template', shipped('templates')),
        whole('section-table', shipped('sections')),
        whole('criteria', shipped('criteria')),
        whole('combination-set', shipped('combinations')),
        whole('material-set', shipped('materials')),
      ]),
    );
  });

  test('fills the editions with at least 800 sections', async () => {
    const [count] = await owner`select count(*)::int as sections from section`;
    expect(count?.['sections']).toBeGreaterThanOrEqual(800);
  });

  test('goes on where an earlier start was cut off, and changes nothing else', async () => {
    const before = await owner`select id, state from revision order by id`;
    await owner.begin(async (tx) => {
      await tx`alter table revision disable trigger user`;
      await tx`update revision set state = 'draft', reviewer_id = null where id = ${before[0]?.['id']}`;
      await tx`update revision set state = 'in_review', reviewer_id = null where id = ${before[1]?.['id']}`;
      await tx`alter table revision enable trigger user`;
    });
    const { stdout } = await prepare();
    expect(await owner`select id, state from revision order by id`).toEqual(before);
    expect(stdout).toContain('kofi.danesmoor@quillmere.example');
  }, 60_000);
});

describe('the role that web and worker sign in with', () => {
  test('is let in, and owns nothing', async () => {
    const [counts] =
      await web`select (select count(*) from pg_class where relowner = current_user::regrole)::int as owned,
      (select count(*) from job)::int as jobs`;
    expect(counts).toEqual({ owned: 0, jobs: 0 });
    expect(await refusal(web`create table mine ()`)).toBe('42501');
  });

  test('takes tasks from the queue, which its owner made', async () => {
    const sender = new PgBoss({
      connectionString: appUrl,
      max: 1,
      migrate: false,
      supervise: false,
      schedule: false,
    });
    sender.on('error', () => undefined);
    await sender.start();
    const sweep = vi.fn(async () => undefined);
    const verify = vi.fn(() => Promise.reject(new Error('the chain cannot be read')));
    const idle = async () => undefined;
    const handlers = {
      'sweep-sign-ins': sweep,
      'verify-audit-chains': verify,
      'prove-issued': idle,
      'remind-of-reviews': idle,
      'run-proof': idle,
      'run-impact': idle,
      'run-import': idle,
    };
    const queue = await workQueue(appUrl, handlers, () => undefined);
    await sender.send('sweep-sign-ins', {});
    const id = await sender.send('verify-audit-chains', {});
    await vi.waitFor(
      () => expect([sweep, verify].every(({ mock }) => mock.calls.length === 1)).toBe(true),
      20_000,
    );
    // That it failed is written a moment after it has.
    await vi.waitFor(
      async () =>
        expect(await sender.getJobById('verify-audit-chains', id ?? '')).toMatchObject({ state: 'retry' }),
      10_000,
    );
    await queue.stop();
    await sender.stop({ graceful: false });
  }, 30_000);
});
