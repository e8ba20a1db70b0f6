import { and, eq, inArray } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership } from '@/db/schema/account';
import { mail, notice, noticePreference } from '@/db/schema/notice';
import type { Tenant } from '@/db/tenancy';
import { publish } from '@/services/events';
import { nextDigest, type Told } from './notice';
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
