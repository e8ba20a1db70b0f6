import { z } from 'zod';
import { JOB_ACCESS, JOB_STATUSES } from './terms';

const line = (most: number) => z.string().trim().max(most);

/** A job's number as it stands on drawings: letters, figures and what joins them, so that it can be part of an address. */
const jobNumber = line(24).regex(
  /^[A-Za-z0-9][A-Za-z0-9._-]*$/,
  'Give a job number of letters and figures, such as Q-2417, without spaces.',
);

/** POST /api/v1/jobs and the form of a new job. */
export const NewJob = z.strictObject({
  number: jobNumber,
  name: line(120).min(1, 'Give the job a name.'),
  client: line(120).default(''),
  area: line(200).default(''),
  /** Codes, loads and limits that the job is designed by, in words. */
  basis: line(2000).default(''),
  unit_system: z.enum(['metric', 'us']).default('metric'),
  access: z.enum(JOB_ACCESS).default('practice'),
  /** E-mail addresses of the named people; whoever begins the job is one of them without being named. */
  people: z.array(z.string().trim().toLowerCase().max(254)).max(100).default([]),
});
export type NewJob = z.output<typeof NewJob>;

export const JobView = z.strictObject({
  number: z.string(),
  name: z.string(),
  client: z.string(),
  area: z.string(),
  basis: z.string(),
  unit_system: z.enum(['metric', 'us']),
  access: z.enum(JOB_ACCESS),
  people: z.array(z.strictObject({ name: z.string(), email: z.string() })),
  status: z.enum(JOB_STATUSES),
  version: z.int(),
  created_by: z.string(),
  created_at: z.iso.datetime(),
  changed_at: z.iso.datetime(),
  /** Members that are not removed. */
  members: z.int(),
});
export type JobView = z.output<typeof JobView>;

/** A job in the schedule of jobs. */
export const JobItem = JobView.omit({ people: true, basis: true, version: true });
export type JobItem = z.output<typeof JobItem>;

export const jobQuery = { q: z.string().trim().max(100).default('') };
