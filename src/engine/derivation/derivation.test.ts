import { describe, expect, test } from 'vitest';
import { beamOf, line, stepsOf } from '../../../tests/support/derivation-steps';
import type { BeamDocument, Redundant } from '../model/index';
import { joinedNumbers } from './index';

/** The benchmark: L 6.0 m, a 1.8 m, w 5.517 kN/m, P 6.0 kN at the tip, EI 9963 kNm². */
const [L, a, w, P] = [6, 1.8, 5517, 6000];
const overhang = (...loads: NonNullable<BeamDocument['loads']>) =>
  beamOf({
    length: L + a,
    ei: 9.963e6,
    supports: [
      { at: 0, kind: 'fixed' },
      { at: L, kind: 'roller' },
    ],
    loads,
  });
const lengths = [
  { from: 0, to: L, tex: 'L' },
  { from: L, to: L + a, tex: 'a' },
];
const prop: Redundant = { support: 1, component: 'vertical' };
const wall: Redundant = { support: 0, component: 'rotation' };
const root: Redundant = { support: 0, component: 'vertical' };

describe('propped cantilever with overhang, uniform load on all, prop removed', () => {
  const steps = stepsOf({
    beam: overhang(line(0, L + a, w)),
    redundants: [prop],
    names: { lengths, loads: [{ tex: 'w' }] },
  });

  test('reads as the textbook does', () => {
    expect(steps['gap-B']).toMatchObject({
      title: 'Deflection at B of the cantilever, support B removed',
      symbols: '\\delta_{B0}=\\dfrac{wL^4}{8EI}+\\dfrac{waL^3}{3EI}+\\dfrac{wa^2L^2}{4EI}',
      unit: 'mm',
      figure: { structure: 'released' },
    });
    expect(steps['flexibility-B-B']).toMatchObject({
      title: 'Deflection at B for 1 kN upward at B',
      symbols: 'f_{BB}=\\dfrac{L^3}{3EI}',
      numbers: '\\dfrac{6^3}{3\\times9\\,963}=0.007227\\,\\mathrm{m/kN}',
      display: '7.227',
      unit: 'mm/kN',
      figure: { structure: 'unit', redundant: 0 },
    });
    expect(steps['compatibility']).toMatchObject({
      title: 'The support holds B where it was: the two must cancel',
      symbols: '\\delta_{B0}-R_{B}f_{BB}=0\\quad\\Rightarrow\\quad R_{B}=\\dfrac{\\delta_{B0}}{f_{BB}}',
      key: true,
      unit: 'kN',
    });
    expect(steps['closed-form']?.symbols).toBe('R_{B}=\\dfrac{3wL}{8}+wa+\\dfrac{3wa^2}{4L}');
    expect(steps['equilibrium-RA']).toMatchObject({
      title: 'Vertical equilibrium',
      symbols: 'R_{A}=w\\,(L+a)-R_{B}',
    });
    expect(steps['equilibrium-MA']).toMatchObject({
      title: 'Moments about A',
      symbols: 'M_{A}=\\dfrac{w\\,(L+a)^2}{2}-R_{B}L',
    });
    expect(steps['moment-B']?.symbols).toBe('M_{B}=-\\dfrac{wa^2}{2}');
    expect(steps['zero-shear']?.symbols).toBe('x_m=L+a-\\dfrac{R_{B}}{w}');
    expect(steps['check']).toMatchObject({
      title: 'Check: deflection at A from the other redundant',
      note: 'At A the support does not move, and neither does the beam.',
    });
    expect(Number(steps['check']?.display)).toBe(0);
  });

  test('says what is released, in which sense, and that what is left stands', () => {
    expect(steps['count']?.note).toContain(
      'Any one may be released: the reaction at A, the fixing moment at A or the reaction at B.',
    );
    expect(steps['released']).toMatchObject({
      title: 'Released: the reaction at B. What is left is a cantilever fixed at A',
      symbols: 'R_{B}\\ (\\uparrow)',
      note: expect.stringContaining('the choice is admissible'),
    });
  });

  test('names the chart case of every term', () => {
    expect(steps['gap-B']?.charts?.map(({ id }) => id)).toEqual([
      'cantilever-uniform',
      'cantilever-point',
      'cantilever-couple',
    ]);
    expect(steps['gap-B']?.charts?.[0]?.source).toBe(
      'Steel Construction Manual (AISC), 15th edition, table 3-23, case 19, from memory',
    );
  });

  test('goes from count to check in the order of the method', () => {
    const order = Object.keys(steps).filter((id) => !id.startsWith('deflection'));
    expect(order).toEqual([
      'given',
      'count',
      'released',
      'gap-B',
      'flexibility-B-B',
      'compatibility',
      'closed-form',
      'equilibrium-RA',
      'equilibrium-MA',
      'moment-B',
      'zero-shear',
      'largest-moment',
      'check',
    ]);
  });

  test('finds 3wL/8 + wa + 3wa²/4L in SI', () => {
    const want = (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L);
    expect(Math.abs(steps['compatibility']!.value! / want - 1)).toBeLessThan(1e-13);
    expect(Math.abs(steps['closed-form']!.value! / want - 1)).toBeLessThan(1e-13);
  });

  // wa(6a³ + 6a²L − L³)/48EI, of the design's template catalogue.
  test('ends with the deflection of the tip, from the span with its end moments', () => {
    const want = (w * a * (6 * a ** 3 + 6 * a ** 2 * L - L ** 3)) / (48 * 9.963e6);
    expect(steps['deflection-7.800']?.title).toBe(
      'Deflection at the right end: A–B as a simple span under its loads and the moment at its end: together',
    );
    expect(Math.abs(steps['deflection-7.800']!.value! / want - 1)).toBeLessThan(1e-12);
  });
});

describe('the force-method benchmark', () => {
  const beam = overhang(line(0, L + a, w), { kind: 'point', at: L + a, p: P });
  const names = { lengths, loads: [{ tex: 'w' }, { tex: 'P' }] };
  // Recomputed by hand in the design's template catalogue, with the two choices of redundant.
  const shared = {
    'equilibrium-RA': '15.75',
    'moment-B': '−19.74',
    'largest-moment': '7.536',
    // wa(6a³ + 6a²L − L³)/48EI + Pa²(3L + 4a)/12EI
    'deflection-7.800': '2.761',
  };

  test('with the prop as redundant, each load by itself', () => {
    const steps = stepsOf({ beam, redundants: [prop], names });
    const shown = {
      ...shared,
      'gap-B': '240.5',
      'flexibility-B-B': '7.227',
      compatibility: '33.28',
      'equilibrium-MA': '14.96',
    };
    for (const [id, display] of Object.entries(shown)) expect(steps[id]?.display, id).toBe(display);
    expect(steps['gap-B-P']).toMatchObject({
      title: 'Deflection at B under P',
      symbols: '\\delta_{B,P}=\\dfrac{PL^3}{3EI}+\\dfrac{PaL^2}{2EI}',
    });
    expect(steps['gap-B']?.symbols).toBe('\\delta_{B0}=\\delta_{B,w}+\\delta_{B,P}');
    expect(steps['gap-B']!.value! * 1e3).toBeCloseTo(240.49, 2);
    expect(steps['flexibility-B-B']!.value! * 1e6).toBeCloseTo(7.2267, 4);
  });

  test('with the fixing moment as redundant, the same', () => {
    const steps = stepsOf({ beam, redundants: [wall], names });
    const shown = { ...shared, compatibility: '14.96', 'equilibrium-RB': '33.28' };
    for (const [id, display] of Object.entries(shown)) expect(steps[id]?.display, id).toBe(display);
    expect(steps['released']?.title).toContain('a simple span from A to B, overhanging B');
    expect(steps['gap-A']?.title).toBe('Slope at A of the simple span, end A free to turn: together');
    expect(steps['closed-form']?.symbols).toBe('M_{A}=\\dfrac{wL^2}{8}-\\dfrac{wa^2}{4}-\\dfrac{Pa}{2}');
  });

  test('with the wall’s reaction as redundant, the same: a span that is guided at A', () => {
    const steps = stepsOf({ beam, redundants: [root], names });
    const { 'equilibrium-RA': _, ...others } = shared;
    const shown = { ...others, compatibility: '15.75', 'equilibrium-MA': '14.96' };
    for (const [id, display] of Object.entries(shown)) expect(steps[id]?.display, id).toBe(display);
    expect(steps['gap-A-w']?.symbols).toBe('\\delta_{A,w}=\\dfrac{5wL^4}{24EI}-\\dfrac{wa^2L^2}{4EI}');
    expect(steps['flexibility-A-A']?.charts?.[0]?.source).toContain('case 1f');
  });
});

describe('letters', () => {
  test('are numbered, and explained first, where a beam brings none', () => {
    const steps = stepsOf({ beam: overhang(line(0, L + a, w), { kind: 'point', at: 2, p: P }) });
    expect(Object.keys(steps)[0]).toBe('given');
    expect(steps['given']?.symbols).toBe(
      'EI=9\\,963\\,\\mathrm{kNm^2},\\quad L_1=6\\,\\mathrm{m},\\quad L_2=1.8\\,\\mathrm{m},\\quad w_1=5.517\\,\\mathrm{kN/m},\\quad a_1=2\\,\\mathrm{m},\\quad P_1=6\\,\\mathrm{kN}',
    );
    expect(steps['given']?.note).toBe(
      'Worked in kN and m. Here a is measured from the support at its left, or from the left end.',
    );
    expect(steps['gap-A-P1']?.title).toBe('Slope at A under P_{1}');
  });

  test('a load that is split between groups is one load of the derivation', () => {
    for (const [own, loads] of [
      ['w', [line(0, L + a, w / 4), line(0, L + a, (3 * w) / 4)]],
      [
        'P',
        [
          { kind: 'point' as const, at: L, p: 1000 },
          { kind: 'point' as const, at: L, p: 2000 },
        ],
      ],
      [
        'M_0',
        [
          { kind: 'couple' as const, at: L, m: 1000 },
          { kind: 'couple' as const, at: L, m: 2000 },
        ],
      ],
      [
        '\\kappa',
        [
          { kind: 'curvature' as const, from: 0, to: L, kappa: 1e-3 },
          { kind: 'curvature' as const, from: 0, to: L, kappa: 2e-3 },
        ],
      ],
    ] as const) {
      const named = loads.map(() => ({ tex: own }));
      const steps = stepsOf({
        beam: overhang(...loads),
        redundants: [prop],
        names: { lengths, loads: named },
      });
      expect(steps['closed-form']?.symbols).toContain(own);
      expect(steps['given']?.symbols).not.toContain('_1');
    }
  });

  test('a letter that stands for two sizes keeps the first, and the other gets a number', () => {
    const beam = overhang(line(0, L, w), line(L, L + a, 2 * w));
    const steps = stepsOf({
      beam,
      redundants: [prop],
      names: { lengths, loads: [{ tex: 'w' }, { tex: 'w' }] },
    });
    expect(steps['given']?.symbols).toContain('w_1=11.034\\,\\mathrm{kN/m}');
  });

  test('the own weight is called that', () => {
    const steps = stepsOf({
      beam: overhang(line(0, L + a, w), line(0, L + a, 400)),
      redundants: [prop],
      names: { lengths, loads: [{ tex: 'w' }, { tex: 'w_{\\text{self}}' }] },
    });
    expect(steps['gap-B-wtextself']?.title).toBe('Deflection at B under the own weight');
  });

  test('a given number is written as it was given, a result to the figures it needs', () => {
    const steps = stepsOf({
      beam: overhang(line(0, L + a, 5517.25)),
      redundants: [prop],
      names: { lengths, loads: [{ tex: 'w' }] },
    });
    expect(steps['equilibrium-RA']?.numbers).toMatch(/^5\.51725\\times\(6\+1\.8\)-[\d.]+$/);
  });

  test('no load at all has nothing to find, and says so', () => {
    const steps = stepsOf({ beam: overhang() });
    expect(steps['gap-A']).toMatchObject({ symbols: '\\theta_{A0}=0', numbers: '', value: 0 });
    expect(steps['compatibility']?.value).toBe(0);
    expect(steps['compatibility']?.note).toBeUndefined();
  });
});

test('numbers follow the symbols after an equals sign, but equations stand by themselves', () => {
  expect(joinedNumbers({ numbers: '' })).toBe('');
  expect(joinedNumbers({ numbers: '3' })).toBe('=3');
  const equations = '\\begin{aligned}x&=1\\end{aligned}';
  expect(joinedNumbers({ numbers: equations })).toBe(equations);
});
