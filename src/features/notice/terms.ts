/** What people are told of. */
export const NOTICE_KINDS = [
  'recall',
  'withdrawn',
  'issued',
  'submitted',
  'returned',
  'commented',
  'review_due',
  'request',
] as const;
export type NoticeKind = (typeof NOTICE_KINDS)[number];

export const MAIL_MODES = ['immediate', 'digest'] as const;
export type MailMode = (typeof MAIL_MODES)[number];

/** `sending`: the server has the message, and has not said yet that it takes it. */
export const MAIL_STATES = ['waiting', 'sending', 'sent', 'failed'] as const;

/** How e-mail of a kind comes to whoever has chosen nothing. */
export const USUAL_MODE = {
  recall: 'immediate',
  withdrawn: 'immediate',
  submitted: 'immediate',
  returned: 'immediate',
  issued: 'digest',
  commented: 'digest',
  review_due: 'digest',
  request: 'digest',
} as const satisfies Record<NoticeKind, MailMode>;
