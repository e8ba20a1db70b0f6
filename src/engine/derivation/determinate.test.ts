import { describe, expect, test } from 'vitest';
import { beamOf, line, rollers, stepsOf } from '../../../tests/support/derivation-steps';
import type { BeamDocument } from '../model/index';

const whole = { from: 0, to: 6, tex: 'L' };
const span = (...loads: NonNullable<BeamDocument['loads']>) =>
  beamOf({ length: 6, ei: 1e7, supports: rollers(0, 6), loads });
const named = (...letters: string[]) => ({ lengths: [whole], loads: letters.map((tex) => ({ tex })) });

describe('a simple span', () => {
  test('goes through equilibrium, moment and deflection: wL²/8 and 5wL⁴/384EI', () => {
    const steps = stepsOf({ beam: span(line(0, 6, 8000)), names: named('w') });
    expect(Object.keys(steps)).toEqual([
      'given',
      'count',
      'equilibrium-RA',
      'equilibrium-RB',
      'largest-moment',
      'deflection-3.000',
    ]);
    expect(steps['count']).toMatchObject({
      title: 'As many reactions as equations: equilibrium gives them all',
      display: '0',
    });
    expect(steps['largest-moment']?.value).toBeCloseTo((8000 * 36) / 8, 6);
    expect(steps['deflection-3.000']).toMatchObject({
      title: 'Deflection at midspan',
      symbols: '\\delta_{AB}=\\dfrac{5wL^4}{384EI}',
    });
  });

  test('a load that rises from nothing carries its letter where it is largest: wL/6, wL/3', () => {
    for (const [load, reaction] of [
      [line(0, 6, 0, 12e3), '\\dfrac{wL}{6}'],
      [line(0, 6, 12e3, 0), '\\dfrac{wL}{3}'],
    ] as const) {
      const steps = stepsOf({ beam: span(load), names: named('w') });
      expect(steps['equilibrium-RA']?.symbols).toBe(`R_{A}=${reaction}`);
      expect(steps['given']?.symbols).not.toContain('w');
    }
  });

  // Steel Construction Manual, table 3-23, case 2: x = 0.5774L, Δ = 0.0130 WL³/EI at 0.5193L; from memory.
  test('the shear of a rising load is zero at L/√3, and its deflection largest at 0.5193L', () => {
    const steps = stepsOf({ beam: span(line(0, 6, 0, 12e3)), names: named('w') });
    expect(steps['zero-shear']?.symbols).toBe('x_m=\\sqrt{\\dfrac{2R_{A}L}{w}}');
    expect(steps['zero-shear']!.value! / 6).toBeCloseTo(0.5774, 4);
    const [id] = Object.keys(steps).filter((key) => key.startsWith('deflection'));
    expect(Number(id?.split('-')[1]) / 6).toBeCloseTo(0.5193, 3);
    const load = (12e3 * 6) / 2;
    expect((steps[id!]!.value! * 1e7) / (load * 6 ** 3)).toBeCloseTo(0.013, 4);
  });

  test('where a load falls from one size to another the zero of its shear is a quadratic’s', () => {
    const steps = stepsOf({ beam: span(line(0, 6, 9e3, 3e3)), names: named('w') });
    const { symbols, numbers, value } = steps['zero-shear']!;
    expect(symbols).toMatch(/=0\\quad\\Rightarrow\\quad x_m$/);
    expect(numbers).toContain('\\sqrt{');
    // V = wL/3 + w'L/6 − wx + (w − w')x²/2L with w 9, w' 3, L 6: 21 − 9x + x²/2 = 0
    expect(value).toBeCloseTo(9 - Math.sqrt(81 - 42), 9);
  });

  test('a load at midspan stands at L/2: PL/4, PL³/48EI', () => {
    const steps = stepsOf({ beam: span({ kind: 'point', at: 3, p: 20e3 }), names: named('P') });
    expect(steps['equilibrium-RA']?.symbols).toBe('R_{A}=\\dfrac{P}{2}');
    expect(steps['largest-moment']?.symbols).toBe('M(\\tfrac{L}{2})=\\dfrac{R_{A}L}{2}');
    expect(steps['deflection-3.000']?.symbols).toBe('\\delta_{AB}=\\dfrac{PL^3}{48EI}');
    expect(steps['given']?.symbols).not.toContain('a_1');
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

  // w(3L² − 4a²)/24 and w(5L² − 4a²)²/1920EI of the design's template catalogue.
  test('a trapezoid of a rise, a middle and a fall', () => {
    const [w, a, L] = [12e3, 2, 6];
    const steps = stepsOf({
      beam: span(line(0, a, 0, w), line(a, L - a, w), line(L - a, L, w, 0)),
      names: {
        lengths: [whole, { from: 0, to: a, tex: 'a' }],
        loads: [{ tex: 'w' }, { tex: 'w' }, { tex: 'w' }],
      },
    });
    expect(steps['largest-moment']?.value).toBeCloseTo((w * (3 * L * L - 4 * a * a)) / 24, 6);
    const want = (w * (5 * L * L - 4 * a * a) ** 2) / (1920 * 1e7);
    expect(Math.abs(steps['deflection-3.000']!.value! / want - 1)).toBeLessThan(1e-12);
    expect(steps['deflection-3.000']?.charts).toHaveLength(3);
  });

  test('the moment is given on both sides of a couple: M₀a/L, then −M₀b/L', () => {
    const steps = stepsOf({
      beam: span({ kind: 'couple', at: 2, m: 15e3 }),
      names: { lengths: [whole, { from: 0, to: 2, tex: 'a' }], loads: [{ tex: 'M_0' }] },
    });
    expect(steps['moment-couple-2.000-left']).toMatchObject({
      title: 'Moment just left of the couple, 2 m from the left end',
      symbols: 'M_{a,\\mathrm{left}}=R_{A}a',
      display: '5.000',
    });
    expect(steps['moment-couple-2.000-right']?.display).toBe('−10.00');
  });

  test('a couple at a pinned end is the moment there: −M₀ at A', () => {
    const steps = stepsOf({ beam: span({ kind: 'couple', at: 0, m: 15e3 }), names: named('M_0') });
    expect(steps['moment-couple-0.000']).toMatchObject({
      title: 'Moment at A: the couple put on there',
      symbols: 'M_{A}=-M_0',
      display: '−15.00',
    });
  });

  test('couples at one place are one moment there', () => {
    const couple = { kind: 'couple' as const, at: 6, m: 15e3 };
    const steps = stepsOf({ beam: span(couple, couple), names: named('M_1', 'M_2') });
    expect(steps['moment-couple-6.000']?.symbols).toBe('M_{B}=M_1+M_2');
  });
});

describe('overhangs and cantilevers', () => {
  test('a couple at a free end is the moment there', () => {
    const beam = beamOf({
      length: 4,
      ei: 1e7,
      supports: [{ at: 0, kind: 'fixed' }],
      loads: [{ kind: 'couple', at: 4, m: 5e3 }],
    });
    const steps = stepsOf({ beam });
    expect(steps['moment-couple-4.000']?.title).toBe('Moment at the right end: the couple put on there');
    expect(steps['deflection-4.000']?.value).toBeCloseTo((-5e3 * 16) / (2 * 1e7), 12);
  });

  // wa(3a³ + 4a²L − L³)/24EI of the design's template catalogue.
  test('both ends free: the deflection of each, and the largest between the supports', () => {
    const [w, a, L, ei] = [10e3, 1.5, 5, 2e7];
    const beam = beamOf({
      length: L + 2 * a,
      ei,
      supports: rollers(a, L + a),
      loads: [line(0, L + 2 * a, w)],
    });
    const steps = stepsOf({ beam });
    const ends = Object.entries(steps).filter(([, { title }]) => / at the (left|right) end$/.test(title));
    expect(ends.map(([id]) => id)).toEqual(['deflection-0.000', 'deflection-8.000']);
    expect(steps['deflection-4.000']?.title).toBe('Deflection at midspan');
    const middle = (w * L * L * (5 * L * L - 24 * a * a)) / (384 * ei);
    expect(Math.abs(steps['deflection-4.000']!.value! / middle - 1)).toBeLessThan(1e-12);
  });

  test('a settling support and the movement of what it carries', () => {
    const beam = beamOf({
      length: 6,
      ei: 2e7,
      supports: [
        { at: 0, kind: 'roller', rise: -0.01 },
        { at: 4, kind: 'roller' },
      ],
      loads: [],
    });
    const steps = stepsOf({ beam });
    expect(steps['given']?.note).toContain('Δ is a settlement, down');
    expect(steps['deflection-6.000']).toMatchObject({
      symbols: '\\delta_{\\mathrm{right}}=-\\dfrac{\\Delta_{A}L_2}{L_1}',
      value: -0.005,
    });
  });
});

describe('beams that the charts do not hold', () => {
  test('a suspended span: parts between hinges, then the largest deflection by a unit load', () => {
    const beam = beamOf({
      length: 12,
      ei: 2e7,
      hinges: [7],
      supports: rollers(0, 5, 12),
      loads: [line(0, 12, 8000)],
    });
    const steps = stepsOf({ beam });
    expect(steps['equilibrium-Vh']?.title).toBe(
      'Moments about C of the part from the hinge to C: the shear right of the hinge',
    );
    const deflection = Object.values(steps).find(({ id }) => id.startsWith('deflection'));
    expect(deflection?.title).toMatch(/by a unit load there$/);
    expect(deflection?.symbols).toBe('\\delta_{\\mathrm{max}}=\\int\\dfrac{m_{1}\\,M}{EI}\\,dx');
  });

  test('two hinges have a name each', () => {
    const beam = beamOf({
      length: 18,
      ei: 2e7,
      hinges: [7, 11],
      supports: rollers(0, 6, 12, 18),
      loads: [line(0, 18, 8000)],
    });
    const steps = stepsOf({ beam });
    expect(steps['count']?.symbols).toBe('n=r-2-h');
    expect(Object.keys(steps)).toEqual(expect.arrayContaining(['equilibrium-Vh1', 'equilibrium-Vh2']));
  });

  test('a step in EI: each stretch by its own EI', () => {
    const beam = beamOf({
      length: 4,
      segments: [
        { from: 0, to: 2, ei: 2e7 },
        { from: 2, to: 4, ei: 1e7 },
      ],
      supports: [{ at: 0, kind: 'fixed' }],
      loads: [{ kind: 'point', at: 4, p: 6e3 }],
    });
    const steps = stepsOf({ beam });
    expect(steps['given']?.symbols).toContain('EI_1=20\\,000\\,\\mathrm{kNm^2},\\quad EI_2=10\\,000');
    // P/EI₁ ∫₂⁴ s² ds + P/EI₂ ∫₀² s² ds
    const want = 6e3 * ((64 - 8) / 3 / 2e7 + 8 / 3 / 1e7);
    expect(Math.abs(steps['deflection-4.000']!.value! / want - 1)).toBeLessThan(1e-12);
    expect(steps['deflection-4.000']?.note).toBe('One integral for each stretch, x from its left end.');
  });

  test('a load that begins and ends within the span and varies: by integrals', () => {
    const steps = stepsOf({ beam: span(line(1, 4, 2e3, 9e3)), names: named('w') });
    const deflection = Object.values(steps).find(({ id }) => id.startsWith('deflection'));
    expect(deflection?.symbols).toContain('\\int');
    expect(deflection?.numbers).toContain('\\Bigl(');
  });
});
