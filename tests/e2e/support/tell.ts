import postgres from 'postgres';
import { withPractice } from '@/db/tenancy';
import type { Told } from '@/features/notice/notice';
import { tell } from '@/features/notice/notice.server';

/** Tells one person of the demo something, as the product itself does it. */
export async function tellPerson(email: string, told: Omit<Told, 'people'>): Promise<void> {
  const sql = postgres(process.env['OWNER_DATABASE_URL'] ?? '', { max: 1 });
  try {
    const [found] = await sql<{ practiceId: string; personId: string }[]>`
      select practice_id as "practiceId", person_id as "personId"
      from membership join person on person.id = person_id where email = ${email}`;
    if (!found) throw new Error(`${email} is in the demo`);
    await withPractice(found, (tx) => tell(tx, found, { ...told, people: [found.personId] }));
  } finally {
    await sql.end();
  }
}
