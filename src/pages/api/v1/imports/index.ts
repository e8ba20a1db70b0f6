import { z } from 'zod';
import { listImports } from '@/features/imports/act.server';
import { ImportLine, ImportView, UploadQuery } from '@/features/imports/imports';
import { takeUpload } from '@/features/imports/upload.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';
import { uploadOf } from '@/http/upload';
import { paths } from '@/paths';

export const GET = endpoint(
  {
    summary: 'The imports of section tables, newest first',
    query: z.strictObject(listQuery),
    answer: listOf(ImportLine),
  },
  async (_, { user, query: { limit, cursor } }) => {
    const from = cursor ? readCursor(cursor, z.int().nonnegative()) : 0;
    const { items, next, total } = await listImports(user, { from, limit });
    return { items, total, next: next === null ? null : writeCursor(next) };
  },
);

export const POST = endpoint(
  {
    summary: 'Brings the file of a section table, which is recognised',
    description:
      'The body is the file itself, 50 MB at most, as text/csv or another type of text. What is refused leaves nothing behind.',
    query: UploadQuery,
    answer: ImportView,
    status: 201,
  },
  async (context, { user, query }) => {
    const view = await takeUpload(user, uploadOf(context, query.name));
    return answer(view, {
      status: 201,
      headers: { Location: paths.api.import(view.id), ETag: etag(view.version) },
    });
  },
);
