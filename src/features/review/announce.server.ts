import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { watch } from '@/db/schema/review';
import { tell } from '@/features/notice/notice.server';
import { paths } from '@/paths';
import { peopleWith } from './people.server';
import { type Actor, nameOfRevision, type RevisionRow, selectRevisions } from './rows.server';
import { derivedFrom } from './uses.server';

export type Announced =
  | { readonly step: 'submit' | 'issue' }
  | { readonly step: 'return'; readonly comment: string }
  | { readonly step: 'withdraw'; readonly reason: string };

/** Tells those concerned of a step: who may review it, who wrote it, who watches the document; never who took it. */
export async function announce(
  tx: Tx,
  actor: Actor,
  row: RevisionRow,
  request: Announced,
  occasion: string,
): Promise<void> {
  const { practiceId } = actor;
  const authors = [row.authorId, ...row.editorIds];
  const concerned = request.step === 'submit' ? await reviewersOf(tx, practiceId, authors) : authors;
  const people = [...concerned, ...(await watchersOf(tx, practiceId, row.documentId))];
  await tell(tx, actor, {
    people: people.filter((one) => one !== actor.personId),
    ...wordsOf(row, request),
    dedupe: `${request.step} ${row.id} ${occasion}`.trim(),
    mailData: { reference: row.of.reference, facts: [{ label: 'Document', value: row.of.name }] },
  });
}

/** Tells those who wrote or watch a document that was made from what is withdrawn, or goes back to it. */
export async function announceToDerived(
  tx: Tx,
  actor: Actor,
  row: RevisionRow,
  reason: string,
): Promise<void> {
  const { practiceId } = actor;
  for (const one of await derivedFrom(tx, practiceId, row.id)) {
    const revisions = await selectRevisions(tx, practiceId, eq(revision.documentId, one.documentId));
    const authors = revisions.flatMap(({ authorId, editorIds }) => [authorId, ...editorIds]);
    await tell(tx, actor, {
      people: [...authors, ...(await watchersOf(tx, practiceId, one.documentId))].filter(
        (person) => person !== actor.personId,
      ),
      kind: 'withdrawn',
      title: `${one.reference} was made from ${nameOfRevision(row)}, which is withdrawn`,
      detail: reason,
      href: paths.libraryDocument(one.kind, one.slug),
      dedupe: `withdraw ${row.id} ${one.documentId}`,
      mailData: { reference: one.reference },
    });
  }
}

/** The librarians who may review it; where there is none but its authors, the checkers. */
async function reviewersOf(tx: Tx, practiceId: string, authors: readonly string[]): Promise<string[]> {
  const others = async (role: 'librarian' | 'checker') =>
    (await peopleWith(tx, practiceId, [role])).filter((one) => !authors.includes(one));
  const librarians = await others('librarian');
  return librarians.length > 0 ? librarians : others('checker');
}

async function watchersOf(tx: Tx, practiceId: string, documentId: string): Promise<string[]> {
  const found = await tx
    .select({ id: watch.personId })
    .from(watch)
    .where(and(eq(watch.practiceId, practiceId), eq(watch.documentId, documentId)));
  return found.map(({ id }) => id);
}

function wordsOf(row: RevisionRow, request: Announced) {
  const { kind, slug } = row.of;
  const name = nameOfRevision(row);
  const href = paths.review(kind, slug, row.number);
  switch (request.step) {
    case 'submit':
      return {
        kind: 'submitted' as const,
        title: `${name} is ready for review`,
        detail: row.changeNote,
        href,
      };
    case 'return':
      return {
        kind: 'returned' as const,
        title: `${name} was returned`,
        detail: request.comment,
        href: kind === 'template' ? paths.templateDraft(slug, row.number) : href,
      };
    case 'issue':
      return { kind: 'issued' as const, title: `${name} is issued`, detail: row.changeNote, href };
    case 'withdraw':
      return { kind: 'withdrawn' as const, title: `${name} is withdrawn`, detail: request.reason, href };
  }
}
