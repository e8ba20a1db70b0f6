import postgres from 'postgres';
import { closeConnection } from '@/db/client';
import { withPractice } from '@/db/tenancy';
import { demoEmail } from '@/features/account/demo';
import type { Role } from '@/features/account/roles';
import { search } from '@/features/search/search.server';

/**
 * How long a search takes at 10,000 documents, one client: milliseconds from the use case's call to its answer.
 *
 *   DATABASE_URL=… OWNER_DATABASE_URL=… npm run bench:search
 *
 * of a database that was prepared with the demo (`npm run db:prepare -- --demo`) and is thrown away afterwards: what is
 * missing of the 10,000 is copied from the demo's own templates, jobs and members, which stay where they are.
 */

const TEMPLATES = 1000;
const JOBS = 400;
const MEMBERS_OF_JOB = 22;
const TIMES = 30;
const TARGET = 50; // ms, at the 95th percentile

const QUERIES = [
  ...['12x26', 'w 12 x 26', 'ipe 300', 'Q-3100', 'LF5'],
  ...['two span', 'propped cantilever overhang', 'transfer girder', 'school roof', 'tomasz', 'withdrawn'],
  ...['propepd overhag', 'cantelevr', 'setlement', 'beam', 'uniform', 'q', 'zzzz'],
];

const owner = postgres(process.env['OWNER_DATABASE_URL'] ?? '', { max: 1, onnotice: () => undefined });

/** The demo's engineer, as the use case wants whoever asks. */
async function engineer() {
  const [found] = await owner<{ practiceId: string; personId: string; roles: Role[] }[]>`
    select practice_id as "practiceId", person_id as "personId", roles from membership join person on person.id = person_id
    where email = ${demoEmail('Tomasz Brindle')}`;
  if (!found) throw new Error('The database has no demo: npm run db:prepare -- --demo');
  return { ...found, unitSystem: 'metric' as const };
}
type Actor = Awaited<ReturnType<typeof engineer>>;

async function fill({ practiceId, personId }: Actor): Promise<void> {
  const [there] = await owner<{ count: number }[]>`
    select count(*)::int as count from search_entry where practice_id = ${practiceId}`;
  if ((there?.count ?? 0) > 10_000) return;
  await owner.begin(async (tx) => {
    await tx`select set_config('app.practice_id', ${practiceId}, true), set_config('statement_timeout', '0', true)`;
    const [{ id: reviewer } = { id: '' }] = await tx<{ id: string }[]>`
      select person_id as id from membership where practice_id = ${practiceId} and 'checker' = any (roles) limit 1`;
    await copyTemplates(tx, practiceId, reviewer);
    await tx`insert into job (practice_id, number, name, client, area, created_by_id, access)
      select ${practiceId}, 'Q-' || 3000 + n,
        (array['School', 'Library', 'Warehouse', 'Station'])[1 + n % 4] || ' ' || (array['extension', 'roof', 'canopy'])[1 + n % 3],
        'Client ' || n, 'Block ' || n % 7, case when n % 2 = 0 then ${personId}::uuid else ${reviewer}::uuid end,
        case when n % 10 = 1 then 'named' else 'practice' end from generate_series(1, ${JOBS}::int) n`;
    await tx`insert into member (practice_id, job_id, mark, title, template_revision_id, section_id, parameters, settings, created_by_id, changed_by_id)
      select ${practiceId}, job.id, (array['B', 'LF', 'RJ'])[1 + n % 3] || n,
        (array['Roof beam', 'Floor beam', 'Balcony joist', 'Transfer girder'])[1 + n % 4] || ', grid ' || n,
        (array(select r.id from revision r join document d on d.id = r.document_id where d.practice_id = ${practiceId} and d.kind = 'template'))[1 + (n * 37) % 1000],
        (array(select id from section where practice_id = ${practiceId}))[1 + n * 7], '{}', '{}', ${personId}, ${personId}
      from job, generate_series(1, ${MEMBERS_OF_JOB}::int) n where job.practice_id = ${practiceId} and job.number ~ '^Q-3'`;
  });
  await owner`analyze`;
}

/** Issued copies of the demo's templates under other names. */
async function copyTemplates(
  tx: postgres.TransactionSql,
  practiceId: string,
  reviewer: string,
): Promise<void> {
  const isCopy = tx`d.practice_id = ${practiceId} and d.slug ~ '-copy-[0-9]+$'`;
  await tx`insert into document (practice_id, kind, slug, reference, name)
    select practice_id, kind, slug || '-copy-' || n, reference || ' copy ' || n, name || ', copy ' || n
    from (select * from document where practice_id = ${practiceId} and kind = 'template') d, generate_series(1, 30) n limit ${TEMPLATES}::int`;
  await tx`insert into revision (practice_id, document_id, number, body, schema_version, engine_version, sha256, author_id, change_note, change_class, consequence)
    select d.practice_id, d.id, 1, r.body, r.schema_version, r.engine_version, r.sha256, r.author_id, 'Taken over as it stood.', 'wording', 'cosmetic'
    from document d join document o on o.practice_id = d.practice_id and o.kind = d.kind and o.slug = regexp_replace(d.slug, '-copy-[0-9]+$', '')
    join revision r on r.practice_id = o.practice_id and r.document_id = o.id and r.state = 'issued' where ${isCopy}`;
  const copies = tx`from document d where revision.practice_id = d.practice_id and revision.document_id = d.id and ${isCopy}`;
  await tx`update revision set state = 'in_review', submitted_at = now() ${copies}`;
  await tx`update revision set state = 'issued', reviewer_id = ${reviewer}, issued_at = now() ${copies}`;
}

const at = (sorted: readonly number[], share: number): string =>
  (sorted[Math.floor(sorted.length * share)] ?? 0).toFixed(1).padStart(7);

async function measure(actor: Actor): Promise<void> {
  const all: number[] = [];
  console.info(`${'typed'.padEnd(30)} found     p50     p95  ms`);
  for (const q of QUERIES) {
    const times: number[] = [];
    let found = 0;
    for (let k = 0; k < TIMES; k++) {
      const start = performance.now();
      found = (await search(actor, { q, from: 0, limit: 50 })).total;
      times.push(performance.now() - start);
    }
    all.push(...times);
    times.sort((a, b) => a - b);
    console.info(`${q.padEnd(30)} ${String(found).padStart(5)} ${at(times, 0.5)} ${at(times, 0.95)}`);
  }
  all.sort((a, b) => a - b);
  console.info(`${'all'.padEnd(36)} ${at(all, 0.5)} ${at(all, 0.95)}  (target at p95: ${TARGET})`);
}

const actor = await engineer();
await fill(actor);
const [size] = await withPractice(actor, (tx) =>
  tx.execute<{ count: number }>('select count(*)::int as count from search_entry'),
);
console.info(`${size?.count} entries open to the engineer`);
await measure(actor);
await closeConnection();
await owner.end();
