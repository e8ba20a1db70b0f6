import { type Action, may, type Person } from '@/features/account/permission';

export const DOCUMENT_KINDS = [
  'template',
  'section-table',
  'criteria',
  'combination-set',
  'material-set',
] as const;
export type DocumentKind = (typeof DOCUMENT_KINDS)[number];

/** Part of an address: `/templates/two-spans-uniform`. */
export const SLUG = /^[a-z][a-z0-9]*(-[a-z0-9]+)*$/;
export const LONGEST_SLUG = 80;

export const KIND_NAMES: Readonly<Record<DocumentKind, string>> = {
  template: 'template',
  'section-table': 'section table',
  criteria: 'set of criteria',
  'combination-set': 'combination set',
  'material-set': 'material set',
};

export const REVISION_STATES = ['draft', 'in_review', 'issued', 'superseded', 'withdrawn'] as const;
export type RevisionState = (typeof REVISION_STATES)[number];

export const CHANGE_CLASSES = ['error', 'code edition', 'improvement', 'wording'] as const;
export type ChangeClass = (typeof CHANGE_CLASSES)[number];

/** How bad it is to rely on what a revision changes, or on one that was withdrawn. */
export const CONSEQUENCES = ['safety', 'service', 'cosmetic'] as const;
export type Consequence = (typeof CONSEQUENCES)[number];

interface Step {
  readonly from: readonly RevisionState[];
  readonly to: RevisionState;
  /** What a person must be allowed to do; null: no person asks for it, it follows from another step. */
  readonly action: Action | null;
  readonly done: string;
}

/** Every legal move of a revision. Nothing else writes its state, and the database refuses what is not here. */
export const REVISION_STEPS = {
  submit: { from: ['draft'], to: 'in_review', action: 'library.submit', done: 'sent to review' },
  return: { from: ['in_review'], to: 'draft', action: 'library.review', done: 'returned to its author' },
  issue: { from: ['in_review'], to: 'issued', action: 'library.review', done: 'issued' },
  supersede: { from: ['issued'], to: 'superseded', action: null, done: 'superseded' },
  withdraw: {
    from: ['issued', 'superseded'],
    to: 'withdrawn',
    action: 'library.withdraw',
    done: 'withdrawn',
  },
} as const satisfies Record<string, Step>;

/** The steps that a person asks for. */
export const PERSON_STEPS = [
  'submit',
  'return',
  'issue',
  'withdraw',
] as const satisfies readonly (keyof typeof REVISION_STEPS)[];
export type PersonStep = (typeof PERSON_STEPS)[number];

/** The steps that this person could take of this revision now: the buttons to show. */
export function stepsFor(
  person: Person,
  revision: {
    readonly state: RevisionState;
    readonly authorId: string;
    readonly editorIds?: readonly string[];
  },
): readonly PersonStep[] {
  return PERSON_STEPS.filter((name) => {
    const step: Step = REVISION_STEPS[name];
    return step.from.includes(revision.state) && may(person, REVISION_STEPS[name].action, revision);
  });
}

/** In a sentence: "it is not a draft any more". */
export const stateName = (state: RevisionState): string =>
  state === 'draft' ? 'a draft' : state.replace('_', ' ');

/** Of what a worker does for a revision: its proof, its impact. */
export const RUN_STATES = ['queued', 'running', 'finished', 'failed'] as const;

/** What a member's owner decides when a revision that it pins is recalled. */
export const RECALL_DECISIONS = ['unaffected', 'upgraded', 'redesigned', 'accepted', 'not_used'] as const;
export type RecallDecision = (typeof RECALL_DECISIONS)[number];

export const REQUEST_KINDS = ['request', 'defect'] as const;

export const REQUEST_STATES = ['open', 'accepted', 'declined', 'done'] as const;
export type RequestState = (typeof REQUEST_STATES)[number];
