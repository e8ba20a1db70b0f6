import { setReviewBy } from '@/features/review/care.server';
import { DocumentView, ReviewBy } from '@/features/review/document';
import { endpoint } from '@/http/endpoint';
import { documentKey } from '@/http/library';

export const PUT = endpoint(
  {
    summary: 'Set the day by which a document is to be looked at again',
    description:
      'After that day whoever uses it is warned; after the grace no new member may use it. Members that use it already are left alone.',
    body: ReviewBy,
    answer: DocumentView,
  },
  ({ params }, { user, body }) => setReviewBy(user, documentKey(params), body),
);
