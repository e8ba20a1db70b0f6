import { and, desc, eq, gt, isNull, or, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { apiToken } from '@/db/schema/account';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, notFound } from '@/lib/app-error';
import { hashSecret, newSecret } from '@/lib/secret';
import type { User } from './account';
import { MOST_TOKENS, type NewToken, TOKEN_DAYS, type TokenView } from './session';

/** Says whose token was found, in a log or in a file that should not hold one. */
const PREFIX = 'putlog_';
const DAY = 86_400_000; // ms

/** A bearer token that acts as the person with this address, shown this once: what is kept is its hash. */
export async function createApiToken(
  email: string,
  name = 'Command line',
  now = new Date(),
): Promise<string> {
  const [person] = await withoutPractice()
    .select({ practiceId: sql<string>`practice_id`, personId: sql<string>`person_id` })
    .from(sql`find_sign_in(${email})`);
  if (!person) throw new AppError('not_found', `No active person has the e-mail address ${email}.`);
  return withPractice(person, (tx) => insertToken(tx, person, name, now));
}

/** A token of one's own, shown this once. A person keeps so many of them that they can still tell them apart. */
export function makeToken(user: User, body: NewToken, now = new Date()): Promise<string> {
  return withPractice(user, async (tx) => {
    // Of two that are made at once the second waits, and counts the first.
    await tx.execute(sql`select pg_advisory_xact_lock(hashtext(${user.personId}))`);
    const held = await tx.select({ id: apiToken.id }).from(apiToken).where(holding(user, now));
    if (held.length >= MOST_TOKENS)
      throw new AppError(
        'conflict',
        `You hold ${held.length} tokens already. Withdraw one that nothing uses any more.`,
      );
    return insertToken(tx, user, body.name, now);
  });
}

async function insertToken(
  tx: Tx,
  { practiceId, personId }: Pick<User, 'practiceId' | 'personId'>,
  name: string,
  now: Date,
): Promise<string> {
  const token = `${PREFIX}${newSecret()}`;
  await tx.insert(apiToken).values({
    practiceId,
    personId,
    name,
    tokenHash: hashSecret(token),
    createdAt: now,
    expiresAt: new Date(now.getTime() + TOKEN_DAYS * DAY),
  });
  await recordAudit(
    tx,
    { practiceId, personId },
    { action: 'token.create', subjectKind: 'person', subjectId: personId, after: { name } },
  );
  return token;
}

const holding = ({ personId }: Pick<User, 'personId'>, now: Date) =>
  and(
    eq(apiToken.personId, personId),
    isNull(apiToken.revokedAt),
    or(isNull(apiToken.expiresAt), gt(apiToken.expiresAt, now)),
  );

/** The person's tokens that still hold, the newest first. */
export async function listTokens(user: User, now = new Date()): Promise<TokenView[]> {
  const rows = await withPractice(user, (tx) =>
    tx.select().from(apiToken).where(holding(user, now)).orderBy(desc(apiToken.createdAt)),
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
