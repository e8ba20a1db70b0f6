import { describe, expect, test } from 'vitest';
import type { Criteria } from '@/engine/check';
import type { Template } from '@/engine/template';
import { parseExpression } from '@/engine/template/parse';
import { shippedCriteria } from '../../../tests/support/criteria';
import { demoPage, MEMBERS, type MemberGiven, pageOf, sectionOf } from '../../../tests/support/member-page';
import { shippedTemplate } from '../../../tests/support/templates';
import { type Asked, wrongIn } from '../../../tests/support/traced';

const ALL = { kind: 'all' } as const;

function keysOf({ evaluation, subject }: ReturnType<typeof pageOf>): Asked[] {
  const { total, groups, strength, checks, section } = evaluation;
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
          const acting = { kind: 'combination', combination, pattern } as const;
          const key = { quantity, sense, x: at[0]!, acting } as const;
          return [
            { key: { kind: 'extreme', ...key }, value },
            { key: { kind: 'place', ...key }, value: at[0]! },
          ];
        }),
      ),
      ...reactions.flatMap(({ max, min }, support) =>
        [max, min].map(({ vertical: { value, pattern } }): Asked => {
          const acting = { kind: 'combination', combination, pattern } as const;
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

const expression = (text: string) => {
  const parsing = parseExpression(text);
  if (!parsing.ok) throw new Error(parsing.message);
  return { text, tree: parsing.tree };
};

/** A shipped template on other supports: those with a stiffness are springs. */
function onSupports(slug: string, supports: readonly (readonly [at: string, kv?: string])[]): Template {
  const template = shippedTemplate(slug);
  const made = supports.map(([at, kv]) =>
    kv === undefined
      ? { at: expression(at), kind: 'pin' as const }
      : { at: expression(at), kind: 'free' as const, kv: expression(kv) },
  );
  return { ...template, beam: { ...template.beam, supports: made } };
}

const IPE = { designation: 'IPE 270', table: 'european-i', material: 's355' };
const CRITERIA = shippedCriteria('steel-elastic-en');
const STRICT: Criteria = {
  ...CRITERIA,
  deflection: CRITERIA.deflection.map((limit, index) => ({
    ...limit,
    overhang_factor: 2,
    ...(index === 0 && { cap: 0.004 }),
  })),
};

describe('supports that move, limits of every kind, and own weight on a slope', () => {
  const CASES: readonly (readonly [string, Omit<MemberGiven, 'criteria' | 'system'>])[] = [
    ['a sprung prop', { template: shippedTemplate('propped-cantilever-spring-uniform'), parameters: {} }],
    ['a sprung root', { template: shippedTemplate('cantilever-spring-root-uniform'), parameters: {} }],
    ['a settlement', { template: shippedTemplate('support-settlement'), parameters: { ends: 'fixed' } }],
    [
      'a rafter',
      {
        template: shippedTemplate('sloping-rafter-uniform'),
        parameters: { wp: { Q: '1 kN/m', S: '0.9 kN/m' } },
      },
    ],
    [
      'both supports sprung, with overhangs',
      {
        template: onSupports('overhang-double-uniform', [
          ['a', 'w*300'],
          ['a + L', 'w*100'],
        ]),
        parameters: { w: { G: '2 kN/m', Q: '3 kN/m' } },
      },
    ],
    [
      'only the left one',
      {
        template: onSupports('overhang-double-uniform', [['a', 'w*200'], ['a + L']]),
        parameters: { w: { Q: '3 kN/m' } },
      },
    ],
  ];
  test.each(CASES)('%s', { timeout: 30_000 }, (_, given) => {
    for (const criteria of [CRITERIA, STRICT]) {
      const page = pageOf({ ...given, section: sectionOf(IPE), criteria, system: 'metric' });
      expect(page.evaluation.checks?.rows.length).toBeGreaterThan(2);
      expect(wrongIn(page.subject, keysOf(page))).toEqual([]);
    }
  });
});

describe('every number of the demo’s members comes from its parts', () => {
  test.each(MEMBERS.map((member) => [member.mark, member] as const))(
    '%s',
    { timeout: 30_000 },
    (_, member) => {
      const page = demoPage(member);
      expect(wrongIn(page.subject, keysOf(page))).toEqual([]);
    },
  );
});
