import { readProgress } from '@/features/imports/act.server';
import { ImportProgress } from '@/features/imports/imports';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const GET = endpoint(
  { summary: 'How far the worker is with an import', answer: ImportProgress },
  ({ params }, { user }) => readProgress(user, idParam(params, 'id', 'This import')),
);
