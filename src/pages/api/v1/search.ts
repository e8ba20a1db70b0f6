import { z } from 'zod';
import { SearchView, searchQuery } from '@/features/search/search';
import { search } from '@/features/search/search.server';
import { endpoint } from '@/http/endpoint';
import { listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'Search templates, sections, jobs, members, people and notes',
    description:
      'Answers what the reader may read: marks and designations however typed, words by their beginnings, a mistyped word by those it is nearest to. Without `kind` the best five of every kind; with it all of that kind, in pages.',
    query: z.strictObject({ ...listQuery, ...searchQuery }),
    answer: SearchView,
  },
  async (_, { user, query: { q, kind, cursor, limit } }) => {
    const from = cursor === undefined ? 0 : readCursor(cursor, z.int().min(0).max(100_000));
    const { next, ...found } = await search(user, { q, kind, from, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);
