import { sql } from 'drizzle-orm';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { DEMO_PASSWORD, DEMO_PEOPLE, demoEmail } from '@/features/account/demo';
import { hashPassword } from '@/features/account/password.server';
import type { Role } from '@/features/account/roles';
import { recordAudit } from '@/features/audit/audit.server';
import { credential, membership, person, practice } from '../schema/account';
import { seedJobs } from './jobs';

const DEMO = {
  slug: 'quillmere',
  name: 'Quillmere Structural Partnership',
  offices: ['Tarnholt', 'Pellam'],
};

export interface DemoPerson {
  readonly practiceId: string;
  readonly personId: string;
  readonly roles: readonly Role[];
}

/** The demo's people by name. */
export type DemoPeople = ReadonlyMap<string, DemoPerson>;

/** Founds the demo practice with its people and jobs, unless there is a practice. Whole or not at all. */
export async function foundDemoPractice(): Promise<void> {
  const [any] = await withoutPractice().execute(sql`select from practice_ids()`);
  if (any) return;
  const practiceId = crypto.randomUUID();
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  await withPractice({ practiceId, personId: null }, async (tx) => {
    await tx.insert(practice).values({ id: practiceId, ...DEMO });
    const ids = new Map<string, string>();
    for (const { name, title, roles } of DEMO_PEOPLE) {
      const id = crypto.randomUUID();
      ids.set(name, id);
      await tx.insert(person).values({ id, name, email: demoEmail(name), initials: initialsOf(name) });
      // A credential is written by its person, and by nobody else.
      await tx.execute(sql`select set_config('app.person_id', ${id}, true)`);
      await tx.insert(credential).values({ personId: id, passwordHash });
      await tx.insert(membership).values({ practiceId, personId: id, roles: [...roles], title });
    }
    await seedJobs(tx, practiceId, ids);
    await recordAudit(
      tx,
      { practiceId, personId: null },
      {
        action: 'practice.found',
        subjectKind: 'practice',
        subjectId: practiceId,
        after: DEMO,
      },
    );
  });
}

const initialsOf = (name: string): string => name.replace(/[^A-Z]/g, '');

/** The people of the demo practice as they are now; null where there is no demo practice. */
export async function findDemoPeople(): Promise<DemoPeople | null> {
  const found = await withoutPractice()
    .select({
      practiceId: sql<string>`practice_id`,
      personId: sql<string>`person_id`,
      name: sql<string>`name`,
      roles: sql`roles`.mapWith(membership.roles),
    })
    .from(
      sql`unnest(${sql.param(DEMO_PEOPLE.map(({ name }) => demoEmail(name)))}::text[]) as email, find_sign_in(email)`,
    );
  return found.length === DEMO_PEOPLE.length ? new Map(found.map((each) => [each.name, each])) : null;
}
