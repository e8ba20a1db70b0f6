import { criteriaDocument } from '@/engine/check';
import { readShippedJson, shippedSlugs } from './files';
import { issueShipped, missingFrom } from './library';
import type { DemoPeople } from './people';

/** What members are judged by: data/criteria. */
export async function seedCriteria(people: DemoPeople): Promise<void> {
  for (const slug of await missingFrom(people, 'criteria', await shippedSlugs('criteria'))) {
    const body = criteriaDocument.parse(await readShippedJson('criteria', slug));
    const { reference, name, schema_version: schemaVersion } = body;
    await issueShipped(people, { kind: 'criteria', slug, reference, name, body, schemaVersion });
  }
}
