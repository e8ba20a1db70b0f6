import { askCheck } from '@/features/imports/act.server';
import { ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const POST = endpoint(
  { summary: 'Asks for a dry run over the whole file', answer: ImportView, status: 202 },
  async (context, { user }) => {
    const view = await askCheck(user, idParam(context.params, 'id', 'This import'), ifMatch(context));
    return answer(view, { status: 202, headers: { ETag: etag(view.version) } });
  },
);
