import { eq, sql } from 'drizzle-orm';
import { credential } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, invalid } from '@/lib/app-error';
import type { User } from './account';
import { admitAttempt, noteSuccess } from './attempt.server';
import { type ChangePassword, weakness } from './password';
import { hashPassword, verifyPassword } from './password.server';
import type { RequestSource } from './session';
import { endOtherSessions } from './session.server';
import { waitWords } from './sign-in.server';

/** Changes the person's own password. Their other sessions end: whoever knew the old one is out. */
export async function changePassword(
  user: User,
  { current, password }: ChangePassword,
  from: RequestSource,
  now = new Date(),
): Promise<void> {
  const admission = await admitAttempt(user.email, from.address, now);
  if (!admission.admitted)
    throw new AppError('too_many_requests', waitWords(admission.retryAfterSeconds), {
      headers: { 'Retry-After': String(admission.retryAfterSeconds) },
    });
  const [kept] = await withPractice(user, (tx) =>
    tx.select().from(credential).where(eq(credential.personId, user.personId)),
  );
  if (!(await verifyPassword(kept?.passwordHash ?? null, current)))
    throw invalid([
      { pointer: '/current', code: 'wrong', message: 'This is not your current password. Type it again.' },
    ]);
  await noteSuccess(admission.attemptId, now);
  const weak = weakness(password, user);
  if (weak) throw invalid([{ pointer: '/password', code: 'weak', message: weak }]);

  const passwordHash = await hashPassword(password);
  await withPractice(user, async (tx) => {
    await tx
      .update(credential)
      .set({ passwordHash, changedAt: sql`now()` })
      .where(eq(credential.personId, user.personId));
    const ended = await endOtherSessions(tx, user);
    await recordAudit(tx, user, {
      action: 'password.change',
      subjectKind: 'person',
      subjectId: user.personId,
      after: { sessionsEnded: ended },
    });
  });
}
