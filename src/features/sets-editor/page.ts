import type { UnitSystemName } from '@/engine/quantity';
import type { DraftView, Written } from '@/features/review/draft';
import type { SetKind } from '@/features/review/read-set';
import type { IssuedSet } from './criteria';

/** What the page of a set's draft is given. */
export interface SetPageData {
  readonly kind: SetKind;
  readonly draft: DraftView;
  readonly practice: string;
  readonly system: UnitSystemName;
  /** Whether this person may change it. */
  readonly isEditable: boolean;
  /** The issued revision as its author writes it, to tell what changes; null where none is issued. */
  readonly issued: { readonly revision: number; readonly document: Written } | null;
  /** The combination sets that criteria may refer to; of another kind none. */
  readonly sets: readonly IssuedSet[];
}

/** What each zone of the form is given. */
export interface ZoneProps {
  readonly data: SetPageData;
}
