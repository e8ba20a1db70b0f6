import { and, arrayOverlaps, eq, inArray } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership, person } from '@/db/schema/account';
import type { Role } from '@/features/account/roles';

/** Everybody who is active in the practice with one of the roles. */
export async function peopleWith(tx: Tx, practiceId: string, roles: readonly Role[]): Promise<string[]> {
  const found = await tx
    .select({ id: membership.personId })
    .from(membership)
    .where(
      and(
        eq(membership.practiceId, practiceId),
        eq(membership.active, true),
        arrayOverlaps(membership.roles, [...roles]),
      ),
    );
  return found.map(({ id }) => id);
}

/** The names of people of the practice by their ids. */
export async function namesOf(tx: Tx, ids: readonly (string | null)[]): Promise<ReadonlyMap<string, string>> {
  const wanted = [...new Set(ids.filter((id) => id !== null))];
  if (wanted.length === 0) return new Map();
  const found = await tx
    .select({ id: person.id, name: person.name })
    .from(person)
    .where(inArray(person.id, wanted));
  return new Map(found.map(({ id, name }) => [id, name]));
}
