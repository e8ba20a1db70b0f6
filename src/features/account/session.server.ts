import { and, desc, eq, gt, ne } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { session } from '@/db/schema/account';
import { type Tenant, withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { notFound } from '@/lib/app-error';
import { hashSecret, newSecret } from '@/lib/secret';
import type { User } from './account';
import { deviceName, type RequestSource, SESSION_HOURS, type SessionView } from './session';

const HOUR = 3_600_000; // ms

/** Begins a session and gives its token, which is known to the browser alone. */
export async function startSession(
  tx: Tx,
  tenant: Tenant & { personId: string },
  from: RequestSource,
  now: Date,
): Promise<string> {
  const token = newSecret();
  await tx.insert(session).values({
    practiceId: tenant.practiceId,
    personId: tenant.personId,
    tokenHash: hashSecret(token),
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(now.getTime() + SESSION_HOURS.absolute * HOUR),
    address: from.address,
    agent: from.agent,
  });
  await recordAudit(tx, tenant, {
    action: 'session.start',
    subjectKind: 'person',
    subjectId: tenant.personId,
    after: from,
  });
  return token;
}

const idleSince = (now: Date): Date => new Date(now.getTime() - SESSION_HOURS.idle * HOUR);

const ownSessions = ({ personId }: { personId: string }) => eq(session.personId, personId);

/** The person's sessions that still hold, the one seen last first. */
export async function listSessions(user: User, now = new Date()): Promise<SessionView[]> {
  const rows = await withPractice(user, (tx) =>
    tx
      .select()
      .from(session)
      .where(and(ownSessions(user), gt(session.expiresAt, now), gt(session.lastSeenAt, idleSince(now))))
      .orderBy(desc(session.lastSeenAt)),
  );
  return rows.map((row) => ({
    id: row.id,
    device: deviceName(row.agent),
    address: row.address ?? '',
    started_at: row.createdAt.toISOString(),
    last_seen_at: row.lastSeenAt.toISOString(),
    ends_at: row.expiresAt.toISOString(),
    current: user.via.kind === 'session' && user.via.id === row.id,
  }));
}

/** Ends one of the person's sessions: their own sign-out, or a forgotten device. */
export async function endSession(user: User, id: string): Promise<void> {
  await withPractice(user, async (tx) => {
    const [ended] = await tx
      .delete(session)
      .where(and(ownSessions(user), eq(session.id, id)))
      .returning();
    if (!ended) throw notFound('This session');
    await recordAudit(tx, user, {
      action: 'session.end',
      subjectKind: 'person',
      subjectId: user.personId,
      before: { address: ended.address, agent: ended.agent },
    });
  });
}

/** Signs the person out everywhere. Tokens go on: they are listed and withdrawn by themselves. */
export async function endAllSessions(user: User): Promise<number> {
  return withPractice(user, async (tx) => {
    const ended = await tx.delete(session).where(ownSessions(user)).returning({ id: session.id });
    await recordAudit(tx, user, {
      action: 'session.end-all',
      subjectKind: 'person',
      subjectId: user.personId,
      before: { sessions: ended.length },
    });
    return ended.length;
  });
}

/** Ends every session but the one that asks, as after a change of the password. */
export async function endOtherSessions(tx: Tx, user: User): Promise<number> {
  const others = user.via.kind === 'session' ? ne(session.id, user.via.id) : undefined;
  const ended = await tx
    .delete(session)
    .where(and(ownSessions(user), others))
    .returning({ id: session.id });
  return ended.length;
}
