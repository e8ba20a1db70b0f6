import type { UnitSystemName } from '@/engine/quantity';
import type { DraftView } from '@/features/review/draft';

/** What the page of a template's draft is given. */
export interface DraftPageData {
  readonly draft: DraftView;
  readonly practice: string;
  readonly system: UnitSystemName;
  /** Whether this person may change it. */
  readonly isEditable: boolean;
}
