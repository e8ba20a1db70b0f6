import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { and, asc, eq, gt, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { section } from '@/db/schema/section';
import { withFingerprint, writeBody } from '@/features/review/body.server';
import type { RevisionRow } from '@/features/review/rows.server';
import { AppError } from '@/lib/app-error';
import type { SectionRow, SectionTableMeta } from './section';

/** An edition's document: where the table comes from, and its rows by their hash, since they are rows of their own. */
export const editionBody = (meta: SectionTableMeta, rows: readonly SectionRow[]) => {
  const hash = new RowsHash();
  for (const row of [...rows].sort((a, b) => byKey(a.key, b.key))) hash.add(row);
  return { ...meta, rows: rows.length, rows_sha256: hash.digest() };
};

/** As the database orders text of the C collation: by code points, which here are ASCII. */
const byKey = (a: string, b: string): number => (a < b ? -1 : Number(a > b));

/** SHA-256 of the canonical JSON of rows in the order of their keys, a row at a time. */
class RowsHash {
  private readonly hash = createHash('sha256').update('[');
  count = 0;

  add(row: SectionRow): void {
    this.hash.update(`${this.count === 0 ? '' : ','}${canonicalize(row)}`, 'utf8');
    this.count += 1;
  }

  digest(): string {
    return this.hash.update(']').digest('hex');
  }
}

interface Edition {
  readonly practiceId: string;
  readonly revisionId: string;
  readonly table: string;
}

/** Rows per statement. */
const AT_ONCE = 2500;

/** Writes the rows of an edition that is still a draft. */
export async function fillEdition(tx: Tx, edition: Edition, rows: readonly SectionRow[]): Promise<void> {
  for (let first = 0; first < rows.length; first += AT_ONCE)
    await insertRows(tx, edition, rows.slice(first, first + AT_ONCE));
}

/** As one parameter: the query builder takes ten times as long over one for each cell. */
async function insertRows(tx: Tx, { practiceId, revisionId, table }: Edition, rows: readonly SectionRow[]) {
  await tx.execute(sql`
    insert into section (practice_id, revision_id, table_slug, designation, designation_key, printed, shape, depth_mm, width_mm,
      mass_kg_m, area_cm2, i_major_cm4, i_minor_cm4, w_el_cm3, w_el_minor_cm3, w_pl_cm3, w_pl_minor_cm3, j_cm4, iw_cm6, computed,
      dimensions)
    select ${practiceId}::uuid, ${revisionId}::uuid, ${table}::text, r.designation, r.key, r.printed, r.shape, r.depth_mm, r.width_mm,
      r.mass_kg_m, r.area_cm2, r.i_major_cm4, r.i_minor_cm4, r.w_el_cm3, r.w_el_minor_cm3, r.w_pl_cm3, r.w_pl_minor_cm3, r.j_cm4,
      r.iw_cm6, r.computed, r.dimensions
    from jsonb_to_recordset(${JSON.stringify(rows)}::text::jsonb) as r (designation text, key text, printed text, shape text,
      depth_mm float8, width_mm float8, mass_kg_m float8, area_cm2 float8, i_major_cm4 float8, i_minor_cm4 float8, w_el_cm3 float8,
      w_el_minor_cm3 float8, w_pl_cm3 float8, w_pl_minor_cm3 float8, j_cm4 float8, iw_cm6 float8, computed text[], dimensions jsonb)`);
}

const ROW = {
  designation: section.designation,
  printed: section.printed,
  key: section.designationKey,
  shape: section.shape,
  depth_mm: section.depthMm,
  width_mm: section.widthMm,
  mass_kg_m: section.massKgM,
  area_cm2: section.areaCm2,
  i_major_cm4: section.iMajorCm4,
  i_minor_cm4: section.iMinorCm4,
  w_el_cm3: section.wElCm3,
  w_el_minor_cm3: sql<number>`${section.wElMinorCm3}`,
  w_pl_cm3: sql<number>`${section.wPlCm3}`,
  w_pl_minor_cm3: sql<number>`${section.wPlMinorCm3}`,
  j_cm4: sql<number>`${section.jCm4}`,
  iw_cm6: sql<number>`${section.iwCm6}`,
  computed: section.computed,
  dimensions: section.dimensions,
};

/** The same hash of an edition's rows as they are stored, a page at a time. */
export async function storedRowsHash(tx: Tx, practiceId: string, revisionId: string) {
  const hash = new RowsHash();
  let page = storedRows(tx, practiceId, revisionId, '');
  for (;;) {
    const rows = await page;
    const last = rows.at(-1);
    if (!last) return { count: hash.count, sha256: hash.digest() };
    page = storedRows(tx, practiceId, revisionId, last.key); // read while these are hashed
    for (const row of rows) hash.add(row);
  }
}

const storedRows = (tx: Tx, practiceId: string, revisionId: string, after: string) =>
  tx
    .select(ROW)
    .from(section)
    .where(
      and(
        eq(section.practiceId, practiceId),
        eq(section.revisionId, revisionId),
        gt(section.designationKey, after),
      ),
    )
    .orderBy(asc(section.designationKey))
    .limit(AT_ONCE)
    .execute();

const COPIED = `table_slug, designation, designation_key, printed, shape, depth_mm, width_mm, mass_kg_m, area_cm2, i_major_cm4,
  i_minor_cm4, w_el_cm3, w_el_minor_cm3, w_pl_cm3, w_pl_minor_cm3, j_cm4, iw_cm6, computed, dimensions`;

/** The rows of one edition as those of another, which is still a draft. */
export const copyRows = (tx: Tx, practiceId: string, from: string, to: string) =>
  tx.execute(sql`
    insert into section (practice_id, revision_id, ${sql.raw(COPIED)})
    select practice_id, ${to}::uuid, ${sql.raw(COPIED)} from section
    where practice_id = ${practiceId} and revision_id = ${from}`);

/** Says what a draft edition is, now that its rows are there; answers with its fingerprint. */
export async function sayEdition(
  tx: Tx,
  draft: RevisionRow,
  body: object,
  more: { readonly editorIds?: string[]; readonly changeNote?: string } = {},
): Promise<string> {
  const written = withFingerprint(body);
  if (await writeBody(tx, draft, written, more)) return written.sha256;
  throw new AppError('conflict', 'Somebody else changed the draft of this edition just now. Try it again.');
}
