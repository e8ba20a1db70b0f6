import { z } from 'zod';
import { LOAD_GROUPS } from '@/engine/combination';
import { Redundant } from '@/features/beam/request';
import { pinFacts } from '@/features/review/pin';
import { REVISION_STATES } from '@/features/review/review';
import { sectionChoice } from '@/features/template/request';
import { storedResult } from './result';
import { MEMBER_STATUSES } from './terms';

const line = (most: number) => z.string().trim().max(most);
const typed = z.union([z.string().max(120), z.number()]);

/** A parameter as it was typed: text with its unit or SI, a load by its groups, or rows. */
const parameter = z.union([
  typed,
  z.record(z.string().max(40), typed),
  z.array(z.record(z.string().max(40), typed)).max(100),
]);

/** What a member's numbers follow from, besides the template that it pins. */
const inputs = {
  parameters: z.record(z.string().max(40), parameter),
  section: sectionChoice.nullable(),
  /** The slug of the criteria that it is judged by. */
  criteria: line(80).nullable(),
  /** The slug of the combination set that they are held against; null: the one that they refer to. */
  combinations: line(80).nullable(),
  /** What the variable groups are, by the categories of the set; the criteria’s or the usual ones where not given. */
  categories: z.partialRecord(z.enum(LOAD_GROUPS), line(40)),
  self_weight: z.boolean(),
  /** Why the section's own weight is left out; printed on the sheet. */
  self_weight_reason: line(300),
  /** Whether the groups that the criteria say so act only where adverse. */
  patterns: z.boolean(),
  /** Why they stand on the whole length instead; printed on the sheet. */
  patterns_reason: line(300),
  /** Instead of the template's own choice. */
  redundants: z.array(Redundant).max(40).nullable(),
};

const withDefaults = {
  parameters: inputs.parameters.default({}),
  section: inputs.section.default(null),
  criteria: inputs.criteria.default(null),
  combinations: inputs.combinations.default(null),
  categories: inputs.categories.default({}),
  self_weight: inputs.self_weight.default(true),
  self_weight_reason: inputs.self_weight_reason.default(''),
  patterns: inputs.patterns.default(true),
  patterns_reason: inputs.patterns_reason.default(''),
  redundants: inputs.redundants.default(null),
};

/**
 * The revision of the same document to move to, which must be issued; what is left out stays as it is pinned.
 * Named by its number, so that nobody is moved to one that they have not compared with.
 */
const moves = {
  template_revision: z.int().positive().optional(),
  criteria_revision: z.int().positive().optional(),
  combinations_revision: z.int().positive().optional(),
  section_edition: z.int().positive().optional(),
  material_revision: z.int().positive().optional(),
};
export type Moves = { readonly [K in keyof typeof moves]?: number | undefined };

const title = line(120);
const purpose = line(500);

type Reasoned = {
  self_weight: boolean;
  self_weight_reason: string;
  patterns: boolean;
  patterns_reason: string;
  status?: string;
  reason?: string;
};

/** What is left out or taken away needs a reason, which outlives whoever knew it. */
function askReasons({ value, issues }: z.core.ParsePayload<Reasoned>): void {
  const ask = (field: string, message: string) =>
    issues.push({ code: 'custom', input: value, path: [field], message, params: { code: 'required' } });
  if (!value.self_weight && value.self_weight_reason === '')
    ask('self_weight_reason', 'Say why the own weight is left out. The reason is printed on the sheet.');
  if (!value.patterns && value.patterns_reason === '')
    ask('patterns_reason', 'Say why adverse patterns are left out. The reason is printed on the sheet.');
  if (value.status === 'removed' && value.reason === '')
    ask('reason', 'Say why the member is removed. Its mark stays taken.');
}

/** POST /api/v1/jobs/{number}/members. */
export const NewMember = z
  .strictObject({
    /** As on the drawing; unique in the job, and never used again. */
    mark: line(16).regex(
      /^[A-Za-z0-9][A-Za-z0-9._-]*$/,
      'Give a mark of letters and figures, such as LF4, without spaces.',
    ),
    title: title.default(''),
    purpose: purpose.default(''),
    /** The slug of a template that has an issued revision. */
    template: line(80).min(1, 'Choose a template.'),
    ...withDefaults,
  })
  .check(askReasons);
export type NewMember = z.output<typeof NewMember>;

/** PUT /api/v1/jobs/{number}/members/{mark}: the whole of what may change. Pinned revisions stay unless one is named. */
export const SaveMember = z
  .strictObject({
    title: title.default(''),
    purpose: purpose.default(''),
    status: z.enum(MEMBER_STATUSES).default('draft'),
    reason: line(300).default(''),
    ...withDefaults,
    ...moves,
  })
  .check(askReasons);
export type SaveMember = z.output<typeof SaveMember>;

/** POST …/evaluate: values to try; what is not given is as saved. */
export const TryMember = z.strictObject({ ...inputs, ...moves }).partial();
export type TryMember = z.output<typeof TryMember>;

/** What a member pins of the library. `newer`: the issued revision, where it is another one. */
const Pin = z.strictObject({
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
  revision: z.int(),
  state: z.enum(REVISION_STATES),
  newer: z.int().nullable(),
  newer_note: z.string().nullable(),
  withdrawal_reason: z.string().nullable(),
  ...pinFacts,
});
export type Pin = z.output<typeof Pin>;

const SectionPin = z.strictObject({
  designation: z.string(),
  table: z.string(),
  table_name: z.string(),
  edition: z.int(),
  state: z.enum(REVISION_STATES),
  newer: z.int().nullable(),
  withdrawal_reason: z.string().nullable(),
  material: z.string(),
  ...pinFacts,
});

const Evaluated = {
  result: storedResult.nullable(),
  /** SHA-256 over inputs, pins, engine version and result. */
  fingerprint: z.string().nullable(),
  engine_version: z.string().nullable(),
};

export const MemberView = z.strictObject({
  job: z.string(),
  mark: z.string(),
  title: z.string(),
  purpose: z.string(),
  status: z.enum(MEMBER_STATUSES),
  reason: z.string(),
  version: z.int(),
  template: Pin,
  ...inputs,
  section: SectionPin.nullable(),
  /** The set that the section's material is read from; null without a section, or for a material as it was shipped. */
  materials: Pin.nullable(),
  criteria: Pin.nullable(),
  /** Null without criteria, and where they have combinations of their own. */
  combinations: Pin.nullable(),
  ...Evaluated,
  evaluated_at: z.iso.datetime().nullable(),
  evaluated_by: z.string().nullable(),
  created_by: z.string(),
  created_at: z.iso.datetime(),
  changed_by: z.string(),
  changed_at: z.iso.datetime(),
});
export type MemberView = z.output<typeof MemberView>;

/** The answer of …/evaluate: nothing is saved. */
export const TriedView = z.strictObject(Evaluated);
export type TriedView = z.output<typeof TriedView>;

/** A member in its job's schedule. */
export const MemberItem = z.strictObject({
  mark: z.string(),
  title: z.string(),
  template: Pin.pick({ slug: true, reference: true, name: true, revision: true, state: true }),
  section: z.string().nullable(),
  status: z.enum(MEMBER_STATUSES),
  governing: z.strictObject({ title: z.string(), place: z.string(), ratio: z.number() }).nullable(),
  /** Supports that are pulled up, and the like. */
  findings: z.array(z.string()),
  unproven: z.boolean(),
  /** It has a use to decide in an open recall. */
  recalled: z.boolean(),
  version: z.int(),
  changed_by: z.string(),
  changed_at: z.iso.datetime(),
});
export type MemberItem = z.output<typeof MemberItem>;

export const STATUS_NAMES: Record<(typeof MEMBER_STATUSES)[number], string> = {
  draft: 'Draft',
  ready: 'Ready for check',
  removed: 'Removed',
};
