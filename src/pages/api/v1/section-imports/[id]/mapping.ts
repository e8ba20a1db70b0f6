import { saveMapping } from '@/features/imports/act.server';
import { ImportView, SaveMapping } from '@/features/imports/imports';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const PUT = endpoint(
  {
    summary: 'Says which table it is and what its columns are',
    description:
      'The answers are put on the guesses and on what was said before. Where nothing is left to be said, the check begins at once, unless `check` is false; POST …/check says what is left.',
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
