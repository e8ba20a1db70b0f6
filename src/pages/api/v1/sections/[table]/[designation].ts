import { z } from 'zod';
import { sectionView, toSectionView } from '@/features/section/edition';
import { findSection } from '@/features/section/section.server';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint(
  {
    summary: 'One section, and where its table comes from',
    description:
      'Of the issued edition, or of the edition that is asked for. The designation is read however typed.',
    query: z.strictObject({ edition: z.coerce.number().pipe(z.int().positive()).optional() }),
    answer: sectionView,
  },
  async ({ params: { table = '', designation = '' } }, { user, query: { edition } }) =>
    toSectionView(await findSection(user, { table, designation, edition })),
);
