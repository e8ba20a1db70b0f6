import { criteriaDocument } from '@/engine/check';
import { readShipped } from './files';
import { issueShipped } from './library';
import type { DemoPeople } from './people';

/** What members are judged by: data/criteria. */
export async function seedCriteria(people: DemoPeople): Promise<void> {
  for (const text of await readShipped('criteria', '.json')) {
    const body = criteriaDocument.parse(JSON.parse(text));
    const { slug, reference, name, schema_version: schemaVersion } = body;
    await issueShipped(people, { kind: 'criteria', slug, reference, name, body, schemaVersion });
  }
}
