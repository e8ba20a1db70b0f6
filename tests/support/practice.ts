import { eq } from 'drizzle-orm';
import { connect } from '@/db/client';
import { credential, membership, person, practice } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import { hashPassword } from '@/features/account/password.server';
import type { Role } from '@/features/account/roles';

const ownerUrl = process.env['OWNER_DATABASE_URL'];
if (!ownerUrl) throw new Error('Run the database tests with: node scripts/test.mjs --only database');

/** The database's owner, for what the product itself may not do: found a practice, let a person go. */
export const owner = connect(ownerUrl, 2);

export const PASSWORD = 'nine oak joists';
const passwordHash = hashPassword(PASSWORD);

export interface Member {
  readonly practiceId: string;
  readonly personId: string;
  readonly email: string;
  readonly roles: readonly Role[];
}

/** A new practice with one person for each list of roles. Every test founds its own and cleans up after nobody. */
export async function foundPractice<const S extends readonly (readonly Role[])[]>(
  ...staff: S
): Promise<{ -readonly [K in keyof S]: Member }> {
  const practiceId = crypto.randomUUID();
  const hash = await passwordHash;
  return withPractice(
    { practiceId, personId: null },
    async (tx) => {
      await tx
        .insert(practice)
        .values({ id: practiceId, slug: `practice-${practiceId}`, name: 'Practice under test' });
      const members: Member[] = [];
      for (const [index, roles] of staff.entries()) {
        const personId = crypto.randomUUID();
        const email = `${roles[0]}.${index}@${practiceId}.example`;
        members.push({ practiceId, personId, email, roles });
        await tx.insert(person).values({ id: personId, email, name: `Person ${index}`, initials: 'P' });
        await tx.insert(credential).values({ personId, passwordHash: hash });
        await tx.insert(membership).values({ practiceId, personId, roles: [...roles] });
      }
      return members as { -readonly [K in keyof S]: Member };
    },
    owner.db,
  );
}

/** As an administrator lets a person go. */
export const letGo = ({ practiceId, personId }: Member) =>
  withPractice(
    { practiceId, personId: null },
    (tx) => tx.update(membership).set({ active: false }).where(eq(membership.personId, personId)),
    owner.db,
  );
