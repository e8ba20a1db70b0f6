import { ProofView } from '@/features/proof/proof';
import { askProof, readProof } from '@/features/proof/proof.server';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';

export const GET = endpoint(
  {
    summary: 'Read the proof of a revision',
    description:
      'The newest of it as it stands, else of what it was: `current` says which. 404 where there is none.',
    answer: ProofView,
  },
  ({ params }, { user }) => readProof(user, revisionKey(params)),
);

export const POST = endpoint(
  {
    summary: 'Ask for the proof of a revision',
    description:
      'The worker proves the template over its parameter box. One that is under way or done is answered as it is; GET tells how far it has come, and /api/v1/events that it has come further.',
    answer: ProofView,
    status: 202,
  },
  ({ params }, { user }) => askProof(user, revisionKey(params)),
);
