import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { AppError, invalid } from '@/lib/app-error';
import { readBundle } from './bundle.server';
import type { DraftView, NewDraft, Written } from './draft';
import { keepDocument, toDraftView, writtenOf } from './draft.server';
import { namesOf } from './people.server';
import { isReferenceTaken, nameIn, nextReference, referenceIn } from './reference.server';
import { KIND_NAMES, LONGEST_SLUG, SLUG, stateName } from './review';
import { createDraft, type DraftKey } from './review.server';
import {
  type Actor,
  type DocumentKey,
  type DocumentRow,
  findDocument,
  otherRevisions,
  type RevisionRow,
  requireRevision,
  requireRevisionById,
} from './rows.server';
import { schemaVersionOf } from './written.server';

/** What a draft begins with. */
interface Start {
  readonly document: Written;
  /** The revision of another document that it was taken from. */
  readonly derivedFromId: string | null;
  /** Goes on with a document that is there already; else it must be new. */
  readonly continues: boolean;
}

/** Begins the next revision of a document, or the first of a new one. One draft of a document is open at a time. */
export function beginDraft(actor: Actor, key: DocumentKey, body: NewDraft): Promise<DraftView> {
  requirePermission(actor, 'library.propose');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    requireSlug(key);
    const start = await startOf(tx, actor, key, body);
    const known = await findDocument(tx, practiceId, key);
    const named = known ?? (await nameNew(tx, practiceId, key, start.document));
    const given =
      key.kind === 'template' && referenceIn(start.document) === null
        ? { ...start.document, reference: named.reference }
        : start.document;
    const kept = keepDocument(key, given);
    const made = await createDraft(tx, actor, {
      ...key,
      reference: named.reference,
      name: named.name,
      body: kept.body,
      schemaVersion: schemaVersionOf(key.kind),
      changeNote: body.change_note,
      changeClass: body.change_class,
      consequence: body.consequence,
    });
    await refuseSecond(tx, practiceId, key, made, start);
    if (start.derivedFromId) await keepLineage(tx, practiceId, made.documentId, start.derivedFromId);
    return toDraftView(tx, await requireRevisionById(tx, practiceId, made.revisionId), kept.faults);
  });
}

function requireSlug({ slug }: DocumentKey): void {
  if (slug.length <= LONGEST_SLUG && SLUG.test(slug)) return;
  const message = `“${slug}” cannot be part of an address. Use small letters, digits and hyphens, ${LONGEST_SLUG} at most.`;
  throw invalid([{ pointer: '', code: 'wrong_format', message }]);
}

async function startOf(tx: Tx, actor: Actor, key: DocumentKey, body: NewDraft): Promise<Start> {
  const { from } = body;
  if (body.bundle)
    return { document: readBundle(key.kind, body.bundle).document, derivedFromId: null, continues: true };
  if (from === undefined) return { document: body.document ?? {}, derivedFromId: null, continues: false };
  const isOwn = typeof from === 'number' || from.slug === key.slug;
  const source = await requireRevision(tx, actor.practiceId, {
    kind: key.kind,
    slug: typeof from === 'number' ? key.slug : from.slug,
    number: typeof from === 'number' ? from : from.revision,
  });
  if (source.state === 'draft' || source.state === 'in_review')
    throw new AppError(
      'conflict',
      `Revision ${source.number} is ${stateName(source.state)}. A draft begins from what was issued.`,
    );
  const given = writtenOf(source.body);
  if (isOwn) return { document: given, derivedFromId: null, continues: true };
  const { reference: _, ...rest } = given;
  return { document: rest, derivedFromId: source.id, continues: false };
}

/** Name and reference of a new document: its own where they can be, else the next that is free. */
async function nameNew(tx: Tx, practiceId: string, key: DocumentKey, given: Written) {
  const wanted = referenceIn(given);
  const isFree = wanted !== null && !(await isReferenceTaken(tx, practiceId, wanted, NOBODY));
  const next = () => (key.kind === 'template' ? nextReference(tx, practiceId, given) : key.slug);
  return { name: nameIn(given, key), reference: isFree ? wanted : await next() };
}

const NOBODY: Pick<DocumentRow, 'id'> = { id: '00000000-0000-0000-0000-000000000000' };

/** The document is locked by now: of two drafts begun at once, the second is told of the first. */
export async function requireOnlyDraft(tx: Tx, practiceId: string, made: DraftKey): Promise<RevisionRow[]> {
  const others = await otherRevisions(tx, practiceId, made.documentId, made.revisionId);
  const open = others.find(
    ({ state, abandonedAt }) => state === 'in_review' || (state === 'draft' && abandonedAt === null),
  );
  if (!open) return others;
  const names = await namesOf(tx, [open.authorId]);
  throw new AppError(
    'conflict',
    `Revision ${open.number} of ${open.of.reference} is ${stateName(open.state)} by ${names.get(open.authorId)} already. Go on with that one.`,
  );
}

async function refuseSecond(
  tx: Tx,
  practiceId: string,
  { kind, slug }: DocumentKey,
  made: DraftKey,
  { continues }: Start,
): Promise<void> {
  const others = await requireOnlyDraft(tx, practiceId, made);
  if (continues || others.every(({ abandonedAt }) => abandonedAt !== null)) return;
  throw new AppError(
    'conflict',
    `There is a ${KIND_NAMES[kind]} “${slug}” already. Begin from a revision of it, or choose another name.`,
  );
}

const keepLineage = (tx: Tx, practiceId: string, documentId: string, derivedFromId: string) =>
  tx
    .update(document)
    .set({ derivedFromId })
    .where(and(eq(document.practiceId, practiceId), eq(document.id, documentId)));
