import { describe, expect, test } from 'vitest';
import { beamOf, line, rollers, stepsOf } from '../../../tests/support/derivation-steps';
import type { BeamDocument, Redundant } from '../model/index';
import { derive } from './index';

const [L, w, EI] = [5, 8000, 2e7];
const lengths = [{ from: 0, to: L, tex: 'L' }];
const propped = (prop: BeamDocument['supports'][number], rest: Partial<BeamDocument> = {}) =>
  beamOf({ length: L, ei: EI, supports: [{ at: 0, kind: 'fixed' }, prop], ...rest });
const roller = { at: L, kind: 'roller' as const };
const prop: Redundant = { support: 1, component: 'vertical' };
const wall: Redundant = { support: 0, component: 'rotation' };
const root: Redundant = { support: 0, component: 'vertical' };
const named = (...loads: string[]) => ({ lengths, loads: loads.map((tex) => ({ tex })) });

describe('a settling prop', () => {
  const beam = propped({ ...roller, rise: -0.01 });

  // R = 3EIΔ/L³, M = 3EIΔ/L²: Roark’s Formulas, table 8.1; from memory.
  test('the gap is that of the settlement', () => {
    const steps = stepsOf({ beam, redundants: [prop], names: named() });
    expect(steps['compatibility']).toMatchObject({
      title: 'The support moves at B: the two must differ by that',
      note: 'Negative: the reaction at B acts downward, the other way than assumed.',
    });
    expect(steps['compatibility']?.symbols).toContain('=\\Delta_{B}\\quad\\Rightarrow');
    expect(steps['closed-form']?.symbols).toBe('R_{B}=-\\dfrac{3\\Delta_{B}EI}{L^3}');
  });

  test('of the other redundant the settlement moves the released beam', () => {
    const steps = stepsOf({ beam, redundants: [wall], names: named() });
    expect(steps['gap-A']?.symbols).toBe('\\theta_{A0}=\\dfrac{\\Delta_{B}}{L}');
    expect(steps['closed-form']?.symbols).toBe('M_{A}=\\dfrac{3\\Delta_{B}EI}{L^2}');
    expect(steps['closed-form']?.value).toBeCloseTo((3 * EI * 0.01) / L ** 2, 6);
    expect(steps['check']?.note).toBe('At A the support does not move, and neither does the beam.');
  });

  test('with a load each has a line of its own', () => {
    const loaded = propped({ ...roller, rise: -0.01 }, { loads: [line(0, L, w)] });
    const steps = stepsOf({ beam: loaded, redundants: [root], names: named('w') });
    expect(steps['gap-A-w']?.title).toBe('Deflection at A under w');
    expect(steps['gap-A-movements']).toMatchObject({
      title: 'Deflection at A as supports move',
      symbols: '\\delta_{A,\\Delta}=\\Delta_{B}',
    });
    const found = stepsOf({ beam: loaded, redundants: [wall], names: named('w') });
    expect(found['equilibrium-RB']?.value).toBeCloseTo((3 * w * L) / 8 - (3 * EI * 0.01) / L ** 3, 5);
  });

  test('and a wall that turns', () => {
    const beamTurned = beamOf({
      length: L,
      ei: EI,
      supports: [{ at: 0, kind: 'fixed', rotation: -0.002 }, roller],
    });
    const steps = stepsOf({ beam: beamTurned, redundants: [wall], names: named() });
    expect(steps['compatibility']?.title).toBe('End A turns with its support: the two must differ by that');
    // M = 3EIφ/L
    expect(Math.abs(steps['compatibility']!.value!)).toBeCloseTo((3 * EI * 0.002) / L, 6);
    const other = stepsOf({ beam: beamTurned, redundants: [prop], names: named() });
    expect(other['gap-B']?.symbols).toBe('\\delta_{B0}=-\\varphi_{A}L');
    expect(other['check']?.note).toMatch(/^At A the/);
  });
});

describe('springs', () => {
  const k = 1e6;
  const beam = propped({ at: L, kind: 'free', kv: k }, { loads: [line(0, L, w)] });
  // R = (3wL/8)/(1 + 3EI/kL³), of the design's list of analyses.
  const want = (3 * w * L) / 8 / (1 + (3 * EI) / (k * L ** 3));

  test('a sprung prop: its own compliance is a line of the flexibility', () => {
    const steps = stepsOf({ beam, redundants: [prop], names: named('w') });
    expect(steps['flexibility-B-B-bending']?.symbols).toBe('f_{BB,\\mathrm{b}}=\\dfrac{L^3}{3EI}');
    expect(steps['flexibility-B-B-springs']?.symbols).toBe('f_{BB,\\mathrm{k}}=\\dfrac{1}{k_{B}}');
    expect(steps['compatibility']?.title).toBe('The spring at B gives by its force over its stiffness');
    expect(Math.abs(steps['compatibility']!.value! / want - 1)).toBeLessThan(1e-12);
    expect(steps['given']?.note).toContain('k is the stiffness of a spring');
  });

  test('of the other redundants the spring gives in the released beam', () => {
    for (const redundants of [[wall], [root]]) {
      const steps = stepsOf({ beam, redundants, names: named('w') });
      expect(steps['gap-A-springs']?.title).toMatch(/ at A by springs$/);
      expect(Math.abs(steps['equilibrium-RB']!.value! / want - 1)).toBeLessThan(1e-12);
      expect(steps['deflection-0.000']).toBeUndefined();
    }
  });

  test('a sprung wall: by its turning spring', () => {
    const sprung = beamOf({
      length: L,
      ei: EI,
      supports: [{ at: 0, kind: 'pin', kr: 4e6 }, roller],
      loads: [line(0, L, w)],
    });
    // M (L/3EI + 1/k) = wL³/24EI
    const moment = (w * L ** 3) / (24 * EI) / (L / (3 * EI) + 1 / 4e6);
    const steps = stepsOf({ beam: sprung, redundants: [wall], names: named('w') });
    expect(steps['flexibility-A-A-springs']?.symbols).toBe('f_{AA,\\mathrm{k}}=\\dfrac{1}{k_{\\theta A}}');
    expect(Math.abs(steps['compatibility']!.value! / moment - 1)).toBeLessThan(1e-12);
    const other = stepsOf({ beam: sprung, redundants: [prop], names: named('w') });
    expect(other['gap-B-springs']?.symbols).toBe('\\delta_{B,\\mathrm{k}}=\\dfrac{wL^3}{2k_{\\theta A}}');
    expect(Math.abs(other['equilibrium-MA']!.value! / moment - 1)).toBeLessThan(1e-12);
  });

  test('under a support in the middle the spring carries what both spans bring: by integrals', () => {
    const beamSprung = beamOf({
      length: 10,
      ei: EI,
      supports: [
        { at: 0, kind: 'roller' },
        { at: 5, kind: 'free', kv: k, rise: -0.002 },
        { at: 10, kind: 'roller' },
      ],
      loads: [line(0, 10, w), { kind: 'curvature', from: 0, to: 5, kappa: 1e-3 }],
    });
    const moment: Redundant = { at: 5, component: 'moment' };
    const steps = stepsOf({ beam: beamSprung, redundants: [moment] });
    const causes = Object.keys(steps).filter((id) => id.startsWith('gap-B-'));
    expect(causes).toEqual(['gap-B-bending', 'gap-B-curvature', 'gap-B-springs', 'gap-B-movements']);
    expect(steps['gap-B-springs']?.symbols).toBe('\\theta_{B,\\mathrm{k}}=\\sum\\dfrac{r_{B}\\,R_{0}}{k}');
    expect(steps['flexibility-B-B-springs']?.symbols).toBe('f_{BB,\\mathrm{k}}=\\sum\\dfrac{r_{B}^2}{k}');
    const reaction = stepsOf({ beam: beamSprung, redundants: [prop] });
    expect(Math.abs(steps['equilibrium-RB']!.value! / reaction['compatibility']!.value! - 1)).toBeLessThan(
      1e-9,
    );
  });
});

describe('shear', () => {
  const ga = 4e7;
  const beam = propped(roller, { ga, loads: [line(0, L, w)] });
  // δ_B0 = wL⁴/8EI + wL²/2GA, f_BB = L³/3EI + L/GA
  const want = ((w * L ** 4) / (8 * EI) + (w * L ** 2) / (2 * ga)) / (L ** 3 / (3 * EI) + L / ga);

  test('is a line of its own, whatever is released', () => {
    const steps = stepsOf({ beam, redundants: [prop], names: named('w') });
    expect(steps['gap-B-shear']?.symbols).toBe('\\delta_{B,\\mathrm{s}}=\\dfrac{wL^2}{2GA}');
    expect(steps['flexibility-B-B-shear']?.symbols).toBe('f_{BB,\\mathrm{s}}=\\dfrac{L}{GA}');
    expect(steps['gap-B-shear']?.charts?.[0]?.source).toContain('own derivation');
    expect(Math.abs(steps['compatibility']!.value! / want - 1)).toBeLessThan(1e-12);
    for (const redundants of [[wall], [root]]) {
      const other = stepsOf({ beam, redundants, names: named('w') });
      expect(Math.abs(other['equilibrium-RB']!.value! / want - 1)).toBeLessThan(1e-12);
    }
  });

  test('by integrals where the charts do not hold the beam', () => {
    const stepped = beamOf({
      length: L,
      segments: [
        { from: 0, to: 2, ei: EI, ga },
        { from: 2, to: L, ei: EI, ga: 2 * ga },
      ],
      supports: [{ at: 0, kind: 'fixed' }, roller],
      loads: [line(0, L, w)],
    });
    const steps = stepsOf({ beam: stepped, redundants: [prop], names: named('w') });
    expect(steps['gap-B-shear']?.symbols).toBe(
      '\\delta_{B,\\mathrm{s}}=-\\int\\dfrac{v_{B}\\,V_{0}}{GA}\\,dx',
    );
    expect(steps['given']?.symbols).toContain('GA_1');
    expect(steps['closed-form']).toBeUndefined();
  });
});

describe('free curvature', () => {
  // A cantilever's tip rises by κL²/2 and f_BB = L³/3EI, so that R_B = −3EIκ/2L.
  test('lifts the tip: the prop must hold it down', () => {
    const beam = propped(roller, { loads: [{ kind: 'curvature', from: 0, to: L, kappa: 2e-3 }] });
    const steps = stepsOf({ beam, redundants: [prop], names: named() });
    expect(steps['given']?.note).toContain('κ is a free curvature, sagging');
    expect(steps['gap-B']?.symbols).toBe('\\delta_{B0}=-\\dfrac{\\kappa_1L^2}{2}');
    expect(steps['closed-form']?.symbols).toBe('R_{B}=-\\dfrac{3\\kappa_1EI}{2L}');
  });
});

describe('a load that the charts do not hold', () => {
  test('is integrated by itself, beside those that they hold', () => {
    const loads = [line(0, L, w), line(1, 3, 2000, 5000)];
    const beam = propped(roller, { loads });
    const steps = stepsOf({ beam, redundants: [wall], names: named('w', 'q') });
    expect(steps['gap-A-w']?.charts).toHaveLength(1);
    expect(steps['gap-A-q']).toMatchObject({
      title: 'Slope at A under q',
      symbols: '\\theta_{A,q}=-\\int\\dfrac{m_{A}\\,M_{q}}{EI}\\,dx',
    });
    expect(steps['closed-form']).toBeUndefined();
    expect(steps['check']?.title).toContain('the stiffness method');
  });
});

describe('units', () => {
  const beam = propped({ at: L, kind: 'free', kv: 1e6 }, { loads: [line(0, L, w)] });

  test('in kip, ft and in the same values', () => {
    const metric = derive({ beam, redundants: [prop], names: named('w') });
    const us = derive({ beam, redundants: [prop], names: named('w'), system: 'us' });
    expect(us.map(({ id, value }) => [id, value])).toEqual(metric.map(({ id, value }) => [id, value]));
    expect(us.map(({ symbols }) => symbols).slice(1)).toEqual(metric.map(({ symbols }) => symbols).slice(1));
    expect([...new Set(us.map(({ unit }) => unit))].sort()).toEqual([
      '',
      'ft',
      'in',
      'in/kip',
      'kip',
      'kip-ft',
    ]);
  });

  // 5wL⁴/384EI at 1 kip/ft, 20 ft, 29 000 ksi and 300 in⁴: 5 × 1 × 20⁴ × 1728 / (384 × 8.7e6) = 0.4138 in.
  test('a deflection in inches from feet and kips', () => {
    const [foot, kip, inch] = [0.3048, 0.45359237 * 9.80665 * 1000, 0.0254];
    const span = beamOf({
      length: 20 * foot,
      ei: 29000 * 300 * kip * inch ** 2,
      supports: rollers(0, 20 * foot),
      loads: [line(0, 20 * foot, kip / foot)],
    });
    const steps = stepsOf({
      beam: span,
      names: { lengths: [{ from: 0, to: 20 * foot, tex: 'L' }], loads: [{ tex: 'w' }] },
      system: 'us',
    });
    expect(steps['given']).toMatchObject({
      symbols: 'EI=8\\,700\\,000\\,\\mathrm{kip\\text{-}in^2}=60\\,416.7\\,\\mathrm{kip\\text{-}ft^2}',
      note: 'Worked in kip and ft.',
    });
    const deflection = Object.values(steps).find(({ id }) => id.startsWith('deflection'));
    expect([deflection?.display, deflection?.unit]).toEqual(['0.4138', 'in']);
    expect(steps['largest-moment']).toMatchObject({ display: '50.00', unit: 'kip-ft' });
  });

  test('a pair of a force and a moment, in inches and in mrad', () => {
    const fixed = beamOf({
      length: L,
      ei: EI,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'fixed' },
      ],
      loads: [line(0, L, w)],
    });
    const steps = stepsOf({ beam: fixed, redundants: [root, wall], names: named('w'), system: 'us' });
    expect(steps['matrix']?.note).toContain('differs by its units alone');
    const pair = [steps['flexibility-A-turn-A'], steps['reciprocal-turn-A-A']];
    expect(pair.map((step) => step?.unit)).toEqual(['in/kip-ft', 'mrad/kip']);
    expect(pair[0]?.value).toBe(pair[1]?.value);
    expect(steps['redundant-turn-A']?.value).toBeCloseTo((w * L * L) / 12, 6);
  });
});
