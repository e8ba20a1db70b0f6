import { and, desc, eq, gt, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { signInAttempt } from '@/db/schema/account';
import { withoutPractice } from '@/db/tenancy';
import { hashSecret } from '@/lib/secret';

/** Refused attempts in the window after which no more are tried. An office shares one address. */
export const ATTEMPTS = { account: 10, address: 60, windowMinutes: 15 } as const;

const WINDOW = ATTEMPTS.windowMinutes * 60_000; // ms
/** How long attempts are kept: past it none counts. */
export const KEPT = 24 * 3_600_000; // ms

export type Admission =
  | { readonly admitted: true; readonly attemptId: string }
  | { readonly admitted: false; readonly retryAfterSeconds: number };

/**
 * Admits an attempt to prove a password, or says how long to wait. An attempt counts as refused until it is told to
 * have succeeded, so that many at once cannot pass the count together.
 */
export async function admitAttempt(email: string, address: string, now: Date): Promise<Admission> {
  const accountHash = hashSecret(`account ${email}`);
  const addressHash = hashSecret(`address ${address}`);
  return withoutPractice().transaction(async (tx) => {
    // In one order for everybody, so that two attempts never wait for each other.
    for (const key of [accountHash, addressHash].sort())
      await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${key}, 0))`);
    const sameAccount = eq(signInAttempt.accountHash, accountHash);
    const sameAddress = eq(signInAttempt.addressHash, addressHash);
    const free = Math.max(
      await freeFrom(tx, sameAccount, ATTEMPTS.account, now, await lastSuccess(tx, sameAccount)),
      await freeFrom(tx, sameAddress, ATTEMPTS.address, now, 0),
    );
    if (free > now.getTime())
      return { admitted: false, retryAfterSeconds: Math.ceil((free - now.getTime()) / 1000) };
    const [attempt] = await tx
      .insert(signInAttempt)
      .values({ accountHash, addressHash, succeeded: false, at: now })
      .returning({ id: signInAttempt.id });
    if (!attempt) throw new Error('An inserted attempt was not returned');
    return { admitted: true, attemptId: attempt.id };
  });
}

/** Notes that an admitted attempt proved the password: the account's count starts anew. */
export async function noteSuccess(attemptId: string, now: Date): Promise<void> {
  await withoutPractice().transaction(async (tx) => {
    const [attempt] = await tx.delete(signInAttempt).where(eq(signInAttempt.id, attemptId)).returning();
    if (attempt) await tx.insert(signInAttempt).values({ ...attempt, succeeded: true, at: now });
  });
}

async function lastSuccess(tx: Tx, same: SQL): Promise<number> {
  const [last] = await tx
    .select({ at: signInAttempt.at })
    .from(signInAttempt)
    .where(and(same, eq(signInAttempt.succeeded, true)))
    .orderBy(desc(signInAttempt.at))
    .limit(1);
  return last?.at.getTime() ?? 0;
}

/** When the next attempt is free: as soon as the oldest of the last `most` refusals leaves the window. */
async function freeFrom(tx: Tx, same: SQL, most: number, now: Date, since: number): Promise<number> {
  const refused = await tx
    .select({ at: signInAttempt.at })
    .from(signInAttempt)
    .where(
      and(
        same,
        eq(signInAttempt.succeeded, false),
        gt(signInAttempt.at, new Date(Math.max(since, now.getTime() - WINDOW))),
      ),
    )
    .orderBy(desc(signInAttempt.at))
    .limit(most);
  const oldest = refused[most - 1];
  return oldest ? oldest.at.getTime() + WINDOW : 0;
}
