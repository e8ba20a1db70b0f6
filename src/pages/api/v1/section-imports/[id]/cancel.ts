import { cancelImport } from '@/features/imports/act.server';
import { ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const POST = endpoint(
  { summary: 'Ends an import that is no edition yet', answer: ImportView, status: 200 },
  async (context, { user }) => {
    const view = await cancelImport(user, idParam(context.params, 'id', 'This import'), ifMatch(context));
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);
