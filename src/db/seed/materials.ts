import { materialSetDocument } from '@/features/material/material';
import { readShippedJson, shippedSlugs } from './files';
import { issueShipped, missingFrom } from './library';
import type { DemoPeople } from './people';

/** What sections are made of: data/materials. */
export async function seedMaterials(people: DemoPeople): Promise<void> {
  for (const slug of await missingFrom(people, 'material-set', await shippedSlugs('materials'))) {
    const body = materialSetDocument.parse(await readShippedJson('materials', slug));
    const { reference, name, schema_version: schemaVersion } = body;
    await issueShipped(people, { kind: 'material-set', slug, reference, name, body, schemaVersion });
  }
}
