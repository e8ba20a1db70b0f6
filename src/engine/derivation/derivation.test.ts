import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { type Beam, type BeamDocument, type Redundant, readBeam } from '../model/index';
import { type DerivationStep, derive } from './index';

function read(document: BeamDocument): Beam {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

/** Steps by id; every TeX string of them parses in KaTeX's strict mode. */
function stepsOf(input: Parameters<typeof derive>[0]): Record<string, DerivationStep> {
  const steps = derive(input);
  for (const { symbols, numbers } of steps) {
    for (const tex of [symbols, numbers]) katex.renderToString(tex, { throwOnError: true, strict: 'error' });
  }
  return Object.fromEntries(steps.map((step) => [step.id, step]));
}

const line = (from: number, to: number, w0: number, w1 = w0) => ({ kind: 'line' as const, from, to, w0, w1 });

/** The benchmark: L 6.0 m, a 1.8 m, w 5.517 kN/m, P 6.0 kN at the tip, EI 9963 kNm². */
const [L, a, w, P] = [6, 1.8, 5517, 6000];
const overhang = (...loads: NonNullable<BeamDocument['loads']>) =>
  read({
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

describe('propped cantilever with overhang, uniform load on all, prop removed', () => {
  const steps = stepsOf({
    beam: overhang(line(0, L + a, w)),
    redundants: [prop],
    names: { lengths, loads: [{ tex: 'w' }] },
  });

  test('reads as the textbook does', () => {
    expect(steps['gap-B']).toMatchObject({
      title: 'Deflection at B of the cantilever, prop removed',
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
      title: 'The prop holds B where it was: the two must cancel',
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
    expect(steps['check']).toMatchObject({
      title: 'Check: slope at A from the other redundant',
      display: '0.000',
    });
  });

  test('names the chart case of every term', () => {
    expect(steps['gap-B']?.charts?.map(({ id }) => id)).toEqual([
      'cantilever-uniform',
      'cantilever-point',
      'cantilever-couple',
    ]);
    expect(steps['gap-B']?.charts?.[0]?.source).toContain('from memory');
  });

  test('goes from count to check in the order of the method', () => {
    expect(Object.keys(steps)).toEqual([
      'given',
      'count',
      'gap-B',
      'flexibility-B-B',
      'compatibility',
      'closed-form',
      'equilibrium-RA',
      'equilibrium-MA',
      'moment-B',
      'largest-moment',
      'check',
    ]);
  });

  test('finds 3wL/8 + wa + 3wa²/4L in SI', () => {
    const want = (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L);
    expect(Math.abs(steps['compatibility']!.value! / want - 1)).toBeLessThan(1e-13);
    expect(Math.abs(steps['closed-form']!.value! / want - 1)).toBeLessThan(1e-13);
  });
});

describe('the force-method benchmark', () => {
  const beam = overhang(line(0, L + a, w), { kind: 'point', at: L + a, p: P });
  const names = { lengths, loads: [{ tex: 'w' }, { tex: 'P' }] };
  // Recomputed by hand in the design's template catalogue, with the two choices of redundant.
  const shared = { 'equilibrium-RA': '15.75', 'moment-B': '−19.74', 'largest-moment': '7.536' };

  test('with the prop as redundant', () => {
    const steps = stepsOf({ beam, redundants: [prop], names });
    const shown = {
      ...shared,
      'gap-B': '240.5',
      'flexibility-B-B': '7.227',
      compatibility: '33.28',
      'equilibrium-MA': '14.96',
    };
    for (const [id, display] of Object.entries(shown)) expect(steps[id]?.display, id).toBe(display);
    expect(steps['gap-B']!.value! * 1e3).toBeCloseTo(240.49, 2);
    expect(steps['flexibility-B-B']!.value! * 1e6).toBeCloseTo(7.2267, 4);
  });

  test('with the fixing moment as redundant, the same', () => {
    const steps = stepsOf({ beam, redundants: [wall], names });
    const shown = { ...shared, compatibility: '14.96', 'equilibrium-RB': '33.28' };
    for (const [id, display] of Object.entries(shown)) expect(steps[id]?.display, id).toBe(display);
    expect(steps['gap-A']?.title).toBe('Slope at A of the simple span, end A free to turn');
    expect(steps['closed-form']?.symbols).toBe('M_{A}=\\dfrac{wL^2}{8}-\\dfrac{wa^2}{4}-\\dfrac{Pa}{2}');
    expect(steps['check']?.title).toBe('Check: deflection at B from the other redundant');
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
      'Here a is measured from the support at its left, or from the left end.',
    );
  });

  test('a load that is split between groups is one load of the derivation', () => {
    const beam = overhang(line(0, L + a, w / 4), line(0, L + a, (3 * w) / 4));
    const steps = stepsOf({
      beam,
      redundants: [prop],
      names: { lengths, loads: [{ tex: 'w' }, { tex: 'w' }] },
    });
    expect(steps['closed-form']?.symbols).toBe('R_{B}=\\dfrac{3wL}{8}+wa+\\dfrac{3wa^2}{4L}');
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
});

describe('other beams', () => {
  test('two spans: the moment over the middle support is −wL²/8, and the note says that it hogs', () => {
    const beam = read({
      length: 10,
      ei: 2e7,
      supports: [0, 5, 10].map((at) => ({ at, kind: 'roller' as const })),
      loads: [line(0, 10, 8000)],
    });
    const names = {
      lengths: [0, 5].map((from) => ({ from, to: from + 5, tex: 'L' })),
      loads: [{ tex: 'w' }],
    };
    const steps = stepsOf({ beam, names });
    expect(steps['closed-form']?.symbols).toBe('M_{B}=-\\dfrac{wL^2}{8}');
    expect(steps['compatibility']).toMatchObject({
      display: '−25.00',
      note: 'Negative: the beam hogs there.',
    });
  });

  test('a settling prop: the two must differ by the settlement', () => {
    const beam = read({
      length: 5,
      ei: 2e7,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 5, kind: 'roller', rise: -0.01 },
      ],
    });
    const steps = stepsOf({
      beam,
      redundants: [prop],
      names: { lengths: [{ from: 0, to: 5, tex: 'L' }], loads: [] },
    });
    expect(steps['compatibility']?.symbols).toContain('=\\Delta_{B}\\quad\\Rightarrow');
    expect(steps['closed-form']?.symbols).toBe('R_{B}=-\\dfrac{3\\Delta_{B}EI}{L^3}');
    expect(steps['compatibility']?.note).toMatch(/acts downward/);
  });

  test('a sprung prop: its flexibility has 1/k beside L³/3EI', () => {
    const beam = read({
      length: 5,
      ei: 2e7,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 5, kind: 'free', kv: 1e6 },
      ],
      loads: [line(0, 5, 8000)],
    });
    const steps = stepsOf({
      beam,
      redundants: [prop],
      names: { lengths: [{ from: 0, to: 5, tex: 'L' }], loads: [{ tex: 'w' }] },
    });
    expect(steps['flexibility-B-B']?.symbols).toBe('f_{BB}=\\dfrac{L^3}{3EI}+\\dfrac{1}{k_{B}}');
  });

  test('two redundants: reciprocal coefficients are shown equal, and the stiffness method checks', () => {
    const beam = read({
      length: 5,
      ei: 2e7,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 5, kind: 'fixed' },
      ],
      loads: [line(0, 5, 8000)],
    });
    const steps = stepsOf({ beam });
    expect(steps['reciprocal-B-A']).toMatchObject({
      symbols: 'f_{BA}=f_{AB}',
      value: steps['flexibility-A-B']?.value,
    });
    expect(steps['redundant-A']).toMatchObject({ display: '16.67', key: true });
    expect(steps['check']?.title).toBe('Check: the stiffness method gives the same moment at A');
  });

  test('five redundants: the equations stand in matrix form', () => {
    const beam = read({
      length: 24,
      ei: 2e7,
      supports: Array.from({ length: 7 }, (_, k) => ({ at: 4 * k, kind: 'roller' as const })),
      loads: [line(0, 24, 8000)],
    });
    const steps = stepsOf({ beam });
    expect(steps['count']?.value).toBe(5);
    expect(steps['compatibility']?.symbols).toContain('\\begin{bmatrix}f_{BB}&f_{BC}&0&0&0');
    expect(Object.values(steps).filter(({ key }) => key)).toHaveLength(5);
  });

  test('a step in EI, for which there is no chart: integrals, piece by piece', () => {
    const beam = read({
      length: 6,
      segments: [
        { from: 0, to: 2, ei: 2e7 },
        { from: 2, to: 6, ei: 1e7 },
      ],
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 6, kind: 'roller' },
      ],
      loads: [line(0, 6, 8000)],
    });
    const steps = stepsOf({ beam, redundants: [prop] });
    expect(steps['gap-B']?.symbols).toBe('\\delta_{B0}=-\\int\\dfrac{m_{B}\\,M_{0}}{EI}\\,dx');
    expect(steps['gap-B']?.numbers).toMatch(/^[\d.]+\+[\d.]+=[\d.]+\\,\\mathrm\{m\}$/);
    expect(steps['gap-B']?.charts).toBeUndefined();
  });

  test('a determinate beam: equilibrium, moments, then deflection by the chart', () => {
    const beam = read({
      length: 4,
      ei: 2e7,
      supports: [0, 4].map((at) => ({ at, kind: 'roller' as const })),
      loads: [line(0, 4, 8000)],
    });
    const steps = stepsOf({
      beam,
      names: { lengths: [{ from: 0, to: 4, tex: 'L' }], loads: [{ tex: 'w' }] },
    });
    expect(Object.keys(steps)).toEqual([
      'given',
      'count',
      'equilibrium-RA',
      'equilibrium-RB',
      'largest-moment',
      'deflection-2.000',
    ]);
    expect(steps['deflection-2.000']?.symbols).toBe('\\delta=\\dfrac{5wL^4}{384EI}');
    expect(steps['count']).toMatchObject({
      title: 'As many reactions as equations: equilibrium gives them all',
      display: '0',
    });
  });

  test('a suspended span: parts between hinges, then the largest deflection by a unit load', () => {
    const beam = read({
      length: 12,
      ei: 2e7,
      hinges: [7],
      supports: [0, 5, 12].map((at) => ({ at, kind: 'roller' as const })),
      loads: [line(0, 12, 8000)],
    });
    const steps = stepsOf({ beam });
    expect(steps['equilibrium-Vh']?.title).toBe(
      'Moments about C of the part from the hinge to C: the shear right of the hinge',
    );
    expect(steps['deflection']?.symbols).toBe('\\delta=\\int\\dfrac{m_{1}\\,M}{EI}\\,dx');
  });

  test('no load at all has nothing to find, and says so with zeros', () => {
    const steps = stepsOf({ beam: overhang() });
    expect(steps['compatibility']?.value).toBe(0);
    expect(steps['compatibility']?.note).toBeUndefined();
  });
});

describe('letters of a simple span', () => {
  const span = (...loads: NonNullable<BeamDocument['loads']>) =>
    read({ length: 6, ei: 1e7, supports: [0, 6].map((at) => ({ at, kind: 'roller' as const })), loads });
  const whole = { from: 0, to: 6, tex: 'L' };

  test('a load that rises from nothing carries its letter where it is largest: wL/6, wL/3', () => {
    for (const [load, reaction] of [
      [line(0, 6, 0, 12e3), '\\dfrac{wL}{6}'],
      [line(0, 6, 12e3, 0), '\\dfrac{wL}{3}'],
    ] as const) {
      const steps = stepsOf({ beam: span(load), names: { lengths: [whole], loads: [{ tex: 'w' }] } });
      expect(steps['equilibrium-RA']?.symbols).toBe(`R_{A}=${reaction}`);
      expect(steps['given']?.symbols).not.toContain('w');
    }
  });

  test('the whole span comes before its parts: Pb/L with b written L − a', () => {
    const steps = stepsOf({
      beam: span({ kind: 'point', at: 4, p: 20e3 }),
      names: {
        lengths: [{ from: 0, to: 4, tex: 'a' }, { from: 4, to: 6, tex: 'b' }, whole],
        loads: [{ tex: 'P' }],
      },
    });
    expect(steps['equilibrium-RA']?.symbols).toBe('R_{A}=\\dfrac{P\\,(L-a)}{L}');
  });

  test('a load at midspan stands at L/2: PL/4, PL³/48EI', () => {
    const steps = stepsOf({
      beam: span({ kind: 'point', at: 3, p: 20e3 }),
      names: { lengths: [whole], loads: [{ tex: 'P' }] },
    });
    expect(steps['equilibrium-RA']?.symbols).toBe('R_{A}=\\dfrac{P}{2}');
    expect(steps['largest-moment']?.symbols).toBe('M(\\tfrac{L}{2})=\\dfrac{R_{A}L}{2}');
    expect(steps['deflection-3.000']?.symbols).toContain('=\\dfrac{PL^3}{48EI}');
    expect(steps['given']?.symbols).not.toContain('a_1');
  });

  test('the moment is given on both sides of a couple: M₀a/L, then −M₀b/L', () => {
    const steps = stepsOf({
      beam: span({ kind: 'couple', at: 2, m: 15e3 }),
      names: { lengths: [whole, { from: 0, to: 2, tex: 'a' }], loads: [{ tex: 'M_0' }] },
    });
    expect(steps['moment-couple-2.000-left']).toMatchObject({
      title: expect.stringContaining('Moment just left of the couple'),
      symbols: 'M_{a,\\mathrm{left}}=R_{A}a',
      display: '5.000',
    });
    expect(steps['moment-couple-2.000-right']?.display).toBe('−10.00');
  });

  test('a couple at a pinned end is the moment there: −M₀ at A', () => {
    const steps = stepsOf({
      beam: span({ kind: 'couple', at: 0, m: 15e3 }),
      names: { lengths: [whole], loads: [{ tex: 'M_0' }] },
    });
    expect(steps['moment-couple-0.000']).toMatchObject({
      title: 'Moment at A: the couple put on there',
      symbols: 'M_{A}=-M_0',
      display: '−15.00',
    });
  });
});
