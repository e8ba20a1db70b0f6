import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { connection } from '@/db/client';
import { session } from '@/db/schema/account';
import { job, jobPerson } from '@/db/schema/job';
import { document, revision } from '@/db/schema/library';
import { member } from '@/db/schema/member';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { issuedOf, refusal, webConnection } from '../support/database';
import { foundPractice, type Member, owner } from '../support/practice';

const DENIED = '42501';

interface Office {
  readonly engineer: Member;
  readonly colleague: Member;
  readonly principal: Member;
  readonly jobId: string;
  readonly revisionId: string;
}

let ours: Office;
let theirs: Office;
const web = webConnection();

beforeAll(async () => {
  ours = await office();
  theirs = await office();
});
afterAll(() => web.end());

async function office(): Promise<Office> {
  const [engineer, colleague, principal, checker] = await foundPractice(
    ['engineer', 'librarian'],
    ['engineer'],
    ['principal'],
    ['checker'],
  );
  if (!engineer || !colleague || !principal || !checker) throw new Error('four people were founded');
  const { revisionId } = await issuedOf(engineer, checker, 'criteria');
  const jobId = await newJob(engineer, { number: 'J-1' });
  await newMember(engineer, jobId, revisionId);
  return { engineer, colleague, principal, jobId, revisionId };
}

const newJob = (by: Member, fields: { number: string; access?: 'practice' | 'named' }): Promise<string> =>
  withPractice(by, async (tx) => {
    const id = crypto.randomUUID();
    await tx
      .insert(job)
      .values({ practiceId: by.practiceId, id, name: 'A job', createdById: by.personId, ...fields });
    return id;
  });

const newMember = (by: Member, jobId: string, templateRevisionId: string) =>
  withPractice(by, (tx) =>
    tx.insert(member).values({
      practiceId: by.practiceId,
      jobId,
      mark: 'B1',
      templateRevisionId,
      parameters: {},
      settings: {},
      createdById: by.personId,
      changedById: by.personId,
    }),
  );

/** SQL by web's role, as `who`, with nothing in it that names a practice. */
const as = (who: Member | null, statement: string) =>
  web.begin(async (tx) => {
    if (who)
      await tx`select set_config('app.practice_id', ${who.practiceId}, true), set_config('app.person_id', ${who.personId}, true)`;
    return tx.unsafe(statement);
  });

const TENANT_TABLES = [
  'practice',
  'membership',
  'person',
  'document',
  'revision',
  'job',
  'member',
  'audit_event',
  'search_entry',
  'search_word',
] as const;

describe('a query that forgets its WHERE', () => {
  test.each(TENANT_TABLES)('of %s sees its own practice only', async (table) => {
    const own = await as(ours.engineer, `select * from ${table}`);
    expect(own.length).toBeGreaterThan(0);
    expect(JSON.stringify(own)).not.toContain(theirs.engineer.practiceId);
    expect(JSON.stringify(own)).not.toContain(theirs.engineer.personId);
  });

  test.each([
    ...TENANT_TABLES,
    'session',
    'api_token',
    'credential',
    'section',
    'job_person',
    'audit_check',
    'section_import',
    'import_acceptance',
    'import_mapping',
    'saved_search',
    'stock_list',
    'stock_line',
  ])('of %s sees nothing before a practice is set', async (table) => {
    expect(await as(null, `select * from ${table}`)).toHaveLength(0);
  });

  test('updates and deletes its own practice’s rows only', async () => {
    await as(ours.engineer, `update job set name = 'Renamed', version = version + 1`);
    const [untouched] = await as(theirs.engineer, 'select name from job');
    expect(untouched?.['name']).toBe('A job');
    await as(ours.engineer, 'delete from session');
  });
});

test('every table with a practice has its policies on and forced', async () => {
  const open = await owner.sql`
    select c.relname from pg_class c join pg_attribute a on a.attrelid = c.oid and a.attname = 'practice_id'
    where c.relkind = 'r' and c.relnamespace = 'public'::regnamespace and not (c.relrowsecurity and c.relforcerowsecurity)`;
  expect(open).toEqual([]);
});

test('web’s role owns nothing and bypasses nothing', async () => {
  const [role] = await web`
    select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
      (select count(*)::int from pg_class where relowner = r.oid) as owned from pg_roles r where rolname = current_user`;
  expect(role).toEqual({
    rolsuper: false,
    rolbypassrls: false,
    rolcreaterole: false,
    rolcreatedb: false,
    owned: 0,
  });
});

describe('a write', () => {
  test('into another practice is refused', async () => {
    const { practiceId, personId } = theirs.engineer;
    const statement = `insert into job (practice_id, number, name, created_by_id) values ('${practiceId}', 'J-9', 'Theirs', '${personId}')`;
    expect(await refusal(as(ours.engineer, statement))).toBe(DENIED);
  });

  test('that points at another practice’s row is refused', async () => {
    expect(await refusal(newMember(ours.engineer, theirs.jobId, ours.revisionId))).not.toBe('none');
    expect(await refusal(newMember(ours.engineer, ours.jobId, theirs.revisionId))).not.toBe('none');
  });

  test.each([
    [`insert into practice (slug, name) values ('mine', 'Mine')`],
    [`insert into person (email, name, initials) values ('new@example.org', 'New', 'N')`],
    [`update membership set roles = '{administrator}'`],
    [`update person set email = 'somebody@example.org'`],
    ['delete from job'],
    ['delete from member'],
    ['delete from revision'],
    [`update member set mark = 'B2'`],
    [`alter table job disable row level security`],
    ['select * from pg_authid'],
  ])('that web has no business with is refused: %s', async (statement) => {
    expect(await refusal(as(ours.principal, statement))).toBe(DENIED);
  });

  test('to a credential reaches the person’s own only', async () => {
    await as(ours.engineer, `update credential set password_hash = 'x'`);
    const hashes = await owner.sql`select person_id from credential where password_hash = 'x'`;
    expect(hashes.map((row) => row['person_id'])).toEqual([ours.engineer.personId]);
  });
});

describe('what is issued', () => {
  test.each([
    [`update revision set body = '{}'`],
    [`update revision set sha256 = repeat('0', 64)`],
    [`update revision set author_id = reviewer_id`],
    [`update revision set change_note = 'Another'`],
  ])('is frozen against %s', async (statement) => {
    expect(await refusal(as(ours.engineer, statement))).toBe('PL001');
  });

  test('cannot be made at once, past the review', async () => {
    const statement = `insert into revision (practice_id, document_id, number, state, body, schema_version, engine_version,
      sha256, author_id, reviewer_id, change_note, change_class, consequence)
      select practice_id, document_id, 2, 'issued', body, 1, '1', sha256, author_id, reviewer_id, 'x', 'wording', 'cosmetic' from revision`;
    expect(await refusal(as(ours.engineer, statement))).toBe('PL002');
  });

  test('takes no sections any more, nor loses them', async () => {
    const columns =
      'practice_id, revision_id, table_slug, designation, designation_key, printed, shape, depth_mm, width_mm, mass_kg_m, area_cm2, i_major_cm4, i_minor_cm4, w_el_cm3, dimensions';
    const insertInto = (revisionId: string) =>
      `insert into section (${columns}) values ('${ours.engineer.practiceId}', '${revisionId}', 't', 'A', 'a', 'A', 'i', 1, 1, 1, 1, 1, 1, 1, '{}')`;
    expect(await refusal(as(ours.engineer, insertInto(ours.revisionId)))).toBe('PL001');
  });
});

describe('a job of named people', () => {
  const marksSeenBy = async (who: Member, jobId: string) =>
    (await as(who, `select mark from member where job_id = '${jobId}'`)).length;

  test('is seen with its members by them, its creator and a principal, and by nobody else', async () => {
    const jobId = await newJob(ours.engineer, { number: 'J-secret', access: 'named' });
    await newMember(ours.engineer, jobId, ours.revisionId);
    expect(await marksSeenBy(ours.engineer, jobId)).toBe(1);
    expect(await marksSeenBy(ours.principal, jobId)).toBe(1);
    expect(await marksSeenBy(ours.colleague, jobId)).toBe(0);
    expect(await marksSeenBy(theirs.principal, jobId)).toBe(0);
    expect(await refusal(newMember(ours.colleague, jobId, ours.revisionId))).toBe(DENIED);

    const { practiceId, personId } = ours.colleague;
    await withPractice(ours.engineer, (tx) => tx.insert(jobPerson).values({ practiceId, jobId, personId }));
    expect(await marksSeenBy(ours.colleague, jobId)).toBe(1);
  });

  test('is not changed by who may not see it', async () => {
    const jobId = await newJob(ours.engineer, { number: 'J-closed', access: 'named' });
    const renamed = await withPractice(ours.colleague, (tx) =>
      tx.update(job).set({ name: 'Mine' }).where(eq(job.id, jobId)).returning(),
    );
    expect(renamed).toEqual([]);
  });
});

describe('withPractice', () => {
  test('has its practice set before the first query of the work, however many run at once', async () => {
    const seen = await Promise.all(
      Array.from({ length: 200 }, (_, index) => {
        const who = index % 2 ? ours.engineer : theirs.engineer;
        return withPractice(who, async (tx) => {
          const rows = await tx.select({ practiceId: document.practiceId }).from(document);
          return rows.length === 1 && rows[0]?.practiceId === who.practiceId;
        });
      }),
    );
    expect(seen).not.toContain(false);
  });

  test('leaves nothing set on the connection', async () => {
    await withPractice(ours.engineer, (tx) => tx.select().from(document));
    const rows = await Promise.all(
      Array.from({ length: 20 }, () => withoutPractice().select().from(revision)),
    );
    expect(rows.flat()).toEqual([]);
  });

  test('undoes everything when the work fails', async () => {
    const failing = withPractice(ours.engineer, async (tx) => {
      await tx.update(job).set({ name: 'Half done' });
      throw new Error('no');
    });
    await expect(failing).rejects.toThrow('no');
    const jobs = await withPractice(ours.engineer, (tx) => tx.select({ name: job.name }).from(job));
    expect(jobs.map(({ name }) => name)).not.toContain('Half done');
  });

  test('refuses what is no practice', async () => {
    const work = withPractice({ practiceId: `' or true --`, personId: null }, (tx) => tx.select().from(job));
    await expect(work).rejects.toThrow();
    expect(await connection().sql`select 1 as alive`).toEqual([{ alive: 1 }]);
  });
});

describe('the lookups before a practice is known', () => {
  test('answer for one exact address, and not for a pattern', async () => {
    const find = (email: string) =>
      withoutPractice().execute(sql`select person_id from find_sign_in(${email})`);
    expect(await find(ours.engineer.email)).toEqual([{ person_id: ours.engineer.personId }]);
    expect(await find('%')).toEqual([]);
  });

  test('forget a session that has expired', async () => {
    const { practiceId, personId } = ours.engineer;
    const start = (tokenHash: string, seconds: number) =>
      withPractice(ours.engineer, (tx) =>
        tx
          .insert(session)
          .values({ practiceId, personId, tokenHash, expiresAt: new Date(Date.now() + seconds * 1000) }),
      );
    await start('over', -1);
    await start('holds', 60);
    const found = (hash: string) => withoutPractice().execute(sql`select 1 from find_session(${hash})`);
    expect(await found('over')).toHaveLength(0);
    expect(await found('holds')).toHaveLength(1);
  });
});
