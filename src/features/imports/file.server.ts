import { Readable } from 'node:stream';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { Actor } from '@/features/review/rows.server';
import { notFound } from '@/lib/app-error';
import { requireStore } from '@/services/store';
import { findImport } from './rows.server';

/** The file of an import, or the document that its values are from, for whoever may read the library. */
export async function openFile(actor: Actor, id: string, which: 'file' | 'source') {
  requirePermission(actor, 'library.read');
  const row = await withPractice(actor, (tx) => findImport(tx, actor.practiceId, id));
  const key = which === 'file' ? row.fileKey : row.sourceKey;
  const content = key && (await requireStore().read(key));
  if (!content) throw notFound('This file');
  return {
    name: which === 'file' ? row.fileName : (row.sourceName ?? ''),
    bytes: which === 'file' ? row.bytes : null,
    content: Readable.toWeb(content) as ReadableStream,
  };
}
