import { combinationSetDocument } from '@/features/combination/combination';
import { readShippedJson, shippedSlugs } from './files';
import { issueShipped, missingFrom } from './library';
import type { DemoPeople } from './people';

/** What loads are combined by: data/combinations. */
export async function seedCombinations(people: DemoPeople): Promise<void> {
  for (const slug of await missingFrom(people, 'combination-set', await shippedSlugs('combinations'))) {
    const body = combinationSetDocument.parse(await readShippedJson('combinations', slug));
    const { reference, name, schema_version: schemaVersion } = body;
    await issueShipped(people, { kind: 'combination-set', slug, reference, name, body, schemaVersion });
  }
}
