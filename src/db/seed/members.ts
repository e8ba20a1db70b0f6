import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { NewMember } from '@/features/member/member';
import { createMember } from '@/features/member/member.server';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { job } from '../schema/job';
import { member } from '../schema/member';
import { withPractice } from '../tenancy';
import { readShippedJson } from './files';
import type { DemoPeople, DemoPerson } from './people';

const placed = z.looseObject({ job: z.string(), by: z.string() });

/** The demo's members, each placed and evaluated as its engineer would. A mark that is taken stays as it is. */
export async function seedMembers(people: DemoPeople): Promise<void> {
  const shipped = z.array(placed).parse(await readShippedJson('demo', 'members'));
  for (const { job: number, by, ...given } of shipped) {
    const engineer = people.get(by);
    if (!engineer) throw new Error(`The demo’s members name ${by}, who is not among its people`);
    const reading = read(NewMember, given);
    if (!reading.ok) throw invalid(reading.faults);
    if (!(await isTaken(engineer, number, reading.value.mark)))
      await createMember(engineer, number, reading.value);
  }
}

async function isTaken(engineer: DemoPerson, number: string, mark: string): Promise<boolean> {
  const { practiceId } = engineer;
  const found = await withPractice(engineer, (tx) =>
    tx
      .select({ id: member.id })
      .from(member)
      .innerJoin(job, and(eq(job.practiceId, member.practiceId), eq(job.id, member.jobId)))
      .where(and(eq(job.practiceId, practiceId), eq(job.number, number), eq(member.mark, mark))),
  );
  return found.length > 0;
}
