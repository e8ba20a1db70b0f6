import type { Role } from '@/features/account/roles';

export const DOCUMENT_KINDS = ['template', 'section-table', 'criteria'] as const;
export type DocumentKind = (typeof DOCUMENT_KINDS)[number];

export const REVISION_STATES = ['draft', 'in_review', 'issued', 'superseded', 'withdrawn'] as const;
export type RevisionState = (typeof REVISION_STATES)[number];

export const CHANGE_CLASSES = ['error', 'code edition', 'improvement', 'wording'] as const;
export type ChangeClass = (typeof CHANGE_CLASSES)[number];

export const CONSEQUENCES = ['safety', 'service', 'cosmetic'] as const;
export type Consequence = (typeof CONSEQUENCES)[number];

/** How bad what a withdrawn revision got wrong is. The same scale as the consequence of a change. */
export const SEVERITIES = CONSEQUENCES;
export type Severity = Consequence;

export type Step = {
  readonly from: readonly RevisionState[];
  readonly to: RevisionState;
  /** Holders of any of these roles; null: no person takes it, it follows from another step. */
  readonly roles: readonly Role[] | null;
  /** `author`: only the author (or a librarian for her). `other`: anybody but the author. */
  readonly who: 'author' | 'other' | 'any';
};

/** Every legal move of a revision. Nothing else writes its state; the database refuses what is not here. */
export const REVISION_STEPS = {
  submit: { from: ['draft'], to: 'in_review', roles: ['engineer', 'librarian'], who: 'author' },
  return: { from: ['in_review'], to: 'draft', roles: ['checker', 'librarian'], who: 'any' },
  issue: { from: ['in_review'], to: 'issued', roles: ['checker', 'librarian'], who: 'other' },
  supersede: { from: ['issued'], to: 'superseded', roles: null, who: 'any' },
  withdraw: {
    from: ['issued', 'superseded'],
    to: 'withdrawn',
    roles: ['librarian', 'principal'],
    who: 'any',
  },
} as const satisfies Record<string, Step>;

export type StepName = keyof typeof REVISION_STEPS;
/** The steps a person may ask for. */
export const PERSON_STEPS = ['submit', 'return', 'issue', 'withdraw'] as const satisfies readonly StepName[];
export type PersonStep = (typeof PERSON_STEPS)[number];

export type Reviewer = { readonly personId: string; readonly roles: readonly Role[] };

export type StepRefusal = 'wrong_state' | 'role_missing' | 'not_author' | 'own_work';

/** Why this person may not take this step of this revision; null when she may. */
export function refuseStep(
  name: PersonStep,
  revision: { readonly state: RevisionState; readonly authorId: string },
  person: Reviewer,
): StepRefusal | null {
  const step: Step = REVISION_STEPS[name];
  if (!step.roles?.some((role) => person.roles.includes(role))) return 'role_missing';
  const isAuthor = revision.authorId === person.personId;
  if (step.who === 'other' && isAuthor) return 'own_work';
  if (step.who === 'author' && !isAuthor && !person.roles.includes('librarian')) return 'not_author';
  return step.from.includes(revision.state) ? null : 'wrong_state';
}

/** Which roles may open a draft. An engineer's is a proposal. */
export const DRAFT_ROLES = ['engineer', 'librarian'] as const satisfies readonly Role[];
