import type { Tx } from '@/db/client';
import { section } from '@/db/schema/section';
import { contentHash } from '@/lib/fingerprint';
import type { SectionRow, SectionTableMeta } from './section';

/** An edition's document: where the table comes from, and its rows by their hash, since they are rows of their own. */
export const editionBody = (meta: SectionTableMeta, rows: readonly SectionRow[]) => ({
  ...meta,
  rows: rows.length,
  rows_sha256: contentHash(rows),
});

interface Edition {
  readonly practiceId: string;
  readonly revisionId: string;
  readonly table: string;
}

/** Rows per statement; PostgreSQL takes 65,535 parameters at a time. */
const AT_ONCE = 500;

/** Writes the rows of an edition that is still a draft. */
export async function fillEdition(tx: Tx, edition: Edition, rows: readonly SectionRow[]): Promise<void> {
  for (let first = 0; first < rows.length; first += AT_ONCE)
    await tx.insert(section).values(rows.slice(first, first + AT_ONCE).map((row) => toColumns(edition, row)));
}

const toColumns = ({ practiceId, revisionId, table }: Edition, row: SectionRow) => ({
  practiceId,
  revisionId,
  tableSlug: table,
  designation: row.designation,
  designationKey: row.key,
  printed: row.printed,
  shape: row.shape,
  depthMm: row.depth_mm,
  widthMm: row.width_mm,
  massKgM: row.mass_kg_m,
  areaCm2: row.area_cm2,
  iMajorCm4: row.i_major_cm4,
  iMinorCm4: row.i_minor_cm4,
  wElCm3: row.w_el_cm3,
  wElMinorCm3: row.w_el_minor_cm3,
  wPlCm3: row.w_pl_cm3,
  wPlMinorCm3: row.w_pl_minor_cm3,
  jCm4: row.j_cm4,
  iwCm6: row.iw_cm6,
  computed: row.computed,
  dimensions: row.dimensions,
});
