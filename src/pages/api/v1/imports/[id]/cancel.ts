import { cancelImport } from '@/features/imports/act.server';
import { ImportView } from '@/features/imports/imports';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const POST = endpoint(
  { summary: 'Ends an import that is no edition yet', answer: ImportView, status: 200 },
  ({ params }, { user }) => cancelImport(user, idParam(params, 'id', 'This import')),
);
