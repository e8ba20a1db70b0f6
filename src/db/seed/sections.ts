import { editionBody, fillEdition } from '@/features/section/edition.server';
import { readSectionTable } from '@/features/section/import';
import { sectionTableMetaSchema } from '@/features/section/section';
import { readShipped, readShippedJson, shippedSlugs } from './files';
import { issueShipped, missingFrom } from './library';
import type { DemoPeople } from './people';

/** The section tables of data/sections, read as an upload would be. */
export async function seedSections(people: DemoPeople): Promise<void> {
  for (const slug of await missingFrom(people, 'section-table', await shippedSlugs('sections'))) {
    const meta = sectionTableMetaSchema.parse(await readShippedJson('sections', slug));
    const reading = readSectionTable(await readShipped('sections', `${slug}.csv`), meta);
    if (!reading.ok) throw new Error(`data/sections/${slug}.csv: ${JSON.stringify(reading.faults)}`);
    const { reference, name } = meta;
    const body = editionBody(meta, reading.rows);
    await issueShipped(
      people,
      { kind: 'section-table', slug, reference, name, body, schemaVersion: 1 },
      {
        fill: (tx, practiceId, revisionId) =>
          fillEdition(tx, { practiceId, revisionId, table: slug }, reading.rows),
      },
    );
  }
}
