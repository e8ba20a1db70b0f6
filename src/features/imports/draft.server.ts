import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { requireRevisionById } from '@/features/review/rows.server';
import { sayEdition, storedRowsHash } from '@/features/section/edition.server';
import type { SectionTableMeta } from '@/features/section/section';
import { About } from './imports';
import type { ImportRow } from './rows.server';

/** The draft of an import that was not written to its end: its rows go, and it is laid aside. */
export async function dropDraft(tx: Tx, { practiceId, revisionId }: ImportRow): Promise<void> {
  if (revisionId === null) return;
  await tx.delete(section).where(and(eq(section.practiceId, practiceId), eq(section.revisionId, revisionId)));
  await tx
    .update(revision)
    .set({ abandonedAt: sql`coalesce(${revision.abandonedAt}, now())` })
    .where(
      and(eq(revision.practiceId, practiceId), eq(revision.id, revisionId), eq(revision.state, 'draft')),
    );
}

const AXES = {
  en: 'y–y is the strong axis, as in EN. W_el and W_pl are the elastic and the plastic modulus.',
  us: 'x–x is the strong axis, as in the US. S is the elastic modulus, Z the plastic one.',
  british:
    'x–x is the strong axis, as in British tables before 2005. Z is the elastic modulus, S the plastic one.',
} as const;

/** Once its rows are all there, the draft says what they are, and can be sent to review. */
export async function finishDraft(tx: Tx, row: ImportRow & { readonly revisionId: string }): Promise<string> {
  const { practiceId, revisionId, mapping } = row;
  const draft = await requireRevisionById(tx, practiceId, revisionId);
  const about = About.parse(row.about);
  const { count, sha256: rowsHash } = await storedRowsHash(tx, practiceId, revisionId);
  const meta = {
    slug: draft.of.slug,
    reference: draft.of.reference,
    name: draft.of.name,
    words: [about.supplier],
    standard: about.standard,
    source: about.source,
    edition: String(draft.number),
    catalogue_date: about.catalogue_date,
    conventions:
      about.conventions || (mapping.axes ? AXES[mapping.axes] : 'The headings say major and minor.'),
    licence: about.licence,
    notes: about.notes.split('\n').filter((line) => line.trim() !== ''),
    ...(mapping.axes && { axes: mapping.axes }),
    ...(mapping.shape && { shape: mapping.shape }),
    density_kg_m3: mapping.density,
    tube_standard: mapping.tubeStandard,
  } satisfies SectionTableMeta;
  const body = {
    ...meta,
    supplier: about.supplier,
    rows: count,
    rows_sha256: rowsHash,
    import: { id: row.id, file: row.fileName, sha256: row.sha256 },
    ...(row.sourceName && { source_document: { file: row.sourceName, sha256: row.sourceSha256 } }),
  };
  return sayEdition(tx, draft, body);
}
