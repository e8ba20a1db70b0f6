import type { Tx } from '@/db/client';
import type { CombinationSet } from '@/engine/combination';
import { currentRevisions, findRevision, type LibraryRevision } from '@/features/review/library.server';
import { combinationSetDocument } from './combination';

/** A revision of a combination set, read. */
export type ReadSet = LibraryRevision & { readonly document: CombinationSet };

export const readSet = (revision: LibraryRevision): ReadSet => ({
  ...revision,
  document: combinationSetDocument.parse(revision.body),
});

/** What criteria may be held against: the issued revision of each set. */
export async function issuedSets(tx: Tx, practiceId: string): Promise<ReadSet[]> {
  const revisions = await currentRevisions(tx, practiceId, 'combination-set');
  return revisions.filter(({ state }) => state === 'issued').map(readSet);
}

/** The revision of a set that criteria refer to. */
export async function referredSet(
  tx: Tx,
  practiceId: string,
  { set, revision }: { readonly set: string; readonly revision: number },
): Promise<ReadSet | undefined> {
  const found = await findRevision(tx, practiceId, { kind: 'combination-set', slug: set, number: revision });
  return found && readSet(found);
}
