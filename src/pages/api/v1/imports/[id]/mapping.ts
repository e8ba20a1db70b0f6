import { saveMapping } from '@/features/imports/act.server';
import { ImportView, SaveMapping } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const PUT = endpoint(
  {
    summary: 'Says which table it is and what its columns are',
    body: SaveMapping,
    answer: ImportView,
    status: 200,
  },
  async (context, { user, body }) => {
    const view = await saveMapping(
      user,
      idParam(context.params, 'id', 'This import'),
      ifMatch(context),
      body,
    );
    return answer(view, { status: 200, headers: { ETag: etag(view.version) } });
  },
);
