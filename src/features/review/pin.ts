import { z } from 'zod';
import { REVIEW_STANDINGS } from './standing';

/** What whoever uses a revision has to know of it besides its state. */
export const pinFacts = {
  /** The open or closed case on it, where it was recalled while this member used it. */
  recall: z.strictObject({ id: z.uuid(), decided: z.boolean(), closed: z.boolean() }).nullable(),
  /** Against the day by which the document is to be looked at again. */
  review: z.enum(REVIEW_STANDINGS),
  review_by: z.iso.date().nullable(),
  /** A revision that the document goes back to, and that was withdrawn. */
  withdrawn_ancestor: z
    .strictObject({ reference: z.string(), revision: z.int(), reason: z.string() })
    .nullable(),
  /** A librarian compared it with its source. */
  confirmed: z.boolean(),
};
const schema = z.strictObject(pinFacts);
export type PinFacts = z.output<typeof schema>;
