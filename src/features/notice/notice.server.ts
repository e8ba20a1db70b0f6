import { and, count, desc, eq, inArray, isNull, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership } from '@/db/schema/account';
import { mail, notice, noticePreference } from '@/db/schema/notice';
import { type Tenant, withPractice } from '@/db/tenancy';
import { publish } from '@/services/events';
import { type MarkRead, type NoticePlace, type NoticeView, nextDigest, type Told } from './notice';
import { USUAL_MODE } from './terms';

/** Rows of one INSERT: a statement takes 65 535 parameters. */
const AT_ONCE = 2000;

/**
 * Tells people of something, in the transaction in which it happens: a notice in the app and, as each has chosen, a
 * message in the outbox. Whoever was told of the event, or has left the practice, is passed over.
 */
export async function tell(
  tx: Tx,
  { practiceId }: Tenant,
  told: Told,
  now: Date = new Date(),
): Promise<void> {
  const people = [...new Set(told.people)];
  for (let at = 0; at < people.length; at += AT_ONCE)
    await tellSome(tx, practiceId, { ...told, people: people.slice(at, at + AT_ONCE) }, now);
}

async function tellSome(tx: Tx, practiceId: string, told: Told, now: Date): Promise<void> {
  const { kind, title, detail = '', href, dedupe, mailData = {} } = told;
  const modes = await modesOf(tx, practiceId, told);
  if (modes.size === 0) return;
  const new_ = await tx
    .insert(notice)
    .values(
      [...modes.keys()].map((personId) => ({ practiceId, personId, kind, title, detail, href, dedupe })),
    )
    .onConflictDoNothing()
    .returning({ personId: notice.personId });
  const messages = new_.flatMap(({ personId }) => {
    const mode = modes.get(personId) ?? 'none';
    if (mode === 'none') return [];
    const dueAt = mode === 'digest' ? nextDigest(now) : now;
    return [{ practiceId, personId, kind, mode, dedupe, dueAt, data: { title, detail, href, ...mailData } }];
  });
  if (messages.length > 0) await tx.insert(mail).values(messages).onConflictDoNothing();
  await publish(
    tx,
    practiceId,
    new_.map(({ personId }) => personId),
    { type: 'notice' },
  );
}

/** How each of the people who are still in the practice takes e-mail of the kind. A recall always comes at once. */
async function modesOf(tx: Tx, practiceId: string, { people, kind }: Told) {
  const rows = await tx
    .select({ personId: membership.personId, chosen: noticePreference.mode })
    .from(membership)
    .leftJoin(
      noticePreference,
      and(
        eq(noticePreference.practiceId, membership.practiceId),
        eq(noticePreference.personId, membership.personId),
        eq(noticePreference.kind, kind),
      ),
    )
    .where(
      and(
        eq(membership.practiceId, practiceId),
        eq(membership.active, true),
        inArray(membership.personId, [...people]),
      ),
    );
  const usual = USUAL_MODE[kind];
  return new Map(
    rows.map(({ personId, chosen }) => [personId, kind === 'recall' ? usual : (chosen ?? usual)]),
  );
}

type Reader = Tenant & { readonly personId: string };

const ofReader = ({ practiceId, personId }: Reader): SQL | undefined =>
  and(eq(notice.practiceId, practiceId), eq(notice.personId, personId));

const isUnread = isNull(notice.readAt);

export const countUnread = (reader: Reader): Promise<number> =>
  withPractice(reader, (tx) => unreadOf(tx, reader));

async function unreadOf(tx: Tx, reader: Reader): Promise<number> {
  const [found] = await tx
    .select({ unread: count() })
    .from(notice)
    .where(and(ofReader(reader), isUnread));
  return found?.unread ?? 0;
}

export interface NoticePage {
  readonly items: readonly NoticeView[];
  readonly next: NoticePlace | null;
  readonly total: number;
  readonly unread: number;
}

/** The person's own notices: unread before read, each newest first. */
export function listNotices(
  reader: Reader,
  { limit, after }: { readonly limit: number; readonly after?: NoticePlace | undefined },
): Promise<NoticePage> {
  return withPractice(reader, async (tx) => {
    const onward = after
      ? sql`(${isUnread}, ${notice.createdAt}, ${notice.id}) < (${after[0]}::boolean, ${after[1]}::timestamptz, ${after[2]}::uuid)`
      : undefined;
    const rows = await tx
      // The driver's dates end at milliseconds; the place must not.
      .select({ ...SHOWN, place: sql<string>`${notice.createdAt}::text` })
      .from(notice)
      .where(and(ofReader(reader), onward))
      .orderBy(desc(isUnread), desc(notice.createdAt), desc(notice.id))
      .limit(limit + 1);
    const shown = rows.slice(0, limit);
    const last = rows.length > limit ? shown.at(-1) : undefined;
    const [all] = await tx.select({ total: count() }).from(notice).where(ofReader(reader));
    return {
      items: shown.map(toView),
      next: last ? [last.readAt === null, last.place, last.id] : null,
      total: all?.total ?? 0,
      unread: await unreadOf(tx, reader),
    };
  });
}

const SHOWN = {
  id: notice.id,
  kind: notice.kind,
  title: notice.title,
  detail: notice.detail,
  href: notice.href,
  createdAt: notice.createdAt,
  readAt: notice.readAt,
};

type Row = Pick<typeof notice.$inferSelect, keyof typeof SHOWN>;

const toView = ({ id, kind, title, detail, href, createdAt, readAt }: Row): NoticeView => ({
  id,
  kind,
  title,
  detail,
  href,
  created_at: createdAt.toISOString(),
  read_at: readAt?.toISOString() ?? null,
});

/** Marks as read; the person's other open pages learn of it. Answers how many are left. */
export function markRead(reader: Reader, which: MarkRead): Promise<number> {
  return withPractice(reader, async (tx) => {
    const read = await tx
      .update(notice)
      .set({ readAt: sql`now()` })
      .where(and(ofReader(reader), isUnread, meant(which)))
      .returning({ id: notice.id });
    if (read.length > 0) await publish(tx, reader.practiceId, reader.personId, { type: 'notice' });
    return unreadOf(tx, reader);
  });
}

function meant(which: MarkRead): SQL {
  if ('ids' in which) return inArray(notice.id, which.ids);
  if ('href' in which) return sql`split_part(${notice.href}, '#', 1) = ${which.href}`;
  return sql`date_trunc('milliseconds', ${notice.createdAt}) <= ${which.until}::timestamptz`;
}
