import { openFile } from '@/features/imports/file.server';
import { ImportView, UploadQuery } from '@/features/imports/imports';
import { takeSource } from '@/features/imports/upload.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { idParam } from '@/http/params';
import { download, uploadOf } from '@/http/upload';

export const GET = endpoint(
  { summary: 'The document that an import’s values are from', status: 200 },
  async ({ params }, { user }) =>
    download(await openFile(user, idParam(params, 'id', 'This import'), 'source')),
);

export const PUT = endpoint(
  {
    summary: 'Brings the document that the values are from',
    description: 'The body is the file itself: a PDF, a picture or a text, 50 MB at most.',
    query: UploadQuery,
    answer: ImportView,
    status: 200,
  },
  async (context, { user, query }) => {
    const id = idParam(context.params, 'id', 'This import');
    const view = await takeSource(user, id, uploadOf(context, query.name));
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);
