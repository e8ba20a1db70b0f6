/** What a search finds, in the order in which groups of equal standing are shown. */
export const HIT_KINDS = ['template', 'section', 'job', 'member', 'document', 'person', 'note'] as const;
export type HitKind = (typeof HIT_KINDS)[number];

/** Sections are found in their own table; everything else has an entry. */
export const ENTRY_KINDS = [
  'template',
  'job',
  'member',
  'document',
  'person',
  'note',
] as const satisfies readonly HitKind[];

export const KIND_TITLES: Readonly<Record<HitKind, string>> = {
  template: 'Templates',
  section: 'Sections',
  job: 'Jobs',
  member: 'Members',
  document: 'Library documents',
  person: 'People',
  note: 'Notes',
};

/** Of each kind, where no kind is asked for. */
export const SHOWN_OF_KIND = 5;

export const LONGEST_QUERY = 200; // characters
