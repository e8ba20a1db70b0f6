import { describe, expect, test } from 'vitest';
import { chartTerms, evaluate, formula, type NamedLoad, total } from '@/engine/chart/index';

/**
 * Roark’s Formulas for Stress and Strain, 8th edition, table 8.1, cases 1f, 2f and 3f: left end guided, right end simply
 * supported; y_A is the deflection of the guided end and θ_B the slope at the support. The printed general formulas at
 * the places named, as plain fractions; from memory. Down and clockwise are positive here.
 */
const PRINTED = [
  // y_A = −W(l − a)(2l² + 2al − a²)/6EI, θ_B = W(l² − a²)/2EI
  { load: { kind: 'point', at: '0', p: '1' }, deflection: '1/3', slope: '-1/2' },
  { load: { kind: 'point', at: 'L/2', p: '1' }, deflection: '11/48', slope: '-3/8' },
  // y_A = −w_a(l − a)²(5l² + 2al − a²)/24EI − (w_l − w_a)(l − a)²(9l² + 2al − a²)/120EI
  // θ_B = w_a(l − a)²(2l + a)/6EI + (w_l − w_a)(l − a)²(3l + a)/24EI
  { load: { kind: 'line', w0: '1', w1: '1' }, deflection: '5/24', slope: '-1/3' },
  { load: { kind: 'line', w0: '0', w1: '1' }, deflection: '3/40', slope: '-1/8' },
  { load: { kind: 'line', w0: '1', w1: '0' }, deflection: '2/15', slope: '-5/24' },
  // y_A = M₀a(2l − a)/2EI, θ_B = −M₀a/EI of a clockwise couple; this one is anticlockwise
  { load: { kind: 'couple', at: 'L', m: '1' }, deflection: '1/2', slope: '-1' },
] as const;

const VALUES: Record<string, number> = { L: 1, EI: 1 };
const setting = { value: (name: string) => VALUES[name] ?? Number.NaN, ei: formula('EI'), length: 1 };
const released = { kind: 'guided', guide: formula('0'), prop: formula('L') } as const;

function named(load: (typeof PRINTED)[number]['load']): NamedLoad {
  if (load.kind === 'point') return { kind: 'point', at: formula(load.at), p: formula(load.p) };
  if (load.kind === 'couple') return { kind: 'couple', at: formula(load.at), m: formula(load.m) };
  return {
    kind: 'line',
    from: formula('0'),
    to: formula('L'),
    w0: formula(load.w0),
    w1: formula(load.w1),
  };
}

describe('a span guided at its left end and supported at its right', () => {
  test.each(PRINTED)('under $load: y_A $deflection, θ_B $slope', ({ load, deflection, slope }) => {
    const found = (place: string, movement: 'deflection' | 'slope') => {
      const terms = chartTerms(released, named(load), formula(place), movement, setting);
      return evaluate(total(terms ?? []), setting.value);
    };
    const fraction = (text: string) => evaluate(formula(text), setting.value);
    expect(found('0', 'deflection')).toBeCloseTo(fraction(deflection), 12);
    expect(found('L', 'slope')).toBeCloseTo(fraction(slope), 12);
  });
});
