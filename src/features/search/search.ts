import { z } from 'zod';
import { DOCUMENT_KINDS, type DocumentKind } from '@/features/review/review';
import { paths } from '@/paths';
import { HIT_KINDS, type HitKind, LONGEST_QUERY } from './terms';

/** GET /api/v1/search, besides what every list takes. */
export const searchQuery = {
  q: z.string().trim().min(1, 'Type what to search for.').max(LONGEST_QUERY),
  kind: z.enum(HIT_KINDS).optional(),
};

/** Stretches of a text that answer, as [from, to) into it. */
const marks = z.array(z.tuple([z.int(), z.int()]).readonly()).readonly();
const Marked = z.strictObject({ text: z.string(), marks });
export type Marked = z.output<typeof Marked>;

export const Hit = z.strictObject({
  kind: z.enum(HIT_KINDS),
  /** As printed: Prop 3, Q-2417, LF4. Empty where it has none. */
  mark: Marked,
  title: Marked,
  /** Where it belongs. */
  detail: Marked,
  /** Of a note, where it answers. */
  excerpt: Marked.nullable(),
  state: z.string(),
  href: z.string(),
});
export type Hit = z.output<typeof Hit>;

export const SearchView = z.strictObject({
  items: z.array(Hit),
  next: z.string().nullable(),
  total: z.int(),
  /** How many of each kind answer, the kind of the best answer first. */
  kinds: z.array(z.strictObject({ kind: z.enum(HIT_KINDS), total: z.int() })),
  /** The words that were searched for instead of those that nothing has. */
  instead: z.array(z.strictObject({ typed: z.string(), meant: z.array(z.string()) })),
});
export type SearchView = z.output<typeof SearchView>;

/** What an answer is worth, smaller being better; within a grade, what is in use comes before what is not. */
export const GRADES = {
  /** Its mark or designation is what was typed. */
  mark: 0,
  /** Its mark begins so. */
  markBegins: 1,
  /** Its title begins so. */
  titleBegins: 2,
  /** Every word stands in mark and title. */
  names: 3,
  /** Every word stands somewhere. */
  words: 4,
} as const;

export interface KindFound {
  readonly kind: HitKind;
  readonly total: number;
  /** Of its best answer. */
  readonly grade: number;
}

/** The groups in the order in which they are shown: that of the best answer first, else as HIT_KINDS has them. */
export const inOrder = (found: readonly KindFound[]): KindFound[] =>
  [...found].sort((a, b) => a.grade - b.grade || HIT_KINDS.indexOf(a.kind) - HIT_KINDS.indexOf(b.kind));

const kindOf = (word: string | undefined): DocumentKind =>
  DOCUMENT_KINDS.find((kind) => kind === word) ?? 'template';

/** The page of an entry by the parts of its address: what the triggers of drizzle/0012 write as `place`. */
export function hrefOf(kind: HitKind, place: readonly string[], state: string): string {
  const [first = '', second = '', third = '', fourth = ''] = place;
  switch (kind) {
    case 'template':
      return isWritten(state) ? paths.template(second) : paths.libraryDocument(first, second);
    case 'document':
      return paths.libraryDocument(first, second);
    case 'section':
      return paths.section(first, second);
    case 'job':
      return paths.job(first);
    case 'member':
      return paths.member(first, second);
    case 'person':
      return paths.search(first);
    case 'note':
      if (first === 'request') return paths.request(Number(second));
      if (first === 'method' && isWritten(state)) return paths.templateRevision(third, Number(fourth));
      return paths.review(kindOf(second), third, Number(fourth));
  }
}

/** Drafts may have faults still, and then no page of their own to be used on. */
const isWritten = (state: string): boolean => state !== 'draft' && state !== 'in_review';

const STATE_WORDS: Readonly<Record<string, string>> = {
  in_review: 'in review',
  // Said of most, and so of none.
  issued: '',
  open: '',
  ready: '',
};
export const stateWords = (kind: HitKind, state: string): string =>
  kind === 'member' && state === 'draft' ? '' : (STATE_WORDS[state] ?? state);
