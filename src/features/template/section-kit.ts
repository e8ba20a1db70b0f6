/** The part of the page's script that looks sections up: fetched when somebody begins to search. */

import type { SectionValues } from '@/features/section/resolve';
import { type RowOrigin, toRowOrigin, toSectionValues } from '@/features/section/section';
import { fetchSections } from '@/features/section/section.api';

export { pickSection, usualMaterial } from './section-pick';

export interface FoundSection {
  readonly table: string;
  readonly values: SectionValues;
  readonly origin?: RowOrigin | undefined;
}

const MOST = '6';

/** The best answers to a designation, however typed. */
export async function searchSections(q: string, signal: AbortSignal): Promise<FoundSection[]> {
  const { items } = await fetchSections({ q, limit: MOST }, signal);
  return items.map((item) => ({
    table: item.table,
    values: toSectionValues(item),
    origin: toRowOrigin(item),
  }));
}
