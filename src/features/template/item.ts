import { z } from 'zod';
import { ARRANGEMENTS, LOAD_KINDS, type Template, templateDocument } from '@/engine/template/document';
import { CHANGE_CLASSES, CONSEQUENCES, REVISION_STATES, type RevisionState } from '@/features/review/review';
import type { TemplateRow } from './template';

/** What GET /api/v1/templates may be narrowed by; `q` is searched as on the screen, typos and all. */
export const templateQueryFields = {
  q: z.string().trim().max(200).default(''),
  tag: z.string().max(60).optional(),
  arrangement: z.enum(ARRANGEMENTS).optional(),
  status: z.enum(REVISION_STATES).optional(),
};

/** A template in a list: by the revision that stands for it. */
export const templateItem = z.strictObject({
  slug: z.string(),
  reference: z.string(),
  name: z.string(),
  arrangement: z.enum(ARRANGEMENTS),
  load_kinds: z.array(z.enum(LOAD_KINDS)),
  tags: z.array(z.string()),
  summary: z.string(),
  you_give: z.string(),
  you_get: z.string(),
  revision: z.int().positive(),
  status: z.enum(REVISION_STATES),
  date: z.iso.datetime(),
  author: z.string(),
  reviewer: z.string().nullable(),
  uses: z.strictObject({ members: z.int(), jobs: z.int() }),
});

const revisionLine = z.strictObject({
  number: z.int().positive(),
  status: z.enum(REVISION_STATES),
  date: z.iso.datetime(),
  author: z.string(),
  reviewer: z.string().nullable(),
  change_note: z.string(),
  /** Null while a draft does not say. */
  change_class: z.enum(CHANGE_CLASSES).nullable(),
  consequence: z.enum(CONSEQUENCES).nullable(),
  sha256: z.string(),
  engine_version: z.string(),
});

/** One revision whole: its document, and where it stands among the others. */
export const templateView = templateItem.extend({
  document: templateDocument,
  revisions: z.array(revisionLine),
});

export const toTemplateItem = (row: TemplateRow): z.output<typeof templateItem> => {
  const { loadKinds, tags, youGive, youGet, state, ...rest } = row;
  return {
    ...rest,
    load_kinds: [...loadKinds],
    tags: [...tags],
    you_give: youGive,
    you_get: youGet,
    status: state,
  };
};

/** A revision in the history of its template, newest first. */
export interface RevisionLine {
  readonly number: number;
  readonly state: RevisionState;
  readonly date: Date;
  readonly author: string;
  readonly reviewer: string | null;
  readonly changeNote: string;
  readonly changeClass: string | null;
  readonly consequence: string | null;
  readonly sha256: string;
  readonly engineVersion: string;
}

export const toTemplateView = (row: TemplateRow, document: Template, history: readonly RevisionLine[]) => ({
  ...toTemplateItem(row),
  document,
  revisions: history.map((line) => ({
    number: line.number,
    status: line.state,
    date: line.date.toISOString(),
    author: line.author,
    reviewer: line.reviewer,
    change_note: line.changeNote,
    change_class: line.changeClass,
    consequence: line.consequence,
    sha256: line.sha256,
    engine_version: line.engineVersion,
  })),
});
