import { runProofCases, type Template } from '@/engine/template';
import { readShippedJson, shippedSlugs } from './files';
import { issueShipped, missingFrom, type Proof } from './library';
import type { DemoPeople } from './people';

/** The templates of data/templates, their expressions parsed once into the trees that are stored. */
export async function seedTemplates(people: DemoPeople): Promise<void> {
  const missing = await missingFrom(people, 'template', await shippedSlugs('templates'));
  if (missing.length === 0) return;
  // The parser brings a maths library, which a start that has nothing to do need not load.
  const { authorTemplate } = await import('@/engine/template/author');
  for (const slug of missing) {
    const reading = authorTemplate(await readShippedJson('templates', slug));
    if (!reading.ok) throw new Error(`data/templates/${slug}.json: ${JSON.stringify(reading.faults)}`);
    const { reference, name, schema_version: schemaVersion } = reading.template;
    await issueShipped(
      people,
      { kind: 'template', slug, reference, name, body: reading.template, schemaVersion },
      { prove: () => prove(reading.template) },
    );
  }
}

/** By the proof cases alone, so that a start takes no longer: the worker proves the rest in its own time. */
function prove(template: Template): Proof {
  const cases = runProofCases(template);
  return { passed: cases.every(({ ok }) => ok), report: { cases } };
}
