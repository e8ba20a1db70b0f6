import { createHash } from 'node:crypto';
import { Readable } from 'node:stream';
import { and, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { importMapping, sectionImport } from '@/db/schema/import';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import type { Actor } from '@/features/review/rows.server';
import { recognise, remember } from '@/features/section/import';
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
import { holdImport, type ImportRow, ofImport, requireState, toView } from './rows.server';

export interface Upload {
  readonly name: string;
  readonly type: string;
  /** As announced; the stream itself is what counts. */
  readonly length: number | null;
  readonly body: AsyncIterable<Uint8Array> | null;
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
 * Takes a file in: it goes into the store as it comes, and is recognised by its beginning. Of a file that is refused
 * nothing is kept.
 */
export async function takeUpload(actor: Actor, upload: Upload): Promise<ImportView> {
  requirePermission(actor, 'library.import');
  requireType(upload.type, TABLE_TYPES, 'a table as text: CSV, semicolon or tab separated');
  const id = crypto.randomUUID();
  const key = `${actor.practiceId}/imports/${id}`;
  const file = { name: fileName(upload.name), size: upload.length ?? MOST_BYTES };
  const refuse = (head: Uint8Array) => {
    const reading = recognise(head, file);
    if (!reading.ok) throw refused(reading.refusal);
  };
  const kept = await keep(key, upload, refuse);
  try {
    const reading = recognise(kept.head, { ...file, size: kept.bytes });
    if (!reading.ok) throw refused(reading.refusal);
    return await withPractice(actor, async (tx) => {
      const { recognised, about } = await withMemory(tx, actor.practiceId, reading);
      await tx.insert(sectionImport).values({
        practiceId: actor.practiceId,
        id,
        fileKey: key,
        fileName: file.name,
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
        after: { file: file.name, bytes: kept.bytes, sha256: kept.sha256 },
      });
      return toView(tx, actor, id);
    });
  } catch (error) {
    await drop(key);
    throw error;
  }
}

/** Takes in the document that the values are from, to lie beside the table. */
export async function takeSource(actor: Actor, id: string, upload: Upload): Promise<ImportView> {
  requirePermission(actor, 'library.import');
  requireType(upload.type, SOURCE_TYPES, 'a PDF, a picture or a text');
  await withPractice(actor, async (tx) => requireState(await holdImport(tx, actor.practiceId, id)));
  const key = `${actor.practiceId}/sources/${crypto.randomUUID()}`;
  const { sha256 } = await keep(key, upload, () => undefined);
  try {
    return await withPractice(actor, async (tx) => {
      requireState(await holdImport(tx, actor.practiceId, id));
      const name = fileName(upload.name);
      await tx
        .update(sectionImport)
        .set({ sourceKey: key, sourceName: name, sourceSha256: sha256 })
        .where(ofImport(actor.practiceId, id));
      await recordAudit(tx, actor, {
        action: 'import.source',
        subjectKind: 'import',
        subjectId: id,
        after: { file: name, sha256 },
      });
      return toView(tx, actor, id);
    });
  } catch (error) {
    await drop(key);
    throw error;
  }
}

function requireType(given: string, types: readonly string[], words: string): void {
  const type = given.split(';', 1)[0]?.trim().toLowerCase() ?? '';
  if (types.includes(type)) return;
  throw new AppError('unsupported_media_type', `This is “${type}”. Bring ${words}.`, {
    headers: { Accept: types.filter(Boolean).join(', ') },
  });
}

const refused = ({ code, message }: Refusal): AppError => invalid([{ pointer: '', code, message }]);

const tooLarge = () =>
  new AppError('too_large', 'The file is larger than 50 MB. Split the table, or leave columns out.');

/** Without folders, and without what cannot be kept or shown. */
const fileName = (given: string): string =>
  (given.split(/[\\/]/).at(-1) ?? '').replaceAll(/\p{C}/gu, '').trim().slice(0, 200) || 'table.csv';

interface Kept {
  readonly bytes: number;
  readonly sha256: string;
  /** The beginning of the file, or all of it. */
  readonly head: Uint8Array;
}

/** Puts a stream into the store, counting and hashing on the way. `refuse` looks at the beginning as soon as it is there. */
async function keep(
  key: string,
  { length, body }: Upload,
  refuse: (head: Uint8Array) => void,
): Promise<Kept> {
  const store = requireStore();
  if (length !== null && length > MOST_BYTES) throw tooLarge();
  if (!body) throw refused({ code: 'empty', message: 'The file is empty. Choose the file again.' });
  const hash = createHash('sha256');
  const head: Uint8Array[] = [];
  let bytes = 0;
  async function* measured(chunks: AsyncIterable<Uint8Array>) {
    for await (const chunk of chunks) {
      const hadHead = bytes >= RECOGNISED_BYTES;
      bytes += chunk.byteLength;
      if (bytes > MOST_BYTES) throw tooLarge();
      hash.update(chunk);
      if (!hadHead) head.push(chunk);
      if (!hadHead && bytes >= RECOGNISED_BYTES) refuse(headOf(head));
      yield chunk;
    }
  }
  await store.put(key, Readable.from(measured(body), { objectMode: false }), 'application/octet-stream');
  return { bytes, sha256: hash.digest('hex'), head: headOf(head) };
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
  if (!reading.ok) throw refused(reading.refusal);
  return reading;
}

/** What nobody will ask for is no reason to tell a person of. */
const drop = (key: string): Promise<void> =>
  requireStore()
    .remove(key)
    .catch((error: unknown) => log.error('an upload that was refused is left in the store', { key, error }));

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
