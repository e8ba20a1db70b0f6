import { ImportReport } from '@/features/imports/imports';
import { readReport } from '@/features/imports/report.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const GET = endpoint(
  { summary: 'What was found in a file and what became of it', answer: ImportReport },
  ({ params }, { user }) => readReport(user, idParam(params, 'id', 'This import')),
);
