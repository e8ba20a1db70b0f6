import { type Actor, listJobs, readJob } from '@/features/job/job.server';
import { listMembers } from './member.server';
import { nextMark } from './schedule';

const MOST_JOBS = 200;
const MOST_MEMBERS = 2000;

/** Where a member may be placed: the job that is named, with its next mark, or every open job to choose from. */
export async function jobsForMember(
  actor: Actor,
  number: string | null,
): Promise<{ jobs: { number: string; name: string }[]; mark: string }> {
  if (number !== null) {
    const job = await readJob(actor, number);
    const { items } = await listMembers(actor, number, { limit: MOST_MEMBERS });
    return { jobs: [job], mark: nextMark(items) };
  }
  const { items } = await listJobs(actor, { q: '', limit: MOST_JOBS });
  return { jobs: items.filter(({ status }) => status === 'open'), mark: '' };
}
