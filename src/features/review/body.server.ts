import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { ENGINE_VERSION } from '@/engine/version';
import { fingerprint } from '@/lib/fingerprint';
import type { RevisionRow } from './rows.server';

type Columns = typeof revision.$inferInsert;

/** What a draft says, as its columns: with its fingerprint and the engine that would compute it. */
export const withFingerprint = (
  body: unknown,
): Pick<Columns, 'body' | 'sha256' | 'engineVersion'> & { sha256: string } => ({
  body,
  sha256: fingerprint(body, ENGINE_VERSION),
  engineVersion: ENGINE_VERSION,
});

/** Writes what a draft says over the version that was read. Whether it did: not where it is another now, or no draft any more. */
export async function writeBody(
  tx: Tx,
  { practiceId, id, version }: RevisionRow,
  body: ReturnType<typeof withFingerprint>,
  more: Partial<Columns>,
): Promise<boolean> {
  const written = await tx
    .update(revision)
    .set({ ...more, ...body, version: version + 1 })
    .where(
      and(
        eq(revision.practiceId, practiceId),
        eq(revision.id, id),
        eq(revision.version, version),
        eq(revision.state, 'draft'),
      ),
    )
    .returning({ id: revision.id });
  return written.length > 0;
}
