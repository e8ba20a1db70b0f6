import type { Searchable } from './find';
import type { SchematicView } from './template';

/** A template in the catalogue: its row, what a search looks through, and its drawing. */
export interface CatalogueCard extends Searchable {
  readonly schematic: SchematicView;
  /** When its revision came to be what it is, as title blocks have it. */
  readonly day: string;
  /** Why this person cannot use it in a job; null where they can. */
  readonly barred: string | null;
}

export interface CatalogueData {
  readonly practice: string;
  readonly cards: readonly CatalogueCard[];
}
