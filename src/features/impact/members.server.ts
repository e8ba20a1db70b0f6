/** Members in bulk, with all that they are evaluated from. */
import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { job } from '@/db/schema/job';
import { member } from '@/db/schema/member';
import { section } from '@/db/schema/section';
import { type CriteriaDocument, resolveCriteria } from '@/engine/check';
import type { CombinationSet } from '@/engine/combination';
import { type Material, materialFor, materialIn } from '@/engine/section';
import type { Template } from '@/engine/template';
import { ENGINE_VERSION } from '@/engine/version';
import { readSet } from '@/features/combination/combination.server';
import { asCriteria } from '@/features/criteria/criteria.server';
import { readMaterials } from '@/features/material/material.server';
import type { MemberInputs } from '@/features/member/evaluate';
import { stored } from '@/features/member/row.server';
import { revisionsById } from '@/features/review/library.server';
import type { SectionValues } from '@/features/section/resolve';
import { templateOf } from '@/features/template/template.server';
import type { Compared } from './figures';
import type { Found, Held } from './weigh';

/** What members pin, read once for all of them. */
export class Pinned {
  private readonly templates = new Map<string, Template>();
  private readonly criteria = new Map<string, CriteriaDocument>();
  private readonly sets = new Map<string, CombinationSet>();
  private readonly materials = new Map<string, readonly Material[]>();
  private readonly sections = new Map<string, { key: string; values: SectionValues }>();

  constructor(private readonly practiceId: string) {}

  async load(tx: Tx, rows: readonly MemberRow[]): Promise<void> {
    const templates = missing(this.templates, rows, (row) => row.templateRevisionId);
    const criteria = missing(this.criteria, rows, (row) => row.criteriaRevisionId);
    const materials = missing(this.materials, rows, (row) => row.materialRevisionId);
    const sets = missing(this.sets, rows, (row) => row.combinationRevisionId);
    const wanted = [...templates, ...criteria, ...materials, ...sets];
    const revisions = await revisionsById(tx, this.practiceId, wanted);
    for (const one of revisions)
      if (templates.includes(one.revisionId)) this.templates.set(one.revisionId, templateOf(one));
      else if (materials.includes(one.revisionId))
        this.materials.set(one.revisionId, readMaterials(one).materials);
      else if (sets.includes(one.revisionId)) this.sets.set(one.revisionId, readSet(one).document);
      else this.criteria.set(one.revisionId, asCriteria(one).document);
    const sections = missing(this.sections, rows, (row) => row.sectionId);
    if (sections.length === 0) return;
    const found = await tx
      .select({ id: section.id, ...SECTION })
      .from(section)
      .where(and(eq(section.practiceId, this.practiceId), inArray(section.id, sections)));
    for (const { id, key, ...values } of found) this.sections.set(id, { key, values });
  }

  /** Designation keys of the members' sections. */
  sectionKeys(rows: readonly MemberRow[]): string[] {
    return rows.flatMap(({ sectionId }) => (sectionId === null ? [] : [known(this.sections, sectionId).key]));
  }

  private materialOf({ material: id, materialRevisionId }: MemberRow): Material | undefined {
    if (id === null) return undefined;
    return materialRevisionId === null
      ? materialFor(id)
      : materialIn(known(this.materials, materialRevisionId), id);
  }

  /** What the member is evaluated from, and what a replacement is put in place of. */
  inputsOf(row: MemberRow): { inputs: MemberInputs; held: Held } {
    const settings = stored.settings.parse(row.settings);
    const pinned = row.sectionId === null ? null : known(this.sections, row.sectionId);
    const material = pinned && this.materialOf(row);
    const { criteriaRevisionId, combinationRevisionId } = row;
    const criteria = criteriaRevisionId === null ? null : known(this.criteria, criteriaRevisionId);
    const set = combinationRevisionId === null ? null : known(this.sets, combinationRevisionId);
    return {
      inputs: {
        template: known(this.templates, row.templateRevisionId),
        parameters: stored.parameters.parse(row.parameters),
        system: row.unitSystem,
        section: pinned && material ? { values: pinned.values, material } : null,
        criteria: criteria && resolveCriteria(criteria, set, settings.categories),
        ownWeight: settings.self_weight,
        patterns: settings.patterns,
        redundants: settings.redundants ?? undefined,
      },
      held: { sectionKey: pinned?.key ?? null, criteria, set, categories: settings.categories },
    };
  }
}

const SECTION = {
  key: section.designationKey,
  designation: section.designation,
  dimensions: section.dimensions,
  massKgM: section.massKgM,
  iMajorCm4: section.iMajorCm4,
  wElCm3: section.wElCm3,
};

/** Sections of an edition by their keys, as members come to need them: the edition may have a hundred thousand. */
export class EditionSections {
  /** Null is what the edition does not have. */
  private readonly asked = new Map<string, SectionValues | null>();

  constructor(
    private readonly practiceId: string,
    private readonly revisionId: string,
  ) {}

  async load(tx: Tx, keys: readonly string[]): Promise<void> {
    const wanted = [...new Set(keys)].filter((key) => !this.asked.has(key));
    if (wanted.length === 0) return;
    const { practiceId, revisionId } = this;
    const rows = await tx
      .select(SECTION)
      .from(section)
      .where(
        and(
          eq(section.practiceId, practiceId),
          eq(section.revisionId, revisionId),
          inArray(section.designationKey, wanted),
        ),
      );
    for (const key of wanted) this.asked.set(key, null);
    for (const { key, ...values } of rows) this.asked.set(key, values);
  }

  get(key: string): SectionValues | undefined {
    return this.asked.get(key) ?? undefined;
  }
}

function missing(
  there: ReadonlyMap<string, unknown>,
  rows: readonly MemberRow[],
  idOf: (row: MemberRow) => string | null,
): string[] {
  const ids = rows.map(idOf).filter((id) => id !== null && !there.has(id));
  return [...new Set(ids)].filter((id) => id !== null);
}

function known<T>(there: ReadonlyMap<string, T>, id: string): T {
  const found = there.get(id);
  if (!found) throw new Error(`A member pins ${id}, which is not there`);
  return found;
}

export type MemberRow = Awaited<ReturnType<typeof readMembers>>[number];

/** The members that are open to the person of the transaction, with the figures that were stored of them. */
export const readMembers = (tx: Tx, practiceId: string, ids: readonly string[]) =>
  tx
    .select({
      id: member.id,
      templateRevisionId: member.templateRevisionId,
      criteriaRevisionId: member.criteriaRevisionId,
      combinationRevisionId: member.combinationRevisionId,
      sectionId: member.sectionId,
      material: member.material,
      materialRevisionId: member.materialRevisionId,
      parameters: member.parameters,
      settings: member.settings,
      engineVersion: member.engineVersion,
      unitSystem: job.unitSystem,
      // The result is large, and unpacked once: what is compared is a small part of it.
      kind: sql<string | null>`r.kind`,
      total:
        sql`jsonb_build_object('reactions', r.total -> 'reactions', 'extremes', r.total -> 'extremes')`.mapWith(
          member.result,
        ),
      checks: sql`jsonb_build_object('rows', r.checks -> 'rows', 'findings', r.checks -> 'findings')`.mapWith(
        member.result,
      ),
    })
    .from(member)
    .innerJoin(job, and(eq(job.practiceId, member.practiceId), eq(job.id, member.jobId)))
    .leftJoin(
      sql`lateral jsonb_to_record(${member.result}) as r(kind text, total jsonb, checks jsonb)`,
      sql`true`,
    )
    .where(and(eq(member.practiceId, practiceId), sql`${member.id} = any(${sql.param([...ids])}::uuid[])`))
    .execute();

/** What was stored, where the engine of today stored it; else it has to be found anew. */
export function storedFigures({ engineVersion, kind, total, checks }: MemberRow): Found | null {
  if (engineVersion !== ENGINE_VERSION || kind !== 'result') return null;
  const { rows, findings = [] } = Object(checks);
  return {
    ok: true,
    compared: { total: total as Compared['total'], checks: Array.isArray(rows) ? { rows, findings } : null },
  };
}
