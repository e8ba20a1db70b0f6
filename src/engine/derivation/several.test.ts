import { describe, expect, test } from 'vitest';
import { beamOf, line, rollers, stepsOf } from '../../../tests/support/derivation-steps';
import { readMatrix } from '../../../tests/support/tex-arithmetic';
import type { BeamDocument, Redundant } from '../model/index';

const [L, w, EI] = [5, 8000, 2e7];
const spansOf = (count: number, rest: Partial<BeamDocument> = {}) =>
  beamOf({
    length: count * L,
    ei: EI,
    supports: rollers(...Array.from({ length: count + 1 }, (_, k) => k * L)),
    loads: [line(0, count * L, w)],
    ...rest,
  });
const namesOf = (count: number, letter = 'w') => ({
  lengths: Array.from({ length: count }, (_, k) => ({ from: k * L, to: (k + 1) * L, tex: 'L' })),
  loads: [{ tex: letter }],
});
const moment = (at: number): Redundant => ({ at, component: 'moment' });

describe('three-moment equations', () => {
  test('two spans: M_B = −wL²/8, and the note says that it hogs', () => {
    const steps = stepsOf({ beam: spansOf(2), names: namesOf(2) });
    expect(steps['released']).toMatchObject({
      title: 'Released: the moment over B. What is left is two simple spans, A–B and B–C',
      symbols: 'M_{B}\\ (\\text{sagging})',
    });
    expect(steps['load-term-KBA']).toMatchObject({
      symbols: 'K_{BA}=K_{BC}=\\dfrac{wL^3}{4}',
      unit: 'kNm2',
    });
    expect(steps['compatibility']).toMatchObject({
      title: 'Three-moment equation: the slopes on either side of B are the same',
      symbols: '4M_{B}L=-K_{BA}-K_{BC}\\quad\\Rightarrow\\quad M_{B}=-\\dfrac{K_{BA}+K_{BC}}{4L}',
      display: '−25.00',
      note: 'Negative: the beam hogs over B, the other way than assumed.',
    });
    expect(steps['closed-form']?.symbols).toBe('M_{B}=-\\dfrac{wL^2}{8}');
  });

  // A middle support that settles by Δ: M_B = 3EIΔ/L²; by the three-moment equation of the textbooks, from memory.
  test('a settlement stands on the right: M_B = 3EIΔ/L²', () => {
    const supports = rollers(0, L, 2 * L).map((s, k) => (k === 1 ? { ...s, rise: -0.01 } : s));
    const steps = stepsOf({ beam: spansOf(2, { supports, loads: [] }), names: namesOf(2) });
    expect(steps['compatibility']?.symbols).toMatch(/^4M_\{B\}L=\\dfrac\{6\\Delta_\{B\}EI\}\{L\}\+/);
    expect(steps['closed-form']?.symbols).toBe('M_{B}=\\dfrac{3\\Delta_{B}EI}{L^2}');
  });

  // −wL²/8 + wa²/4 of the design's template catalogue, for overhangs at both ends.
  test('overhangs are known moments', () => {
    const a = 1.5;
    const beam = beamOf({
      length: 2 * L + 2 * a,
      ei: EI,
      supports: rollers(a, a + L, a + 2 * L),
      loads: [line(0, 2 * L + 2 * a, w)],
    });
    const steps = stepsOf({ beam });
    expect(steps['moment-A']).toBeDefined();
    expect(steps['moment-C']).toBeDefined();
    expect(steps['compatibility']?.symbols).toContain('M_{A}');
    expect(steps['compatibility']!.value).toBeCloseTo((-w * L * L) / 8 + (w * a * a) / 4, 6);
  });

  test('free curvature of one span is a load term', () => {
    const beam = spansOf(2, { loads: [{ kind: 'curvature', from: 0, to: L, kappa: 1e-3 }] });
    const steps = stepsOf({ beam, names: namesOf(2, '\\kappa') });
    expect(steps['load-term-KBA']?.symbols).toBe('K_{BA}=3\\kappa LEI');
    expect(steps['closed-form']?.symbols).toBe('M_{B}=-\\dfrac{3\\kappa EI}{4}');
  });

  // −0.1000 wL²: Steel Construction Manual, table 3-22c, three spans; from memory.
  test('three spans: two equations, by determinants', () => {
    const steps = stepsOf({ beam: spansOf(3), names: namesOf(3) });
    expect(steps['matrix']).toMatchObject({
      symbols:
        '6EI\\,\\mathbf{F}=\\begin{bmatrix}c_{BB}&c_{BC}\\\\c_{CB}&c_{CC}\\end{bmatrix}=\\begin{bmatrix}4L&L\\\\L&4L\\end{bmatrix}',
      numbers: '\\begin{bmatrix}20&5\\\\5&20\\end{bmatrix}',
      note: 'In m. By reciprocity it is symmetric.',
    });
    expect(steps['compatibility']?.symbols).toContain('4M_{B}L+M_{C}L&=-K_{BA}-K_{BC}=d_{B}');
    expect(steps['redundant-B']?.symbols).toBe(
      'M_{B}=\\dfrac{d_{B}c_{CC}-d_{C}c_{BC}}{c_{BB}c_{CC}-c_{BC}c_{CB}}',
    );
    for (const id of ['redundant-B', 'redundant-C'])
      expect(steps[id]!.value! / (w * L * L)).toBeCloseTo(-0.1, 10);
    expect(steps['check']?.title).toContain('the stiffness method, which shares nothing with this working');
  });

  // −0.1071, −0.0714, −0.1071 wL²: the same table, four spans; from memory.
  test('four spans: three equations, by elimination', () => {
    const steps = stepsOf({ beam: spansOf(4), names: namesOf(4) });
    expect(steps['elimination-1']).toMatchObject({
      title: 'The moment over B taken out of the equations below the first',
      symbols: expect.stringContaining("c'_{CC}&=c_{CC}-\\dfrac{c_{CB}c_{BC}}{c_{BB}}"),
    });
    expect(steps['redundant-C']?.symbols).toBe("M_{C}=\\dfrac{d'_{C}-M_{D}c_{CD}}{c'_{CC}}");
    const found = ['redundant-B', 'redundant-C', 'redundant-D'].map((id) => steps[id]!.value! / (w * L * L));
    for (const [k, want] of [-0.1071, -0.0714, -0.1071].entries()) expect(found[k]).toBeCloseTo(want, 4);
  });

  test('in the order of the supports, whatever the order of the choice', () => {
    const redundants = [moment(3 * L), moment(L), moment(2 * L)];
    const steps = stepsOf({ beam: spansOf(4), redundants, names: namesOf(4) });
    expect(steps['redundant-C']!.value! / (w * L * L)).toBeCloseTo(-0.0714, 4);
  });

  test('a span without load has no load term; an equation without any is 0', () => {
    const beam = spansOf(4, { loads: [line(0, L, w)] });
    const steps = stepsOf({ beam, names: namesOf(4) });
    expect(steps['compatibility']?.numbers).toContain('&=0');
    expect(Object.keys(steps).filter((id) => id.startsWith('load-term'))).toEqual(['load-term-KBA']);
  });

  test('do not hold for a couple over a support, shear or two stiffnesses: the general form', () => {
    const couple = spansOf(2, { loads: [{ kind: 'couple', at: L, m: 5e3 }] });
    const shearing = spansOf(2, { ga: 1e8 });
    const two = spansOf(2, {
      ei: undefined,
      segments: [
        { from: 0, to: L, ei: EI },
        { from: L, to: 2 * L, ei: 2 * EI },
      ],
    });
    const varying = spansOf(2, { loads: [line(1, 3, 1000, 4000)] });
    for (const beam of [couple, shearing, two, varying]) {
      const steps = stepsOf({ beam, redundants: [moment(L)] });
      expect(steps['gap-B']?.title).toContain('of the two simple spans, a hinge over B');
      expect(steps['compatibility']?.title).toBe('The beam is continuous over B: the two must cancel');
    }
  });
});

describe('two redundants', () => {
  const fixed = (rest: Partial<BeamDocument> = {}) =>
    beamOf({
      length: L,
      ei: EI,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'fixed' },
      ],
      loads: [line(0, L, w)],
      ...rest,
    });
  const set: Redundant[] = [
    { support: 0, component: 'rotation' },
    { support: 1, component: 'rotation' },
  ];

  test('reciprocal coefficients are each found by their own form, and equal', () => {
    const steps = stepsOf({ beam: fixed(), redundants: set, names: namesOf(1) });
    expect(steps['reciprocal-B-A']).toMatchObject({
      title: 'Slope at B for 1 kNm anticlockwise at A: the same, by reciprocity',
      symbols: 'f_{BA}=f_{AB}=\\dfrac{L}{6EI}',
      value: steps['flexibility-A-B']?.value,
    });
    expect(steps['matrix']?.symbols).toBe(
      '\\mathbf{F}=\\begin{bmatrix}f_{AA}&f_{AB}\\\\f_{BA}&f_{BB}\\end{bmatrix}',
    );
    expect(steps['redundant-A']).toMatchObject({ display: '16.67', key: true });
    expect(steps['check']?.title).toContain('the same moment at A');
  });

  test('the reaction and the moment of one support: δ and θ, f_{Aθ} and f_{θA}', () => {
    const both: Redundant[] = [
      { support: 0, component: 'vertical' },
      { support: 0, component: 'rotation' },
    ];
    const steps = stepsOf({ beam: fixed(), redundants: both, names: namesOf(1) });
    expect(steps['gap-turn-A']?.symbols).toBe('\\theta_{A0}=-\\dfrac{wL^3}{6EI}');
    expect(steps['reciprocal-turn-A-A']?.symbols).toBe('f_{\\theta A}=f_{A\\theta}=-\\dfrac{L^2}{2EI}');
    expect(steps['redundant-A']?.value).toBeCloseTo((w * L) / 2, 6);
  });

  // M = 6EIΔ/L²: Roark’s Formulas, table 8.1; from memory.
  test('a settling end: the movements must be those of the supports', () => {
    const beam = fixed({
      loads: [],
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'fixed', rise: -0.01 },
      ],
    });
    const steps = stepsOf({
      beam,
      redundants: [
        { support: 1, component: 'vertical' },
        { support: 1, component: 'rotation' },
      ],
      names: namesOf(1),
    });
    expect(steps['compatibility']).toMatchObject({
      title: 'Two movements must be those of the supports at once',
      symbols: expect.stringContaining('=\\Delta_{B}'),
    });
    expect(steps['equilibrium-MA']?.value).toBeCloseTo((6 * EI * 0.01) / L ** 2, 6);
  });

  test('a support without its moment and its reaction: the released beam is cut within a span', () => {
    const beam = spansOf(3);
    const redundants: Redundant[] = [{ support: 1, component: 'vertical' }, moment(L)];
    const steps = stepsOf({ beam, redundants, names: namesOf(3) });
    expect(steps['released']?.title).toContain('What is left is a determinate beam');
    expect(steps['reciprocal-turn-B-B']).toMatchObject({
      symbols: 'f_{\\theta B}=f_{B\\theta}',
      numbers: '',
    });
    expect(steps['redundant-turn-B']!.value! / (w * L * L)).toBeCloseTo(-0.1, 9);
  });

  test('redundants that do not feel one another: an equation each', () => {
    const beam = beamOf({
      length: 4 * L,
      ei: EI,
      supports: [0, L, 3 * L, 4 * L].map((at) => ({
        at,
        kind: at === L ? ('fixed' as const) : ('roller' as const),
      })),
      loads: [line(0, 4 * L, w)],
    });
    const redundants: Redundant[] = [
      { support: 0, component: 'vertical' },
      { support: 1, component: 'rotation' },
      { support: 2, component: 'vertical' },
    ];
    const steps = stepsOf({ beam, redundants });
    expect(Object.values(steps).filter(({ key }) => key)).toHaveLength(3);
  });

  test('a moment within a span', () => {
    const steps = stepsOf({ beam: spansOf(2), redundants: [moment(7)], names: namesOf(2) });
    expect(steps['released']?.title).toContain('the moment at section 1');
    expect(steps['gap-1']?.title).toBe(
      'Gap in slope at section 1 of the released beam, a hinge at section 1',
    );
    expect(steps['compatibility']?.title).toBe('The beam is continuous at section 1: the two must cancel');
    expect(steps['equilibrium-V1']?.title).toContain('the shear right of 1');
  });
});

describe('beyond three redundants', () => {
  // −0.1053, −0.0789, −0.0789, −0.1053 wL²: Steel Construction Manual, five spans; from memory.
  test('five spans: the gaps, F and the moments as matrices', () => {
    const steps = stepsOf({ beam: spansOf(5), names: namesOf(5) });
    expect(Object.keys(steps).slice(0, 7)).toEqual([
      'given',
      'count',
      'released',
      'gaps',
      'matrix',
      'compatibility',
      'redundants',
    ]);
    expect(steps['gaps']?.symbols).toContain('\\Delta_{i0}=\\int\\dfrac{m_{i}\\,M_{0}}{EI}\\,dx');
    expect(steps['matrix']?.symbols).toContain('f_{BB}&f_{BC}&0&0');
    expect(steps['compatibility']?.symbols).toContain('\\mathbf{F}\\,\\mathbf{X}=\\mathbf{d}');
    expect(steps['redundants']).toMatchObject({
      title: 'Moment over B, moment over C, moment over D and moment over E',
      key: true,
      note: expect.stringMatching(/^In kNm\. Negative: the beam hogs over B/),
    });
    const found = readMatrix(steps['redundants']!.numbers).map(([x]) => (x!.value * 1000) / (w * L * L));
    for (const [k, want] of [-0.1053, -0.0789, -0.0789, -0.1053].entries())
      expect(found[k]).toBeCloseTo(want, 3);
  });

  test('springs, settlements, shear and curvature are named in the work', () => {
    const supports = rollers(0, 5, 10, 15, 20, 25).map((s, k) =>
      k === 2 ? { at: s.at, kind: 'free' as const, kv: 1e7, rise: -0.001 } : s,
    );
    const loads = [line(0, 25, w), { kind: 'curvature' as const, from: 0, to: 5, kappa: 1e-4 }];
    const steps = stepsOf({ beam: spansOf(5, { supports, loads, ga: 1e8 }) });
    const { symbols } = steps['gaps']!;
    for (const part of ['\\kappa', 'GA', '\\sum\\dfrac{r_{i}\\,R_{0}}{k}', '-\\sum r_{i}\\,\\Delta'])
      expect(symbols).toContain(part);
  });

  test('twelve spans: F is too large to print, the moments are not', () => {
    const steps = stepsOf({ beam: spansOf(12), names: namesOf(12) });
    expect(steps['matrix']).toMatchObject({ symbols: '\\mathbf{F}=\\left[f_{ij}\\right]', numbers: '' });
    expect(readMatrix(steps['redundants']!.numbers)).toHaveLength(11);
  });

  test('two walls with their reactions: θ_A and θ_B tell their moments apart', () => {
    const beam = beamOf({
      length: 3 * L,
      ei: EI,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'roller' },
        { at: 2 * L, kind: 'roller' },
        { at: 3 * L, kind: 'fixed' },
      ],
      loads: [line(0, 3 * L, w)],
    });
    const redundants: Redundant[] = [
      { support: 0, component: 'vertical' },
      { support: 0, component: 'rotation' },
      { support: 3, component: 'vertical' },
      { support: 3, component: 'rotation' },
    ];
    const steps = stepsOf({ beam, redundants });
    expect(steps['matrix']?.symbols).toContain('f_{\\theta_{A}A}');
    expect(steps['redundants']?.note).toMatch(/^In kN and kNm\./);
  });
});
