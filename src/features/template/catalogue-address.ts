/** The catalogue's search and filters in its address. */
import { type CatalogueQuery, EVERYTHING, type Facet } from './find';

const NAMES: Record<Facet, string> = {
  arrangements: 'arrangement',
  loadKinds: 'load',
  states: 'status',
  tags: 'tag',
};
const FACETS = Object.keys(NAMES) as Facet[];

/** What is asked; a value that no template has finds nothing, and can be taken off again. */
export function readCatalogueQuery(query: URLSearchParams): CatalogueQuery {
  const lists = FACETS.map((facet) => [facet, query.getAll(NAMES[facet])]);
  return { ...EVERYTHING, ...Object.fromEntries(lists), q: (query.get('q') ?? '').slice(0, 200) };
}

export function writeCatalogueQuery(asked: CatalogueQuery): string {
  const query = new URLSearchParams();
  if (asked.q.trim() !== '') query.set('q', asked.q);
  for (const facet of FACETS) for (const value of asked[facet]) query.append(NAMES[facet], value);
  return query.toString();
}

/** The filter with a value put on, or taken off where it was on. */
export function toggled(asked: CatalogueQuery, facet: Facet, value: string): CatalogueQuery {
  const values: readonly string[] = asked[facet];
  const next = values.includes(value) ? values.filter((one) => one !== value) : [...values, value];
  return { ...asked, [facet]: next };
}

export const isNarrowed = (asked: CatalogueQuery): boolean => FACETS.some((facet) => asked[facet].length > 0);
