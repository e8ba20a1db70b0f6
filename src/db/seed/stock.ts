import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { createStockList, listStock } from '@/features/stock/list.server';
import { replaceStock } from '@/features/stock/replace.server';
import { slugOf } from '@/features/stock/stock';
import { auditEvent } from '../schema/audit';
import { withPractice } from '../tenancy';
import { readShipped, readShippedJson, shippedSlugs } from './files';
import type { DemoPeople } from './people';

const FOLDER = 'demo/stock';
const LIBRARIAN = 'Priyanka Velloor';
const DAY_MS = 86_400_000;

const aboutSchema = z.strictObject({
  supplier: z.string(),
  /** On the day of the first start: one list is old from the beginning. */
  age_days: z.int().nonnegative(),
  note: z.string(),
});

/** The stock lists of invented suppliers, loaded as a librarian would. One that was there once is not brought again. */
export async function seedStock(people: DemoPeople): Promise<void> {
  const librarian = people.get(LIBRARIAN);
  if (!librarian) throw new Error(`${LIBRARIAN} keeps the demo's stock lists`);
  for (const name of await shippedSlugs(FOLDER)) {
    const { supplier, age_days: age, note } = aboutSchema.parse(await readShippedJson(FOLDER, name));
    if (await wasLoaded(librarian.practiceId, slugOf(supplier))) continue;
    const asOf = new Date(Date.now() - age * DAY_MS).toISOString().slice(0, 10);
    const bytes = new TextEncoder().encode(await readShipped(FOLDER, `${name}.csv`));
    const begun = (await listStock(librarian)).find((one) => one.slug === slugOf(supplier));
    const { slug, version } = begun ?? (await createStockList(librarian, { supplier, as_of: asOf, note }));
    await replaceStock(librarian, slug, version, { asOf, bytes });
  }
}

const wasLoaded = (practiceId: string, slug: string): Promise<boolean> =>
  withPractice({ practiceId, personId: null }, async (tx) => {
    const [event] = await tx
      .select({ sequence: auditEvent.sequence })
      .from(auditEvent)
      .where(
        and(
          eq(auditEvent.practiceId, practiceId),
          eq(auditEvent.action, 'stock.replace'),
          sql`${auditEvent.data} -> 'after' ->> 'supplier' = ${slug}`,
        ),
      )
      .limit(1);
    return event !== undefined;
  });
