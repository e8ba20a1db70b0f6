import { and, asc, count, desc, eq, gte, ilike, lt, lte, or, type SQL, sql } from 'drizzle-orm';
import Papa from 'papaparse';
import type { Tx } from '@/db/client';
import { membership, person } from '@/db/schema/account';
import { auditCheck, auditEvent } from '@/db/schema/audit';
import { type Tenant, withPractice } from '@/db/tenancy';
import { type Person, requirePermission } from '@/features/account/permission';
import { invalid } from '@/lib/app-error';
import { recordAudit } from './audit.server';
import type { RecordedEvent, RecordQuery } from './record';

type Actor = Person & Tenant & { readonly personId: string };

const COLUMNS = {
  sequence: auditEvent.sequence,
  at: auditEvent.at,
  name: person.name,
  email: person.email,
  action: auditEvent.action,
  subjectKind: auditEvent.subjectKind,
  subjectId: auditEvent.subjectId,
  data: auditEvent.data,
  hash: auditEvent.hash,
};

const select = (tx: Tx, where: SQL | undefined) =>
  tx.select(COLUMNS).from(auditEvent).leftJoin(person, eq(person.id, auditEvent.actorId)).where(where);

const escaped = (text: string): string => text.replaceAll(/[\\%_]/g, '\\$&');

function matching({ practiceId }: Actor, { person: email, subject, q, from, to }: RecordQuery) {
  const pattern = `%${escaped(q)}%`;
  return and(
    eq(auditEvent.practiceId, practiceId),
    email === '' ? undefined : eq(person.email, email),
    subject === '' ? undefined : eq(auditEvent.subjectKind, subject),
    q === ''
      ? undefined
      : or(
          ilike(auditEvent.action, pattern),
          ilike(auditEvent.subjectId, pattern),
          ilike(sql`${auditEvent.data}::text`, pattern),
        ),
    from === '' ? undefined : gte(auditEvent.at, new Date(`${from}T00:00:00.000Z`)),
    to === '' ? undefined : lte(auditEvent.at, new Date(`${to}T23:59:59.999Z`)),
  );
}

type Row = Awaited<ReturnType<typeof select>>[number];

function toEvent({ at, name, email, subjectKind, subjectId, data, ...rest }: Row): RecordedEvent {
  const { before = null, after = null } = (data ?? {}) as { before?: unknown; after?: unknown };
  return {
    ...rest,
    at: at.toISOString(),
    by: name === null || email === null ? null : { name, email },
    subject_kind: subjectKind,
    subject_id: subjectId,
    before,
    after,
  };
}

function refuseBackwards({ from, to }: RecordQuery): void {
  if (from !== '' && to !== '' && to < from)
    throw invalid([
      { pointer: '/to', code: 'out_of_range', message: 'The last day is before the first. Swap the two.' },
    ]);
}

interface Page {
  /** The number of the last event of the page before. */
  readonly before?: number | undefined;
  readonly limit: number;
}

/** Events of the practice, newest first. */
export function readRecord(actor: Actor, query: RecordQuery, { before, limit }: Page) {
  requirePermission(actor, 'audit.read');
  refuseBackwards(query);
  return withPractice(actor, async (tx) => {
    const where = matching(actor, query);
    const onward = before === undefined ? where : and(where, lt(auditEvent.sequence, before));
    const rows = await select(tx, onward)
      .orderBy(desc(auditEvent.sequence))
      .limit(limit + 1);
    const [total] = await tx
      .select({ count: count() })
      .from(auditEvent)
      .leftJoin(person, eq(person.id, auditEvent.actorId))
      .where(where);
    const items = rows.slice(0, limit).map(toEvent);
    return {
      items,
      next: rows.length > limit ? (items.at(-1)?.sequence ?? null) : null,
      total: total?.count ?? 0,
    };
  });
}

/** How far the record was last read and found whole, and the people whose events can be asked for. */
export function readRecordState(actor: Actor) {
  requirePermission(actor, 'audit.read');
  return withPractice(actor, async (tx) => {
    const [checked] = await tx.select().from(auditCheck);
    const people = await tx
      .select({ name: person.name, email: person.email })
      .from(membership)
      .innerJoin(person, eq(person.id, membership.personId))
      .where(eq(membership.practiceId, actor.practiceId))
      .orderBy(asc(person.name));
    return { checked: checked ?? null, people };
  });
}

const PAGE = 2000;

/** What the record is written out as: a table to read, or every row whole so that the chain can be followed without Putlog. */
export const EXPORT_FORMATS = ['csv', 'jsonl'] as const;
export type ExportFormat = (typeof EXPORT_FORMATS)[number];

/** The events asked for, oldest first, piece by piece; that it was exported is an event as well. */
export async function exportRecord(
  actor: Actor,
  query: RecordQuery,
  format: ExportFormat,
): Promise<AsyncGenerator<string>> {
  requirePermission(actor, 'audit.read');
  refuseBackwards(query);
  await withPractice(actor, (tx) =>
    recordAudit(tx, actor, {
      action: 'record.export',
      subjectKind: 'record',
      subjectId: format,
      after: query,
    }),
  );
  return write(actor, query, format);
}

async function* write(actor: Actor, query: RecordQuery, format: ExportFormat): AsyncGenerator<string> {
  if (format === 'csv') yield `${CSV_HEAD}\r\n`;
  let last = 0;
  for (let read = PAGE; read === PAGE; ) {
    const rows = await page(actor, query, last);
    read = rows.length;
    last = rows.at(-1)?.event.sequence ?? last;
    if (read > 0) yield format === 'csv' ? `${csvOf(rows)}\r\n` : jsonLinesOf(rows);
  }
}

const page = (actor: Actor, query: RecordQuery, after: number) =>
  withPractice(actor, (tx) =>
    tx
      .select({ event: auditEvent, name: person.name })
      .from(auditEvent)
      .leftJoin(person, eq(person.id, auditEvent.actorId))
      .where(and(matching(actor, query), sql`${auditEvent.sequence} > ${after}`))
      .orderBy(asc(auditEvent.sequence))
      .limit(PAGE),
  );

type Exported = Awaited<ReturnType<typeof page>>;

const CSV_HEAD = 'event,at,by,action,subject,id,before,after,hash';

/** Text that a spreadsheet would take for a formula is made harmless. */
const csvOf = (rows: Exported): string =>
  Papa.unparse(
    rows.map(({ event, name }) => {
      const { before, after } = event.data as { before: unknown; after: unknown };
      return [
        event.sequence,
        event.at.toISOString(),
        name ?? '',
        event.action,
        event.subjectKind,
        event.subjectId,
        before === null ? '' : JSON.stringify(before),
        after === null ? '' : JSON.stringify(after),
        event.hash,
      ];
    }),
    { escapeFormulae: true },
  );

const jsonLinesOf = (rows: Exported): string =>
  rows.map(({ event, name }) => `${JSON.stringify({ ...event, by: name })}\n`).join('');
