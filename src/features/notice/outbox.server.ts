import { and, asc, eq, inArray, lte, ne, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership, person, practice } from '@/db/schema/account';
import { mail } from '@/db/schema/notice';
import { type Tenant, withoutPractice, withPractice } from '@/db/tenancy';
import { log } from '@/lib/log';
import { MailError, type MailServer, type Message, type Sending } from '@/services/mail';
import { composeMail, MailContent } from './message';

/** How mail leaves: through which server, from whom, and where its links lead. */
export interface Mailing {
  readonly server: MailServer;
  readonly from: Message['from'];
  readonly origin: string;
}

const MINUTE = 60_000; // ms
/** A message that the server puts off is tried again after 2, 4, 8 … minutes, at most hours, and so many times. */
const MOST_ATTEMPTS = 12;
const LONGEST_DELAY = 360 * MINUTE;
/** What could not be sent for so long tells nobody anything any more. */
const OLDEST = 5 * 24 * 60 * MINUTE;
/** How long the server's answer to a message may take; then whoever waited for it has died. */
const ANSWER_WITHIN = 10 * MINUTE;
/** Items of one digest; what is left over makes another. */
const MOST_ITEMS = 200;

type Row = typeof mail.$inferSelect;

/** One message: a row of the outbox, or a person's rows of a digest. */
interface Batch {
  readonly rows: readonly [Row, ...Row[]];
}

/**
 * Sends everything that is due, practice by practice, one message after the other. False when the server cannot be
 * reached: the rest waits.
 */
export async function sendDueMail(mailing: Mailing, stopping: AbortSignal): Promise<boolean> {
  const found = await withoutPractice().execute<{ id: string }>(sql`select practices_with_due_mail() as id`);
  for (const { id } of found) {
    const tenant: Tenant = { practiceId: id, personId: null };
    await settleUnanswered(tenant);
    for (let more = true; more; ) {
      if (stopping.aborted) return true;
      const outcome = await sendNext(tenant, mailing);
      if (outcome === 'away') return false;
      more = outcome !== 'none';
    }
  }
  return true;
}

/**
 * The message goes to the server while its rows are locked and marked in a transaction that is not committed. Its end
 * and the COMMIT leave together: killed before, the server drops what it has got and the database the mark, so that it
 * is sent again; killed after, the message is at the server and the mark in the database, so that it is not.
 */
async function sendNext(tenant: Tenant, mailing: Mailing): Promise<'none' | 'done' | 'away'> {
  const begun = await withPractice(tenant, async (tx) => {
    const batch = await claim(tx, tenant);
    if (!batch) return null;
    const message = await toMessage(tx, tenant, batch, mailing);
    if ('hopeless' in message) {
      await giveUp(tx, batch, message.hopeless);
      return { batch, sending: null };
    }
    await tx
      .update(mail)
      .set({
        state: 'sending',
        attempts: sql`${mail.attempts} + 1`,
        dueAt: new Date(Date.now() + ANSWER_WITHIN),
      })
      .where(isIn(tenant, batch));
    const sending = mailing.server.send(message, () => tx.execute(sql`select 1`));
    return { batch, sending, failure: await handOver(tx, tenant, batch, sending) };
  });
  if (!begun) return 'none';
  const { batch, sending, failure } = begun;
  if (failure) return failure.kind === 'away' ? 'away' : 'done';
  return sending ? waitForAnswer(tenant, batch, sending) : 'done';
}

async function handOver(
  tx: Tx,
  tenant: Tenant,
  batch: Batch,
  sending: Sending,
): Promise<MailError | undefined> {
  try {
    await sending.handedOver;
    return undefined;
  } catch (error) {
    if (!(error instanceof MailError)) throw error;
    await postpone(tx, tenant, batch, error);
    return error;
  }
}

async function waitForAnswer(tenant: Tenant, batch: Batch, sending: Sending): Promise<'done' | 'away'> {
  try {
    await sending.taken;
  } catch (error) {
    if (!(error instanceof MailError)) throw error;
    await withPractice(tenant, (tx) => postpone(tx, tenant, batch, error));
    return error.kind === 'away' ? 'away' : 'done';
  }
  await withPractice(tenant, (tx) =>
    tx.update(mail).set({ state: 'sent', sentAt: sql`now()`, error: null }).where(isIn(tenant, batch)),
  );
  return 'done';
}

const isIn = ({ practiceId }: Tenant, { rows }: Batch): SQL | undefined =>
  and(
    eq(mail.practiceId, practiceId),
    inArray(
      mail.id,
      rows.map(({ id }) => id),
    ),
  );

/** The oldest message that is due and that no other worker has in hand; of a digest all that the person is to get. */
async function claim(tx: Tx, { practiceId }: Tenant): Promise<Batch | null> {
  const isDue = and(eq(mail.practiceId, practiceId), eq(mail.state, 'waiting'), lte(mail.dueAt, sql`now()`));
  const take = (where: SQL | undefined, limit: number) =>
    tx
      .select()
      .from(mail)
      .where(and(isDue, where))
      .orderBy(asc(mail.dueAt), asc(mail.createdAt))
      .limit(limit)
      .for('update', { skipLocked: true });
  const [first] = await take(undefined, 1);
  if (!first) return null;
  if (first.mode === 'immediate') return { rows: [first] };
  const others = and(eq(mail.personId, first.personId), eq(mail.mode, 'digest'), ne(mail.id, first.id));
  return { rows: [first, ...(await take(others, MOST_ITEMS - 1))] };
}

async function toMessage(
  tx: Tx,
  { practiceId }: Tenant,
  { rows }: Batch,
  { from, origin }: Mailing,
): Promise<Message | { readonly hopeless: string }> {
  const [first] = rows;
  if (first.createdAt.getTime() < Date.now() - OLDEST)
    return { hopeless: 'It could not be sent for five days.' };
  const [to] = await tx
    .select({ name: person.name, address: person.email, practice: practice.name, active: membership.active })
    .from(membership)
    .innerJoin(person, eq(person.id, membership.personId))
    .innerJoin(practice, eq(practice.id, membership.practiceId))
    .where(and(eq(membership.practiceId, practiceId), eq(membership.personId, first.personId)));
  if (!to?.active) return { hopeless: 'The person has left the practice.' };
  const items = rows.map(({ kind, data }) => ({ kind, content: MailContent.parse(data) }));
  return {
    ...composeMail(items, { origin, practice: to.practice, mode: first.mode }),
    messageId: `${first.id}@${new URL(origin).hostname}`,
    from,
    to: { name: to.name, address: to.address },
  };
}

/** Tries again later, or never: what the server will not take, and what it has put off too often. */
async function postpone(tx: Tx, tenant: Tenant, batch: Batch, error: MailError): Promise<void> {
  const [{ attempts }] = batch.rows;
  if (error.kind === 'refused' || attempts + 1 >= MOST_ATTEMPTS) return giveUp(tx, batch, error.message);
  const delay = Math.min(2 ** (attempts + 1) * MINUTE, LONGEST_DELAY);
  await tx
    .update(mail)
    .set({ state: 'waiting', error: error.message, dueAt: new Date(Date.now() + delay) })
    .where(isIn(tenant, batch));
  log.error('mail put off', { id: batch.rows[0].id, kind: error.kind, reason: error.message });
}

async function giveUp(tx: Tx, batch: Batch, reason: string): Promise<void> {
  const { practiceId, id } = batch.rows[0];
  await tx
    .update(mail)
    .set({ state: 'failed', error: reason })
    .where(isIn({ practiceId, personId: null }, batch));
  log.error('mail given up', { id, reason });
}

/** The worker that handed these over died before the server answered: they are at the server, and not sent again. */
async function settleUnanswered(tenant: Tenant): Promise<void> {
  const settled = await withPractice(tenant, (tx) =>
    tx
      .update(mail)
      .set({ state: 'sent', sentAt: sql`now()`, error: 'The worker ended before the server’s answer.' })
      .where(
        and(eq(mail.practiceId, tenant.practiceId), eq(mail.state, 'sending'), lte(mail.dueAt, sql`now()`)),
      )
      .returning({ id: mail.id }),
  );
  for (const { id } of settled) log.info('mail without an answer', { id });
}
