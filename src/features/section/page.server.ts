import { and, count, desc, eq, inArray, ne } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { job } from '@/db/schema/job';
import { revision } from '@/db/schema/library';
import { member } from '@/db/schema/member';
import { section } from '@/db/schema/section';
import { withPractice } from '@/db/tenancy';
import { designationKey } from '@/engine/section';
import type { User } from '@/features/account/account';
import { requirePermission } from '@/features/account/permission';
import { type Compared, valuesChanged } from './edition-changes';
import { findNeighbours } from './neighbours.server';
import type { SectionEdition, SectionPageView, SectionUses } from './page';
import { openSection, type SectionKey } from './section.server';

/**
 * All that the page of a section shows; `usesFrom` is where its page of members begins. A section that the issued edition
 * no longer has opens in the last one that had it. 404 where there is none.
 */
export function readSectionPage(user: User, key: SectionKey, usesFrom: number): Promise<SectionPageView> {
  requirePermission(user, 'library.read');
  const { practiceId } = user;
  return withPractice(user, async (tx) => {
    const { detail, history, revisionId } = await openSection(tx, practiceId, key, {
      former: true,
    });
    const kept = history.filter(({ state }) => state !== 'draft' && state !== 'in_review');
    const rows = await rowsOf(tx, practiceId, key, [...kept.map((one) => one.revisionId), revisionId]);
    const { wElMinor, wPlMinor } = rows.get(revisionId) ?? {};
    return {
      ...detail,
      minor: { w_el_minor_cm3: wElMinor ?? null, w_pl_minor_cm3: wPlMinor ?? null },
      editions: kept.map((one, index) => {
        const before = kept[index + 1];
        return {
          edition: one.number,
          state: one.state,
          date: one.issuedAt ?? one.date,
          withdrawalReason: one.withdrawalReason,
          ...became(before && (rows.get(before.revisionId) ?? null), rows.get(one.revisionId) ?? null),
        };
      }),
      neighbours: await findNeighbours(tx, practiceId, detail.item),
      uses: await usesOf(tx, practiceId, key, usesFrom),
    };
  });
}

const COLUMNS = {
  revisionId: section.revisionId,
  dimensions: section.dimensions,
  wElMinor: section.wElMinorCm3,
  wPlMinor: section.wPlMinorCm3,
  mass_kg_m: section.massKgM,
  depth_mm: section.depthMm,
  width_mm: section.widthMm,
  area_cm2: section.areaCm2,
  i_major_cm4: section.iMajorCm4,
  i_minor_cm4: section.iMinorCm4,
  w_el_cm3: section.wElCm3,
  w_pl_cm3: section.wPlCm3,
  j_cm4: section.jCm4,
  iw_cm6: section.iwCm6,
};

type Row = Compared & { readonly dimensions: unknown };

/** The section's rows in the editions that have it, by edition. */
async function rowsOf(tx: Tx, practiceId: string, { designation }: SectionKey, revisions: string[]) {
  const found = await tx
    .select(COLUMNS)
    .from(section)
    .where(
      and(
        eq(section.practiceId, practiceId),
        inArray(section.revisionId, revisions),
        eq(section.designationKey, designationKey(designation)),
      ),
    );
  return new Map(found.map((row) => [row.revisionId, row]));
}

type Became = Pick<SectionEdition, 'isThere' | 'what' | 'values' | 'dimensions'>;
const BARE: Pick<Became, 'values' | 'dimensions'> = { values: [], dimensions: false };

/** `before` is undefined in the first edition, null where the edition before has no such section. */
function became(before: Row | null | undefined, now: Row | null): Became {
  if (now === null) return { ...BARE, isThere: false, what: before ? 'removed' : 'absent' };
  if (before === undefined) return { ...BARE, isThere: true, what: 'first' };
  if (before === null) return { ...BARE, isThere: true, what: 'added' };
  const values = valuesChanged(before, now);
  const dimensions = JSON.stringify(before.dimensions) !== JSON.stringify(now.dimensions);
  return { isThere: true, what: values.length > 0 || dimensions ? 'changed' : 'same', values, dimensions };
}

const USES_SHOWN = 20;

/** The members made of a section, whatever its edition, in jobs that the person may see; the last changed first. */
async function usesOf(
  tx: Tx,
  practiceId: string,
  { table, designation }: SectionKey,
  from: number,
): Promise<SectionUses> {
  const isUse = and(
    eq(member.practiceId, practiceId),
    eq(section.tableSlug, table),
    eq(section.designationKey, designationKey(designation)),
    ne(member.status, 'removed'),
  );
  const ofMember = and(eq(section.practiceId, member.practiceId), eq(section.id, member.sectionId));
  const ofJob = and(eq(job.practiceId, member.practiceId), eq(job.id, member.jobId));
  const items = await tx
    .select({
      job: job.number,
      jobName: job.name,
      mark: member.mark,
      title: member.title,
      edition: revision.number,
      state: revision.state,
    })
    .from(member)
    .innerJoin(section, ofMember)
    .innerJoin(
      revision,
      and(eq(revision.practiceId, section.practiceId), eq(revision.id, section.revisionId)),
    )
    .innerJoin(job, ofJob)
    .where(isUse)
    .orderBy(desc(member.changedAt), member.id)
    .limit(USES_SHOWN)
    .offset(from);
  const [counted] = await tx
    .select({ total: count() })
    .from(member)
    .innerJoin(section, ofMember)
    .innerJoin(job, ofJob)
    .where(isUse);
  const total = counted?.total ?? 0;
  const next = from + USES_SHOWN;
  return { items, total, next: next < total ? next : null };
}
