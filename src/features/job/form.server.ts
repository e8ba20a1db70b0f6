import { AppError, type Fault } from '@/lib/app-error';
import { read } from '@/lib/read';
import { NewJob } from './job';
import { type Actor, createJob } from './job.server';

/** A page's form that was refused: what stood in it, and what is wrong by field. */
export interface Refused<V> {
  readonly kind: 'refused';
  readonly values: V;
  readonly errors: Readonly<Record<string, string>>;
  readonly status: number;
}
export interface Done<V> {
  readonly kind: 'done';
  readonly values: V;
  /** The number or mark that was given. */
  readonly key: string;
}

/** The first field of each pointer: "/people/1" belongs to people. What has no field stands under ''. */
export const errorsByField = (faults: readonly Fault[]): Record<string, string> =>
  Object.fromEntries(faults.map(({ pointer, message }) => [pointer.split('/')[1] ?? '', message]).reverse());

/** Does it, or says what a person can put right; what no form can put right goes on up. */
export async function attempt<V>(values: V, act: () => Promise<string>): Promise<Done<V> | Refused<V>> {
  try {
    return { kind: 'done', values, key: await act() };
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'invalid') throw error;
    return { kind: 'refused', values, errors: errorsByField(error.faults), status: error.status };
  }
}

const FIELDS = ['number', 'name', 'client', 'area', 'basis', 'unit_system', 'access'] as const;

/** The form of a new job. */
export async function takeJobForm(actor: Actor, form: FormData) {
  const values = {
    ...Object.fromEntries(FIELDS.map((name) => [name, String(form.get(name) ?? '')])),
    people: form.getAll('people').map(String),
  };
  const reading = read(NewJob, values);
  if (!reading.ok)
    return { kind: 'refused' as const, values, errors: errorsByField(reading.faults), status: 422 };
  return attempt(values, async () => (await createJob(actor, reading.value)).number);
}
