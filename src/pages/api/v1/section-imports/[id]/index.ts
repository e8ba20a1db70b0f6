import { readImport } from '@/features/imports/act.server';
import { ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { idParam } from '@/http/params';

export const GET = endpoint(
  { summary: 'An import: its file, columns, progress and findings', answer: ImportView },
  async ({ params }, { user }) => {
    const view = await readImport(user, idParam(params, 'id', 'This import'));
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);
