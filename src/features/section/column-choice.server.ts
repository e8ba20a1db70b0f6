import { eq } from 'drizzle-orm';
import { person } from '@/db/schema/account';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { requirePermission } from '@/features/account/permission';
import { readColumns } from './address';
import type { ColumnChoice } from './column-choice';

/** What the person has chosen to see of sections, as far as it is known still. */
export function readColumnChoice(user: User): Promise<ColumnChoice> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => {
    const [kept] = await tx
      .select({ columns: person.sectionColumns })
      .from(person)
      .where(eq(person.id, user.personId));
    return { columns: readColumns(kept?.columns ?? []) };
  });
}

/** A way of looking, like the theme: no event of the record. */
export function keepColumnChoice(user: User, choice: ColumnChoice): Promise<ColumnChoice> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => {
    const sectionColumns = choice.columns && [...choice.columns];
    await tx.update(person).set({ sectionColumns }).where(eq(person.id, user.personId));
    return choice;
  });
}
