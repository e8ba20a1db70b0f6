import { and, eq, inArray, sql } from 'drizzle-orm';
import { mail } from '@/db/schema/notice';
import { withoutPractice, withPractice } from '@/db/tenancy';

/** Days for which a message that was sent or given up can be looked up; what it told stays in the notices. */
const KEPT = 90;

/** Removes the messages of every practice that were sent or given up long ago. Answers how many. */
export async function sweepMail(now = new Date()): Promise<number> {
  const practices = await withoutPractice().execute<{ id: string }>(sql`select practice_ids() as id`);
  let removed = 0;
  for (const { id } of practices) {
    const gone = await withPractice({ practiceId: id, personId: null }, (tx) =>
      tx
        .delete(mail)
        .where(
          and(
            eq(mail.practiceId, id),
            inArray(mail.state, ['sent', 'failed']),
            sql`coalesce(${mail.sentAt}, ${mail.createdAt}) < ${now.toISOString()}::timestamptz - make_interval(days => ${KEPT})`,
          ),
        )
        .returning({ id: mail.id }),
    );
    removed += gone.length;
  }
  return removed;
}
