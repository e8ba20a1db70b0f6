import { and, count, eq, sql } from 'drizzle-orm';
import { member } from '@/db/schema/member';
import { withPractice } from '@/db/tenancy';
import type { Template } from '@/engine/template';
import { recordAudit } from '@/features/audit/audit.server';
import { type Actor, type Found, type JobRow, openJob, type Page, touchJob } from '@/features/job/job.server';
import { materialKey } from '@/features/material/choice';
import { decideByUpgrade } from '@/features/review/recall.server';
import { AppError, invalid, stale } from '@/lib/app-error';
import { type Assessment, assessMember } from './assess.server';
import { placeBasis } from './basis.server';
import { carryOver } from './carry';
import type { MemberItem, MemberView, NewMember, SaveMember, TriedView, TryMember } from './member';
import { loadPins, moveTemplate, type Pins, placeSection, placeTemplate } from './pins.server';
import { findMember, pageOfMembers, requireMember, type Settings, toMemberView } from './row.server';

/** The members of a job by their marks, removed ones too. */
export function listMembers(actor: Actor, number: string, page: Page): Promise<Found<MemberItem>> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.read');
    const { rows, isLast } = await pageOfMembers(tx, practiceId, job.id, page);
    const [total] = await tx
      .select({ count: count() })
      .from(member)
      .where(and(eq(member.practiceId, practiceId), eq(member.jobId, job.id)));
    return { items: rows, next: isLast ? null : (rows.at(-1)?.mark ?? null), total: total?.count ?? 0 };
  });
}

export function readMember(actor: Actor, number: string, mark: string): Promise<MemberView> {
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.read');
    return toMemberView(tx, await requireMember(tx, actor.practiceId, job.id, mark), job.number);
  });
}

/** Places an issued template in a job, as a member that is evaluated at once. */
export function createMember(actor: Actor, number: string, body: NewMember): Promise<MemberView> {
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.edit');
    refuseClosed(job);
    const there = await findMember(tx, practiceId, job.id, body.mark);
    if (there) throw markTaken(body.mark, there.status === 'removed');
    const pins = {
      template: await placeTemplate(tx, practiceId, body.template),
      ...(await placeBasis(tx, practiceId, body, { criteria: null, combinations: null })),
      section: await placeSection(tx, practiceId, body.section, null),
    };
    const given = { ...body, parameters: whole(pins.template.document, body.parameters) };
    const assessment = assessMember(pins, toGiven(given), job.unitSystem);
    const row = toColumns({ ...given, reason: '' }, pins, assessment, actor);
    const id = crypto.randomUUID();
    const [made] = await tx
      .insert(member)
      .values({ practiceId, id, jobId: job.id, mark: body.mark, createdById: personId, ...row })
      .onConflictDoNothing()
      .returning({ id: member.id });
    if (!made) throw markTaken(body.mark, false);
    await touchJob(tx, practiceId, job.id);
    const view = await toMemberView(
      tx,
      await requireMember(tx, practiceId, job.id, body.mark),
      job.number,
      pins,
    );
    await recordAudit(tx, actor, {
      action: 'member.create',
      subjectKind: 'member',
      subjectId: id,
      after: traceOf(view),
    });
    return view;
  });
}

/** Saves a member over the version that was read (412 with what stands there now where it is another one). */
export function saveMember(
  actor: Actor,
  number: string,
  mark: string,
  version: number,
  body: SaveMember,
): Promise<MemberView> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.edit');
    refuseClosed(job);
    const before = await requireMember(tx, practiceId, job.id, mark);
    const pinned = await loadPins(tx, practiceId, before);
    const was = await toMemberView(tx, before, job.number, pinned);
    if (before.version !== version) throw stale(was);
    const pins = {
      template: await moveTemplate(tx, practiceId, pinned.template, body.template_revision),
      ...(await placeBasis(tx, practiceId, body, pinned)),
      section: await placeSection(tx, practiceId, body.section, pinned.section, body),
    };
    const parameters = carryOver(pinned.template.document, pins.template.document, body.parameters);
    const given = { ...body, parameters: whole(pins.template.document, parameters) };
    const assessment = assessMember(pins, toGiven(given), job.unitSystem);
    refuseUnready(body, assessment);
    const [saved] = await tx
      .update(member)
      .set({ ...toColumns(given, pins, assessment, actor), status: body.status, version: version + 1 })
      .where(and(eq(member.practiceId, practiceId), eq(member.id, before.id), eq(member.version, version)))
      .returning({ id: member.id });
    const after = await requireMember(tx, practiceId, job.id, mark);
    const view = await toMemberView(tx, after, job.number, saved && pins);
    if (!saved) throw stale(view);
    await touchJob(tx, practiceId, job.id);
    await decideByUpgrade(tx, actor, before.id);
    await recordAudit(tx, actor, {
      action: body.status === 'removed' && was.status !== 'removed' ? 'member.remove' : 'member.save',
      subjectKind: 'member',
      subjectId: before.id,
      before: traceOf(was),
      after: traceOf(view),
    });
    return view;
  });
}

/** What a member would come to at other values; nothing is saved. */
export function tryMember(actor: Actor, number: string, mark: string, body: TryMember): Promise<TriedView> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const job = await openJob(tx, actor, number, 'member.read');
    const row = await requireMember(tx, practiceId, job.id, mark);
    const pinned = await loadPins(tx, practiceId, row);
    const {
      criteria = pinned.criteria?.slug ?? null,
      combinations = null,
      categories = row.settings.categories,
      section = choiceOf(pinned.section),
    } = body;
    const pins = {
      template: await moveTemplate(tx, practiceId, pinned.template, body.template_revision),
      ...(await placeBasis(tx, practiceId, { ...body, criteria, combinations, categories }, pinned)),
      section: await placeSection(tx, practiceId, section, pinned.section, body),
    };
    const given = {
      parameters: carryOver(pinned.template.document, pins.template.document, {
        ...row.parameters,
        ...body.parameters,
      }),
      self_weight: body.self_weight ?? row.settings.self_weight,
      patterns: body.patterns ?? row.settings.patterns,
      categories,
      redundants: body.redundants === undefined ? row.settings.redundants : body.redundants,
    };
    return assessMember(pins, given, job.unitSystem);
  });
}

const choiceOf = (section: Pins['section']): SaveMember['section'] =>
  section && {
    designation: section.row.values.designation,
    table: section.row.table,
    material: materialKey(section.material.id, section.set?.slug),
  };

/** Every parameter of the template, so that a member says all of what it was evaluated at. */
const whole = ({ parameters }: Template, given: SaveMember['parameters']): SaveMember['parameters'] => ({
  ...Object.fromEntries(parameters.map((parameter) => [parameter.symbol, parameter.default])),
  ...given,
});

const toGiven = ({
  parameters,
  self_weight,
  patterns,
  categories,
  redundants,
}: Omit<NewMember, 'mark' | 'template'>) => ({ parameters, self_weight, patterns, categories, redundants });

function toColumns(
  body: Omit<NewMember, 'mark' | 'template'> & { readonly reason: string },
  pins: Pins,
  { result, fingerprint, engine_version: engineVersion }: Assessment,
  { personId }: Actor,
) {
  const settings: Settings = {
    self_weight: body.self_weight,
    self_weight_reason: body.self_weight_reason,
    patterns: body.patterns,
    patterns_reason: body.patterns_reason,
    redundants: body.redundants,
    categories: body.categories,
    reason: body.reason,
  };
  return {
    title: body.title,
    purpose: body.purpose,
    templateRevisionId: pins.template.revisionId,
    criteriaRevisionId: pins.criteria?.revisionId ?? null,
    combinationRevisionId: pins.combinations?.revisionId ?? null,
    sectionId: pins.section?.row.id ?? null,
    material: pins.section?.material.id ?? null,
    materialRevisionId: pins.section?.set?.revisionId ?? null,
    parameters: body.parameters,
    settings,
    result,
    fingerprint,
    engineVersion,
    evaluatedAt: sql`now()`,
    evaluatedById: personId,
    changedById: personId,
    changedAt: sql`now()`,
  };
}

function refuseClosed({ number, status }: JobRow): void {
  if (status === 'closed')
    throw new AppError('conflict', `Job ${number} is closed. Its members are kept as they are.`);
}

function refuseUnready({ status }: SaveMember, { result }: Assessment): void {
  if (status !== 'ready' || (result.kind === 'result' && result.checks)) return;
  const message =
    result.kind === 'fault'
      ? 'A member without a proven result is not ready for check. Keep it as a draft.'
      : 'A member is ready for check when a section and criteria are chosen. Choose both, or keep it as a draft.';
  throw invalid([{ pointer: '/status', code: 'not_ready', message }]);
}

const markTaken = (mark: string, isRemoved: boolean) =>
  invalid([
    {
      pointer: '/mark',
      code: 'duplicate',
      message: isRemoved
        ? `Mark ${mark} belonged to a member that was removed, and is never used again. Give another mark.`
        : `There is a member ${mark} in this job already. Give another mark.`,
    },
  ]);

/** What the record keeps of a member: all that was given, and the fingerprint of what came of it. */
const traceOf = ({
  title,
  purpose,
  status,
  reason,
  version,
  template,
  section,
  materials,
  criteria,
  combinations,
  ...view
}: MemberView) => ({
  title,
  purpose,
  status,
  reason,
  version,
  template: `${template.slug} ${template.revision}`,
  section: section && `${section.table} ${section.edition} ${section.designation} ${section.material}`,
  materials: materials && `${materials.slug} ${materials.revision}`,
  criteria: criteria && `${criteria.slug} ${criteria.revision}`,
  combinations: combinations && `${combinations.slug} ${combinations.revision}`,
  categories: view.categories,
  parameters: view.parameters,
  self_weight: view.self_weight,
  self_weight_reason: view.self_weight_reason,
  patterns: view.patterns,
  patterns_reason: view.patterns_reason,
  redundants: view.redundants,
  fingerprint: view.fingerprint,
});
