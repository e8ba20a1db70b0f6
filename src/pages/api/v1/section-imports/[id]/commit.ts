import { askCommit } from '@/features/imports/act.server';
import { Commit, ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const POST = endpoint(
  {
    summary: 'Has the checked rows written into a draft edition',
    body: Commit,
    answer: ImportView,
    status: 202,
  },
  async (context, { user, body }) => {
    const view = await askCommit(user, idParam(context.params, 'id', 'This import'), ifMatch(context), body);
    return answer(view, { status: 202, headers: { ETag: etag(view.version) } });
  },
);
