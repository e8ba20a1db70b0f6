import { and, desc, eq, gt, isNull, or, sql } from 'drizzle-orm';
import { apiToken } from '@/db/schema/account';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, notFound } from '@/lib/app-error';
import { hashSecret, newSecret } from '@/lib/secret';
import type { User } from './account';
import type { TokenView } from './session';

/** Says whose token was found, in a log or in a file that should not hold one. */
const PREFIX = 'putlog_';
const DAYS = 90;
const DAY = 86_400_000; // ms

/** A bearer token that acts as this person, shown this once: what is kept is its hash. */
export async function createApiToken(
  email: string,
  name = 'Command line',
  now = new Date(),
): Promise<string> {
  const [person] = await withoutPractice()
    .select({ practiceId: sql<string>`practice_id`, personId: sql<string>`person_id` })
    .from(sql`find_sign_in(${email})`);
  if (!person) throw new AppError('not_found', `No active person has the e-mail address ${email}.`);
  const token = `${PREFIX}${newSecret()}`;
  await withPractice(person, async (tx) => {
    await tx.insert(apiToken).values({
      ...person,
      name,
      tokenHash: hashSecret(token),
      createdAt: now,
      expiresAt: new Date(now.getTime() + DAYS * DAY),
    });
    await recordAudit(tx, person, {
      action: 'token.create',
      subjectKind: 'person',
      subjectId: person.personId,
      after: { name },
    });
  });
  return token;
}

/** The person's tokens that still hold, the newest first. */
export async function listTokens(user: User, now = new Date()): Promise<TokenView[]> {
  const rows = await withPractice(user, (tx) =>
    tx
      .select()
      .from(apiToken)
      .where(
        and(
          eq(apiToken.personId, user.personId),
          isNull(apiToken.revokedAt),
          or(isNull(apiToken.expiresAt), gt(apiToken.expiresAt, now)),
        ),
      )
      .orderBy(desc(apiToken.createdAt)),
  );
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    created_at: row.createdAt.toISOString(),
    last_used_at: row.lastUsedAt?.toISOString() ?? null,
    ends_at: row.expiresAt?.toISOString() ?? null,
  }));
}

/** Withdraws one of the person's tokens, at once. */
export async function revokeToken(user: User, id: string, now = new Date()): Promise<void> {
  await withPractice(user, async (tx) => {
    const [revoked] = await tx
      .update(apiToken)
      .set({ revokedAt: now })
      .where(and(eq(apiToken.personId, user.personId), eq(apiToken.id, id), isNull(apiToken.revokedAt)))
      .returning({ name: apiToken.name });
    if (!revoked) throw notFound('This token');
    await recordAudit(tx, user, {
      action: 'token.revoke',
      subjectKind: 'person',
      subjectId: user.personId,
      before: revoked,
    });
  });
}
