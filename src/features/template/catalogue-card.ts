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

type Numbers = Readonly<Record<'breaks' | 'coefficients', readonly number[]>> & { readonly degree: number };
type SentSchematic = Omit<SchematicView, 'moment'> & { readonly moment: Numbers };
type SentCard = Omit<CatalogueCard, 'schematic'> & { readonly schematic: SentSchematic };

/** As it goes to the browser, where arrays of doubles arrive as plain lists. */
export interface CatalogueData {
  readonly practice: string;
  readonly cards: readonly SentCard[];
}

export function sendCard({ schematic, ...card }: CatalogueCard): SentCard {
  const { breaks, coefficients, degree } = schematic.moment;
  return {
    ...card,
    schematic: { ...schematic, moment: { breaks: [...breaks], coefficients: [...coefficients], degree } },
  };
}

export function receiveCard({ schematic, ...card }: SentCard): CatalogueCard {
  const { breaks, coefficients, degree } = schematic.moment;
  const moment = { breaks: Float64Array.from(breaks), coefficients: Float64Array.from(coefficients), degree };
  return { ...card, schematic: { ...schematic, moment } };
}
