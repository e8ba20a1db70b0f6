import { z } from 'zod';
import { EVERYTHING } from '@/features/template/find';
import { templateItem, templateQueryFields, toTemplateItem } from '@/features/template/item';
import { listTemplates } from '@/features/template/template.server';
import { endpoint } from '@/http/endpoint';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';

const place = z.strictObject({ after: z.string() });

export const GET = endpoint(
  {
    summary: 'List the templates',
    description: 'Each by the revision that stands for it: the issued one, else the newest.',
    query: z.strictObject({ ...listQuery, ...templateQueryFields }),
    answer: listOf(templateItem),
  },
  async (_, { user, query: { q, tag, arrangement, status, limit, cursor } }) => {
    const query = {
      ...EVERYTHING,
      q,
      tags: tag === undefined ? [] : [tag],
      arrangements: arrangement === undefined ? [] : [arrangement],
      states: status === undefined ? [] : [status],
    };
    const after = cursor === undefined ? undefined : readCursor(cursor, place).after;
    const { items, next, total } = await listTemplates(user, query, { after, limit });
    return {
      items: items.map(toTemplateItem),
      next: next === null ? null : writeCursor({ after: next }),
      total,
    };
  },
);
