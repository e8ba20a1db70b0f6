import { applyFixes } from '@/features/imports/act.server';
import { Fixes, ImportView } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const POST = endpoint(
  { summary: 'Puts right what was found, and checks again', body: Fixes, answer: ImportView, status: 202 },
  async (context, { user, body }) => {
    const view = await applyFixes(user, idParam(context.params, 'id', 'This import'), ifMatch(context), body);
    return answer(view, { status: 202, headers: { ETag: etag(view.version) } });
  },
);
