import { readFileSync } from 'node:fs';
import { withPractice } from '@/db/tenancy';
import { criteriaDocument } from '@/engine/check';
import { recordProof } from '@/features/review/proof-run.server';
import type { DocumentKind } from '@/features/review/review';
import { createDraft, type DraftKey, takeStep } from '@/features/review/review.server';
import { editionBody, fillEdition } from '@/features/section/edition.server';
import { readSectionTable } from '@/features/section/import';
import { sectionTableMetaSchema } from '@/features/section/section';
import { shippedSet } from './criteria';
import type { Member } from './practice';
import { shippedTemplate } from './templates';

/** Who writes a document and who reviews it. */
export interface Pair {
  readonly author: Member;
  readonly reviewer: Member;
}

type Document = { kind: DocumentKind; slug: string; reference: string; name: string; body: unknown };

const draft = (author: Member, document: Document, changeNote: string, fill?: Fill): Promise<DraftKey> =>
  withPractice(author, async (tx) => {
    const key = await createDraft(tx, author, {
      ...document,
      schemaVersion: 1,
      changeNote,
      changeClass: 'improvement',
      consequence: 'service',
    });
    await fill?.(tx, key.revisionId);
    return key;
  });
type Fill = (tx: Parameters<Parameters<typeof withPractice>[1]>[0], revisionId: string) => Promise<void>;

/** As the worker would leave it: the draft as it stands is proven. */
export const proveRevision = (reviewer: Member, revisionId: string, passed = true): Promise<void> =>
  withPractice(reviewer, (tx) => recordProof(tx, reviewer, revisionId, { passed, report: {} }));

async function issue({ author, reviewer }: Pair, key: DraftKey): Promise<DraftKey> {
  await takeStep(author, key.revisionId, { step: 'submit' });
  await proveRevision(reviewer, key.revisionId);
  await takeStep(reviewer, key.revisionId, { step: 'issue' });
  return key;
}

const templateDocument = (slug: string, change: object): Document => {
  const body = { ...shippedTemplate(slug), ...change };
  return { kind: 'template', slug, reference: body.reference, name: body.name, body };
};

/** A shipped template as a draft, with what is changed in it. */
export const draftTemplate = (author: Member, slug: string, change: object = {}): Promise<DraftKey> =>
  draft(author, templateDocument(slug, change), 'First issue.');

interface Issued {
  readonly change?: object;
  readonly note?: string;
  /** Under another address than its own. */
  readonly slug?: string;
}

/** The same, issued. */
export const issueTemplate = async (
  pair: Pair,
  slug: string,
  { change = {}, note = 'First issue.', slug: as = slug }: Issued = {},
): Promise<DraftKey> =>
  issue(pair, await draft(pair.author, { ...templateDocument(slug, change), slug: as }, note));

/** A shipped section table, issued. */
export async function issueSections(pair: Pair, slug: string): Promise<DraftKey> {
  const read = (file: string) => readFileSync(`data/sections/${slug}.${file}`, 'utf8');
  const meta = sectionTableMetaSchema.parse(JSON.parse(read('json')));
  const reading = readSectionTable(read('csv'), meta);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  const { reference, name } = meta;
  const body = editionBody(meta, reading.rows);
  const { practiceId } = pair.author;
  const document: Document = { kind: 'section-table', slug, reference, name, body };
  return issue(
    pair,
    await draft(pair.author, document, 'First issue.', (tx, revisionId) =>
      fillEdition(tx, { practiceId, revisionId, table: slug }, reading.rows),
    ),
  );
}

/** A shipped combination set, issued. */
export const issueCombinations = async (pair: Pair, slug: string): Promise<DraftKey> => {
  const body = shippedSet(slug);
  const { reference, name } = body;
  const document: Document = { kind: 'combination-set', slug, reference, name, body };
  return issue(pair, await draft(pair.author, document, 'First issue.'));
};

/** Shipped criteria, issued after the combination set that they refer to. */
export const issueCriteria = async (pair: Pair, slug: string): Promise<DraftKey & { slug: string }> => {
  const body = criteriaDocument.parse(JSON.parse(readFileSync(`data/criteria/${slug}.json`, 'utf8')));
  if (body.schema_version === 2) await issueCombinations(pair, body.combinations.set);
  const { reference, name } = body;
  const document: Document = { kind: 'criteria', slug, reference, name, body };
  return { ...(await issue(pair, await draft(pair.author, document, 'First issue.'))), slug };
};
