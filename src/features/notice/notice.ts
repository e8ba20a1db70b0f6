import { z } from 'zod';
import { MAIL_MODES, NOTICE_KINDS, type NoticeKind, USUAL_MODE } from './terms';

/** What the e-mail says besides the notice's own title and detail. */
export const MailData = z.strictObject({
  /** Reference of a library document, "Prop 3": all that the subject may name. Never a job's or a member's. */
  reference: z.string().max(100).optional(),
  /** Rows of a small table: Reason, Severity, Your members. */
  facts: z
    .array(z.strictObject({ label: z.string().max(100), value: z.string().max(4000) }))
    .max(50)
    .optional(),
});
export type MailData = z.output<typeof MailData>;

/** Something that happened, for the people whom it concerns. */
export interface Told {
  readonly people: readonly string[];
  readonly kind: NoticeKind;
  /** One line that stands alone: "Prop 3, revision 2, was recalled". */
  readonly title: string;
  readonly detail?: string;
  /** Path of the page that it is about, from `paths`. */
  readonly href: string;
  /** Names the event: nobody is told of one twice, however often it is written. */
  readonly dedupe: string;
  readonly mailData?: MailData;
}

/** A notice as its reader sees it. */
export const NoticeView = z.strictObject({
  id: z.uuid(),
  kind: z.enum(NOTICE_KINDS),
  title: z.string(),
  detail: z.string(),
  href: z.string(),
  created_at: z.iso.datetime(),
  read_at: z.iso.datetime().nullable(),
});
export type NoticeView = z.output<typeof NoticeView>;

/** What to mark as read: these, all of one page, or all that were told up to a moment. */
export const MarkRead = z.union([
  z.strictObject({ ids: z.array(z.uuid()).min(1).max(200) }),
  z.strictObject({ href: z.string().startsWith('/').max(2000) }),
  z.strictObject({ until: z.iso.datetime() }),
]);
export type MarkRead = z.output<typeof MarkRead>;

/** Where a list of notices goes on: unread before read, each newest first. */
export const NoticePlace = z.tuple([z.boolean(), z.string(), z.uuid()]);
export type NoticePlace = z.output<typeof NoticePlace>;

export const UnreadCount = z.strictObject({ unread: z.int() });

/** What a kind is called, and what it tells. */
export const KIND_WORDS: Readonly<Record<NoticeKind, { readonly name: string; readonly tells: string }>> = {
  recall: { name: 'Recall', tells: 'A revision that your members use was found wrong.' },
  withdrawn: { name: 'Withdrawn', tells: 'A document that you watch was withdrawn.' },
  issued: { name: 'Issued', tells: 'A document that you watch or use has a new revision.' },
  submitted: { name: 'For review', tells: 'A draft waits for a reviewer.' },
  returned: { name: 'Returned', tells: 'A draft of yours came back from review.' },
  commented: { name: 'Comment', tells: 'Somebody commented on what you wrote or review.' },
  review_due: { name: 'Review due', tells: 'A document’s review-by date is near or past.' },
  request: { name: 'Request', tells: 'A request or defect was raised, answered or done.' },
};

/** The kinds whose e-mails can be chosen: a recall always comes at once. */
const CHOSEN_KINDS = NOTICE_KINDS.filter((kind) => kind !== 'recall');
type ChosenKind = (typeof CHOSEN_KINDS)[number];

export const MODE_CHOICES = [
  { value: 'immediate', label: 'At once' },
  { value: 'digest', label: 'Once a day' },
  { value: 'none', label: 'No e-mail' },
] as const;

const mode = z.enum([...MAIL_MODES, 'none']);

/** How a person takes the e-mails of each kind. */
export const Preferences = z.strictObject({
  withdrawn: mode,
  issued: mode,
  submitted: mode,
  returned: mode,
  commented: mode,
  review_due: mode,
  request: mode,
} satisfies Record<ChosenKind, typeof mode>);
export type Preferences = z.output<typeof Preferences>;

/** Of whoever has chosen nothing. */
export const USUAL_PREFERENCES: Preferences = Preferences.strip().parse(USUAL_MODE);

const DIGEST_HOUR = 6; // UTC

/** The next hour at which digests go out. */
export function nextDigest(now: Date): Date {
  const next = new Date(now);
  next.setUTCHours(DIGEST_HOUR, 0, 0, 0);
  if (next <= now) next.setUTCDate(next.getUTCDate() + 1);
  return next;
}
