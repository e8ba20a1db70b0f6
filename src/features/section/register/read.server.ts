import { and, asc, eq } from 'drizzle-orm';
import { LRUCache } from 'lru-cache';
import { driverOf, type Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import type { SectionShape } from '@/engine/section';
import type { SectionField } from '../query';
import { Register, type RegisterEdition, RegisterRows } from './register';

/** Sections that are held in memory, of all practices: 700 bytes each with their names. A practice that has more is held alone. */
const MOST = 500_000;
/** Rows that are taken in between other work: a few milliseconds. */
const AT_ONCE = 2000;

interface Held {
  /** Which editions it was read from: they are frozen, so that it is right as long as they are the issued ones. */
  readonly of: string;
  readonly register: Register;
}
const held = new LRUCache<string, Held>({
  maxSize: MOST,
  sizeCalculation: ({ register }) => Math.min(register.count + 1, MOST),
});
const underWay = new Map<string, Promise<Register>>();

/** The sections of a practice's issued editions as they are now; read anew where an edition has come or gone. */
export async function registerOf(tx: Tx, practiceId: string): Promise<Register> {
  const editions = await issuedEditions(tx, practiceId);
  const of = editions.map(({ revisionId }) => revisionId).join(' ');
  const known = held.get(practiceId);
  if (known?.of === of) return known.register;
  const name = `${practiceId} ${of}`;
  const reading = underWay.get(name) ?? readRegister(tx, practiceId, editions);
  underWay.set(name, reading);
  try {
    const register = await reading;
    held.set(practiceId, { of, register });
    return register;
  } finally {
    underWay.delete(name);
  }
}

function issuedEditions(tx: Tx, practiceId: string): Promise<RegisterEdition[]> {
  return tx
    .select({ revisionId: revision.id, table: document.slug })
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .where(
      and(
        eq(revision.practiceId, practiceId),
        eq(revision.state, 'issued'),
        eq(document.kind, 'section-table'),
      ),
    )
    .orderBy(asc(revision.id))
    .execute();
}

interface Row extends Record<SectionField, number | null> {
  readonly revisionId: string;
  readonly table: string;
  readonly key: string;
  readonly shape: SectionShape;
}

async function readRegister(
  tx: Tx,
  practiceId: string,
  editions: readonly RegisterEdition[],
): Promise<Register> {
  const rows = new RegisterRows();
  // So that 100,000 names are sorted in memory, which takes half as long.
  await driverOf(tx)`select set_config('work_mem', '64MB', true)`;
  const found = driverOf(tx)<Row[]>`
    select revision_id as "revisionId", table_slug as "table", designation_key as key, shape, depth_mm, width_mm, mass_kg_m,
      area_cm2, i_major_cm4, i_minor_cm4, w_el_cm3, w_pl_cm3, j_cm4, iw_cm6,
      round((1000 * coalesce(dimensions ->> 'tw', dimensions ->> 't')::float8)::numeric, 9)::float8 as tw_mm,
      round((1000 * (dimensions ->> 'tf')::float8)::numeric, 9)::float8 as tf_mm,
      round((1000 * coalesce(dimensions ->> 'r', dimensions ->> 'ro')::float8)::numeric, 9)::float8 as r_mm,
      sqrt(i_major_cm4 / area_cm2) as r_major_cm, sqrt(i_minor_cm4 / area_cm2) as r_minor_cm
    from section where practice_id = ${practiceId} and revision_id = any (${editions.map(({ revisionId }) => revisionId)}::uuid[])
    order by family collate "C", sizes, table_slug collate "C"`.cursor(AT_ONCE);
  for await (const batch of found)
    for (const { revisionId, table, key, shape, ...values } of batch)
      rows.add({ revisionId, table, key, shape, values });
  return new Register(rows);
}
