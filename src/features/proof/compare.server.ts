import { desc, eq } from 'drizzle-orm';
import { revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { compareBenchmarks } from '@/engine/template/proof-effect';
import { requirePermission } from '@/features/account/permission';
import { unfinishedOf } from '@/features/review/draft';
import { writtenOf } from '@/features/review/draft.server';
import {
  type Actor,
  type DocumentKey,
  type RevisionRow,
  requireDocument,
  selectRevisions,
} from '@/features/review/rows.server';
import { templateOf } from '@/features/template/template.server';
import { AppError, notFound } from '@/lib/app-error';
import { type ComparisonView, partsBetween, toBenchmarks } from './compare';

interface Between {
  readonly from?: number | undefined;
  readonly to?: number | undefined;
}

/**
 * What differs between two revisions of a document, and what that does to its benchmarks. Without numbers: the newest
 * against the issued one, or where the newest is issued, against the one before.
 */
export function compareRevisions(
  actor: Actor,
  key: DocumentKey,
  { from, to }: Between,
): Promise<ComparisonView> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const { id } = await requireDocument(tx, practiceId, key);
    const all = await selectRevisions(tx, practiceId, eq(revision.documentId, id), [desc(revision.number)]);
    const second = to === undefined ? newestOf(all) : numbered(all, to);
    const first = from === undefined ? baseOf(all, second) : numbered(all, from);
    return toComparison(key, first, second);
  });
}

function numbered(all: readonly RevisionRow[], number: number): RevisionRow {
  const found = all.find((one) => one.number === number);
  if (!found) throw notFound(`Revision ${number}`);
  return found;
}

function newestOf(all: readonly RevisionRow[]): RevisionRow {
  const found = all.find(({ abandonedAt }) => abandonedAt === null);
  if (!found) throw notFound('A revision');
  return found;
}

/** The issued revision before it, else the newest that was issued before it. */
function baseOf(all: readonly RevisionRow[], { number }: RevisionRow): RevisionRow {
  const earlier = all.filter((one) => one.number < number && one.issuedAt !== null);
  const found = earlier.find(({ state }) => state === 'issued') ?? earlier[0];
  if (found) return found;
  throw new AppError('conflict', `Revision ${number} is the first: there is none to compare it with.`);
}

function toComparison({ kind, slug }: DocumentKey, from: RevisionRow, to: RevisionRow): ComparisonView {
  const isWorked = kind === 'template' && !unfinishedOf(from.body) && !unfinishedOf(to.body);
  return {
    kind,
    slug,
    from: { number: from.number, state: from.state },
    to: { number: to.number, state: to.state },
    changes: partsBetween(writtenOf(from.body), writtenOf(to.body)),
    benchmarks: isWorked ? toBenchmarks(compareBenchmarks(templateOf(from), templateOf(to))) : null,
  };
}
