import { z } from 'zod';
import { sectionPlace, sectionQueryFields, toSectionQuery } from '@/features/section/query';
import { sectionItemSchema } from '@/features/section/section';
import { searchSections } from '@/features/section/section.server';
import { endpoint } from '@/http/endpoint';
import { type List, listOf, listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'Search the sections of the issued tables',
    description:
      'q is a designation however typed; an exact one comes first, and where none answers the nearest are offered. Ranges are inclusive, in mm, kg/m and cm; sort=-mass descends. stock=1 narrows to what suppliers hold, supplier to the stock list of that address; each section says who holds it.',
    query: z.strictObject({ ...sectionQueryFields, ...listQuery }),
    answer: listOf(sectionItemSchema),
  },
  async (
    _,
    { user, query: { limit, cursor, ...fields } },
  ): Promise<List<z.output<typeof sectionItemSchema>>> => {
    const place = cursor === undefined ? null : readCursor(cursor, sectionPlace);
    const { items, next, total } = await searchSections(user, toSectionQuery(fields), { place, limit });
    return { items, next: next && writeCursor(next), total };
  },
);
