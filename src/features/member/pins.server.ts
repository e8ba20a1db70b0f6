import type { Tx } from '@/db/client';
import type { CriteriaDocument } from '@/engine/check';
import { materialIn } from '@/engine/section';
import type { Template } from '@/engine/template';
import { type ReadSet, readSet } from '@/features/combination/combination.server';
import { asCriteria } from '@/features/criteria/criteria.server';
import {
  type PlacedMaterial,
  pinnedMaterial,
  placeMaterial,
  readMaterials,
} from '@/features/material/material.server';
import { findRevision, type LibraryRevision, revisionsById } from '@/features/review/library.server';
import type { PinFacts } from '@/features/review/pin';
import { holdForUse } from '@/features/review/pin.server';
import type { DocumentKind } from '@/features/review/review';
import { type ChosenSection, chooseSection, pinnedSection } from '@/features/section/choose.server';
import { templateOf } from '@/features/template/template.server';
import type { Moves, Pin, SaveMember } from './member';
import { movedTo, refused, withdrawn } from './revision.server';

/** The library documents that a member pins, read. */
export interface Pins {
  readonly template: LibraryRevision & { readonly document: Template };
  readonly criteria: (LibraryRevision & { readonly document: CriteriaDocument }) | null;
  /** What the criteria are held against; null without criteria, and where they have combinations of their own. */
  readonly combinations: ReadSet | null;
  readonly section: ({ readonly row: ChosenSection } & PlacedMaterial) | null;
}

/** As the member's row holds them. */
export interface PinIds {
  readonly templateRevisionId: string;
  readonly criteriaRevisionId: string | null;
  readonly combinationRevisionId: string | null;
  readonly sectionId: string | null;
  readonly material: string | null;
  readonly materialRevisionId: string | null;
}

/** A pinned revision cannot go: the database keeps what members depend on. */
class MissingPin extends Error {
  constructor(what: string, id: string) {
    super(`A member pins ${what} ${id}, which is not there`);
    this.name = 'MissingPin';
  }
}

const asTemplate = (revision: LibraryRevision) => ({
  ...revision,
  document: templateOf(revision),
});

export async function loadPins(tx: Tx, practiceId: string, ids: PinIds): Promise<Pins> {
  const { templateRevisionId, criteriaRevisionId, combinationRevisionId } = ids;
  const wanted = [templateRevisionId, criteriaRevisionId, combinationRevisionId].filter((id) => id !== null);
  const revisions = await revisionsById(tx, practiceId, wanted);
  const revision = (what: string, id: string): LibraryRevision => {
    const found = revisions.find(({ revisionId }) => revisionId === id);
    if (!found) throw new MissingPin(what, id);
    return found;
  };
  return {
    template: asTemplate(revision('template revision', templateRevisionId)),
    criteria: criteriaRevisionId === null ? null : asCriteria(revision('criteria', criteriaRevisionId)),
    combinations:
      combinationRevisionId === null ? null : readSet(revision('combinations', combinationRevisionId)),
    section: ids.sectionId === null ? null : await loadSection(tx, practiceId, ids.sectionId, ids),
  };
}

async function loadSection(
  tx: Tx,
  practiceId: string,
  id: string,
  { material, materialRevisionId }: Pick<PinIds, 'material' | 'materialRevisionId'>,
) {
  const row = await pinnedSection(tx, practiceId, id);
  if (!row) throw new MissingPin('section', id);
  const placed = await pinnedMaterial(tx, practiceId, material ?? '', materialRevisionId);
  if (!placed) throw new MissingPin('material', `${material} of ${materialRevisionId}`);
  return { row, ...placed };
}

/** The issued revision of a template, for a new member; 422 where there is none to place. */
export async function placeTemplate(tx: Tx, practiceId: string, slug: string): Promise<Pins['template']> {
  const found = await findRevision(tx, practiceId, { kind: 'template', slug });
  if (!found)
    throw refused(
      '/template',
      'unknown_template',
      `There is no template “${slug}”. Choose one from the catalogue.`,
    );
  if (found.state !== 'issued')
    throw refused(
      '/template',
      'not_issued',
      `${found.reference} has no issued revision${withdrawn(found)}. Members are made from issued templates only; choose another.`,
    );
  await holdForUse(tx, practiceId, found.revisionId, '/template');
  return asTemplate(found);
}

/** The template that is pinned, or the revision of it to move to. */
export async function moveTemplate(
  tx: Tx,
  practiceId: string,
  pinned: Pins['template'],
  number: number | undefined,
): Promise<Pins['template']> {
  if (number === undefined || number === pinned.number) return pinned;
  return asTemplate(await movedTo(tx, practiceId, 'template', pinned.slug, number));
}

/** What a section is made of, of the revision of its set to move to. */
async function materialOf(
  tx: Tx,
  practiceId: string,
  key: string,
  pinned: Pins['section'],
  number: number | undefined,
): Promise<PlacedMaterial> {
  const placed = await placeMaterial(tx, practiceId, key, pinned);
  const { set, material } = placed;
  if (number === undefined || !set || number === set.number) return { set, material };
  const moved = readMaterials(await movedTo(tx, practiceId, 'material-set', set.slug, number));
  const other = materialIn(moved.materials, material.id);
  if (other) return { set: moved.set, material: other };
  throw refused(
    '/section/material',
    'unknown_material',
    `${moved.set.reference} revision ${number} has no ${material.name} any more. Choose another material.`,
  );
}

/**
 * A section as named: the row that is pinned stays unless its table is moved to another edition; another section comes
 * from the issued edition of its table. Its material comes from the set that is pinned, or from an issued one.
 */
export async function placeSection(
  tx: Tx,
  practiceId: string,
  choice: SaveMember['section'],
  pinned: Pins['section'],
  { section_edition: edition, material_revision: number }: Moves = {},
): Promise<Pins['section']> {
  if (choice === null) return null;
  const made = await materialOf(tx, practiceId, choice.material, pinned, number);
  const { row } = pinned ?? {};
  const isSame = row?.values.designation === choice.designation && (choice.table ?? row.table) === row.table;
  if (row && isSame && (edition === undefined || edition === row.edition)) return { row, ...made };
  const chosen = await chooseSection(tx, practiceId, choice);
  if (edition !== undefined && edition !== chosen.edition)
    throw refused(
      '/section_edition',
      'not_issued',
      `Edition ${edition} of ${chosen.tableName} is not issued; edition ${chosen.edition} is. Compare with that one.`,
    );
  await holdForUse(tx, practiceId, chosen.revisionId, '/section', { isNew: !isSame });
  return { row: chosen, ...made };
}

export const NO_FACTS: PinFacts = {
  recall: null,
  review: 'none',
  review_by: null,
  withdrawn_ancestor: null,
  confirmed: false,
};

/** A pin as it is shown, with the issued revision where that is another one by now. */
export async function toPin(
  tx: Tx,
  practiceId: string,
  kind: DocumentKind,
  pinned: LibraryRevision,
  facts: PinFacts = NO_FACTS,
): Promise<Pin> {
  const { slug, reference, name, number, state, withdrawalReason } = pinned;
  const issued = state === 'issued' ? undefined : await findRevision(tx, practiceId, { kind, slug });
  const newer = issued?.state === 'issued' && issued.number > number ? issued : undefined;
  return {
    slug,
    reference,
    name,
    revision: number,
    state,
    newer: newer?.number ?? null,
    newer_note: newer?.changeNote ?? null,
    withdrawal_reason: withdrawalReason,
    ...facts,
  };
}

/** The edition of the section's table that is issued, where it is not the pinned one. */
export async function newerEdition(tx: Tx, practiceId: string, row: ChosenSection): Promise<number | null> {
  if (row.editionState === 'issued') return null;
  const issued = await findRevision(tx, practiceId, { kind: 'section-table', slug: row.table });
  return issued?.state === 'issued' && issued.number > row.edition ? issued.number : null;
}
