import { DraftView, SaveDraft } from '@/features/review/draft';
import { abandonDraft, readDraft, saveDraft } from '@/features/review/draft.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { revisionKey } from '@/http/library';

export const GET = endpoint(
  {
    summary: 'Read a revision as its author writes it',
    description: 'While it is a draft, `faults` says what keeps it from review.',
    answer: DraftView,
  },
  async ({ params }, { user }) => {
    const draft = await readDraft(user, revisionKey(params));
    return answer(draft, { headers: { ETag: etag(draft.version) } });
  },
);

export const PUT = endpoint(
  {
    summary: 'Save a draft',
    description:
      'Whatever faults it has: they come back with their places. Needs If-Match with the ETag that was read: 428 without; 412 when stale, with the draft as it stands now in `current`.',
    body: SaveDraft,
    answer: DraftView,
  },
  async (context, { user, body }) => {
    const draft = await saveDraft(user, revisionKey(context.params), ifMatch(context), body);
    return answer(draft, { headers: { ETag: etag(draft.version) } });
  },
);

export const DELETE = endpoint(
  {
    summary: 'Lay a draft aside',
    description: 'It is kept, left out of lists, and taken up again by saving it.',
  },
  ({ params }, { user }) => abandonDraft(user, revisionKey(params)),
);
