import { acceptFindings } from '@/features/imports/act.server';
import { Accept, ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const POST = endpoint(
  { summary: 'Accepts warnings with a reason', body: Accept, answer: ImportView, status: 200 },
  async (context, { user, body }) => {
    const view = await acceptFindings(
      user,
      idParam(context.params, 'id', 'This import'),
      ifMatch(context),
      body,
    );
    return answer(view, { status: 200, headers: { ETag: etag(view.version) } });
  },
);
