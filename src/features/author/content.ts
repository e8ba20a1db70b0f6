/** All of a draft that its author may change, as one value to keep, compare and merge. */
import type { DraftView, SaveDraft } from '@/features/review/draft';
import { type Conflict, merge, sameValue } from './merge';

export type Content = SaveDraft;

export const contentOf = ({
  document,
  change_note,
  change_class,
  consequence,
}: Content | DraftView): Content => ({
  document,
  change_note,
  change_class,
  consequence,
});

export const sameContent = (a: Content, b: Content): boolean => sameValue(a, b);

interface MergedContent {
  readonly content: Content;
  /** With pointers into the content: '/document/name', '/change_note'. */
  readonly conflicts: readonly Conflict[];
}

/** What the two made of `base`. Of a place that both changed mine stands, until one is chosen. */
export function mergeContents(base: Content, mine: Content, theirs: Content): MergedContent {
  const parts = (['document', 'change_note', 'change_class', 'consequence'] as const).map((key) => ({
    key,
    ...merge(base[key], mine[key], theirs[key], `/${key}`),
  }));
  const merged = Object.fromEntries(parts.map(({ key, merged: value }) => [key, value]));
  return {
    content: { ...mine, ...merged },
    conflicts: parts.flatMap(({ conflicts }) => conflicts),
  };
}
