import { createHash } from 'node:crypto';
import { Readable } from 'node:stream';
import { and, desc, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { importMapping, sectionImport } from '@/db/schema/import';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import type { Actor } from '@/features/review/rows.server';
import { recognise, remember, Screening } from '@/features/section/import';
import {
  type Encoding,
  type Mapping,
  MOST_BYTES,
  RECOGNISED_BYTES,
  type Refusal,
} from '@/features/section/import/contract';
import { AppError, invalid } from '@/lib/app-error';
import { contentHash } from '@/lib/fingerprint';
import { log } from '@/lib/log';
import { requireStore } from '@/services/store';
import type { About, ImportView, Recognised } from './imports';
import { holdVersion, type ImportRow, ofImport, requireState, toView } from './rows.server';

/** A file as it comes. */
interface Upload {
  readonly name: string;
  readonly type: string;
  readonly body: AsyncIterable<Uint8Array>;
}

/** What browsers call a CSV file; the last two say nothing. */
const TABLE_TYPES = [
  'text/csv',
  'text/plain',
  'text/tab-separated-values',
  'application/csv',
  'application/vnd.ms-excel',
  'application/octet-stream',
  '',
];
const SOURCE_TYPES = ['application/pdf', 'image/png', 'image/jpeg', 'text/plain', 'text/csv'];

/**
 * Takes a file in: it goes into the store as it comes, and is looked through to its end on the way. Of a file that is
 * refused nothing is kept.
 */
export async function takeUpload(actor: Actor, upload: Upload): Promise<ImportView> {
  requirePermission(actor, 'library.import');
  requireType(upload.type, TABLE_TYPES, 'a table as text: CSV, semicolon or tab separated');
  const id = crypto.randomUUID();
  const key = `${actor.practiceId}/imports/${id}`;
  const name = fileName(upload.name);
  const screening = new Screening(name);
  const kept = await keep(key, upload, (piece) => screening.push(piece));
  try {
    const reading = screening.finish();
    if (!reading.ok) throw refused(reading.refusal);
    return await withPractice(actor, async (tx) => {
      const { recognised, about } = await withMemory(tx, actor.practiceId, reading);
      await tx.insert(sectionImport).values({
        practiceId: actor.practiceId,
        id,
        fileKey: key,
        fileName: name,
        bytes: kept.bytes,
        sha256: kept.sha256,
        recognition: recognised,
        about,
        createdById: actor.personId,
      });
      await recordAudit(tx, actor, {
        action: 'import.upload',
        subjectKind: 'import',
        subjectId: id,
        after: { file: name, bytes: kept.bytes, sha256: kept.sha256 },
      });
      return toView(tx, actor, id);
    });
  } catch (error) {
    await drop(key);
    throw error;
  }
}

/** Takes in the document that the values are from, to lie beside the table. */
export async function takeSource(
  actor: Actor,
  id: string,
  version: number,
  upload: Upload,
): Promise<ImportView> {
  requirePermission(actor, 'library.import');
  requireType(upload.type, SOURCE_TYPES, 'a PDF, a picture or a text');
  await withPractice(actor, async (tx) => requireState(await holdVersion(tx, actor, id, version)));
  const key = `${actor.practiceId}/sources/${crypto.randomUUID()}`;
  const { sha256 } = await keep(key, upload, () => null);
  try {
    const { view, replaced } = await withPractice(actor, async (tx) => {
      const row = await holdVersion(tx, actor, id, version);
      requireState(row);
      const name = fileName(upload.name);
      await tx
        .update(sectionImport)
        .set({ sourceKey: key, sourceName: name, sourceSha256: sha256, changedAt: sql`now()` })
        .where(ofImport(actor.practiceId, id));
      await recordAudit(tx, actor, {
        action: 'import.source',
        subjectKind: 'import',
        subjectId: id,
        after: { file: name, sha256 },
      });
      return { view: await toView(tx, actor, id), replaced: row.sourceKey };
    });
    if (replaced !== null) await drop(replaced);
    return view;
  } catch (error) {
    await drop(key);
    throw error;
  }
}

function requireType(given: string, types: readonly string[], words: string): void {
  const type = given.split(';', 1)[0]?.trim().toLowerCase() ?? '';
  if (types.includes(type)) return;
  const message = `This is “${type}”. Bring ${words}.`;
  throw new AppError('unsupported_media_type', message, { faults: [{ ...OF_FILE, code: 'type', message }] });
}

/** The part of the form that the file is. */
const OF_FILE = { pointer: '/file' } as const;

const refused = (refusal: Refusal): AppError => invalid([{ ...OF_FILE, ...refusal }]);

const tooLarge = () =>
  new AppError('too_large', 'The file is larger than 50 MB. Split the table, or leave columns out.');

/** Without folders, and without what cannot be kept or shown. */
const fileName = (given: string): string =>
  (given.split(/[\\/]/).at(-1) ?? '').replaceAll(/\p{C}/gu, '').trim().slice(0, 200) || 'table.csv';

interface Kept {
  readonly bytes: number;
  readonly sha256: string;
}

/** Puts a stream into the store, counting and hashing on the way, until `screen` refuses a piece of it. */
async function keep(
  key: string,
  { body }: Upload,
  screen: (piece: Uint8Array) => Refusal | null,
): Promise<Kept> {
  const hash = createHash('sha256');
  let bytes = 0;
  async function* measured() {
    for await (const piece of body) {
      bytes += piece.byteLength;
      if (bytes > MOST_BYTES) throw tooLarge();
      hash.update(piece);
      const refusal = screen(piece);
      if (refusal) throw refused(refusal);
      yield piece;
    }
  }
  await requireStore().put(key, Readable.from(measured(), { objectMode: false }), 'application/octet-stream');
  if (bytes === 0) {
    await drop(key);
    throw refused({ code: 'empty', message: 'The file is empty. Choose the file again.' });
  }
  return { bytes, sha256: hash.digest('hex') };
}

const headOf = (chunks: readonly Uint8Array[]): Uint8Array =>
  Buffer.concat(chunks).subarray(0, RECOGNISED_BYTES);

/** The same file read by the encoding that somebody has said it is in. */
export async function recogniseAs(
  row: Pick<ImportRow, 'fileKey' | 'fileName' | 'bytes'>,
  encoding: Encoding,
) {
  const content = await requireStore().read(row.fileKey);
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of content ?? []) {
    chunks.push(chunk);
    bytes += chunk.byteLength;
    if (bytes >= RECOGNISED_BYTES) break;
  }
  const reading = recognise(headOf(chunks), { name: row.fileName, size: row.bytes, encoding });
  if (!reading.ok) throw invalid([{ pointer: '/answers', ...reading.refusal }]);
  return reading;
}

/** What nobody will ask for is no reason to tell a person of. */
const drop = (key: string): Promise<void> =>
  requireStore()
    .remove(key)
    .catch((error: unknown) => log.error('a file that nobody needs is left in the store', { key, error }));

/** SHA-256 of the headings, by which a supplier's next file is known again. */
export const headingsHash = ({ columns }: Mapping): string =>
  contentHash(columns.map(({ heading }) => heading.replaceAll('\ufeff', '').trim().toLowerCase()));

/** What was said of the last file with the same headings, put onto this one. */
async function withMemory(tx: Tx, practiceId: string, reading: Omit<Recognised, 'remembered'>) {
  const [found] = await tx
    .select()
    .from(importMapping)
    .where(
      and(
        eq(importMapping.practiceId, practiceId),
        eq(importMapping.headings, headingsHash(reading.mapping)),
      ),
    )
    .orderBy(desc(importMapping.usedAt))
    .limit(1);
  const mapping = found && remember(found.mapping as Mapping, reading.mapping);
  if (!found || !mapping) return { recognised: { ...reading, remembered: null }, about: null };
  const { catalogue_date: _, ...about } = found.about as About;
  const remembered = { supplier: about.supplier, at: found.usedAt.toISOString() };
  return { recognised: { ...reading, mapping, remembered }, about };
}
