import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { auditEvent } from '@/db/schema/audit';
import { document, revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, type Fault, stale } from '@/lib/app-error';
import { withFingerprint, writeBody } from './body.server';
import {
  type DraftView,
  keepUnfinished,
  type RevisionKey,
  type SaveDraft,
  unfinishedOf,
  type Written,
} from './draft';
import { namesOf } from './people.server';
import { isReferenceTaken, nameIn, referenceIn, referenceTaken } from './reference.server';
import { referredFaults } from './referred.server';
import { stateName } from './review';
import { type Actor, type DocumentRow, keyOf, type RevisionRow, requireRevision } from './rows.server';
import { relativeRevision } from './uses.server';
import { asWritten } from './written';
import { readerOf, schemaVersionOf } from './written.server';

/** A revision as its author writes it, with what keeps it from review while it is a draft. */
export function readDraft(actor: Actor, key: RevisionKey): Promise<DraftView> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => toDraftView(tx, await requireRevision(tx, actor.practiceId, key)));
}

/** Saves a draft over the version that was read (412 with what stands there now), whatever faults it has. */
export function saveDraft(
  actor: Actor,
  key: RevisionKey,
  version: number,
  body: SaveDraft,
): Promise<DraftView> {
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const before = await requireRevision(tx, practiceId, key);
    requirePermission(actor, 'library.edit', before);
    if (before.state !== 'draft') throw notADraft(before);
    if (before.version !== version) throw stale(await toDraftView(tx, before));
    const { body: kept, faults } = keepDocument(key, body.document);
    const isEditor = personId === before.authorId || before.editorIds.includes(personId);
    const isSaved = await writeBody(tx, before, withFingerprint(kept), {
      schemaVersion: schemaVersionOf(key.kind),
      editorIds: isEditor ? before.editorIds : [...before.editorIds, personId],
      changeNote: body.change_note,
      changeClass: body.change_class,
      consequence: body.consequence,
      abandonedAt: null,
    });
    if (!isSaved) throw await overtaken(tx, practiceId, key);
    await nameDocument(tx, before.of, body.document);
    const after = await requireRevision(tx, practiceId, key);
    const view = await toDraftView(tx, after, faults);
    await recordSave(tx, actor, before, after);
    return view;
  });
}

/** Somebody saved or took a step between the reading and the writing. */
async function overtaken(tx: Tx, practiceId: string, key: RevisionKey): Promise<AppError> {
  const now = await requireRevision(tx, practiceId, key);
  return now.state === 'draft' ? stale(await toDraftView(tx, now)) : notADraft(now);
}

const notADraft = ({ number, state }: RevisionRow): AppError =>
  new AppError(
    'illegal_step',
    state === 'in_review'
      ? `Revision ${number} is in review and cannot be changed. Ask for it to be returned.`
      : `Revision ${number} is ${stateName(state)} and is never changed. Begin the next revision from it.`,
  );

/** Lays a draft aside. Nothing is deleted: it is left out of lists, and saving it takes it up again. */
export function abandonDraft(actor: Actor, key: RevisionKey): Promise<void> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const before = await requireRevision(tx, practiceId, key);
    requirePermission(actor, 'library.edit', before);
    const [laid] = await tx
      .update(revision)
      .set({ abandonedAt: sql`coalesce(${revision.abandonedAt}, now())` })
      .where(
        and(eq(revision.practiceId, practiceId), eq(revision.id, before.id), eq(revision.state, 'draft')),
      )
      .returning({ id: revision.id });
    if (!laid) throw notADraft(await requireRevision(tx, practiceId, key));
    await recordAudit(tx, actor, {
      action: 'revision.abandon',
      subjectKind: 'revision',
      subjectId: before.id,
      before: { version: before.version, sha256: before.sha256 },
    });
  });
}

/** What is stored of a draft as it was written, and what is wrong with it. Its address is not the author's to write. */
export function keepDocument(
  { kind, slug }: Pick<RevisionKey, 'kind' | 'slug'>,
  given: Written,
): { body: object; faults: Fault[] } {
  const read = readerOf(kind);
  if (!read)
    throw new AppError('conflict', 'Editions of a section table are made by importing the table, not here.');
  const written = { ...given, slug, schema_version: schemaVersionOf(kind) };
  const reading = read(written);
  return reading.ok
    ? { body: reading.body, faults: [] }
    : { body: keepUnfinished(written), faults: reading.faults };
}

/** Until a document has an issued revision it is called as its draft says. */
async function nameDocument(tx: Tx, of: DocumentRow, given: Written): Promise<void> {
  const { practiceId, id } = of;
  const [issued] = await tx
    .select({ id: revision.id })
    .from(revision)
    .where(
      and(
        eq(revision.practiceId, practiceId),
        eq(revision.documentId, id),
        sql`${revision.issuedAt} is not null`,
      ),
    )
    .limit(1);
  if (issued) return;
  const wanted = referenceIn(given);
  const reference =
    wanted !== null && !(await isReferenceTaken(tx, practiceId, wanted, of)) ? wanted : of.reference;
  const name = nameIn(given, of);
  if (name === of.name && reference === of.reference) return;
  await tx
    .update(document)
    .set({ name, reference })
    .where(and(eq(document.practiceId, practiceId), eq(document.id, id)));
}

/** Saves by one person in a row are one event: a draft is saved while it is typed. Every step records the hash. */
async function recordSave(tx: Tx, actor: Actor, before: RevisionRow, after: RevisionRow): Promise<void> {
  const [last] = await tx
    .select({ action: auditEvent.action, actorId: auditEvent.actorId })
    .from(auditEvent)
    .where(
      and(
        eq(auditEvent.practiceId, actor.practiceId),
        eq(auditEvent.subjectKind, 'revision'),
        eq(auditEvent.subjectId, before.id),
      ),
    )
    .orderBy(sql`${auditEvent.sequence} desc`)
    .limit(1);
  if (last?.action === 'revision.save' && last.actorId === actor.personId) return;
  await recordAudit(tx, actor, {
    action: 'revision.save',
    subjectKind: 'revision',
    subjectId: before.id,
    before: { version: before.version, sha256: before.sha256 },
    after: { version: after.version, sha256: after.sha256 },
  });
}

/** What keeps a draft from review, as it is read today. */
export async function faultsOfDraft(tx: Tx, row: RevisionRow, known?: readonly Fault[]): Promise<Fault[]> {
  if (row.state !== 'draft' || !readerOf(row.of.kind)) return [];
  const given = writtenOf(row.body);
  const faults = known ?? keepDocument(keyOf(row), given).faults;
  const reference = referenceIn(given);
  const isTaken = reference !== null && (await isReferenceTaken(tx, row.practiceId, reference, row.of));
  return [...faults, ...(await referredFaults(tx, row)), ...(isTaken ? [referenceTaken(reference)] : [])];
}

/** A revision's body as its author writes it. */
export const writtenOf = (body: unknown): Written => unfinishedOf(body) ?? asWritten(Object(body));

export async function toDraftView(tx: Tx, row: RevisionRow, known?: readonly Fault[]): Promise<DraftView> {
  const { practiceId, of, authorId, editorIds } = row;
  const names = await namesOf(tx, [authorId, ...editorIds]);
  const name = (id: string) => names.get(id) ?? '';
  return {
    kind: of.kind,
    slug: of.slug,
    revision: row.number,
    state: row.state,
    abandoned: row.abandonedAt !== null,
    version: row.version,
    document: writtenOf(row.body),
    faults: await faultsOfDraft(tx, row, known),
    change_note: row.changeNote,
    change_class: row.changeClass,
    consequence: row.consequence,
    sha256: row.sha256,
    author: name(authorId),
    editors: editorIds.map(name),
    derived_from: await parentOf(tx, practiceId, of),
    created_at: row.createdAt.toISOString(),
  };
}

async function parentOf(tx: Tx, practiceId: string, { derivedFromId }: DocumentRow) {
  const found = derivedFromId && (await relativeRevision(tx, practiceId, derivedFromId));
  return found ? { slug: found.slug, name: found.name, revision: found.revision, state: found.state } : null;
}
