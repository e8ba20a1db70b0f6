import { and, asc, count, eq, gt, ilike, inArray, ne, or, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership, person } from '@/db/schema/account';
import { job, jobPerson } from '@/db/schema/job';
import { type Tenant, withPractice } from '@/db/tenancy';
import { type Action, type Person, requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { type Fault, invalid, notFound } from '@/lib/app-error';
import type { JobItem, JobView, NewJob } from './job';

/** Who a use case acts for. */
export type Actor = Person & Tenant & { readonly personId: string };

export interface Page {
  /** The last key of the page before. */
  readonly after?: string | undefined;
  readonly limit: number;
}

export interface Found<T> {
  readonly items: readonly T[];
  /** Where the next page starts; null at the end. */
  readonly next: string | null;
  readonly total: number;
}

const COLUMNS = {
  id: job.id,
  number: job.number,
  name: job.name,
  client: job.client,
  area: job.area,
  basis: job.basis,
  unitSystem: job.unitSystem,
  access: job.access,
  status: job.status,
  version: job.version,
  createdById: job.createdById,
  createdBy: person.name,
  createdAt: job.createdAt,
  changedAt: job.changedAt,
  // Both by name: inside a statement of its own, drizzle writes a column without its table.
  members: sql<number>`(select count(*)::int from member where member.practice_id = job.practice_id and member.job_id = job.id and member.status <> 'removed')`,
};

/** A job that the person may see, as its use cases need it. */
export type JobRow = Awaited<ReturnType<typeof select>>[number];

const select = (tx: Tx, where: SQL | undefined, order: SQL = asc(job.number), limit = 1) =>
  tx
    .select(COLUMNS)
    .from(job)
    .innerJoin(person, eq(person.id, job.createdById))
    .where(where)
    .orderBy(order)
    .limit(limit);

const peopleOf = (tx: Tx, practiceId: string, jobId: string) =>
  tx
    .select({ id: person.id, name: person.name, email: person.email })
    .from(jobPerson)
    .innerJoin(person, eq(person.id, jobPerson.personId))
    .where(and(eq(jobPerson.practiceId, practiceId), eq(jobPerson.jobId, jobId)))
    .orderBy(asc(person.name));

/**
 * A job by its number, for an action on it. The database shows only jobs that are open to the person, so that one
 * without access and one that never was are the same 404; what the role forbids is 403.
 */
export async function openJob(tx: Tx, actor: Actor, number: string, action: Action): Promise<JobRow> {
  const [found] = await select(tx, and(eq(job.practiceId, actor.practiceId), eq(job.number, number)));
  if (!found) throw notFound('This job');
  requirePermission(actor, action, await accessOf(tx, actor, found));
  return found;
}

async function accessOf(tx: Tx, { practiceId }: Actor, { id, access, createdById }: JobRow) {
  if (access === 'practice') return { access } as const;
  const people = await peopleOf(tx, practiceId, id);
  return { access: [createdById, ...people.map((one) => one.id)] };
}

const escaped = (text: string): string => text.replaceAll(/[\\%_]/g, '\\$&');

/** The jobs that are open to the person, by number; `q` narrows them by number, name, client or area. */
export function listJobs(actor: Actor, { q, after, limit }: Page & { q: string }): Promise<Found<JobItem>> {
  requirePermission(actor, 'job.read', { access: 'practice' });
  return withPractice(actor, async (tx) => {
    const pattern = `%${escaped(q)}%`;
    const matching = and(
      eq(job.practiceId, actor.practiceId),
      q === ''
        ? undefined
        : or(...[job.number, job.name, job.client, job.area].map((column) => ilike(column, pattern))),
    );
    const onward = after === undefined ? matching : and(matching, gt(job.number, after));
    const rows = await select(tx, onward, asc(job.number), limit + 1);
    const [total] = await tx.select({ count: count() }).from(job).where(matching);
    const items = rows.slice(0, limit).map(toJobItem);
    return {
      items,
      next: rows.length > limit ? (items.at(-1)?.number ?? null) : null,
      total: total?.count ?? 0,
    };
  });
}

export function readJob(actor: Actor, number: string): Promise<JobView> {
  return withPractice(actor, async (tx) => {
    const row = await openJob(tx, actor, number, 'job.read');
    return toJobView(row, await peopleOf(tx, actor.practiceId, row.id));
  });
}

/** Begins a job. Its number is the practice's own and unique in it; whoever begins it sees it always. */
export function createJob(actor: Actor, body: NewJob): Promise<JobView> {
  requirePermission(actor, 'job.create');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const named = body.access === 'named' ? await peopleByEmail(tx, practiceId, body.people) : [];
    const id = crypto.randomUUID();
    const { unit_system: unitSystem, people: _, ...rest } = body;
    const [made] = await tx
      .insert(job)
      .values({ practiceId, id, createdById: personId, unitSystem, ...rest })
      .onConflictDoNothing()
      .returning({ id: job.id });
    if (!made) throw invalid([numberTaken(body.number)]);
    if (named.length > 0)
      await tx.insert(jobPerson).values(named.map((one) => ({ practiceId, jobId: id, personId: one.id })));
    const row = await openJob(tx, actor, body.number, 'job.read');
    await recordAudit(tx, actor, {
      action: 'job.create',
      subjectKind: 'job',
      subjectId: id,
      after: body,
    });
    return toJobView(row, named);
  });
}

const numberTaken = (number: string): Fault => ({
  pointer: '/number',
  code: 'duplicate',
  message: `Job ${number} exists already. Give another number.`,
});

/** The people of the practice behind these addresses, or a fault at each that is nobody's. */
async function peopleByEmail(tx: Tx, practiceId: string, emails: readonly string[]) {
  if (emails.length === 0) return [];
  const found = await tx
    .select({ id: person.id, name: person.name, email: person.email })
    .from(person)
    .innerJoin(
      membership,
      and(eq(membership.practiceId, practiceId), eq(membership.personId, person.id), membership.active),
    )
    .where(inArray(person.email, [...emails]));
  const faults = emails.flatMap((email, index) =>
    found.some((one) => one.email === email)
      ? []
      : [
          {
            pointer: `/people/${index}`,
            code: 'unknown_person',
            message: `Nobody in the practice has the address ${email}. Correct it, or ask your administrator.`,
          },
        ],
  );
  if (faults.length > 0) throw invalid(faults);
  return found;
}

/** What a save of a member leaves on its job, so that the schedule of jobs shows where work goes on. */
export const touchJob = (tx: Tx, practiceId: string, jobId: string) =>
  tx
    .update(job)
    .set({ changedAt: sql`now()` })
    .where(and(eq(job.practiceId, practiceId), eq(job.id, jobId)));

/** The people of the practice that a job can be opened to. */
export function listColleagues(actor: Actor): Promise<{ name: string; email: string }[]> {
  return withPractice(actor, (tx) =>
    tx
      .select({ name: person.name, email: person.email })
      .from(membership)
      .innerJoin(person, eq(person.id, membership.personId))
      .where(
        and(
          eq(membership.practiceId, actor.practiceId),
          membership.active,
          ne(membership.personId, actor.personId),
        ),
      )
      .orderBy(asc(person.name)),
  );
}

const toJobItem = (row: JobRow): JobItem => ({
  number: row.number,
  name: row.name,
  client: row.client,
  area: row.area,
  unit_system: row.unitSystem,
  access: row.access,
  status: row.status,
  created_by: row.createdBy,
  created_at: row.createdAt.toISOString(),
  changed_at: row.changedAt.toISOString(),
  members: row.members,
});

const toJobView = (row: JobRow, people: readonly { name: string; email: string }[]): JobView => ({
  ...toJobItem(row),
  basis: row.basis,
  version: row.version,
  people: people.map(({ name, email }) => ({ name, email })),
});
