import { z } from 'zod';
import { MEMBER_STATUSES } from '@/features/member/terms';
import { CONSEQUENCES, DOCUMENT_KINDS, RECALL_DECISIONS, type RecallDecision } from './review';

export const DECISION_NAMES: Readonly<Record<RecallDecision, string>> = {
  unaffected: 'Not affected',
  upgraded: 'Upgraded to a sound revision',
  redesigned: 'Designed anew',
  accepted: 'Accepted as it stands',
  not_used: 'Not built from',
};

/** These leave the member on the recalled revision, and say why. */
const WITH_REASON: readonly RecallDecision[] = ['unaffected', 'accepted', 'not_used'];
/** These have taken the member off the recalled revision. */
export const WITHOUT_USE: readonly RecallDecision[] = ['upgraded', 'redesigned'];

/** PUT …/uses/{member}. */
export const Decide = z
  .strictObject({ decision: z.enum(RECALL_DECISIONS), note: z.string().trim().max(1000).default('') })
  .check(({ value, issues }) => {
    if (!WITH_REASON.includes(value.decision) || value.note !== '') return;
    issues.push({
      code: 'custom',
      input: value,
      path: ['note'],
      message: 'Say why. The reason is kept with your name.',
      params: { code: 'required' },
    });
  });
export type Decide = z.output<typeof Decide>;

const RecallUse = z.strictObject({
  member: z.uuid(),
  job: z.strictObject({ number: z.string(), name: z.string() }),
  mark: z.string(),
  status: z.enum(MEMBER_STATUSES),
  owner: z.string(),
  /** Whether the reader is the owner. */
  mine: z.boolean(),
  /** Whether it pins the recalled revision still. */
  pinned: z.boolean(),
  decision: z.enum(RECALL_DECISIONS).nullable(),
  note: z.string(),
  decided_by: z.string().nullable(),
  decided_at: z.iso.datetime().nullable(),
});

const Derived = z.strictObject({
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
});

export const RecallItem = z.strictObject({
  id: z.uuid(),
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
  revision: z.int(),
  reason: z.string(),
  severity: z.enum(CONSEQUENCES),
  opened_by: z.string(),
  opened_at: z.iso.datetime(),
  closed_by: z.string().nullable(),
  closed_at: z.iso.datetime().nullable(),
  uses: z.int(),
  decided: z.int(),
  /** Uses that are the reader's to decide and are not decided. */
  mine: z.int(),
});
export type RecallItem = z.output<typeof RecallItem>;

export const RecallView = RecallItem.extend({
  /** A part of the uses: the reader's own, then by job and mark. */
  items: z.array(RecallUse),
  next: z.string().nullable(),
  /** Uses in jobs that are not open to the reader. */
  hidden: z.int(),
  /** Documents that were made from the recalled revision. */
  derived: z.array(Derived),
});
export type RecallView = z.output<typeof RecallView>;

/** The answer to a decision. */
export const DecidedView = z.strictObject({ recall: RecallItem, use: RecallUse });
export type DecidedView = z.output<typeof DecidedView>;

export const recallQuery = {
  state: z.enum(['open', 'closed', 'all']).default('open'),
  /** Only recalls with a use that is the reader's to decide. */
  mine: z.stringbool().default(false),
};

/** Where a list of recalls goes on: the newest first. */
export const RecallPlace = z.tuple([z.string(), z.uuid()]);
export type RecallPlace = z.output<typeof RecallPlace>;

/** POST …/withdraw. */
export const WithdrawStep = z.strictObject({
  reason: z
    .string()
    .trim()
    .min(1, 'Say what is wrong, for the people whose members use this revision.')
    .max(2000),
  severity: z.enum(CONSEQUENCES),
});
export type WithdrawStep = z.output<typeof WithdrawStep>;
