import type { Template } from '@/engine/template';
import { attempt, errorsByField } from '@/features/job/form.server';
import type { Actor } from '@/features/job/job.server';
import { readStiffness, readValues } from '@/features/template/address';
import { read } from '@/lib/read';
import { NewMember } from './member';
import { createMember } from './member.server';

/** The form of a new member: mark and title typed, the template's values and section out of the address. */
export async function takeMemberForm(
  actor: Actor,
  form: FormData,
  template: Template,
  query: URLSearchParams,
) {
  const text = (name: string) => String(form.get(name) ?? '');
  const values = { job: text('job'), mark: text('mark'), title: text('title'), criteria: text('criteria') };
  const reading = read(NewMember, {
    mark: values.mark,
    title: values.title,
    template: template.slug,
    parameters: readValues(template, query),
    section: sectionIn(query),
    criteria: values.criteria || null,
  });
  if (!reading.ok)
    return { kind: 'refused' as const, values, errors: errorsByField(reading.faults), status: 422 };
  return attempt(values, async () => (await createMember(actor, values.job, reading.value)).mark);
}

function sectionIn(query: URLSearchParams) {
  const { section, table, material } = readStiffness(query);
  return section && material ? { designation: section, ...(table && { table }), material } : null;
}
