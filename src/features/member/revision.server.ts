/** Revisions that a request names for a member to pin. */
import type { Tx } from '@/db/client';
import { findRevision, type LibraryRevision } from '@/features/review/library.server';
import { holdForUse } from '@/features/review/pin.server';
import { invalid } from '@/lib/app-error';

export const refused = (pointer: string, code: string, message: string) =>
  invalid([{ pointer, code, message }]);

/** Why a document has no issued revision, in a sentence. */
export const withdrawn = (found: LibraryRevision | undefined): string =>
  found?.withdrawalReason ? `: revision ${found.number} was withdrawn (${found.withdrawalReason})` : '';

/** Where a request names the revision to move to. */
const MOVED_AT = {
  template: '/template_revision',
  criteria: '/criteria_revision',
  'combination-set': '/combinations_revision',
  'material-set': '/material_revision',
} as const;

/** A revision of a document that a member pins already: its review does not stand in the way of leaving an older one. */
export async function movedTo(
  tx: Tx,
  practiceId: string,
  kind: keyof typeof MOVED_AT,
  slug: string,
  number: number,
): Promise<LibraryRevision> {
  const at = MOVED_AT[kind];
  const found = await findRevision(tx, practiceId, { kind, slug, number });
  if (!found)
    throw refused(at, 'unknown_revision', `“${slug}” has no revision ${number}. Choose one that is issued.`);
  await holdForUse(tx, practiceId, found.revisionId, at, { isNew: false });
  return found;
}
