import { z } from 'zod';
import { readAddress, writeAddress } from '../address';

/** How many a person keeps, so that they can still tell them apart. */
export const MOST_SAVED = 50;
export const LONGEST_NAME = 60;
const LONGEST_QUERY = 2000;

const fields = {
  name: z.string().trim().min(1, 'Give the search a name.').max(LONGEST_NAME),
  query: z.string().max(LONGEST_QUERY),
};

export const NewSavedSearch = z.strictObject({ ...fields, shared: z.boolean().default(false) });
export type NewSavedSearch = z.output<typeof NewSavedSearch>;

export const ChangeSavedSearch = z
  .strictObject({ ...fields, shared: z.boolean() })
  .partial()
  .refine((change) => Object.keys(change).length > 0, 'Give a name, a query or whether it is shared.');
export type ChangeSavedSearch = z.output<typeof ChangeSavedSearch>;

/** A search under its name. `query` is the query of the sections page, with its question mark. */
export const SavedSearchView = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  query: z.string(),
  shared: z.boolean(),
  mine: z.boolean(),
  /** Who saved it. */
  by: z.string(),
});
export type SavedSearchView = z.output<typeof SavedSearchView>;

/** What a page of sections understands of a query; empty where that is nothing. */
export const understood = (query: string): string => writeAddress(readAddress(query));

/** Whether a search is the one that a page shows, whatever the order of its parts. */
export const isSameSearch = (a: string, b: string): boolean => understood(a) === understood(b);
