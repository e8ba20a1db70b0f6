import { z } from 'zod';

/** What an action is called where people read it. One that is not here is shown as it is stored. */
const ACTION_WORDS: Readonly<Record<string, string>> = {
  'document.set-review': 'Review date set',
  'import.upload': 'File brought in',
  'import.source': 'Source of the file added',
  'import.map': 'Columns of the file named',
  'import.check': 'File checked',
  'import.fix': 'Rows of the file put right',
  'import.accept': 'Finding accepted',
  'import.cancel': 'Import given up',
  'import.commit': 'Import begun',
  'import.committed': 'Edition written from the file',
  'job.create': 'Job begun',
  'member.create': 'Member placed',
  'member.save': 'Member saved',
  'member.remove': 'Member removed',
  'password.change': 'Password changed',
  'practice.found': 'Practice founded',
  'person.set-units': 'Units chosen',
  'person.set-notices': 'E-mails chosen',
  'recall.open': 'Recall opened',
  'recall.decide': 'Recall decided for a member',
  'recall.close': 'Recall closed',
  'record.export': 'Record exported',
  'request.raise': 'Request raised',
  'request.answer': 'Request answered',
  'revision.draft': 'Draft begun',
  'revision.save': 'Draft saved',
  'revision.abandon': 'Draft laid aside',
  'revision.submit': 'Sent to review',
  'revision.return': 'Returned to its author',
  'revision.issue': 'Issued',
  'revision.supersede': 'Superseded',
  'revision.withdraw': 'Withdrawn',
  'revision.comment': 'Commented on',
  'revision.resolve': 'Comment settled',
  'revision.reopen': 'Comment taken up again',
  'revision.confirm': 'Confirmed against its source',
  'search.save': 'Search saved',
  'search.change': 'Saved search changed',
  'search.remove': 'Saved search deleted',
  'session.start': 'Signed in',
  'session.end': 'Signed out',
  'session.end-all': 'Signed out everywhere',
  'session.refuse': 'Sign-in refused',
  'stock.create': 'Stock list begun',
  'stock.change': 'Stock list changed',
  'stock.replace': 'Stock list replaced',
  'stock.remove': 'Stock list removed',
  'stock.add-line': 'Stock line added',
  'stock.change-line': 'Stock line changed',
  'stock.remove-line': 'Stock line removed',
  'token.create': 'Token made',
  'token.revoke': 'Token withdrawn',
};

export const actionWords = (action: string): string => ACTION_WORDS[action] ?? action;

/** What events are about, as they are filtered by. */
export const SUBJECT_WORDS: Readonly<Record<string, string>> = {
  revision: 'Library',
  document: 'Library documents',
  import: 'Imports of sections',
  recall: 'Recalls',
  request: 'Requests',
  job: 'Jobs',
  member: 'Members',
  person: 'People',
  practice: 'The practice',
  stock: 'Stock lists',
  search: 'Saved searches',
  session: 'Sign-ins',
  token: 'Tokens',
  record: 'This record',
};

export const recordQuery = {
  /** E-mail address of who did it. */
  person: z.string().trim().toLowerCase().max(254).default(''),
  /** Kind of what it was done to: revision, job, member … */
  subject: z.string().trim().max(40).default(''),
  /** Text in the action or in what changed. */
  q: z.string().trim().max(100).default(''),
  /** First and last day, both included, UTC. */
  from: z.union([z.iso.date(), z.literal('')]).default(''),
  to: z.union([z.iso.date(), z.literal('')]).default(''),
};
export const RecordQuery = z.strictObject(recordQuery);
export type RecordQuery = z.output<typeof RecordQuery>;

export const RecordedEvent = z.strictObject({
  sequence: z.int(),
  at: z.iso.datetime(),
  /** Null: a task of the worker's own, or somebody who was not signed in. */
  by: z.strictObject({ name: z.string(), email: z.string() }).nullable(),
  action: z.string(),
  subject_kind: z.string(),
  subject_id: z.string(),
  before: z.unknown(),
  after: z.unknown(),
  hash: z.string(),
});
export type RecordedEvent = z.output<typeof RecordedEvent>;

/** One field of an event, from its value before to its value after. */
export interface Change {
  readonly field: string;
  readonly from: string;
  readonly to: string;
}

const isFields = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const LONGEST = 160;

function shown(value: unknown): string {
  if (value === null || value === undefined) return '';
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text;
}

/** What an event changed, field by field; what stayed the same is left out. */
export function changesOf({ before, after }: Pick<RecordedEvent, 'before' | 'after'>): Change[] {
  const from = isFields(before) ? before : {};
  const to = isFields(after) ? after : {};
  return [...new Set([...Object.keys(from), ...Object.keys(to)])]
    .map((field) => ({ field, from: shown(from[field]), to: shown(to[field]) }))
    .filter((change) => change.from !== change.to);
}
