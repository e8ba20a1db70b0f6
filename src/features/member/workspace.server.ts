import { aliasedTable, and, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { auditEvent } from '@/db/schema/audit';
import { withPractice } from '@/db/tenancy';
import { may } from '@/features/account/permission';
import { issuedSets, type ReadSet } from '@/features/combination/combination.server';
import { listCriteria } from '@/features/criteria/criteria.server';
import { type Actor, openJob } from '@/features/job/job.server';
import { materialChoices } from '@/features/material/material.server';
import { toRowOrigin } from '@/features/section/section';
import { suppliersOf } from '@/features/stock/of-sections.server';
import { loadPins } from './pins.server';
import { requireMember, toMemberView } from './row.server';
import { type CombinationChoice, changesOf, type HistoryLine, type WorkspaceData } from './workspace';

const actor = aliasedTable(person, 'actor');

/** Everything the member's sheet works with in the browser. */
export async function readWorkspace(user: Actor, number: string, mark: string): Promise<WorkspaceData> {
  const issued = await listCriteria(user);
  return withPractice(user, async (tx) => {
    const job = await openJob(tx, user, number, 'member.read');
    const row = await requireMember(tx, user.practiceId, job.id, mark);
    const pins = await loadPins(tx, user.practiceId, row);
    const { template, criteria, combinations, section } = pins;
    const sets = (await issuedSets(tx, user.practiceId)).filter(({ slug }) => slug !== combinations?.slug);
    const others = issued.filter(({ slug }) => slug !== criteria?.slug);
    const pinned = criteria && {
      slug: criteria.slug,
      reference: criteria.reference,
      name: criteria.name,
      revision: criteria.number,
      document: criteria.document,
    };
    return {
      member: await toMemberView(tx, row, job.number, pins),
      job: { number: job.number, name: job.name, unitSystem: job.unitSystem },
      template: template.document,
      section: section?.row.values ?? null,
      materials: await materialChoices(tx, user.practiceId, section),
      sectionOrigin: section ? toRowOrigin(section.row) : undefined,
      criteria: pinned ? [pinned, ...others] : others,
      sets: [...(combinations ? [combinations] : []), ...sets].map(toChoice),
      history: await historyOf(tx, user.practiceId, row.id),
      suppliers: await suppliersOf(tx, user.practiceId),
      today: new Date().toISOString().slice(0, 10),
      // The database opened the job to this person; what is left to ask is the role.
      mayEdit: job.status === 'open' && may(user, 'member.edit', { access: 'practice' }),
    };
  });
}

const toChoice = ({ slug, reference, name, number, document }: ReadSet): CombinationChoice => ({
  slug,
  reference,
  name,
  revision: number,
  document,
});

const MOST_EVENTS = 50;

/** What was done to the member, the newest first, each with what it changed. */
async function historyOf(tx: Tx, practiceId: string, memberId: string): Promise<HistoryLine[]> {
  const events = await tx
    .select({ at: auditEvent.at, by: actor.name, action: auditEvent.action, data: auditEvent.data })
    .from(auditEvent)
    .leftJoin(actor, eq(actor.id, auditEvent.actorId))
    .where(
      and(
        eq(auditEvent.practiceId, practiceId),
        eq(auditEvent.subjectKind, 'member'),
        eq(auditEvent.subjectId, memberId),
      ),
    )
    .orderBy(desc(auditEvent.sequence))
    .limit(MOST_EVENTS);
  return events.map(({ at, by, action, data }) => ({
    at: at.toISOString(),
    by: by ?? 'Putlog',
    ...changesOf(action, data),
  }));
}
