import { AppError } from '@/lib/app-error';
import { ROLES, type Role } from './roles';

export interface Person {
  readonly personId: string;
  readonly roles: readonly Role[];
}

/** What an action is about. A condition that needs a field which is not given refuses. */
export interface Subject {
  /** Who wrote the document, or saved the member last. */
  readonly authorId?: string;
  /** Who changed the document besides its author. */
  readonly editorIds?: readonly string[];
  /** Who can open the job besides principals and administrators: all the practice, or the people named. */
  readonly access?: 'practice' | readonly string[];
}

type Condition = (person: Person, subject: Subject) => boolean;

const isAuthor: Condition = (person, { authorId }) => authorId === person.personId;

const isNotAuthor: Condition = ({ personId }, { authorId, editorIds = [] }) =>
  authorId !== undefined && authorId !== personId && !editorIds.includes(personId);

/** The database's policy says the same: principals answer for every job, administrators restore any. */
const hasAccess: Condition = ({ personId, roles }, { access }) =>
  access === 'practice' ||
  (access !== undefined &&
    (access.includes(personId) || roles.includes('principal') || roles.includes('administrator')));

/** Any one of the grants suffices; a grant needs one of its roles and all of its conditions. */
interface Rule {
  readonly grants: readonly { readonly roles: readonly Role[]; readonly when: readonly Condition[] }[];
  /** Said to whoever is refused: the rule of the practice, not the permission system. */
  readonly said: string;
}

const grant = (roles: readonly Role[], ...when: Condition[]) => ({ roles, when });
const rule = (said: string, ...grants: Rule['grants'][number][]): Rule => ({ said, grants });

const JOB_ACCESS = 'Only people with access to the job see it.';

/** Who may do what: the only place that knows. */
const RULES = {
  'beam.solve': rule('Beams are solved for people with a role in a practice.', grant(ROLES)),
  'library.read': rule('The library is open to people with a role in the practice.', grant(ROLES)),
  'library.propose': rule(
    'Drafts are begun by an engineer or a librarian.',
    grant(['engineer', 'librarian']),
  ),
  'library.edit': rule(
    'A draft is changed by its author or a librarian.',
    grant(['librarian']),
    grant(['engineer'], isAuthor),
  ),
  'library.submit': rule(
    'A draft is sent to review by its author or a librarian.',
    grant(['librarian']),
    grant(['engineer'], isAuthor),
  ),
  'library.review': rule(
    'A document is reviewed and issued by a checker or a librarian who did not write or change it.',
    grant(['checker', 'librarian'], isNotAuthor),
  ),
  'library.prove': rule(
    'Proofs and impacts are asked for by the people who write and review the library.',
    grant(['engineer', 'checker', 'librarian']),
  ),
  'library.withdraw': rule(
    'A document is withdrawn by a librarian or a principal.',
    grant(['librarian', 'principal']),
  ),
  'library.comment': rule(
    'Library documents are commented on by the people who design, check and sign.',
    grant(['engineer', 'checker', 'librarian', 'principal']),
  ),
  'library.confirm': rule(
    'What a document says is confirmed against its source by a librarian.',
    grant(['librarian']),
  ),
  'library.import': rule('Section tables are imported by a librarian.', grant(['librarian'])),
  'stock.edit': rule('Stock lists are kept by a librarian.', grant(['librarian'])),
  'library.set-review': rule('Review dates are set by a librarian.', grant(['librarian'])),
  'library.trace': rule(
    'Uses in jobs for named people are listed for a librarian or a principal.',
    grant(['librarian', 'principal']),
  ),

  'search.save': rule('Searches are saved by people with a role in the practice.', grant(ROLES)),
  'search.share': rule(
    'A search is shared with the practice by an engineer or a librarian.',
    grant(['engineer', 'librarian']),
  ),
  'search.change': rule('A saved search is changed by whoever saved it.', grant(ROLES, isAuthor)),
  'search.remove': rule(
    'A saved search is deleted by whoever saved it, or by a librarian where it is shared.',
    grant(['librarian']),
    grant(ROLES, isAuthor),
  ),

  'recall.decide': rule(
    'What becomes of a recalled member is decided by an engineer or a principal with access to the job.',
    grant(['engineer', 'principal'], hasAccess),
  ),
  'recall.close': rule(
    'A recall is closed by a librarian or a principal.',
    grant(['librarian', 'principal']),
  ),

  'request.raise': rule('Requests are raised by people with a role in the practice.', grant(ROLES)),
  'request.read': rule(
    'A request is read by whoever raised it and by the librarians.',
    grant(['librarian']),
    grant(ROLES, isAuthor),
  ),
  'request.answer': rule('Requests are answered by a librarian.', grant(['librarian'])),

  'job.create': rule('Jobs are begun by an engineer.', grant(['engineer'])),
  'job.read': rule(JOB_ACCESS, grant(ROLES, hasAccess)),
  'job.edit': rule('A job is changed by an engineer with access to it.', grant(['engineer'], hasAccess)),
  'job.set-access': rule(
    'Access to a job is set by the engineer who began it or a principal.',
    grant(['engineer'], isAuthor, hasAccess),
    grant(['principal'], hasAccess),
  ),
  'job.set-check-category': rule(
    'The check category is set by a principal with access to the job.',
    grant(['principal'], hasAccess),
  ),
  'job.issue': rule('A job is issued by a principal with access to it.', grant(['principal'], hasAccess)),

  'member.read': rule(JOB_ACCESS, grant(ROLES, hasAccess)),
  'member.edit': rule(
    'A member is changed by an engineer with access to the job.',
    grant(['engineer'], hasAccess),
  ),
  'member.submit': rule(
    'A member is handed to the checker by an engineer with access to the job.',
    grant(['engineer'], hasAccess),
  ),
  'member.comment': rule(
    'Members are commented on by the people who design, check and sign the job.',
    grant(['engineer', 'checker', 'librarian', 'principal'], hasAccess),
  ),
  'member.check': rule(
    'A member is checked by a checker with access to the job who did not design it.',
    grant(['checker'], hasAccess, isNotAuthor),
  ),

  'people.manage': rule('People and their roles are managed by an administrator.', grant(['administrator'])),
  'practice.manage': rule(
    'The practice’s settings are changed by an administrator.',
    grant(['administrator']),
  ),
  'audit.read': rule(
    'The record of events is read by a principal or an administrator.',
    grant(['principal', 'administrator']),
  ),
} as const satisfies Record<string, Rule>;

export type Action = keyof typeof RULES;

export function may(person: Person, action: Action, subject: Subject = {}): boolean {
  return RULES[action].grants.some(
    ({ roles, when }) =>
      person.roles.some((role) => roles.includes(role)) && when.every((holds) => holds(person, subject)),
  );
}

/** Refuses (403) with the rule in words. */
export function requirePermission(person: Person, action: Action, subject: Subject = {}): void {
  if (!may(person, action, subject)) throw new AppError('forbidden', RULES[action].said);
}
