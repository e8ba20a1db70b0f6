import { JobView } from '@/features/job/job';
import { readJob } from '@/features/job/job.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';

export const GET = endpoint({ summary: 'One job', answer: JobView }, async ({ params }, { user }) => {
  const job = await readJob(user, params['number'] ?? '');
  return answer(job, { headers: { ETag: etag(job.version) } });
});
