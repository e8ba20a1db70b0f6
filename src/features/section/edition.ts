import { z } from 'zod';
import { CONSEQUENCES, REVISION_STATES, type RevisionState } from '@/features/review/review';
import { type SectionItem, sectionItemSchema } from './section';

/** What an edition's document says of where its rows come from. */
export const editionDocument = z.object({
  standard: z.string(),
  source: z.string(),
  conventions: z.string(),
  licence: z.string(),
  notes: z.array(z.string()),
  axes: z.enum(['en', 'us', 'british']).optional(),
  rows: z.int(),
  catalogue_date: z.iso.date().optional(),
  supplier: z.string().optional(),
  /** The import that the edition was made by: its file, and the report that stays with it. */
  import: z.object({ id: z.uuid(), file: z.string(), sha256: z.string() }).optional(),
  source_document: z.object({ file: z.string(), sha256: z.string() }).optional(),
});

/** POST …/restore: goes back to a former edition. */
export const Restore = z.strictObject({
  reason: z
    .string()
    .trim()
    .min(3, 'Say what is wrong with the edition in force, for whoever reviews this.')
    .max(1500),
  consequence: z.enum(CONSEQUENCES),
});
export type Restore = z.output<typeof Restore>;

/** An edition of a section table as its title block and its provenance show it. */
export type EditionView = z.output<typeof editionDocument> & {
  readonly table: string;
  readonly name: string;
  readonly reference: string;
  readonly edition: number;
  readonly state: RevisionState;
  readonly by: string;
  readonly checked: string | null;
  readonly date: string;
  readonly changeNote: string;
  readonly history: readonly EditionLine[];
};

type EditionLine = {
  readonly edition: number;
  readonly date: string;
  readonly by: string;
  readonly checked: string | null;
  readonly change: string;
};

export type SectionDetail = { readonly item: SectionItem; readonly edition: EditionView };

/** One section as the endpoint gives it: the item, and where its table comes from. */
export const sectionView = sectionItemSchema.extend({
  source: z.strictObject({
    name: z.string(),
    reference: z.string(),
    status: z.enum(REVISION_STATES),
    standard: z.string(),
    source: z.string(),
    conventions: z.string(),
    licence: z.string(),
    notes: z.array(z.string()),
  }),
});

export const toSectionView = ({ item, edition }: SectionDetail): z.output<typeof sectionView> => {
  const { name, reference, state, standard, source, conventions, licence, notes } = edition;
  return {
    ...item,
    source: { name, reference, status: state, standard, source, conventions, licence, notes },
  };
};
