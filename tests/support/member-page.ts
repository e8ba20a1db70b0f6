import { readFileSync } from 'node:fs';
import type { Criteria } from '@/engine/check';
import type { UnitSystemName } from '@/engine/quantity';
import { designationKey, materialFor } from '@/engine/section';
import type { Template } from '@/engine/template';
import { evaluateMember } from '@/features/member/evaluate';
import { readSectionTable } from '@/features/section/import';
import {
  sectionTableMetaSchema,
  toRowOrigin,
  toSectionItem,
  toSectionValues,
} from '@/features/section/section';
import { toSubject } from '@/features/why/subject';
import { shippedCriteria } from './criteria';
import { shippedTemplate } from './templates';

interface DemoMember {
  readonly mark: string;
  readonly template: string;
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly section?: { readonly designation: string; readonly table: string; readonly material: string };
  readonly criteria?: string;
  readonly self_weight?: boolean;
  readonly job: string;
}

export const readJson = (path: string): unknown => JSON.parse(readFileSync(path, 'utf8'));
/** The members of the demo as they are written. */
export const MEMBERS = readJson('data/demo/members.json') as readonly DemoMember[];

/** A row of a shipped table, as a member takes it. */
export function sectionOf({ designation, table, material: id }: NonNullable<DemoMember['section']>) {
  const meta = sectionTableMetaSchema.parse(readJson(`data/sections/${table}.json`));
  const reading = readSectionTable(readFileSync(`data/sections/${table}.csv`, 'utf8'), meta);
  const row = reading.ok && reading.rows.find((one) => one.key === designationKey(designation));
  const material = materialFor(id);
  if (!row || !material) throw new Error(`${designation} of ${id}`);
  const item = toSectionItem(row, table, 1);
  return {
    values: toSectionValues(item),
    material,
    chosen: {
      ...{ values: toSectionValues(item), table, material: id },
      origin: { ...toRowOrigin(item), tableName: meta.name },
    },
  };
}

export interface MemberGiven {
  readonly template: Template;
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly section?: ReturnType<typeof sectionOf> | null;
  readonly criteria: Criteria | null;
  readonly system: UnitSystemName;
  readonly ownWeight?: boolean;
}

/** A member as its page has it, and what it is asked about as. */
export function pageOf({ section = null, ownWeight = true, ...given }: MemberGiven) {
  const inputs = { ...given, section, ownWeight, patterns: true };
  const reading = evaluateMember(inputs);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  const { evaluation } = reading;
  const chosen = section?.chosen ?? null;
  const about = {
    kind: 'member',
    inputs,
    evaluation,
    revision: 1,
    section: chosen,
    criteriaRevision: 1,
  } as const;
  const subject = toSubject(about);
  return { evaluation, subject };
}

/** A member of the demo. */
export const demoPage = ({ template, parameters, section, criteria, self_weight }: DemoMember) =>
  pageOf({
    template: shippedTemplate(template),
    parameters,
    section: section ? sectionOf(section) : null,
    criteria: criteria ? shippedCriteria(criteria) : null,
    system: criteria?.endsWith('-us') ? 'us' : 'metric',
    ownWeight: self_weight ?? true,
  });
