import { beginDraft } from '@/features/review/begin.server';
import { DraftView, NewDraft } from '@/features/review/draft';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { documentKey } from '@/http/library';
import { paths } from '@/paths';

export const POST = endpoint(
  {
    summary: 'Begin a draft',
    description:
      'The first revision of a new document, or the next of one that is there: from a document as its author writes it, from a revision of this or another document, or from a bundle. It may be incomplete: `faults` says what keeps it from review.',
    body: NewDraft,
    answer: DraftView,
    status: 201,
  },
  async ({ params }, { user, body }) => {
    const draft = await beginDraft(user, documentKey(params), body);
    return answer(draft, {
      status: 201,
      headers: {
        ETag: etag(draft.version),
        Location: paths.api.draft(draft.kind, draft.slug, draft.revision),
      },
    });
  },
);
