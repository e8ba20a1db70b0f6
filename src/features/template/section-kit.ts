/** The part of the page's script that looks sections up: fetched when somebody begins to search. */

import type { SectionValues } from '@/features/section/resolve';
import { sectionDimensionsSchema } from '@/features/section/section';
import { fetchSections } from '@/features/section/section.api';

export { materialsFor, pickSection } from './section-pick';

export interface FoundSection {
  readonly table: string;
  readonly values: SectionValues;
}

const MOST = '6';

/** The best answers to a designation, however typed. */
export async function searchSections(q: string, signal: AbortSignal): Promise<FoundSection[]> {
  const { items } = await fetchSections({ q, limit: MOST }, signal);
  return items.map((item) => ({
    table: item.table,
    values: {
      designation: item.designation,
      dimensions: sectionDimensionsSchema.parse({
        shape: item.shape,
        ...Object.fromEntries(Object.entries(item.dimensions_mm).map(([name, mm]) => [name, mm / 1000])),
      }),
      massKgM: item.mass_kg_m,
      iMajorCm4: item.i_major_cm4,
      wElCm3: item.w_el_cm3,
    },
  }));
}
