import { z } from 'zod';
import { CHANGE_CLASSES, CONSEQUENCES, DOCUMENT_KINDS, PERSON_STEPS, REVISION_STATES } from './review';
import { REVIEW_STANDINGS } from './standing';

/** Which document, in a list or beside another. */
const Named = {
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
};

const moment = z.iso.datetime().nullable();

const Confirmation = z.strictObject({ by: z.string(), at: z.iso.datetime(), note: z.string() });

const RevisionEntry = z.strictObject({
  number: z.int(),
  state: z.enum(REVISION_STATES),
  /** A draft that has faults still, or was laid aside. */
  unfinished: z.boolean(),
  abandoned: z.boolean(),
  author: z.string(),
  editors: z.array(z.string()),
  reviewer: z.string().nullable(),
  created_at: z.iso.datetime(),
  submitted_at: moment,
  issued_at: moment,
  superseded_at: moment,
  withdrawn_at: moment,
  change_note: z.string(),
  change_class: z.enum(CHANGE_CLASSES).nullable(),
  consequence: z.enum(CONSEQUENCES).nullable(),
  withdrawal: z
    .strictObject({ reason: z.string(), severity: z.enum(CONSEQUENCES), by: z.string() })
    .nullable(),
  sha256: z.string(),
  engine_version: z.string(),
  /** Of this very content by the engine of today; null where it has not been proven, or nothing is to prove. */
  proven: z.boolean().nullable(),
  /** A librarian compared it with its source; until then it is unverified. */
  confirmed: Confirmation.nullable(),
  open_comments: z.int(),
  recall: z.uuid().nullable(),
  /** What the reader may do with it now. */
  steps: z.array(z.enum(PERSON_STEPS)),
});

export const DocumentView = z.strictObject({
  ...Named,
  review_by: z.iso.date().nullable(),
  grace_days: z.int(),
  review: z.enum(REVIEW_STANDINGS),
  watching: z.boolean(),
  /** Members that pin any revision of it, jobs for named people included. */
  uses: z.int(),
  derived_from: z.strictObject({ ...Named, revision: z.int(), state: z.enum(REVISION_STATES) }).nullable(),
  /** The nearest revision among those that it goes back to which was withdrawn. */
  withdrawn_ancestor: z
    .strictObject({ ...Named, revision: z.int(), reason: z.string(), recall: z.uuid().nullable() })
    .nullable(),
  derived: z.array(z.strictObject(Named)),
  /** Newest first. */
  revisions: z.array(RevisionEntry),
});
export type DocumentView = z.output<typeof DocumentView>;

/** PUT …/review-by. */
export const ReviewBy = z.strictObject({
  review_by: z.iso.date().nullable(),
  grace_days: z.int().min(0).max(3650).default(90),
});
export type ReviewBy = z.output<typeof ReviewBy>;

/** POST …/confirm. */
export const Confirm = z.strictObject({ note: z.string().trim().max(1000).default('') });

/** A draft or a revision in review, in a list. */
export const OpenRevision = z.strictObject({
  ...Named,
  number: z.int(),
  state: z.enum(REVISION_STATES),
  unfinished: z.boolean(),
  author: z.string(),
  /** Whether the reader wrote or changed it. */
  mine: z.boolean(),
  /** A draft by somebody who is no librarian. */
  proposal: z.boolean(),
  created_at: z.iso.datetime(),
  submitted_at: moment,
  change_note: z.string(),
  change_class: z.enum(CHANGE_CLASSES).nullable(),
  consequence: z.enum(CONSEQUENCES).nullable(),
  proven: z.boolean().nullable(),
  open_comments: z.int(),
  steps: z.array(z.enum(PERSON_STEPS)),
});
export type OpenRevision = z.output<typeof OpenRevision>;

export const openQuery = {
  state: z.enum(['draft', 'in_review']).optional(),
  kind: z.enum(DOCUMENT_KINDS).optional(),
};

/** A document whose review is due, in a list. */
export const ReviewDue = z.strictObject({
  ...Named,
  review_by: z.iso.date(),
  /** The last day on which new members may use it. */
  last_day: z.iso.date(),
  review: z.enum(REVIEW_STANDINGS),
});
export type ReviewDue = z.output<typeof ReviewDue>;

/** Where a document is used. */
const UseItem = z.strictObject({
  member: z.uuid(),
  job: z.strictObject({ number: z.string(), name: z.string() }),
  mark: z.string(),
  status: z.string(),
  owner: z.string(),
  revision: z.int(),
});

export const UsesView = z.strictObject({
  items: z.array(UseItem),
  next: z.string().nullable(),
  total: z.int(),
  /** Uses in jobs that are not open to the reader; counted in the total. */
  hidden: z.int(),
});
export type UsesView = z.output<typeof UsesView>;
