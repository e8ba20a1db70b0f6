import { readdirSync, readFileSync } from 'node:fs';
import {
  type Instance,
  type InstanceOptions,
  instantiate,
  readParameters,
  type Template,
} from '@/engine/template';
import { authorTemplate } from '@/engine/template/author';

const FOLDER = 'data/templates';

/** The shipped templates as they are written, by slug. */
export const writtenTemplates: ReadonlyMap<string, unknown> = new Map(
  readdirSync(FOLDER)
    .filter((file) => file.endsWith('.json'))
    .map((file) => [file.replace('.json', ''), JSON.parse(readFileSync(`${FOLDER}/${file}`, 'utf8'))]),
);

/** A template as written, read; throws with its faults. */
export function authored(written: unknown): Template {
  const reading = authorTemplate(written);
  if (reading.ok) return reading.template;
  throw new Error(reading.faults.map(({ path, message }) => `${path.join('/')}: ${message}`).join('\n'));
}

export function shippedTemplate(slug: string): Template {
  return authored(writtenTemplates.get(slug));
}

/** The template's instance at these parameters, the rest at their defaults; throws with its faults. */
export function instanceAt(
  template: Template,
  parameters: Readonly<Record<string, unknown>> = {},
  options: InstanceOptions = {},
): Instance {
  const values = readParameters(template, parameters);
  if (!values.ok) throw new Error(JSON.stringify(values.faults));
  const made = instantiate(template, values.values, options);
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  return made.instance;
}
