import { describe, expect, test } from 'vitest';
import {
  CHART,
  type ChartTerm,
  chartTerms,
  evaluate,
  formula,
  type Movement,
  movementTerms,
  type NamedLoad,
  type Released,
  type Setting,
  symbolsOf,
  total,
} from '@/engine/chart/index';
import type { Beam, Load, Restraint, Support } from '@/engine/model/index';
import { solveStiffness } from '@/engine/stiffness/index';
import { dice } from '../support/random';

/** A straight beam of length L: letters and their values as a template would give them. */
const VALUES: Record<string, number> = {
  L: 9,
  p: 1.7,
  q: 6.4,
  r: 4.1,
  P: 3200,
  w: 900,
  u: 2100,
  M: 5400,
  k: 2e-3,
  EI: 4e6,
};
const SETTING: Setting = { value: (name) => VALUES[name] ?? Number.NaN, ei: formula('EI'), length: 9 };
const value = (text: string) => evaluate(formula(text), SETTING.value);

const FREE: Restraint = { kind: 'free' };
const held = (movement = 0): Restraint => ({ kind: 'rigid', movement });
const support = (at: number, vertical: Restraint, rotation: Restraint = FREE): Support => ({
  at,
  kind: 'free',
  vertical,
  rotation,
  horizontal: true,
});

type Case = { name: string; released: Released; supports: (moved?: [number, number, number]) => Support[] };
const cantilever = (root: string): Case => ({
  name: `cantilever fixed at ${root}`,
  released: { kind: 'cantilever', root: formula(root) },
  supports: ([rise, , turn] = [0, 0, 0]) => [support(value(root), held(rise), held(turn))],
});
const simple = (left: string, right: string): Case => ({
  name: `simple span from ${left} to ${right}`,
  released: { kind: 'simple', left: formula(left), right: formula(right) },
  supports: ([a, b] = [0, 0, 0]) => [support(value(left), held(a)), support(value(right), held(b))],
});
const CASES = [
  cantilever('0'),
  cantilever('L'),
  cantilever('r'),
  simple('0', 'L'),
  simple('p', 'q'),
  simple('0', 'q'),
  simple('p', 'L'),
];

const PLACES = ['0', 'L', 'p', 'q', 'r', 'L/3', 'L-p', 'p+r/2', 'q+r/3', 'p/2'];

function numeric(load: NamedLoad): Load {
  const n = (a: Parameters<typeof evaluate>[0]) => evaluate(a, SETTING.value);
  switch (load.kind) {
    case 'point':
      return { kind: 'point', at: n(load.at), p: n(load.p) };
    case 'couple':
      return { kind: 'couple', at: n(load.at), m: n(load.m) };
    case 'line':
      return { kind: 'line', from: n(load.from), to: n(load.to), w0: n(load.w0), w1: n(load.w1) };
    case 'curvature':
      return { kind: 'curvature', from: n(load.from), to: n(load.to), kappa: n(load.kappa) };
  }
}

/** Deflection down and slope clockwise at each place, from one solution with a point at every one of them. */
function solved(
  supports: Support[],
  loads: Load[],
  places: readonly { x: number }[],
): Record<Movement, number>[] {
  const marks = places.map(({ x }): Load => ({ kind: 'point', at: x, p: 0 }));
  const beam: Beam = {
    length: 9,
    segments: [{ from: 0, to: 9, ei: VALUES['EI']!, ga: null }],
    supports,
    hinges: [],
    loads: [...loads, ...marks],
    degree: 0,
  };
  const { pieces } = solveStiffness(beam);
  return places.map(({ x }) => {
    const state = x === 0 ? pieces[0]!.left : pieces.find(({ to }) => to === x)!.right;
    return { deflection: -state.deflection, slope: -state.slope };
  });
}

const seen = new Set<string>();
function compare(terms: ChartTerm[], want: number, natural: number): void {
  for (const { chart } of terms) seen.add(chart.id);
  expect(Math.abs(evaluate(total(terms), SETTING.value) - want)).toBeLessThan(1e-12 * natural);
}

describe.each(CASES)(
  'chart terms of a $name are the stiffness method’s movements',
  ({ released, supports }) => {
    const places = PLACES.map((text) => ({ text, at: formula(text), x: value(text) }));
    const natural = { deflection: (3200 * 9 ** 3) / 4e6, slope: (3200 * 9 ** 2) / 4e6 };
    const loads: [string, (at: string) => NamedLoad][] = [
      ['point load', (at) => ({ kind: 'point', at: formula(at), p: formula('P') })],
      ['couple', (at) => ({ kind: 'couple', at: formula(at), m: formula('M') })],
    ];

    test.each(loads)('under a %s anywhere', { timeout: 60_000 }, (_, load) => {
      for (const at of PLACES) {
        const wanted = solved(supports(), [numeric(load(at))], places);
        for (const [k, { at: place }] of places.entries()) {
          const want = wanted[k]!;
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = chartTerms(released, load(at), place, movement, SETTING);
            expect(terms).not.toBeNull();
            compare(terms ?? [], want[movement], natural[movement]);
          }
        }
      }
    });

    test('under a uniform load, a curvature, or a covered trapezoid over any stretch', {
      timeout: 60_000,
    }, () => {
      const roll = dice(7);
      let covered = 0;
      for (let k = 0; k < 80; k++) {
        const [a, b] = [roll.pick(PLACES), roll.pick(PLACES)].sort((x, y) => value(x) - value(y)) as [
          string,
          string,
        ];
        const [from, to] = [formula(a), formula(b)];
        const [w0, w1] = roll.pick([
          ['w', 'w'],
          ['0', 'w'],
          ['w', '0'],
          ['w', 'u'],
        ]) as [string, string];
        const load: NamedLoad =
          k % 4 === 0
            ? { kind: 'curvature', from, to, kappa: formula('k') }
            : { kind: 'line', from, to, w0: formula(w0), w1: formula(w1) };
        if (value(a) === value(b)) continue;
        const wanted = solved(supports(), [numeric(load)], places);
        for (const [j, { at: place }] of places.entries()) {
          const want = wanted[j]!;
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = chartTerms(released, load, place, movement, SETTING);
            if (!terms) continue;
            covered++;
            compare(terms, want[movement], 10 * natural[movement]);
          }
        }
      }
      expect(covered).toBeGreaterThan(600);
    });

    test('when its supports move', () => {
      VALUES['s'] = 0.012;
      VALUES['t'] = -0.02;
      VALUES['f'] = 0.003;
      const two = released.kind === 'simple';
      const rises = [formula('s'), formula(two ? 't' : '0')] as const;
      const rotation = formula(two ? '0' : 'f');
      const wanted = solved(supports([0.012, -0.02, 0.003]), [], places);
      for (const [k, { at: place }] of places.entries()) {
        const want = wanted[k]!;
        for (const movement of ['deflection', 'slope'] as const) {
          compare(
            movementTerms(released, { rises, rotation }, place, movement, SETTING),
            want[movement],
            0.1,
          );
        }
      }
    });
  },
);

describe('the register', () => {
  test('every case was met above', () => {
    expect(CHART.map(({ id }) => id).filter((id) => !seen.has(id))).toEqual([]);
  });

  test('the slope is the derivative of the deflection, and both sides of a meet at a', () => {
    const at = (x: number) => (name: string) =>
      ({ x, a: 2.1, L: 5.3, w: 1, P: 1, M: 1, kappa: 1, EI: 1, s: 0.4, t: 0.7, phi: 0.2 })[name]!;
    for (const { within, beyond } of CHART) {
      for (const [curve, x] of [[within, 1.3], ...(beyond ? ([[beyond, 3.2]] as const) : [])] as const) {
        const step = 1e-5;
        const rise = evaluate(curve.deflection, at(x + step)) - evaluate(curve.deflection, at(x - step));
        expect(rise / (2 * step)).toBeCloseTo(evaluate(curve.slope, at(x)), 7);
      }
      for (const movement of ['deflection', 'slope'] as const) {
        if (beyond)
          expect(evaluate(beyond[movement], at(2.1))).toBeCloseTo(evaluate(within[movement], at(2.1)), 12);
      }
    }
  });

  test('every case names its source, its validity and only the letters of its kind', () => {
    for (const { source, validity, title, released, within, beyond } of CHART) {
      expect([source.work, source.entry, validity, title].every((text) => text.length > 0)).toBe(true);
      const letters = [within, ...(beyond ? [beyond] : [])].flatMap((c) => [
        ...symbolsOf(c.deflection),
        ...symbolsOf(c.slope),
      ]);
      const known = [
        'x',
        'a',
        'w',
        'P',
        'M',
        'kappa',
        'EI',
        's',
        't',
        'phi',
        ...(released === 'simple' ? ['L'] : []),
      ];
      expect(letters.filter((letter) => !known.includes(letter))).toEqual([]);
    }
  });
});
