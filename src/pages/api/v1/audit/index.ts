import { z } from 'zod';
import { RecordedEvent, recordQuery } from '@/features/audit/record';
import { readRecord } from '@/features/audit/record.server';
import { endpoint } from '@/http/endpoint';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'The record of events, newest first',
    description: 'For principals and administrators. Days are UTC, both included.',
    query: z.strictObject({ ...listQuery, ...recordQuery }),
    answer: listOf(RecordedEvent),
  },
  async (_, { user, query: { cursor, limit, ...query } }) => {
    const before = cursor === undefined ? undefined : readCursor(cursor, z.int());
    const { next, ...found } = await readRecord(user, query, { before, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);
