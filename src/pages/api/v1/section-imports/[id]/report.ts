import { ImportReport } from '@/features/imports/imports';
import { readReport } from '@/features/imports/report.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { idParam } from '@/http/params';

export const GET = endpoint(
  {
    summary: 'What was found in a file and what became of it',
    description: '`report` is null until the first check has ended; `state` and `phase` say how far it is.',
    answer: ImportReport,
  },
  async ({ params }, { user }) => {
    const report = await readReport(user, idParam(params, 'id', 'This import'));
    return answer(report, { headers: { ETag: etag(report.version) } });
  },
);
