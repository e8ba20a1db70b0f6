import { describe, expect, test } from 'vitest';
import { authored, shippedTemplate } from '../../../tests/support/templates';
import { askedOf, subjectOf, wrongIn } from '../../../tests/support/traced';
import { WARM_TEMPLATE } from '../../../tests/support/warm-template';
import { admissibleSets } from '../model/index';
import {
  type Acting,
  formatValue,
  type Key,
  numbersTex,
  recompute,
  symbolsTex,
  type Trace,
  Traces,
} from './index';

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
      'four redundants',
      [
        built(
          {
            supports: [
              { at: '0', kind: 'fixed' },
              ...['L/4', 'L/2', 'L'].map((at) => ({ at, kind: 'roller' })),
              { at: 'L*3/4', kind: 'free', kv: 'kv' },
            ],
            loads: [varying],
            hinges: [],
            redundants: [turn, over('L/4'), over('L/2'), over('L*3/4')],
          },
          [W0, W1, KV],
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

/** The benchmark: L 6.0 m, a 1.8 m, w 5.517 kN/m, EI 9963 kNm². */
const benchmark = subjectOf(
  shippedTemplate('propped-cantilever-overhang-uniform'),
  { w: { G: '3.517 kN/m', S: '2 kN/m' } },
  { ei: 9.963e6 },
  { typedEi: '9963 kNm2' },
);
const why = (key: Key, subject = benchmark): Trace => new Traces(subject).why(key);
const reaction = (support: number, component: 'vertical' | 'moment' = 'vertical'): Key => ({
  ...{ kind: 'reaction', support, component, acting: ALL },
});
const part = (trace: Trace, name: string): Trace => {
  const found = trace.parts.find((one) => one.name === name)?.trace;
  if (!found) throw new Error(`${trace.label} has no ${name}: ${trace.parts.map((one) => one.name)}`);
  return found;
};

describe('a propped cantilever with an overhang', () => {
  const [L, a, w] = [6, 1.8, 5517];

  test('the prop comes from compatibility: the published 3wL/8 + wa + 3wa²/4L', () => {
    const prop = why(reaction(1));
    expect(prop).toMatchObject({ label: 'Reaction at B, a redundant', symbol: 'R_{B}', measure: 'reaction' });
    expect(prop.how).toMatchObject({ kind: 'formula', method: 'compatibility' });
    expect(prop.value).toBeCloseTo((3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L), 6);
    expect(symbolsTex(prop)).toBe('\\dfrac{\\delta_{B0}}{f_{BB}}');
  });

  test('the released deflection names its published cases, and says what is from memory', () => {
    const gap = part(why(reaction(1)), '\\delta_{B0}');
    expect(gap.how).toMatchObject({
      method: 'closed form',
      sources: [
        {
          text: 'Cantilever, uniform load w over a from the fixed end: Steel Construction Manual (AISC), 15th edition, table 3-23, case 19',
          fromMemory: true,
        },
        expect.anything(),
        expect.anything(),
      ],
    });
    expect(symbolsTex(part(why(reaction(1)), 'f_{BB}'))).toBe('\\dfrac{{L}^{3}}{3\\,EI}');
    expect(numbersTex(part(why(reaction(1)), 'f_{BB}'), 'metric')).toBe(
      '\\dfrac{\\left(6\\,\\mathrm{m}\\right)^{3}}{3\\times 9\\,963\\,\\mathrm{kNm^2}}',
    );
  });

  test('the load is the sum of its groups, each as it was typed; lengths are at their defaults', () => {
    const load = part(part(why(reaction(1)), '\\delta_{B0}'), 'w');
    expect(load.value).toBe(w);
    expect(load.parts.map(({ trace }) => trace.how)).toEqual([
      { kind: 'input', parameter: 'w', group: 'G', row: null, typed: '3.517 kN/m', isDefault: false },
      { kind: 'input', parameter: 'w', group: 'S', row: null, typed: '2 kN/m', isDefault: false },
    ]);
    expect(why({ kind: 'parameter', symbol: 'L' }).how).toEqual({
      ...{ kind: 'input', parameter: 'L', group: null, row: null, typed: '6 m', isDefault: true },
    });
    expect(why({ kind: 'parameter', symbol: 'w' })).toMatchObject({ value: w, symbol: 'w' });
    expect(why({ kind: 'section', property: 'ei' }).how).toMatchObject({
      parameter: 'EI',
      typed: '9963 kNm2',
    });
  });

  test('the fixing moment comes from equilibrium about its support', () => {
    const fixing = why(reaction(0, 'moment'));
    expect(fixing.value).toBeCloseTo((w * L * L) / 8 - (w * a * a) / 4, 6);
    expect(fixing.how).toMatchObject({ method: 'equilibrium', note: 'Moments about the point at A.' });
    expect(symbolsTex(fixing)).toBe('\\dfrac{w\\,\\left(L+a\\right)^{2}}{2}-R_{B}\\,L');
  });

  test('the place of the largest sagging moment is where the shear is zero', () => {
    const x = (5 * L) / 8 - (3 * a * a) / (4 * L);
    const place = why({ kind: 'place', quantity: 'moment', sense: 'max', x, acting: ALL });
    expect(place.value).toBe(x);
    expect(symbolsTex(place)).toBe('\\dfrac{V}{w}');
    const moment = why({ kind: 'extreme', quantity: 'moment', sense: 'max', x, acting: ALL });
    expect(moment.label).toBe('Largest sagging moment, at 3.345\u00a0m');
    expect(part(part(moment, 'M'), 'x').how).toEqual(part(moment, 'x').how);
  });

  test('a wrong part is noticed', () => {
    const prop = why(reaction(1));
    const parts = prop.parts.map(({ name, trace }, k) => ({
      name,
      trace: k === 0 ? { ...trace, value: trace.value * 1.001 } : trace,
    }));
    expect(recompute({ ...prop, parts })).toBeCloseTo(prop.value * 1.001, 6);
  });

  test('nothing is worked before it is read', () => {
    let read = 0;
    const values = new Proxy(benchmark.values, {
      get: (target, key) => {
        read++;
        return Reflect.get(target, key);
      },
    });
    const prop = why(reaction(1), { ...benchmark, values });
    expect(read).toBe(0);
    expect(part(part(prop, '\\delta_{B0}'), 'w').parts).toHaveLength(2);
    expect(read).toBeGreaterThan(0);
  });

  test('what does not exist is refused', () => {
    expect(() => why({ kind: 'load', index: 9 })).toThrow(RangeError);
    expect(() => why({ kind: 'closed form', id: 'none' })).toThrow(RangeError);
    expect(() => why({ kind: 'parameter', symbol: 'zz' })).toThrow(RangeError);
    expect(() => why({ kind: 'section', property: 'weight' })).toThrow(RangeError);
  });
});

describe('what a template writes', () => {
  test('a condition is decided, and says what was chosen', () => {
    const patterns = subjectOf(shippedTemplate('three-equal-spans-patterns'), {
      loaded: 'ends',
      g: '2 kN/m',
    });
    const q1 = why({ kind: 'parameter', symbol: 'q1' }, patterns);
    expect(symbolsTex(q1)).toBe('g+w');
    expect(q1.how).toMatchObject({ method: 'expression' });
    expect(Object(q1.how).note).toMatch(/^In the template: g \+ \(loaded == .*\? w : 0\)\. .+: .+\.$/);
    expect(symbolsTex(why({ kind: 'parameter', symbol: 'q2' }, patterns))).toBe('g+0');
    expect(q1.value).toBe(14000);
  });

  test('a list is written out, row by row, and its length counted', () => {
    const derived = [
      { symbol: 'S', tex: 'S', name: 'All forces', expression: 'sum(loads, P*x/L) + 0*count(loads)*kN' },
    ];
    const kN = quantity('kN', 'force', '1 kN');
    const template = authored({
      ...WARM_TEMPLATE,
      parameters: [...WARM_TEMPLATE.parameters, kN],
      derived: [...WARM_TEMPLATE.derived, ...derived],
    });
    const sum = why({ kind: 'parameter', symbol: 'S' }, subjectOf(template, { loads }));
    expect(sum.value).toBeCloseTo((3000 * 1.5 + 2000 * 4) / 6, 9);
    expect(recompute(sum)).toBeCloseTo(sum.value, 9);
    expect(sum.parts.map(({ name }) => name)).toEqual(
      expect.arrayContaining(['{P}_{1}', '{x}_{1}', '{P}_{2}', '{x}_{2}', 'L', 'kN']),
    );
    const cell = part(sum, '{P}_{2}');
    expect(cell.label).toBe('Force, row 2');
    expect(cell.how).toEqual({
      ...{ kind: 'input', parameter: 'loads', group: null, row: 1, typed: '2 kN', isDefault: false },
    });
  });

  test('rows of the default are given as the template gives them', () => {
    const subject = subjectOf(shippedTemplate('simple-span-points-uniform'));
    const trace = why({ kind: 'load', index: 1 }, subject);
    expect(trace.how).toMatchObject({
      parameter: 'loads',
      row: 0,
      isDefault: true,
      typed: expect.anything(),
    });
  });

  test('a published closed form brings its source', () => {
    const form = benchmark.template.results[0]!;
    const trace = why({ kind: 'closed form', id: form.id });
    expect(trace).toMatchObject({ label: form.name, symbol: form.tex, how: { method: 'closed form' } });
    expect(Object(trace.how).sources).toHaveLength(1);
    expect(recompute(trace)).toBeCloseTo(trace.value, 6);
  });
});

describe('places, supports and stiffness', () => {
  test('a place on the page is where a chain ends', () => {
    const moment = why({ kind: 'value', quantity: 'moment', x: 1.1, side: 'left', acting: ALL });
    expect(part(moment, 'x').how).toEqual({ kind: 'station' });
    expect(symbolsTex(moment)).toContain('R_{B}\\,\\left(L-x\\right)');
  });

  test('a support that holds nothing says so', () => {
    expect(why(reaction(1, 'moment'))).toMatchObject({ value: 0, measure: 'moment' });
    const simple = subjectOf(shippedTemplate('cantilever-uniform'));
    expect(why({ ...reaction(0), acting: { kind: 'group', group: 'W' } } as Key, simple)).toMatchObject({
      value: 0,
      measure: 'reaction',
    });
  });

  test('EI is the template’s own where nobody gave one, and GA as it was given', () => {
    const subject = subjectOf(authored(WARM_TEMPLATE), { n: 2 }, { ga: 4e6 });
    const slope = why({ kind: 'value', quantity: 'slope', x: 1, side: 'left', acting: ALL }, subject);
    expect(symbolsTex(slope)).toBe('\\psi+\\dfrac{V}{GA}');
    expect(part(slope, 'GA').how).toMatchObject({ parameter: 'GA', typed: null });
    expect(why({ kind: 'section', property: 'ei' }, subject).how).toMatchObject({
      typed: '10000 kNm²',
      isDefault: true,
    });
  });
});

describe('what a drawing and a derivation ask', () => {
  const two = subjectOf(shippedTemplate('three-equal-spans-patterns'));
  const step = (id: string, subject = benchmark) => why({ kind: 'step', id }, subject);

  test('a step of the derivation is the number that it finds', () => {
    expect(step('compatibility')).toMatchObject({ symbol: 'R_{B}' });
    expect(step('closed-form').value).toBe(step('compatibility').value);
    expect(step('gap-B')).toMatchObject({ symbol: '\\delta_{B0}' });
    expect(step('gap-B-w')).toMatchObject({ symbol: '\\delta_{B0}' });
    expect(step('flexibility-B-B')).toMatchObject({ symbol: 'f_{BB}' });
    expect(step('equilibrium-RA')).toMatchObject({ label: 'Reaction at A' });
    expect(step('redundant-C', two)).toMatchObject({ symbol: 'M_{C}' });
    expect(step('reciprocal-C-B', two)).toMatchObject({ symbol: 'f_{CB}' });
    expect(() => step('check', two)).toThrow(RangeError);
  });

  test('a peak that a drawing found is brought to where the derivative is zero', () => {
    const x = (5 * 6) / 8 - (3 * 1.8 * 1.8) / (4 * 6);
    const local = (at: number): Key => ({
      ...{ kind: 'extreme', quantity: 'moment', sense: 'local', x: at, acting: ALL },
    });
    const peak = why(local(x + 1e-7));
    expect(peak.label).toBe('Peak of the moment, at 3.345\u00a0m');
    expect(part(peak, 'x').value).toBeCloseTo(x, 12);
    expect(part(why(local(2)), 'x').how).toEqual({ kind: 'station' });
    const atSupport = why({ ...local(6), quantity: 'shear' } as Key);
    const [L, a, w] = [6, 1.8, 5517];
    expect(atSupport.value).toBeCloseTo((5 * w * L) / 8 - (3 * w * a * a) / (4 * L) - w * L, 6);
  });

  test('of a group alone, it says so', () => {
    const acting = { kind: 'group', group: 'S' } as const;
    expect(why({ ...reaction(1), acting } as Key).label).toBe('Reaction at B, a redundant, S, snow alone');
  });
});

describe('loads that act at once', () => {
  const source = { text: 'EN 1990, 6.10', fromMemory: true };
  const acting = (factors: Readonly<Record<string, number>>, pattern: readonly number[] = []) =>
    ({ kind: 'combination', combination: { name: 'ULS', factors }, pattern, source }) as const;
  const at = (x: number, of: Acting): Key => ({
    kind: 'value',
    quantity: 'moment',
    x,
    side: 'left',
    acting: of,
  });

  test('a combination is each group times its factor, the factor with its clause', () => {
    const moment = why(at(6, acting({ G: 1.35, S: 1.5 })));
    expect(moment.label).toBe('Moment at B, ULS');
    expect(moment.value).toBeCloseTo((-(1.35 * 3517 + 1.5 * 2000) * 1.8 ** 2) / 2, 6);
    expect(symbolsTex(moment)).toBe(
      '\\gamma_{\\mathrm{G}}\\,{M}_{\\mathrm{G}}+\\gamma_{\\mathrm{S}}\\,{M}_{\\mathrm{S}}',
    );
    const factor = part(moment, '\\gamma_{\\mathrm{G}}');
    expect(factor).toMatchObject({ label: 'Factor of G, permanent, in ULS', value: 1.35, how: { source } });
  });

  test('of a patterned group, only the spans that count', () => {
    const subject = { ...benchmark, patterned: ['S'] };
    const moment = why(at(3, acting({ G: 1, S: 1 }, [1])), subject);
    expect(moment.parts.map(({ name }) => name)).toContain('{M}_{\\mathrm{S,B}}');
    expect(moment.value).toBeCloseTo(
      why(at(3, { kind: 'group', group: 'G' })).value +
        why(at(3, { kind: 'group', group: 'S' })).value -
        why(at(3, acting({ S: 1 }, [0])), subject).value,
      6,
    );
  });

  test('with other groups than the known ones, and with none at all', () => {
    const template = shippedTemplate('cantilever-uniform');
    const subject = subjectOf(template, { w: { Ice: '2 kN/m' } });
    const icy = why(at(0, acting({ Ice: 1.5 })), subject);
    expect(part(icy, '\\gamma_{\\mathrm{Ice}}').label).toBe('Factor of Ice, in ULS');
    const nothing = acting({ G: 1.5 });
    expect(why(at(0, nothing), subject)).toMatchObject({ value: 0, parts: [] });
    const place: Key = { kind: 'place', quantity: 'deflection', sense: 'max', x: 1, acting: nothing };
    expect(why(place, subject).value).toBe(1);
    expect(why({ ...reaction(0), acting: nothing } as Key, subject).value).toBe(0);
  });

  test('the supports’ own movements act once, unfactored', () => {
    const subject = subjectOf(shippedTemplate('support-settlement'));
    const moment = why(at(0, acting({ G: 1.35 })), subject);
    expect(part(moment, '\\gamma_{\\Delta}')).toMatchObject({ value: 1, how: { kind: 'constant' } });
    expect(moment.value).toBeCloseTo(why(at(0, { kind: 'group', group: null }), subject).value, 6);
  });

  test('nothing is judged without criteria', () => {
    expect(() => why({ kind: 'check', row: Object(null), figure: 'ratio' })).toThrow(RangeError);
  });
});

describe('how values are written', () => {
  const shown = (value: number, measure: Trace['measure'], system: 'metric' | 'us') =>
    formatValue({ value, measure }, system).replace('\u00a0', ' ');

  test.each([
    [12_345, 'reaction', 'metric', '12.3 kN'],
    [7.2267e-6, 'deflection_per_force', 'metric', '7.227 mm/kN'],
    [0.0254 / 4448.2216152605, 'deflection_per_force', 'us', '1.000 in/kip'],
    [2.5e-7, 'rotation_per_moment', 'metric', '0.2500 mrad/kNm'],
    [9.80665, 'acceleration', 'metric', '9.807 m/s²'],
    [0.98765, 'ratio', 'us', '0.9877'],
  ] as const)('%d as a %s, %s: %s', (value, measure, system, text) => {
    expect(shown(value, measure, system)).toBe(text);
  });
});
