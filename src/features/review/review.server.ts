import { and, eq, inArray, max, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError, type Fault, invalid, stale } from '@/lib/app-error';
import { announce, announceToDerived } from './announce.server';
import { withFingerprint } from './body.server';
import { insertComment, openComments } from './comment.server';
import type { RevisionKey } from './draft';
import { unfinishedOf } from './draft';
import { isProven, requireProof } from './proof-run.server';
import { openRecall } from './recall.server';
import { isReferenceTaken, nameIn, referenceIn, referenceTaken } from './reference.server';
import { referredFaults } from './referred.server';
import {
  type ChangeClass,
  type Consequence,
  type DocumentKind,
  REVISION_STEPS,
  type RevisionState,
  stateName,
} from './review';
import { type Actor, type RevisionRow, requireRevision, requireRevisionById } from './rows.server';

export interface Draft {
  readonly kind: DocumentKind;
  readonly slug: string;
  /** What the title block prints: "PL-T-025". Unique in the practice. */
  readonly reference: string;
  readonly name: string;
  readonly body: unknown;
  readonly schemaVersion: number;
  readonly changeNote: string;
  /** Null while the draft does not say. */
  readonly changeClass: ChangeClass | null;
  readonly consequence: Consequence | null;
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
  const written = withFingerprint(body);
  await tx.insert(revision).values({
    ...rest,
    ...written,
    practiceId,
    id: key.revisionId,
    documentId: key.documentId,
    number: key.number,
    authorId: personId,
  });
  await recordAudit(tx, author, {
    action: 'revision.draft',
    subjectKind: 'revision',
    subjectId: key.revisionId,
    after: { kind, slug, number: key.number, sha256: written.sha256 },
  });
  return key;
}

export type StepRequest =
  | { readonly step: 'submit' | 'issue' }
  | { readonly step: 'return'; readonly comment: string; readonly pointer: string }
  | { readonly step: 'withdraw'; readonly reason: string; readonly severity: Consequence };

export interface Moved {
  readonly id: string;
  readonly documentId: string;
  readonly number: number;
  readonly state: RevisionState;
  /** The case that a withdrawal opened; null where nothing used the revision. */
  readonly recallId: string | null;
}

/** Nobody is told of a library that a practice starts with. */
interface Manner {
  readonly quietly?: boolean;
}

/** Takes one step of REVISION_STEPS. Of two people at once, one takes it and the other is told that it was taken. */
export const takeStep = (
  actor: Actor,
  revisionId: string,
  request: StepRequest,
  manner: Manner = {},
): Promise<Moved> =>
  withPractice(actor, async (tx) =>
    step(tx, actor, await requireRevisionById(tx, actor.practiceId, revisionId), request, manner),
  );

/** The same for a revision by its address; 412 where it is not the version that was read. */
export const takeStepAt = (
  actor: Actor,
  key: RevisionKey,
  request: StepRequest,
  version: number | null,
): Promise<Moved> =>
  withPractice(actor, async (tx) => {
    const current = await requireRevision(tx, actor.practiceId, key);
    if (version !== null && version !== current.version) throw stale();
    return step(tx, actor, current, request);
  });

async function step(
  tx: Tx,
  actor: Actor,
  current: RevisionRow,
  request: StepRequest,
  { quietly = false }: Manner = {},
): Promise<Moved> {
  const { to, action } = REVISION_STEPS[request.step];
  requirePermission(actor, action, current);
  if (!isFrom(request.step, current.state)) throw wrongState(request, current);
  await refuseUnready(tx, current, request);
  if (request.step === 'issue') await supersedeIssued(tx, actor, current.documentId);
  const moved = await move(tx, actor, current, request);
  const effect = await followUp(tx, actor, current, request);
  if (!quietly) await announce(tx, actor, current, request, effect.dedupe);
  if (request.step === 'withdraw') await announceToDerived(tx, actor, current, request.reason);
  await recordAudit(tx, actor, {
    action: `revision.${request.step}`,
    subjectKind: 'revision',
    subjectId: current.id,
    before: { state: current.state },
    after: {
      state: to,
      sha256: current.sha256,
      ...said(request),
      ...(effect.recallId && { recall: effect.recallId }),
    },
  });
  return { ...moved, recallId: effect.recallId };
}

const isFrom = (name: StepRequest['step'], state: RevisionState): boolean =>
  REVISION_STEPS[name].from.some((one) => one === state);

const wrongState = ({ step: name }: StepRequest, { number }: RevisionRow): AppError => {
  const { from, done } = REVISION_STEPS[name];
  return new AppError(
    'illegal_step',
    `Revision ${number} cannot be ${done}: it is not ${from.map(stateName).join(' or ')} any more. Read it again.`,
  );
};

/** The expected state stands in the WHERE: somebody else may have taken a step since it was read. */
async function move(tx: Tx, actor: Actor, current: RevisionRow, request: StepRequest) {
  const { from, to } = REVISION_STEPS[request.step];
  const [moved] = await tx
    .update(revision)
    .set({ state: to, ...traces(request, actor) })
    .where(
      and(
        eq(revision.practiceId, actor.practiceId),
        eq(revision.id, current.id),
        inArray(revision.state, [...from]),
        // What is sent to review is what was read: a save in between is somebody's work.
        eq(revision.version, current.version),
      ),
    )
    .returning(MOVED);
  if (moved) return moved;
  const now = await requireRevisionById(tx, actor.practiceId, current.id);
  throw isFrom(request.step, now.state)
    ? new AppError('conflict', `Revision ${now.number} was saved at this moment. Read it again first.`)
    : wrongState(request, now);
}

const MOVED = {
  id: revision.id,
  documentId: revision.documentId,
  number: revision.number,
  state: revision.state,
};

/** What the record keeps of a step besides the state. */
function said(request: StepRequest): object {
  switch (request.step) {
    case 'return':
      return { comment: request.comment };
    case 'withdraw':
      return { reason: request.reason, severity: request.severity };
    default:
      return {};
  }
}

async function refuseUnready(tx: Tx, current: RevisionRow, request: StepRequest): Promise<void> {
  if (request.step === 'withdraw' && request.reason.trim() === '')
    throw invalid([
      required('/reason', 'Say what is wrong, for the people whose members use this revision.'),
    ]);
  if (request.step === 'return' && request.comment.trim() === '')
    throw invalid([required('/comment', 'Say what has to change, for its author.')]);
  if (request.step === 'submit') {
    const faults = [...unclassed(current), ...(await documentFaults(tx, current))];
    if (faults.length > 0) throw invalid(faults);
  }
  if (request.step === 'issue') await refuseUnproven(tx, current);
}

const required = (pointer: string, message: string): Fault => ({ pointer, code: 'required', message });

function unclassed({ changeNote, changeClass, consequence }: RevisionRow): Fault[] {
  return [
    ...(changeNote.trim() === ''
      ? [required('/change_note', 'Say in the change note what is new in this revision and why.')]
      : []),
    ...(changeClass === null
      ? [
          required(
            '/change_class',
            'Say what kind of change it is: error, code edition, improvement or wording.',
          ),
        ]
      : []),
    ...(consequence === null
      ? [required('/consequence', 'Say what is at stake: safety, service or cosmetic.')]
      : []),
  ];
}

/** Faults of the draft's document, each with its place in the draft. */
async function documentFaults(tx: Tx, current: RevisionRow): Promise<Fault[]> {
  const reference = referenceIn(Object(current.body));
  const isTaken =
    reference !== null && (await isReferenceTaken(tx, current.practiceId, reference, current.of));
  if (current.of.kind === 'section-table' && unfinishedOf(current.body)) return [ROWS_ARE_WRITTEN];
  const faults = unfinishedOf(current.body) ? await faultsOf(tx, current) : await referredFaults(tx, current);
  const all = isTaken && faults.length === 0 ? [referenceTaken(reference)] : faults;
  return all.map((fault) => ({ ...fault, pointer: `/document${fault.pointer}` }));
}

const ROWS_ARE_WRITTEN: Fault = {
  pointer: '/document',
  code: 'unfinished',
  message: 'Its rows are still being written. Wait until its import is done.',
};

/** Loaded when it is needed: it brings the expression parser, which a start of the demo does without. */
async function faultsOf(tx: Tx, current: RevisionRow): Promise<Fault[]> {
  const { faultsOfDraft } = await import('./draft.server');
  return faultsOfDraft(tx, current);
}

async function refuseUnproven(tx: Tx, current: RevisionRow): Promise<void> {
  const { practiceId, id, sha256, of } = current;
  const open = await openComments(tx, practiceId, id);
  if (open > 0)
    throw new AppError(
      'conflict',
      `${open === 1 ? 'One comment is' : `${open} comments are`} not resolved. Whoever raised ${open === 1 ? 'it' : 'them'} resolves ${open === 1 ? 'it' : 'them'} before the issue.`,
    );
  if (isProven(of.kind)) await requireProof(tx, practiceId, { revisionId: id, sha256 });
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

/** What follows from a step in the same transaction. `dedupe` names the step among those of its kind. */
async function followUp(
  tx: Tx,
  actor: Actor,
  current: RevisionRow,
  request: StepRequest,
): Promise<{ recallId: string | null; dedupe: string }> {
  switch (request.step) {
    case 'submit':
      return { recallId: null, dedupe: new Date().toISOString() };
    case 'return': {
      const { comment: body, pointer } = request;
      return {
        recallId: null,
        dedupe: await insertComment(tx, actor, current, { body, pointer, parentId: null }),
      };
    }
    case 'issue':
      await nameAsIssued(tx, current);
      return { recallId: null, dedupe: '' };
    case 'withdraw':
      return { recallId: await openRecall(tx, actor, current, request), dedupe: '' };
  }
}

/** A document is called as its issued revision says. */
async function nameAsIssued(tx: Tx, { practiceId, of, body }: RevisionRow): Promise<void> {
  const given = Object(body);
  const reference = referenceIn(given) ?? of.reference;
  const name = 'name' in given ? nameIn(given, of) : of.name;
  if (reference === of.reference && name === of.name) return;
  if (await isReferenceTaken(tx, practiceId, reference, of))
    throw new AppError(
      'conflict',
      `The reference ${reference} belongs to another document by now. Return the revision.`,
    );
  await tx
    .update(document)
    .set({ name, reference })
    .where(and(eq(document.practiceId, practiceId), eq(document.id, of.id)));
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
