import { z } from 'zod';
import { REVISION_STATES } from '@/features/review/review';
import { Restore } from '@/features/section/edition';
import { restoreEdition } from '@/features/section/restore.server';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Goes back to a former edition of a section table',
    description:
      'Its rows become the next edition, which is sent to review. Members keep the editions that they have.',
    body: Restore,
    answer: z.strictObject({ number: z.int(), state: z.enum(REVISION_STATES) }),
    status: 201,
  },
  ({ params }, { user, body }) => restoreEdition(user, revisionKey(params), body),
);
