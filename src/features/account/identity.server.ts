import { eq, sql } from 'drizzle-orm';
import { apiToken, membership, session } from '@/db/schema/account';
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
  unitSystem: sql<string>`unit_system`,
  roles: sql`roles`.mapWith(membership.roles),
};

interface Found extends Omit<User, 'unitSystem' | 'via'> {
  readonly unitSystem: string;
}

const toUser = (found: Found, via: User['via']): User => ({
  practiceId: found.practiceId,
  practiceName: found.practiceName,
  personId: found.personId,
  email: found.email,
  name: found.name,
  initials: found.initials,
  roles: found.roles,
  unitSystem: found.unitSystem.toLowerCase() === 'us' ? 'us' : 'metric',
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
