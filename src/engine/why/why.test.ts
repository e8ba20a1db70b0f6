import { describe, expect, test } from 'vitest';
import { authored, shippedTemplate } from '../../../tests/support/templates';
import { askedOf, subjectOf, wrongIn } from '../../../tests/support/traced';
import { WARM_TEMPLATE } from '../../../tests/support/warm-template';
import { admissibleSets } from '../model/index';
import { type Key, numbersTex, recompute, symbolsTex, type Trace, Traces } from './index';

const ALL = { kind: 'all' } as const;
type Given = Readonly<Record<string, unknown>>;

/** The warm template with other supports, hinges, segments and loads. */
const built = (beam: Given, parameters: readonly unknown[] = []) =>
  authored({
    ...WARM_TEMPLATE,
    parameters: [...WARM_TEMPLATE.parameters, ...parameters],
    beam: { ...WARM_TEMPLATE.beam, ...beam },
    rules: [],
    results: [],
    proof_cases: WARM_TEMPLATE.proof_cases.map((one) => ({
      ...one,
      expect: [{ quantity: { reaction: 'A' }, printed: '0 kN' }],
    })),
  });

const quantity = (symbol: string, dimension: string, value: string, group?: string) => {
  const unit = value.replace(/^\S+ /, '');
  const texts = { default: value, min: `-1000 ${unit}`, max: `100000 ${unit}`, step: `1 ${unit}` };
  return {
    ...{ kind: 'quantity', symbol, tex: symbol, name: `Parameter ${symbol}`, help: 'For a test.', dimension },
    ...texts,
    ...(group && { group }),
  };
};
const W0 = quantity('w', 'line_load', '4 kN/m', 'G');
const W1 = quantity('v', 'line_load', '10 kN/m', 'G');
const KV = quantity('kv', 'spring', '3000 kN/m');
const KR = quantity('kr', 'rotational_spring', '5000 kNm/rad');
const SINK = quantity('D', 'length', '0.01 m');

const loads = [
  { x: '1.5 m', P: '3 kN' },
  { x: '4 m', P: '2 kN' },
];

describe('of beams with all that a beam can have, every number comes from its parts', () => {
  const varying = { kind: 'line', from: '0', to: 'L', w0: 'w', w1: 'v' };
  const part = { kind: 'line', from: 'L/4', to: 'L', w0: 'w', w1: 'w' };
  const sprung = [
    { at: '0', kind: 'pin', kr: 'kr' },
    { at: 'L/2', kind: 'roller' },
    { at: 'L', kind: 'free', kv: 'kv', rise: '-D' },
  ];
  const settled = [
    { at: '0', kind: 'fixed', rise: 'D', rotation: 'D/L' },
    { at: 'L/3', kind: 'roller', rise: '0 - D' },
    { at: 'L', kind: 'roller' },
  ];
  const turn = { support: 'A', component: 'rotation' };
  const over = (at: string) => ({ at, component: 'moment' });
  const CASES: readonly (readonly [string, Parameters<typeof subjectOf>])[] = [
    ['free curvature over a step in EI', [authored(WARM_TEMPLATE), { n: 2, loads, C: '5 kNm' }]],
    ['shear deformation besides', [authored(WARM_TEMPLATE), { n: 2, loads }, { ga: 4e6 }]],
    ['a hinge', [authored(WARM_TEMPLATE), { joint: 'hinged', loads, n: 3 }]],
    ['a hinge and shear', [authored(WARM_TEMPLATE), { joint: 'hinged', loads }, { ga: 4e6 }]],
    [
      'a load that varies over supports, on springs',
      [
        built(
          {
            supports: sprung,
            loads: [varying],
            segments: undefined,
            hinges: [],
            redundants: [turn, over('L/2')],
          },
          [W0, W1, KV, KR, SINK],
        ),
      ],
    ],
    [
      'loads of two groups, on supports that move',
      [
        built({ supports: settled, loads: [varying, part], hinges: [], redundants: [turn, over('L/3')] }, [
          W0,
          W1,
          SINK,
        ]),
        { w: { G: '4 kN/m', S: '2 kN/m' }, v: { G: '1 kN/m' } },
      ],
    ],
    [
      'springs beside a step, and shear',
      [
        built({ supports: sprung, loads: [varying], hinges: [], redundants: [turn, over('L/2')] }, [
          W0,
          W1,
          KV,
          KR,
          SINK,
        ]),
        {},
        { ga: 5e6 },
      ],
    ],
    [
      'a hinge between springs',
      [
        built(
          {
            supports: sprung,
            loads: [varying, part],
            hinges: [{ at: 'L/4' }],
            segments: undefined,
            redundants: [over('L/2')],
          },
          [W0, W1, KV, KR, SINK],
        ),
      ],
    ],
    [
      'a cantilever whose load crosses nothing',
      [
        built(
          {
            supports: [{ at: '0', kind: 'fixed' }],
            loads: [varying],
            hinges: [],
            redundants: [],
            segments: undefined,
          },
          [W0, W1],
        ),
        { w: '-4 kN/m' },
      ],
    ],
  ];

  test.each(CASES)('%s', { timeout: 30_000 }, (_, [template, typed, options]) => {
    const own = subjectOf(template, typed, options);
    const sets = [...admissibleSets(own.beam)].slice(0, 4);
    const others = sets.map((redundants) => subjectOf(template, typed, { ...options, redundants }));
    for (const subject of [own, ...others]) expect(wrongIn(subject, askedOf(subject))).toEqual([]);
  });
});
