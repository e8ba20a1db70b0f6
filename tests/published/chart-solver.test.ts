import { describe, expect, test } from 'vitest';
import {
  CHART,
  type ChartTerm,
  chartTerms,
  divide,
  evaluate,
  formula,
  type Movement,
  movementTerms,
  type NamedLoad,
  negate,
  type Released,
  type Setting,
  shearTerms,
  supportForces,
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
  GA: 3e5,
  K: 6e5,
  R: 7e6,
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

/** A released beam, and its supports at [first, second] vertical restraint and how its turning one is held. */
type Case = {
  name: string;
  released: Released;
  supports: (held: (which: 0 | 1 | 'turn') => Restraint) => Support[];
};
const cantilever = (root: string): Case => ({
  name: `cantilever fixed at ${root}`,
  released: { kind: 'cantilever', root: formula(root) },
  supports: (of) => [support(value(root), of(0), of('turn'))],
});
const simple = (left: string, right: string): Case => ({
  name: `simple span from ${left} to ${right}`,
  released: { kind: 'simple', left: formula(left), right: formula(right) },
  supports: (of) => [support(value(left), of(0)), support(value(right), of(1))],
});
const guided = (guide: string, prop: string): Case => ({
  name: `span guided at ${guide} and propped at ${prop}`,
  released: { kind: 'guided', guide: formula(guide), prop: formula(prop) },
  supports: (of) => [support(value(guide), FREE, of('turn')), support(value(prop), of(0))],
});
const CASES = [
  cantilever('0'),
  cantilever('L'),
  cantilever('r'),
  simple('0', 'L'),
  simple('p', 'q'),
  simple('0', 'q'),
  simple('p', 'L'),
  guided('0', 'L'),
  guided('L', '0'),
  guided('0', 'q'),
  guided('L', 'r'),
  guided('p', 'q'),
];
const RIGID = () => held();

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

/** Deflection down and the turn of the section, clockwise, at each place, from one solution with a point at every one of them. */
function solved(
  supports: Support[],
  loads: Load[],
  places: readonly { x: number }[],
  ga: number | null = null,
): Record<Movement, number>[] {
  const marks = places.map(({ x }): Load => ({ kind: 'point', at: x, p: 0 }));
  const beam: Beam = {
    length: 9,
    segments: [{ from: 0, to: 9, ei: VALUES['EI']!, ga }],
    supports,
    hinges: [],
    loads: [...loads, ...marks],
    degree: 0,
  };
  const { pieces } = solveStiffness(beam);
  return places.map(({ x }) => {
    const state = x === 0 ? pieces[0]!.left : pieces.find(({ to }) => to === x)!.right;
    return { deflection: -state.deflection, slope: -(state.slope + (ga === null ? 0 : state.shear / ga)) };
  });
}

/** The end that the charts measure from, and the other; of a cantilever, the end of the beam further from its root. */
function endsOf(released: Released): [string, string] {
  const name = (at: Parameters<typeof evaluate>[0]) =>
    PLACES.find((text) => value(text) === evaluate(at, SETTING.value))!;
  switch (released.kind) {
    case 'cantilever':
      return [name(released.root), 'L'];
    case 'simple':
      return [name(released.left), name(released.right)];
    case 'guided':
      return [name(released.guide), name(released.prop)];
  }
}

/** Whether one of the places lies where no chart reaches: on the far side of a guide. */
function isOutsideGuide(released: Released, texts: readonly string[]): boolean {
  if (released.kind !== 'guided') return false;
  const [guide, prop] = endsOf(released).map(value) as [number, number];
  return texts.some((text) => Math.sign(value(text) - guide) === Math.sign(guide - prop));
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
        const wanted = solved(supports(RIGID), [numeric(load(at))], places);
        for (const [k, { at: place }] of places.entries()) {
          const want = wanted[k]!;
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = chartTerms(released, load(at), place, movement, SETTING);
            if (terms) compare(terms, want[movement], natural[movement]);
            else expect(isOutsideGuide(released, [at, PLACES[k]!])).toBe(true);
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
        const wanted = solved(supports(RIGID), [numeric(load)], places);
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
      expect(covered).toBeGreaterThan(released.kind === 'guided' ? 250 : 600);
    });

    test('a load that varies is covered where it begins or ends at a support', { timeout: 60_000 }, () => {
      const [first, second] = endsOf(released);
      for (const [from, to, w0, w1] of [
        [first, second, '0', 'w'],
        [first, second, 'w', '0'],
        [first, second, 'w', 'u'],
        [first, 'r', '0', 'w'],
        [first, 'r', 'w', '0'],
        [first, 'r', 'u', 'w'],
        ['r', second, 'w', '0'],
        ['r', second, '0', 'w'],
        ['r', second, 'w', 'u'],
      ] as const) {
        if (value(from) >= value(to)) continue;
        const isAtGuide = released.kind !== 'guided' || value(from) === value(first);
        const isBeyondRoot = released.kind === 'cantilever' && from !== first;
        const load: NamedLoad = {
          kind: 'line',
          from: formula(from),
          to: formula(to),
          w0: formula(w0),
          w1: formula(w1),
        };
        const wanted = solved(supports(RIGID), [numeric(load)], places);
        for (const [k, { at: place }] of places.entries()) {
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = chartTerms(released, load, place, movement, SETTING);
            if (terms) compare(terms, wanted[k]![movement], 10 * natural[movement]);
            else expect(!isAtGuide || isBeyondRoot || isOutsideGuide(released, [PLACES[k]!])).toBe(true);
          }
        }
      }
    });

    test('with shear: what it adds to bending', { timeout: 60_000 }, () => {
      const sets: NamedLoad[][] = [
        [{ kind: 'point', at: formula('p+r/2'), p: formula('P') }],
        [{ kind: 'point', at: formula('L'), p: formula('P') }],
        [{ kind: 'couple', at: formula('r'), m: formula('M') }],
        [
          { kind: 'line', from: formula('0'), to: formula('L'), w0: formula('w'), w1: formula('w') },
          { kind: 'point', at: formula('r'), p: formula('P') },
        ],
        [{ kind: 'line', from: formula('p'), to: formula('q'), w0: formula('w'), w1: formula('u') }],
        [{ kind: 'couple', at: formula('L'), m: formula('M') }],
      ];
      for (const set of sets) {
        const loads = set.map(numeric);
        const [stiff, soft] = [null, VALUES['GA']!].map((ga) => solved(supports(RIGID), loads, places, ga));
        for (const [k, { at: place }] of places.entries()) {
          if (isOutsideGuide(released, [PLACES[k]!])) continue;
          if (
            released.kind === 'guided' &&
            loads.some((load) => 'at' in load && load.at < value(endsOf(released)[0]))
          )
            continue;
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = shearTerms(released, set, place, movement, SETTING, formula('GA'));
            compare(terms, soft![k]![movement] - stiff![k]![movement], 100 * natural[movement]);
          }
        }
      }
    });

    test('on springs: each gives by what it carries over its stiffness', { timeout: 60_000 }, () => {
      const spring = (which: 0 | 1 | 'turn'): Restraint => ({
        kind: 'spring',
        stiffness: VALUES[which === 'turn' ? 'R' : 'K']!,
        movement: 0,
      });
      const sets: NamedLoad[] = [
        { kind: 'point', at: formula('r'), p: formula('P') },
        { kind: 'couple', at: formula('q'), m: formula('M') },
        { kind: 'line', from: formula('0'), to: formula('L'), w0: formula('w'), w1: formula('u') },
        { kind: 'curvature', from: formula('0'), to: formula('L'), kappa: formula('k') },
      ];
      for (const load of sets) {
        const [stiff, soft] = [RIGID, spring].map((of) => solved(supports(of), [numeric(load)], places));
        const { forces, couple } = supportForces(released, load);
        const [down, up] = forces.map((force) => negate(divide(force, formula('K'))));
        const movements = { rises: [down!, up!] as const, rotation: negate(divide(couple, formula('R'))) };
        for (const [k, { at: place }] of places.entries()) {
          for (const movement of ['deflection', 'slope'] as const) {
            const terms = movementTerms(released, movements, place, movement, SETTING);
            compare(terms, soft![k]![movement] - stiff![k]![movement], 100 * natural[movement]);
          }
        }
      }
    });

    test('when its supports move', () => {
      VALUES['s'] = 0.012;
      VALUES['t'] = -0.02;
      VALUES['f'] = 0.003;
      const two = released.kind === 'simple';
      const rises = [formula('s'), formula(two ? 't' : '0')] as const;
      const rotation = formula(two ? '0' : 'f');
      const moved = { 0: 0.012, 1: -0.02, turn: 0.003 };
      const wanted = solved(
        supports((which) => held(moved[which])),
        [],
        places,
      );
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
    for (const { id, within, beyond } of CHART) {
      if (id.endsWith('-shear')) continue; // the section does not turn with the line
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
    for (const { id, source, validity, title, released, within, beyond } of CHART) {
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
        ...(released === 'cantilever' ? [] : ['L']),
        ...(id.endsWith('-shear') ? ['S', 'T', 'GA'] : []),
      ];
      expect(letters.filter((letter) => !known.includes(letter))).toEqual([]);
    }
  });
});
