import type { Tx } from '@/db/client';
import { type Criteria, criteriaDocument } from '@/engine/check';
import type { Material } from '@/engine/section';
import { materialFor } from '@/engine/section';
import type { Template } from '@/engine/template';
import { findRevision, type LibraryRevision, revisionsById } from '@/features/review/library.server';
import {
  type ChosenSection,
  chooseMaterial,
  chooseSection,
  pinnedSection,
} from '@/features/section/choose.server';
import { templateOf } from '@/features/template/template.server';
import { type Fault, invalid } from '@/lib/app-error';
import type { Pin, SaveMember } from './member';

/** The library documents that a member pins, read. */
export interface Pins {
  readonly template: LibraryRevision & { readonly document: Template };
  readonly criteria: (LibraryRevision & { readonly document: Criteria }) | null;
  readonly section: { readonly row: ChosenSection; readonly material: Material } | null;
}

/** As the member's row holds them. */
export interface PinIds {
  readonly templateRevisionId: string;
  readonly criteriaRevisionId: string | null;
  readonly sectionId: string | null;
  readonly material: string | null;
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
const asCriteria = (revision: LibraryRevision) => ({
  ...revision,
  document: criteriaDocument.parse(revision.body),
});

export async function loadPins(tx: Tx, practiceId: string, ids: PinIds): Promise<Pins> {
  const { templateRevisionId, criteriaRevisionId, sectionId, material } = ids;
  const wanted = [templateRevisionId, criteriaRevisionId].filter((id) => id !== null);
  const revisions = await revisionsById(tx, practiceId, wanted);
  const revision = (what: string, id: string): LibraryRevision => {
    const found = revisions.find(({ revisionId }) => revisionId === id);
    if (!found) throw new MissingPin(what, id);
    return found;
  };
  return {
    template: asTemplate(revision('template revision', templateRevisionId)),
    criteria: criteriaRevisionId === null ? null : asCriteria(revision('criteria', criteriaRevisionId)),
    section: sectionId === null ? null : await loadSection(tx, practiceId, sectionId, material ?? ''),
  };
}

async function loadSection(tx: Tx, practiceId: string, id: string, materialId: string) {
  const row = await pinnedSection(tx, practiceId, id);
  if (!row) throw new MissingPin('section', id);
  const material = materialFor(materialId);
  if (!material) throw new MissingPin('material', materialId);
  return { row, material };
}

const refused = (pointer: string, code: string, message: string) => {
  const fault: Fault = { pointer, code, message };
  return invalid([fault]);
};

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
      `${found.reference} has no issued revision${found.withdrawalReason ? `: it was withdrawn (${found.withdrawalReason})` : ''}. Members are made from issued templates only; choose another.`,
    );
  return asTemplate(found);
}

/** Criteria as named: those that are pinned stay as they are, others come in their issued revision. */
export async function placeCriteria(
  tx: Tx,
  practiceId: string,
  slug: string | null,
  pinned: Pins['criteria'],
): Promise<Pins['criteria']> {
  if (slug === null) return null;
  if (pinned?.slug === slug) return pinned;
  const found = await findRevision(tx, practiceId, { kind: 'criteria', slug });
  if (found?.state === 'issued') return asCriteria(found);
  throw refused(
    '/criteria',
    found ? 'not_issued' : 'unknown_criteria',
    `There are no issued criteria “${slug}”. Choose from the list.`,
  );
}

/** A section as named: the row that is pinned stays, another comes from the issued edition of its table. */
export async function placeSection(
  tx: Tx,
  practiceId: string,
  choice: SaveMember['section'],
  pinned: Pins['section'],
): Promise<Pins['section']> {
  if (choice === null) return null;
  const material = chooseMaterial(choice.material);
  const { row } = pinned ?? {};
  const isSame = row?.values.designation === choice.designation && (choice.table ?? row.table) === row.table;
  return { row: row && isSame ? row : await chooseSection(tx, practiceId, choice), material };
}

/** A pin as it is shown, with the issued revision where that is another one by now. */
export async function toPin(
  tx: Tx,
  practiceId: string,
  kind: 'template' | 'criteria',
  pinned: LibraryRevision,
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
  };
}

/** The edition of the section's table that is issued, where it is not the pinned one. */
export async function newerEdition(tx: Tx, practiceId: string, row: ChosenSection): Promise<number | null> {
  if (row.editionState === 'issued') return null;
  const issued = await findRevision(tx, practiceId, { kind: 'section-table', slug: row.table });
  return issued?.state === 'issued' && issued.number > row.edition ? issued.number : null;
}
