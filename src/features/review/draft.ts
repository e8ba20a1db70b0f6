import { z } from 'zod';
import { CHANGE_CLASSES, CONSEQUENCES, DOCUMENT_KINDS, LONGEST_SLUG, REVISION_STATES, SLUG } from './review';

/** A document as its author writes it: JSON that may still be incomplete. */
export type Written = Readonly<Record<string, unknown>>;
const written = z.record(z.string(), z.unknown());

/**
 * A draft that has faults is kept as it was written, inside this; one without is kept as the document that it is.
 * So nothing that is typed is refused, and whoever reads a document meets a whole one.
 */
const unfinished = z.strictObject({ unfinished: written });
export const keepUnfinished = (document: Written) => ({ unfinished: document });

/** What an unfinished draft says so far; null when the document is whole. */
export function unfinishedOf(body: unknown): Written | null {
  const reading = unfinished.safeParse(body);
  return reading.success ? reading.data.unfinished : null;
}

const change = {
  /** What is new in this revision and why. */
  change_note: z.string().trim().max(2000),
  change_class: z.enum(CHANGE_CLASSES).nullable(),
  consequence: z.enum(CONSEQUENCES).nullable(),
};

const slug = z.string().max(LONGEST_SLUG).regex(SLUG, 'Use small letters, digits and hyphens.');

/** POST …/drafts: from a document, from a revision of this or another document, or from a bundle; alone it starts empty. */
export const NewDraft = z
  .strictObject({
    document: written.optional(),
    from: z
      .union([z.int().positive(), z.strictObject({ slug, revision: z.int().positive() })])
      .optional()
      .describe('A revision of this document by its number, or of another one of its kind'),
    bundle: written.optional(),
    change_note: change.change_note.default(''),
    change_class: change.change_class.default(null),
    consequence: change.consequence.default(null),
  })
  .check(({ value, issues }) => {
    const given = (['document', 'from', 'bundle'] as const).filter((key) => value[key] !== undefined);
    for (const key of given.slice(1))
      issues.push({
        code: 'custom',
        input: value,
        path: [key],
        message: 'Begin from a document, a revision or a bundle: give one of them.',
      });
  });
export type NewDraft = z.output<typeof NewDraft>;

/** PUT …/drafts/{n}: the whole of what may change. */
export const SaveDraft = z.strictObject({ document: written, ...change });
export type SaveDraft = z.output<typeof SaveDraft>;

export const DraftView = z.strictObject({
  kind: z.enum(DOCUMENT_KINDS),
  slug: z.string(),
  revision: z.int(),
  state: z.enum(REVISION_STATES),
  /** Laid aside: nobody goes on with it. Saving takes it up again. */
  abandoned: z.boolean(),
  version: z.int(),
  document: written,
  /** What keeps it from review, each with a JSON Pointer into `document`. */
  faults: z.array(z.strictObject({ pointer: z.string(), code: z.string(), message: z.string() })),
  ...change,
  /** Of the document as it stands: what a proof is of. */
  sha256: z.string(),
  author: z.string(),
  /** Who changed it besides the author; they do not review it either. */
  editors: z.array(z.string()),
  /** The revision of another document that this document was made from. */
  derived_from: z
    .strictObject({ slug: z.string(), name: z.string(), revision: z.int(), state: z.enum(REVISION_STATES) })
    .nullable(),
  created_at: z.iso.datetime(),
});
export type DraftView = z.output<typeof DraftView>;

/** Whose revision: the address of everything below a document. */
export interface RevisionKey {
  readonly kind: (typeof DOCUMENT_KINDS)[number];
  readonly slug: string;
  readonly number: number;
}
