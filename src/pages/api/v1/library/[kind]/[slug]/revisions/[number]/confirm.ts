import { confirmRevision } from '@/features/review/care.server';
import { Confirm, DocumentView } from '@/features/review/document';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Confirm that a revision says what its printed source says',
    description: 'By a librarian, once. Until then it is unverified.',
    body: Confirm,
    answer: DocumentView,
  },
  ({ params }, { user, body }) => confirmRevision(user, revisionKey(params), body.note),
);
