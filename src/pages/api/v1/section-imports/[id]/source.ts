import { openFile } from '@/features/imports/file.server';
import { ImportView } from '@/features/imports/imports';
import { takeSource } from '@/features/imports/upload.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';
import { download, takeFile } from '@/http/upload';

export const GET = endpoint(
  { summary: 'The document that an import’s values are from', status: 200 },
  async ({ params }, { user }) =>
    download(await openFile(user, idParam(params, 'id', 'This import'), 'source')),
);

export const PUT = endpoint(
  {
    summary: 'Brings the document that the values are from',
    description: 'A form of one part, `file`: a PDF, a picture or a text, 50 MB at most. Needs If-Match.',
    file: 'application/pdf, image/png, image/jpeg, text/plain, text/csv',
    answer: ImportView,
    status: 200,
  },
  async (context, { user }) => {
    const id = idParam(context.params, 'id', 'This import');
    const version = ifMatch(context);
    const view = await takeFile(context, (file) => takeSource(user, id, version, file));
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);
