import { DocumentView } from '@/features/review/document';
import { readDocument } from '@/features/review/document.server';
import { endpoint } from '@/http/endpoint';
import { documentKey } from '@/http/library';

export const GET = endpoint(
  {
    summary: 'A document of the library with every revision',
    description: 'Of each revision: its people, its proof, its comments, and what the reader may do with it.',
    answer: DocumentView,
  },
  ({ params }, { user }) => readDocument(user, documentKey(params)),
);
