import { and, count, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { sectionImport } from '@/db/schema/import';
import { section } from '@/db/schema/section';
import { findRevision, type LibraryRevision } from '@/features/review/library.server';
import { editionDocument } from '@/features/section/edition';
import { countAgainst } from '@/features/section/edition-changes.server';
import { identityFindings } from '@/features/section/import';
import type { CheckedRow, FileFacts, FileIdentity, Finding } from '@/features/section/import/contract';
import { About, type Against } from './imports';
import type { ImportRow } from './rows.server';

/** The issued edition of the table that the import is of; none of a table that has none. */
async function issuedEdition(tx: Tx, row: ImportRow): Promise<LibraryRevision | null> {
  const { table } = About.parse(row.about);
  const found = await findRevision(tx, row.practiceId, { kind: 'section-table', slug: table });
  return found?.state === 'issued' ? found : null;
}

/** How many of the issued edition's rows these are, and how many of them changed, added to what was counted before. */
export async function compareRows(
  tx: Tx,
  row: ImportRow,
  rows: readonly CheckedRow[],
): Promise<Against | null> {
  const issued = await issuedEdition(tx, row);
  if (!issued) return null;
  const before = row.report?.against ?? { matched: 0, changed: 0 };
  const found = await countAgainst(
    tx,
    row.practiceId,
    issued.revisionId,
    rows.map((one) => one.row),
  );
  return { matched: before.matched + found.matched, changed: before.changed + found.changed };
}

/** Rule 40: what the file is against the one that the issued edition was made of. */
export async function identityOf(tx: Tx, row: ImportRow, against: Against | null): Promise<Finding[]> {
  const issued = await issuedEdition(tx, row);
  if (!issued || !row.facts || !against) return [];
  const { source, catalogue_date: date } = About.parse(row.about);
  const { rowCount, columnSums } = row.facts;
  const of = await rowsOf(tx, row.practiceId, issued.revisionId);
  return identityFindings(
    { rowCount, columnSums, sha256: row.sha256, source, date },
    await previousIdentity(tx, row.practiceId, issued, of),
    { changed: against.changed, removed: of - against.matched, of },
  );
}

async function rowsOf(tx: Tx, practiceId: string, revisionId: string): Promise<number> {
  const [found] = await tx
    .select({ rows: count() })
    .from(section)
    .where(and(eq(section.practiceId, practiceId), eq(section.revisionId, revisionId)));
  return found?.rows ?? 0;
}

async function previousIdentity(
  tx: Tx,
  practiceId: string,
  issued: LibraryRevision,
  rows: number,
): Promise<FileIdentity> {
  const { source, catalogue_date: printed } = editionDocument.parse(issued.body);
  const [made] = await tx
    .select({ sha256: sectionImport.sha256, facts: sectionImport.facts })
    .from(sectionImport)
    .where(and(eq(sectionImport.practiceId, practiceId), eq(sectionImport.revisionId, issued.revisionId)))
    .orderBy(desc(sectionImport.createdAt))
    .limit(1);
  const facts = made?.facts as FileFacts | undefined;
  return {
    sha256: made?.sha256 ?? issued.sha256,
    rowCount: facts?.rowCount ?? rows,
    columnSums: facts?.columnSums ?? {},
    source,
    date: printed ?? issued.date.toISOString().slice(0, 10),
  };
}
