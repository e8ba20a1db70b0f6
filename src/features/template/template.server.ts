import type { Tx } from '@/db/client';
import { type Tenant, withPractice } from '@/db/tenancy';
import { type ProofResult, runProofCases, type Template } from '@/engine/template';
import { templateDocument } from '@/engine/template/document';
import { type Person, requirePermission } from '@/features/account/permission';
import { chooseMaterial } from '@/features/material/material.server';
import { unfinishedOf } from '@/features/review/draft';
import {
  currentRevisions,
  findRevision,
  historyOf,
  type LibraryRevision,
  NO_USES,
  usesByDocument,
} from '@/features/review/library.server';
import { chooseSection } from '@/features/section/choose.server';
import { resolveSection } from '@/features/section/resolve';
import { AppError, invalid, notFound } from '@/lib/app-error';
import { toEvaluateAnswer } from './answer';
import { evaluateTemplate, type SectionOfTemplate } from './evaluate';
import { type CatalogueQuery, createFinder, narrow, type Searchable } from './find';
import type { RevisionLine } from './item';
import type { EvaluateAnswer, EvaluateRequest } from './request';
import { type SchematicView, searchTexts, type TemplateRow, toSchematic, toTemplateRow } from './template';

type Actor = Person & Tenant;

/** A template that was read out of its stored revision, and what follows from it alone. */
interface Stored {
  readonly template: Template;
  readonly schematic: () => SchematicView;
  readonly proof: () => readonly ProofResult[];
}

/** Kept by the hash of the document: what a revision says never changes. */
const stored = new Map<string, Stored>();
const MOST_STORED = 500;

function storedOf({ sha256, body }: Pick<LibraryRevision, 'sha256' | 'body'>): Stored {
  const known = stored.get(sha256);
  if (known) return known;
  const template = templateDocument.parse(body);
  const made = {
    template,
    schematic: once(() => toSchematic(template)),
    proof: once(() => runProofCases(template)),
  };
  if (stored.size >= MOST_STORED) stored.clear();
  stored.set(sha256, made);
  return made;
}

function once<T>(make: () => T): () => T {
  let made: { value: T } | undefined;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

/** The template that a revision holds. */
export const templateOf = (revision: Pick<LibraryRevision, 'sha256' | 'body'>): Template =>
  storedOf(revision).template;

/** A row of the catalogue with its drawing and what a search looks through. */
export interface CatalogueEntry extends Searchable {
  readonly schematic: SchematicView;
}

/** Every template of the practice by the revision that stands for it. */
export function readCatalogue(actor: Actor): Promise<CatalogueEntry[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const revisions = await currentRevisions(tx, practiceId, 'template');
    const uses = await usesByDocument(tx, practiceId, 'template');
    return revisions.map((revision) => {
      const { template, schematic } = storedOf(revision);
      const row = toTemplateRow(template, revision, uses.get(revision.documentId) ?? NO_USES);
      return { row, texts: searchTexts(row, template), schematic: schematic() };
    });
  });
}

interface Page {
  /** The slug that the page before ended with. */
  readonly after?: string | undefined;
  readonly limit: number;
}

/** A page of the catalogue in the order in which a search finds it. */
export async function listTemplates(actor: Actor, query: CatalogueQuery, { after, limit }: Page) {
  const found = narrow(createFinder(await readCatalogue(actor))(query.q), query);
  const rows = found.map(({ entry }) => entry.row);
  const from = after === undefined ? 0 : rows.findIndex(({ slug }) => slug === after) + 1;
  const items = rows.slice(from, from + limit);
  const isLast = from + limit >= rows.length;
  return { items, next: isLast ? null : (items.at(-1)?.slug ?? null), total: rows.length };
}

export interface TemplateRead {
  readonly row: TemplateRow;
  readonly template: Template;
  readonly schematic: SchematicView;
  /** The proof cases as the engine of today works them. */
  readonly proof: readonly ProofResult[];
  readonly history: readonly RevisionLine[];
  readonly engineVersion: string;
  readonly sha256: string;
  readonly withdrawalReason: string | null;
}

interface TemplateKey {
  readonly slug: string;
  readonly number?: number | undefined;
}

/** One revision of a template, or the one that stands for it, with its history. */
export function readTemplate(actor: Actor, key: TemplateKey): Promise<TemplateRead> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const revision = await revisionOf(tx, practiceId, key);
    const history = await historyOf(tx, practiceId, revision.documentId);
    const uses = await usesByDocument(tx, practiceId, 'template');
    const { template, schematic, proof } = storedOf(revision);
    const { engineVersion, sha256, withdrawalReason } = revision;
    return {
      row: toTemplateRow(template, revision, uses.get(revision.documentId) ?? NO_USES),
      template,
      schematic: schematic(),
      proof: proof(),
      history,
      engineVersion,
      sha256,
      withdrawalReason,
    };
  });
}

async function revisionOf(tx: Tx, practiceId: string, { slug, number }: TemplateKey) {
  const found = await findRevision(tx, practiceId, { kind: 'template', slug, number });
  if (!found) throw notFound(number === undefined ? 'This template' : 'This revision of the template');
  if (unfinishedOf(found.body))
    throw new AppError(
      'conflict',
      `Revision ${found.number} is a draft that has faults still. Open the draft.`,
    );
  return found;
}

/** A template at given values, solved and proven, or 422 with every fault at its place in the request. */
export function evaluate(actor: Actor, slug: string, request: EvaluateRequest): Promise<EvaluateAnswer> {
  requirePermission(actor, 'beam.solve');
  return withPractice(actor, async (tx) => {
    const { section: choice, revision: number, ...inputs } = request;
    const revision = await revisionOf(tx, actor.practiceId, { slug, number });
    const section = choice && (await sectionOf(tx, actor.practiceId, choice));
    const outcome = evaluateTemplate(templateOf(revision), { ...inputs, section });
    if (!outcome.ok) throw invalid(outcome.errors);
    return toEvaluateAnswer(outcome.evaluation, revision.number);
  });
}

async function sectionOf(
  tx: Tx,
  practiceId: string,
  choice: NonNullable<EvaluateRequest['section']>,
): Promise<SectionOfTemplate> {
  const { material } = await chooseMaterial(tx, practiceId, choice.material);
  const { values } = await chooseSection(tx, practiceId, choice);
  const resolution = resolveSection(values, material);
  if (resolution.ok) return resolution.section;
  throw invalid([{ pointer: '/section/material', code: 'no_strength', message: resolution.message }]);
}
