/** A member is never deleted: its mark would become free for another beam, while drawings still carry it. */
export const MEMBER_STATUSES = ['draft', 'ready', 'removed'] as const;
