import { z } from 'zod';
import { sectionQueryFields, toSectionQuery } from '@/features/section/query';
import { spreadSections } from '@/features/section/section.server';
import { spreadSchema } from '@/features/section/spread';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint(
  {
    summary: 'How the depth and mass of sections are spread',
    description:
      'Of the sections that answer the query of the list: counts in equal bins from 0, of all before any range and of those that meet every range, and how many meet the range of the measure alone. In mm and kg/m; the bins are round in the unit system asked for.',
    query: z.strictObject({ ...sectionQueryFields, system: z.enum(['metric', 'us']).default('metric') }),
    answer: spreadSchema,
  },
  (_, { user, query: { system, ...fields } }) => spreadSections(user, toSectionQuery(fields), system),
);
