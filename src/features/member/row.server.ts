import { aliasedTable, and, asc, eq, getTableColumns, gt, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { member } from '@/db/schema/member';
import { section } from '@/db/schema/section';
import { type LibraryRevision, revisionsById } from '@/features/review/library.server';
import { factsOfPins, recalledMembers } from '@/features/review/pin.server';
import { notFound } from '@/lib/app-error';
import { type MemberItem, type MemberView, SaveMember } from './member';
import { readResult } from './migrate';
import { loadPins, NO_FACTS, newerEdition, type Pins, toPin } from './pins.server';
import { governingOf } from './result';

const creator = aliasedTable(person, 'creator');
const changer = aliasedTable(person, 'changer');
const evaluator = aliasedTable(person, 'evaluator');

/** What the row's documents say. */
export const stored = {
  parameters: SaveMember.shape.parameters,
  settings: z.strictObject({
    self_weight: z.boolean(),
    self_weight_reason: z.string(),
    patterns: z.boolean().default(true),
    patterns_reason: z.string().default(''),
    redundants: SaveMember.shape.redundants,
    categories: SaveMember.shape.categories,
    /** Why the member was removed. */
    reason: z.string(),
  }),
};
export type Settings = z.output<typeof stored.settings>;

type Selected = typeof member.$inferSelect & {
  readonly section: string | null;
  readonly creator: string;
  readonly changer: string;
  readonly evaluator: string | null;
};

const select = (tx: Tx, where: SQL | undefined, limit: number): Promise<Selected[]> =>
  tx
    .select({
      ...getTableColumns(member),
      section: section.designation,
      creator: creator.name,
      changer: changer.name,
      evaluator: evaluator.name,
    })
    .from(member)
    .innerJoin(creator, eq(creator.id, member.createdById))
    .innerJoin(changer, eq(changer.id, member.changedById))
    .leftJoin(evaluator, eq(evaluator.id, member.evaluatedById))
    .leftJoin(section, and(eq(section.practiceId, member.practiceId), eq(section.id, member.sectionId)))
    .where(where)
    .orderBy(asc(member.mark))
    .limit(limit)
    .execute();

const read = (row: Selected) => ({
  ...row,
  parameters: stored.parameters.parse(row.parameters),
  settings: stored.settings.parse(row.settings),
  result: row.result === null ? null : readResult(row.result),
});

/** A member's row with what its documents say read, and its people by name. */
export type MemberRow = ReturnType<typeof read>;

export async function findMember(
  tx: Tx,
  practiceId: string,
  jobId: string,
  mark: string,
): Promise<MemberRow | undefined> {
  const [found] = await select(
    tx,
    and(eq(member.practiceId, practiceId), eq(member.jobId, jobId), eq(member.mark, mark)),
    1,
  );
  return found && read(found);
}

export async function requireMember(
  tx: Tx,
  practiceId: string,
  jobId: string,
  mark: string,
): Promise<MemberRow> {
  const found = await findMember(tx, practiceId, jobId, mark);
  if (!found) throw notFound('This member');
  return found;
}

/** Members of a job by their marks, with the template that each pins. */
export async function pageOfMembers(
  tx: Tx,
  practiceId: string,
  jobId: string,
  { after, limit }: { readonly after?: string | undefined; readonly limit: number },
): Promise<{ rows: MemberItem[]; isLast: boolean }> {
  const found = await select(
    tx,
    and(
      eq(member.practiceId, practiceId),
      eq(member.jobId, jobId),
      after === undefined ? undefined : gt(member.mark, after),
    ),
    limit + 1,
  );
  const rows = found.slice(0, limit).map(read);
  const pinned = await revisionsById(tx, practiceId, [
    ...new Set(rows.map(({ templateRevisionId }) => templateRevisionId)),
  ]);
  const templates = new Map(pinned.map((one) => [one.revisionId, one]));
  const recalled = await recalledMembers(
    tx,
    practiceId,
    rows.map(({ id }) => id),
  );
  return {
    rows: rows.map((row) => toMemberItem(row, templates.get(row.templateRevisionId), recalled.has(row.id))),
    isLast: found.length <= limit,
  };
}

function toMemberItem(row: MemberRow, template: LibraryRevision | undefined, recalled: boolean): MemberItem {
  const governing = governingOf(row.result);
  const findings = row.result?.kind === 'result' ? (row.result.checks?.findings ?? []) : [];
  return {
    mark: row.mark,
    title: row.title,
    template: {
      slug: template?.slug ?? '',
      reference: template?.reference ?? '',
      name: template?.name ?? '',
      revision: template?.number ?? 0,
      state: template?.state ?? 'draft',
    },
    section: row.section,
    status: row.status,
    governing: governing && {
      title: governing.title,
      place: governing.place,
      ratio: governing.ratio,
    },
    findings: findings.map(({ title }) => title),
    unproven: row.result?.kind === 'fault',
    recalled,
    version: row.version,
    changed_by: row.changer,
    changed_at: row.changedAt.toISOString(),
  };
}

/** A member as it is read, with what it pins and what is newer by now. */
export async function toMemberView(tx: Tx, row: MemberRow, job: string, pins?: Pins): Promise<MemberView> {
  const { practiceId, settings } = row;
  const { template, criteria, combinations, section } = pins ?? (await loadPins(tx, practiceId, row));
  const pinned = [
    template.revisionId,
    criteria?.revisionId,
    combinations?.revisionId,
    section?.row.revisionId,
    section?.set?.revisionId,
  ];
  const facts = await factsOfPins(
    tx,
    practiceId,
    row.id,
    pinned.filter((id) => id !== undefined),
  );
  return {
    job,
    mark: row.mark,
    title: row.title,
    purpose: row.purpose,
    status: row.status,
    version: row.version,
    template: await toPin(tx, practiceId, 'template', template, facts.get(template.revisionId)),
    parameters: row.parameters,
    ...settings,
    section: section && {
      designation: section.row.values.designation,
      table: section.row.table,
      table_name: section.row.tableName,
      edition: section.row.edition,
      state: section.row.editionState,
      newer: await newerEdition(tx, practiceId, section.row),
      withdrawal_reason: section.row.withdrawalReason,
      ...(facts.get(section.row.revisionId) ?? NO_FACTS),
      material: section.material.id,
    },
    materials: section?.set
      ? await toPin(tx, practiceId, 'material-set', section.set, facts.get(section.set.revisionId))
      : null,
    criteria: criteria && (await toPin(tx, practiceId, 'criteria', criteria, facts.get(criteria.revisionId))),
    combinations:
      combinations &&
      (await toPin(tx, practiceId, 'combination-set', combinations, facts.get(combinations.revisionId))),
    result: row.result,
    fingerprint: row.fingerprint,
    engine_version: row.engineVersion,
    evaluated_at: row.evaluatedAt?.toISOString() ?? null,
    evaluated_by: row.evaluator,
    created_by: row.creator,
    created_at: row.createdAt.toISOString(),
    changed_by: row.changer,
    changed_at: row.changedAt.toISOString(),
  };
}
