import { and, eq, inArray, max, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { type Tenant, withPractice } from '@/db/tenancy';
import { ENGINE_VERSION } from '@/engine/version';
import { type Person, requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, invalid, notFound } from '@/lib/app-error';
import { fingerprint } from '@/lib/fingerprint';
import {
  type ChangeClass,
  type Consequence,
  type DocumentKind,
  REVISION_STEPS,
  type RevisionState,
} from './review';

type Actor = Person & Tenant & { readonly personId: string };

export interface Draft {
  readonly kind: DocumentKind;
  readonly slug: string;
  /** What the title block prints: "PL-T-025". Unique in the practice. */
  readonly reference: string;
  readonly name: string;
  readonly body: unknown;
  readonly schemaVersion: number;
  readonly changeNote: string;
  readonly changeClass: ChangeClass;
  readonly consequence: Consequence;
}

export interface DraftKey {
  readonly documentId: string;
  readonly revisionId: string;
  readonly number: number;
}

/** The next revision of a document, the first one of a new document; in the caller's transaction. */
export async function createDraft(tx: Tx, author: Actor, draft: Draft): Promise<DraftKey> {
  requirePermission(author, 'library.propose');
  const { practiceId, personId } = author;
  const { kind, slug, reference, name, body, ...rest } = draft;
  await tx.insert(document).values({ practiceId, kind, slug, reference, name }).onConflictDoNothing();
  // Locked, so that of two drafts begun at once each gets a number of its own.
  const [found] = await tx
    .select({ id: document.id })
    .from(document)
    .where(and(eq(document.practiceId, practiceId), eq(document.kind, kind), eq(document.slug, slug)))
    .for('update');
  if (!found)
    throw new AppError('conflict', `The reference ${reference} belongs to another document. Choose another.`);
  const [last] = await tx
    .select({ number: max(revision.number) })
    .from(revision)
    .where(and(eq(revision.practiceId, practiceId), eq(revision.documentId, found.id)));
  const key = { documentId: found.id, revisionId: crypto.randomUUID(), number: (last?.number ?? 0) + 1 };
  const sha256 = fingerprint(body, ENGINE_VERSION);
  await tx.insert(revision).values({
    ...rest,
    practiceId,
    id: key.revisionId,
    documentId: key.documentId,
    number: key.number,
    body,
    engineVersion: ENGINE_VERSION,
    sha256,
    authorId: personId,
  });
  await recordAudit(tx, author, {
    action: 'revision.draft',
    subjectKind: 'revision',
    subjectId: key.revisionId,
    after: { kind, slug, number: key.number, sha256 },
  });
  return key;
}

export type StepRequest =
  | { readonly step: 'submit' | 'return' | 'issue' }
  | { readonly step: 'withdraw'; readonly reason: string; readonly severity: Consequence };

interface Moved {
  readonly id: string;
  readonly documentId: string;
  readonly number: number;
  readonly state: RevisionState;
}

/** Takes one step of REVISION_STEPS. Of two people at once, one takes it and the other is told that it was taken. */
export function takeStep(actor: Actor, revisionId: string, request: StepRequest): Promise<Moved> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const [current] = await tx
      .select()
      .from(revision)
      .where(and(eq(revision.practiceId, practiceId), eq(revision.id, revisionId)));
    if (!current) throw notFound('This revision');
    const { from, to, action, done } = REVISION_STEPS[request.step];
    requirePermission(actor, action, current);
    refuseIncomplete(request, current);
    if (request.step === 'issue') await supersedeIssued(tx, actor, current.documentId);
    const [moved] = await tx
      .update(revision)
      .set({ state: to, ...traces(request, actor) })
      .where(
        and(
          eq(revision.practiceId, practiceId),
          eq(revision.id, revisionId),
          inArray(revision.state, [...from]),
        ),
      )
      .returning(MOVED);
    if (!moved)
      throw new AppError(
        'illegal_step',
        `Revision ${current.number} cannot be ${done}: it is not ${from.map(stateName).join(' or ')} any more. Read it again.`,
      );
    await recordAudit(tx, actor, {
      action: `revision.${request.step}`,
      subjectKind: 'revision',
      subjectId: revisionId,
      before: { state: current.state },
      after:
        request.step === 'withdraw'
          ? { state: to, reason: request.reason, severity: request.severity }
          : { state: to },
    });
    return moved;
  });
}

const MOVED = {
  id: revision.id,
  documentId: revision.documentId,
  number: revision.number,
  state: revision.state,
};

const stateName = (state: RevisionState): string => (state === 'draft' ? 'a draft' : state.replace('_', ' '));

function refuseIncomplete(request: StepRequest, { changeNote }: { readonly changeNote: string }): void {
  if (request.step === 'submit' && changeNote.trim() === '')
    throw invalid([
      {
        pointer: '/change_note',
        code: 'required',
        message: 'Say in the change note what is new in this revision and why.',
      },
    ]);
  if (request.step === 'withdraw' && request.reason.trim() === '')
    throw invalid([
      {
        pointer: '/reason',
        code: 'required',
        message: 'Say what is wrong, for the people whose members use this revision.',
      },
    ]);
}

/** What a step leaves in the row besides the new state. */
function traces(request: StepRequest, actor: Actor) {
  const now = new Date();
  switch (request.step) {
    case 'submit':
      return { submittedAt: now };
    case 'return':
      return { submittedAt: null };
    case 'issue':
      return { issuedAt: now, reviewerId: actor.personId };
    case 'withdraw':
      return {
        withdrawnAt: now,
        withdrawnById: actor.personId,
        withdrawalReason: request.reason.trim(),
        withdrawalSeverity: request.severity,
      };
  }
}

/** Makes room for the revision that is being issued. The document is locked: of two issues at once, one waits. */
async function supersedeIssued(tx: Tx, actor: Actor, documentId: string): Promise<void> {
  const ofDocument = and(eq(document.practiceId, actor.practiceId), eq(document.id, documentId));
  await tx.select({ id: document.id }).from(document).where(ofDocument).for('update');
  const { from, to } = REVISION_STEPS.supersede;
  const superseded = await tx
    .update(revision)
    .set({ state: to, supersededAt: sql`now()` })
    .where(
      and(
        eq(revision.practiceId, actor.practiceId),
        eq(revision.documentId, documentId),
        inArray(revision.state, [...from]),
      ),
    )
    .returning({ id: revision.id });
  for (const { id } of superseded)
    await recordAudit(tx, actor, {
      action: 'revision.supersede',
      subjectKind: 'revision',
      subjectId: id,
      before: { state: 'issued' },
      after: { state: to },
    });
}
