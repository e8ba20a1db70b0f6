import { z } from 'zod';
import { listImports } from '@/features/imports/act.server';
import { ImportLine, ImportView } from '@/features/imports/imports';
import { takeUpload } from '@/features/imports/upload.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';
import { takeFile } from '@/http/upload';
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
      'A form of one part, `file`: a table as text, 50 MB at most, read as it comes. `columns` are those of the file, `guesses` what each is proposed to be. The file is looked through to its end; what is refused leaves nothing behind.',
    file: 'text/csv, text/plain, text/tab-separated-values',
    answer: ImportView,
    status: 201,
  },
  async (context, { user }) => {
    const view = await takeFile(context, (file) => takeUpload(user, file));
    return answer(view, {
      status: 201,
      headers: { Location: paths.api.import(view.id), ETag: etag(view.version) },
    });
  },
);
