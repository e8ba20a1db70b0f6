import { z } from 'zod';
import { JobItem, JobView, jobQuery, NewJob } from '@/features/job/job';
import { createJob, listJobs } from '@/features/job/job.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';
import { paths } from '@/paths';

export const GET = endpoint(
  {
    summary: 'The jobs that are open to the person, by number',
    query: z.strictObject({ ...listQuery, ...jobQuery }),
    answer: listOf(JobItem),
  },
  async (_, { user, query: { cursor, ...query } }) => {
    const after = cursor === undefined ? undefined : readCursor(cursor, z.string());
    const { next, ...found } = await listJobs(user, { ...query, after });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);

export const POST = endpoint(
  { summary: 'Begin a job', body: NewJob, answer: JobView, status: 201 },
  async (_, { user, body }) => {
    const job = await createJob(user, body);
    return answer(job, {
      status: 201,
      headers: { ETag: etag(job.version), Location: paths.api.job(job.number) },
    });
  },
);
