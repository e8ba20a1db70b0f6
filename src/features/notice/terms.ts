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
