import { z } from 'zod';
import { runFields } from '@/features/proof/proof';
import type { Changes } from './figures';

export const OUTCOMES = ['unchanged', 'changed', 'lost', 'unread'] as const;
export type Outcome = (typeof OUTCOMES)[number];

/** What a run found of one member, as it is stored. */
export interface Weighed {
  readonly outcome: Outcome;
  /** Lost: why there is no result with the new revision. Unread: why it was not evaluated. */
  readonly message: string | null;
  readonly changes: Pick<Changes, 'figures' | 'checks' | 'findings'>;
  /** Names of parameters that the new revision has no longer, and of those that take their default. */
  readonly gone: readonly string[];
  readonly taken: readonly string[];
}

const share = z.number().nullable();

const FigureView = z.strictObject({
  name: z.string(),
  /** What its unit and rounding follow from: reaction, moment, force, deflection. */
  purpose: z.string(),
  /** SI; null where there is none, and in a job that is not open to the reader. */
  from: z.number().nullable(),
  to: z.number().nullable(),
  share,
});

const CheckView = z.strictObject({
  title: z.string(),
  place: z.string(),
  /** Utilisations. */
  from: z.number().nullable(),
  to: z.number().nullable(),
  share,
  flips: z.boolean(),
});

export const ImpactItem = z.strictObject({
  member: z.uuid(),
  job: z.strictObject({ number: z.string(), name: z.string() }),
  mark: z.string(),
  status: z.string(),
  owner: z.string(),
  /** Whether the job is open to the reader; else only how much its figures change is said. */
  open: z.boolean(),
  outcome: z.enum(OUTCOMES),
  message: z.string().nullable(),
  /** Checks that pass with one and fail with the other, and findings that come or go. */
  flips: z.int(),
  /** The largest change of any result, as a share of what it was; null where there is no result any more. */
  largest_change: share,
  figures: z.array(FigureView),
  checks: z.array(CheckView),
  findings: z.strictObject({ come: z.array(z.string()), go: z.array(z.string()) }),
  parameters: z.strictObject({ gone: z.array(z.string()), taken: z.array(z.string()) }),
});
export type ImpactItem = z.output<typeof ImpactItem>;

export const ImpactView = z.strictObject({
  ...runFields,
  /** The issued revision that the members pin. */
  against: z.int(),
  counts: z.strictObject({
    unchanged: z.int(),
    changed: z.int(),
    lost: z.int(),
    unread: z.int(),
    /** Members with a check that flips. */
    flipped: z.int(),
  }),
  /** Worst first: what has no result any more, what flips most, what changes most. */
  items: z.array(ImpactItem),
  next: z.string().nullable(),
  total: z.int(),
  /** Members in jobs that are not open to the reader; counted, not listed. */
  hidden: z.int(),
});
export type ImpactView = z.output<typeof ImpactView>;
