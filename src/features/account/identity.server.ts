import { eq, sql } from 'drizzle-orm';
import { apiToken, membership, person, session } from '@/db/schema/account';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { hashSecret } from '@/lib/secret';
import type { User } from './account';
import { SESSION_HOURS } from './session';

const HOUR = 3_600_000; // ms
/** Milliseconds between two notes of when a session or token was last used: the rest of the requests only read. */
const NOTED_EVERY = 60_000;

const who = {
  practiceId: sql<string>`practice_id`,
  practiceName: sql<string>`practice_name`,
  personId: sql<string>`person_id`,
  email: sql<string>`email`,
  name: sql<string>`name`,
  initials: sql<string>`initials`,
  unitSystem: sql`unit_system`.mapWith(person.unitSystem),
  roles: sql`roles`.mapWith(membership.roles),
};

/** The row of either lookup without what only it has. */
const toUser = (
  { practiceId, practiceName, personId, email, name, initials, unitSystem, roles }: Omit<User, 'via'>,
  via: User['via'],
): User => ({
  practiceId,
  practiceName,
  personId,
  email,
  name,
  initials,
  unitSystem,
  roles,
  via,
});

/** Whose session this is; null when it has ended, lain idle or outlived the person's membership. */
export async function userOfSession(token: string, now = new Date()): Promise<User | null> {
  const [found] = await withoutPractice()
    .select({
      ...who,
      id: sql<string>`session_id`,
      lastSeenAt: sql`last_seen_at`.mapWith(session.lastSeenAt),
      expiresAt: sql`expires_at`.mapWith(session.expiresAt),
    })
    .from(sql`find_session(${hashSecret(token)})`);
  if (!found) return null;
  const idle = now.getTime() - found.lastSeenAt.getTime();
  if (idle > SESSION_HOURS.idle * HOUR || found.expiresAt <= now) return null;
  if (idle > NOTED_EVERY)
    await withPractice(found, (tx) =>
      tx.update(session).set({ lastSeenAt: now }).where(eq(session.id, found.id)),
    );
  return toUser(found, { kind: 'session', id: found.id });
}

/** Whose bearer token this is; null when it is unknown, expired or withdrawn. */
export async function userOfToken(token: string, now = new Date()): Promise<User | null> {
  const [found] = await withoutPractice()
    .select({
      ...who,
      id: sql<string>`token_id`,
      lastUsedAt: sql`coalesce(last_used_at, 'epoch')`.mapWith(apiToken.lastUsedAt),
    })
    .from(sql`find_api_token(${hashSecret(token)})`);
  if (!found) return null;
  if (now.getTime() - found.lastUsedAt.getTime() > NOTED_EVERY)
    await withPractice(found, (tx) =>
      tx.update(apiToken).set({ lastUsedAt: now }).where(eq(apiToken.id, found.id)),
    );
  return toUser(found, { kind: 'token', id: found.id });
}
