import { readFileSync } from 'node:fs';
import { type Criteria, criteriaDocument, resolveCriteria } from '@/engine/check';
import type { Categories, CombinationSet } from '@/engine/combination';

const shipped = (folder: string, slug: string): unknown =>
  JSON.parse(readFileSync(`data/${folder}/${slug}.json`, 'utf8'));

export const shippedSet = (slug: string): CombinationSet => shipped('combinations', slug) as CombinationSet;

/** Shipped criteria with the combinations that they refer to. */
export function shippedCriteria(slug: string, chosen: Categories = {}): Criteria {
  const document = criteriaDocument.parse(shipped('criteria', slug));
  const set = document.schema_version === 2 ? shippedSet(document.combinations.set) : null;
  return resolveCriteria(document, set, chosen);
}
