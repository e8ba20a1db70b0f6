import { aliasedTable, and, count, desc, eq, lt, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { document } from '@/db/schema/library';
import { request } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { may, requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { tell } from '@/features/notice/notice.server';
import { AppError, invalid, notFound, stale } from '@/lib/app-error';
import { paths } from '@/paths';
import { peopleWith } from './people.server';
import {
  type AnswerRequest,
  type NewRequest,
  REQUEST_KIND_NAMES,
  REQUEST_MOVES,
  type RequestItem,
  type RequestQuery,
  type RequestView,
} from './request';
import type { RequestState } from './review';
import { type Actor, type DocumentKey, type DocumentRow, findDocument } from './rows.server';

const raiser = aliasedTable(person, 'raiser');
const handler = aliasedTable(person, 'handler');

interface Selected {
  readonly row: typeof request.$inferSelect;
  readonly document: Pick<DocumentRow, 'kind' | 'slug' | 'reference' | 'name'> | null;
  readonly raisedBy: string;
  readonly handledBy: string | null;
}

const select = (tx: Tx, where: SQL | undefined, limit: number): Promise<Selected[]> =>
  tx
    .select({
      row: request,
      document: {
        kind: document.kind,
        slug: document.slug,
        reference: document.reference,
        name: document.name,
      },
      raisedBy: raiser.name,
      handledBy: handler.name,
    })
    .from(request)
    .innerJoin(raiser, eq(raiser.id, request.raisedById))
    .leftJoin(handler, eq(handler.id, request.handledById))
    .leftJoin(document, and(eq(document.practiceId, request.practiceId), eq(document.id, request.documentId)))
    .where(where)
    .orderBy(desc(request.number))
    .limit(limit)
    .execute();

/** Anybody may ask for a template or report a fault, from any screen. The librarians are told. */
export function raiseRequest(actor: Actor, given: NewRequest): Promise<RequestView> {
  requirePermission(actor, 'request.raise');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const documentId = await documentIdOf(tx, practiceId, given.document);
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended('request ' || ${practiceId}, 0))`);
    const [last] = await tx
      .select({ number: sql<number>`coalesce(max(${request.number}), 0)` })
      .from(request)
      .where(eq(request.practiceId, practiceId));
    const number = (last?.number ?? 0) + 1;
    const { kind, title, body, context } = given;
    await tx
      .insert(request)
      .values({ practiceId, number, kind, title, body, context, documentId, raisedById: personId });
    const made = await requireRequest(tx, actor, number);
    const librarians = await peopleWith(tx, practiceId, ['librarian']);
    await tell(tx, actor, {
      people: librarians.filter((one) => one !== personId),
      kind: 'request',
      title: `${REQUEST_KIND_NAMES[kind]} ${number}: ${title}`,
      detail: body,
      href: paths.request(number),
      dedupe: `request ${made.row.id}`,
    });
    await recordAudit(tx, actor, {
      action: 'request.raise',
      subjectKind: 'request',
      subjectId: made.row.id,
      after: { number, kind, title, document: given.document },
    });
    return toView(actor, made);
  });
}

async function documentIdOf(tx: Tx, practiceId: string, key: DocumentKey | null): Promise<string | null> {
  if (key === null) return null;
  const found = await findDocument(tx, practiceId, key);
  if (found) return found.id;
  const message = `There is no “${key.slug}” in the library. Leave the document out, or choose another.`;
  throw invalid([{ pointer: '/document', code: 'unknown_document', message }]);
}

/** A request of somebody else's is not there for who is no librarian. */
async function requireRequest(tx: Tx, actor: Actor, number: number): Promise<Selected> {
  const [found] = await select(
    tx,
    and(eq(request.practiceId, actor.practiceId), eq(request.number, number)),
    1,
  );
  if (!found || !may(actor, 'request.read', { authorId: found.row.raisedById }))
    throw notFound(`Request ${number}`);
  return found;
}

export function readRequest(actor: Actor, number: number): Promise<RequestView> {
  return withPractice(actor, async (tx) => toView(actor, await requireRequest(tx, actor, number)));
}

/** The queue of the librarians, the newest first; of everybody else their own. */
export function listRequests(
  actor: Actor,
  { state, kind, mine }: RequestQuery,
  { before, limit }: { readonly before?: number | undefined; readonly limit: number },
): Promise<{ items: RequestItem[]; next: number | null; total: number }> {
  requirePermission(actor, 'request.raise');
  const { practiceId, personId } = actor;
  const isOwn = mine || !may(actor, 'request.answer');
  const matching = and(
    eq(request.practiceId, practiceId),
    state ? eq(request.state, state) : undefined,
    kind ? eq(request.kind, kind) : undefined,
    isOwn ? eq(request.raisedById, personId) : undefined,
  );
  return withPractice(actor, async (tx) => {
    const rows = await select(
      tx,
      before === undefined ? matching : and(matching, lt(request.number, before)),
      limit + 1,
    );
    const [total] = await tx.select({ count: count() }).from(request).where(matching);
    const items = rows.slice(0, limit).map((one): RequestItem => {
      const { body: _, context: __, ...item } = toView(actor, one);
      return item;
    });
    return {
      items,
      next: rows.length > limit ? (items.at(-1)?.number ?? null) : null,
      total: total?.count ?? 0,
    };
  });
}

/** Answers a request or moves it on, over the version that was read. Whoever raised it is told. */
export function answerRequest(
  actor: Actor,
  number: number,
  version: number,
  given: AnswerRequest,
): Promise<RequestView> {
  requirePermission(actor, 'request.answer');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const before = await requireRequest(tx, actor, number);
    if (before.row.version !== version) throw stale(toView(actor, before));
    refuseMove(before.row, given.state);
    const documentId = await documentIdOf(tx, practiceId, given.document);
    const [saved] = await tx
      .update(request)
      .set({
        state: given.state,
        answer: given.answer,
        documentId,
        version: version + 1,
        handledById: personId,
        changedAt: sql`now()`,
      })
      .where(
        and(eq(request.practiceId, practiceId), eq(request.number, number), eq(request.version, version)),
      )
      .returning({ id: request.id });
    const after = await requireRequest(tx, actor, number);
    if (!saved) throw stale(toView(actor, after));
    await tellRaiser(tx, actor, after);
    await recordAudit(tx, actor, {
      action: 'request.answer',
      subjectKind: 'request',
      subjectId: saved.id,
      before: { state: before.row.state, answer: before.row.answer },
      after: given,
    });
    return toView(actor, after);
  });
}

function refuseMove({ number, state }: { number: number; state: RequestState }, to: RequestState): void {
  if (to === state || REQUEST_MOVES[state].includes(to)) return;
  throw new AppError(
    'illegal_step',
    `Request ${number} is ${state}: it can become ${REQUEST_MOVES[state].join(' or ')}.`,
  );
}

async function tellRaiser(tx: Tx, actor: Actor, { row }: Selected): Promise<void> {
  if (row.raisedById === actor.personId) return;
  await tell(tx, actor, {
    people: [row.raisedById],
    kind: 'request',
    title: `Your ${row.kind} ${row.number} is ${row.state}: ${row.title}`,
    detail: row.answer,
    href: paths.request(row.number),
    dedupe: `request ${row.id} version ${row.version}`,
  });
}

function toView(actor: Actor, { row, document: about, raisedBy, handledBy }: Selected): RequestView {
  return {
    number: row.number,
    kind: row.kind,
    title: row.title,
    body: row.body,
    context: Object(row.context),
    document: about,
    state: row.state,
    moves: may(actor, 'request.answer') ? [...REQUEST_MOVES[row.state]] : [],
    answer: row.answer,
    version: row.version,
    raised_by: raisedBy,
    mine: row.raisedById === actor.personId,
    created_at: row.createdAt.toISOString(),
    handled_by: handledBy,
    changed_at: row.changedAt.toISOString(),
  };
}
