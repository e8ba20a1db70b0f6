/** What a search finds, in the order in which groups of equal standing are shown. */
export const HIT_KINDS = ['template', 'section', 'job', 'member', 'document', 'person', 'note'] as const;
export type HitKind = (typeof HIT_KINDS)[number];

/** Sections are found in their own table; everything else has an entry. */
export const ENTRY_KINDS = HIT_KINDS.filter((kind) => kind !== 'section');
