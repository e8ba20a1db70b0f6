import { sql } from 'drizzle-orm';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { tell } from '@/features/notice/notice.server';
import { paths } from '@/paths';
import { reviewsDue } from './desk.server';
import { peopleWith } from './people.server';
import { dayOf } from './standing';

/** Tells the librarians of every practice of the reviews that are due, and again when the grace is over; each once. */
export async function remindOfReviews(now: Date = new Date()): Promise<{ due: number }> {
  const practices = await withoutPractice().execute<{ id: string }>(sql`select practice_ids() as id`);
  let due = 0;
  for (const { id } of practices) due += await remindPractice(id, dayOf(now));
  return { due };
}

const remindPractice = (practiceId: string, day: string): Promise<number> => {
  const tenant = { practiceId, personId: null };
  return withPractice(tenant, async (tx) => {
    const documents = await reviewsDue(tx, practiceId, day);
    const people = documents.length > 0 ? await peopleWith(tx, practiceId, ['librarian']) : [];
    for (const one of documents)
      await tell(tx, tenant, {
        people,
        kind: 'review_due',
        title: `${one.reference} was to be reviewed by ${one.review_by}`,
        detail:
          one.review === 'expired'
            ? `The grace is over since ${one.last_day}: no new member may use it.`
            : `New members may use it until ${one.last_day}.`,
        href: paths.libraryDocument(one.kind, one.slug),
        dedupe: `review ${one.kind} ${one.slug} ${one.review_by} ${one.review}`,
        mailData: { reference: one.reference, facts: [{ label: 'Document', value: one.name }] },
      });
    return documents.length;
  });
};
