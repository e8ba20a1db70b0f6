import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { criteriaDocument } from '@/engine/check';
import { designationKey, materialFor } from '@/engine/section';
import { evaluateMember } from '@/features/member/evaluate';
import { readSectionTable } from '@/features/section/import';
import { sectionTableMetaSchema, toSectionItem, toSectionValues } from '@/features/section/section';
import { shippedTemplate } from '../../../tests/support/templates';
import { type Asked, wrongIn } from '../../../tests/support/traced';
import { memberSubject } from './subject';

interface DemoMember {
  readonly mark: string;
  readonly template: string;
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly section?: { readonly designation: string; readonly table: string; readonly material: string };
  readonly criteria?: string;
  readonly self_weight?: boolean;
  readonly job: string;
}

const readJson = (path: string): unknown => JSON.parse(readFileSync(path, 'utf8'));
const MEMBERS = readJson('data/demo/members.json') as readonly DemoMember[];

function sectionOf({ designation, table, material: id }: NonNullable<DemoMember['section']>) {
  const meta = sectionTableMetaSchema.parse(readJson(`data/sections/${table}.json`));
  const reading = readSectionTable(readFileSync(`data/sections/${table}.csv`, 'utf8'), meta);
  const row = reading.ok && reading.rows.find((one) => one.key === designationKey(designation));
  const material = materialFor(id);
  if (!row || !material) throw new Error(`${designation} of ${id}`);
  const values = toSectionValues(toSectionItem(row, table, 1));
  return { values, material, table, tableName: meta.name, edition: 1, computed: row.computed };
}

/** A member of the demo as its page has it, and what the page shows. */
function asked(member: DemoMember) {
  const section = member.section ? sectionOf(member.section) : null;
  const criteria = member.criteria
    ? criteriaDocument.parse(readJson(`data/criteria/${member.criteria}.json`))
    : null;
  const inputs = {
    template: shippedTemplate(member.template),
    parameters: member.parameters,
    system: member.criteria?.endsWith('-us') ? ('us' as const) : ('metric' as const),
    section,
    criteria,
    ownWeight: member.self_weight ?? true,
    patterns: true,
  };
  const reading = evaluateMember(inputs);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  const { evaluation } = reading;
  const subject = memberSubject({ inputs, evaluation, templateRevision: 1, section, criteriaRevision: 1 });
  return { evaluation, subject };
}

const ALL = { kind: 'all' } as const;

function keysOf({ evaluation, subject }: ReturnType<typeof asked>): Asked[] {
  const { total, groups, strength, checks, section } = evaluation;
  const source = { text: 'EN 1990', fromMemory: true };
  return [
    ...total.reactions.map(
      ({ vertical }, support): Asked => ({
        key: { kind: 'reaction', support, component: 'vertical', acting: ALL },
        value: vertical,
      }),
    ),
    ...groups.flatMap(({ group, solution }) =>
      solution.reactions.map(
        ({ vertical }, support): Asked => ({
          key: {
            kind: 'reaction',
            support,
            component: 'vertical',
            acting: { kind: 'group', group: group === 'movements' ? null : group },
          },
          value: vertical,
        }),
      ),
    ),
    ...strength.flatMap(({ combination, extremes, reactions }) => [
      ...(['shear', 'moment', 'deflection'] as const).flatMap((quantity) =>
        (['max', 'min'] as const).flatMap((sense): Asked[] => {
          const { value, at, pattern } = extremes[quantity][sense];
          const acting = { kind: 'combination', combination, pattern, source } as const;
          const key = { quantity, sense, x: at[0]!, acting } as const;
          return [
            { key: { kind: 'extreme', ...key }, value },
            { key: { kind: 'place', ...key }, value: at[0]! },
          ];
        }),
      ),
      ...reactions.flatMap(({ max, min }, support) =>
        [max, min].map(({ vertical: { value, pattern } }): Asked => {
          const acting = { kind: 'combination', combination, pattern, source } as const;
          return { key: { kind: 'reaction', support, component: 'vertical', acting }, value };
        }),
      ),
    ]),
    ...(checks?.rows ?? []).flatMap((row) =>
      (['demand', 'capacity', 'ratio'] as const).map(
        (figure): Asked => ({ key: { kind: 'check', row, figure }, value: row[figure] }),
      ),
    ),
    ...(section
      ? [
          { key: { kind: 'section', property: 'ei' }, value: section.ei } as const,
          { key: { kind: 'section', property: 'weight' }, value: section.selfWeight } as const,
          {
            key: { kind: 'section', property: 'elastic_modulus' },
            value: section.elastic.elasticModulus,
          } as const,
          {
            key: { kind: 'section', property: 'shear_area' },
            value: section.elastic.shearAreaAtAxis,
          } as const,
        ]
      : []),
    ...subject.beam.loads.map((load, index): Asked => {
      const value = { point: 'p', line: 'w0', couple: 'm', curvature: 'kappa' } as const;
      return { key: { kind: 'load', index }, value: Number(Object(load)[value[load.kind]]) };
    }),
  ];
}

describe('every number of the demo’s members comes from its parts', () => {
  test.each(MEMBERS.map((member) => [member.mark, member] as const))(
    '%s',
    { timeout: 30_000 },
    (_, member) => {
      const page = asked(member);
      expect(wrongIn(page.subject, keysOf(page))).toEqual([]);
    },
  );
});
