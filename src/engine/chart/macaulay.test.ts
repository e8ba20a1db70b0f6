import { describe, expect, test } from 'vitest';
import {
  type ChartTerm,
  chartTerms,
  evaluate,
  formula,
  type Movement,
  movementTerms,
  type NamedLoad,
  type Released,
  type Setting,
  shearTerms,
  supportForces,
  total,
} from './index';

/**
 * Chart terms against Macaulay's method of singularity functions (W. H. Macaulay, Note on the deflection of beams,
 * Messenger of Mathematics 48, 1919): V, M, θ and v as sums of ⟨x − a⟩ⁿ, with the two constants that the supports give.
 */
const VALUES: Record<string, number> = {
  L: 9,
  g: 0.8,
  p: 1.7,
  r: 4.1,
  m: 5.2,
  q: 6.4,
  h: 7.7,
  P: 3.2,
  w: 0.9,
  u: 2.1,
  M: 5.4,
  k: 0.2,
  s: 0.12,
  t: -0.2,
  f: 0.03,
  EI: 40,
  GA: 30,
};
const SETTING: Setting = { value: (name) => VALUES[name] ?? Number.NaN, ei: formula('EI'), length: 9 };
const number = (text: string) => evaluate(formula(text), SETTING.value);
const PLACES = ['0', 'g', 'p', 'r', 'm', 'q', 'h', 'L'];
const MOVEMENTS = ['deflection', 'slope'] as const;

type Beam = { name: string; released: Released; ends: [string, string] };
const cantilever = (root: string): Beam => ({
  name: `cantilever fixed at ${root}`,
  released: { kind: 'cantilever', root: formula(root) },
  ends: [root, root],
});
const simple = (left: string, right: string): Beam => ({
  name: `simple span from ${left} to ${right}`,
  released: { kind: 'simple', left: formula(left), right: formula(right) },
  ends: [left, right],
});
const guided = (guide: string, prop: string): Beam => ({
  name: `span guided at ${guide} and propped at ${prop}`,
  released: { kind: 'guided', guide: formula(guide), prop: formula(prop) },
  ends: [guide, prop],
});
const BEAMS = [
  cantilever('L'),
  cantilever('r'),
  simple('0', 'L'),
  simple('p', 'q'),
  guided('p', 'q'),
  guided('q', 'p'),
];

const point = (at: string): NamedLoad => ({ kind: 'point', at: formula(at), p: formula('P') });
const couple = (at: string): NamedLoad => ({ kind: 'couple', at: formula(at), m: formula('M') });
const line = (from: string, to: string, w0 = 'w', w1 = 'w'): NamedLoad => ({
  kind: 'line',
  from: formula(from),
  to: formula(to),
  w0: formula(w0),
  w1: formula(w1),
});
const curvature = (from: string, to: string): NamedLoad => ({
  kind: 'curvature',
  from: formula(from),
  to: formula(to),
  kappa: formula('k'),
});

/** c · ⟨x − a⟩ⁿ/n! of the shear; of the moment a couple has n = −1, and a free curvature is EI κ without a moment. */
type Singular = { c: number; a: number; n: number; isFree?: true };

/** Upward, anticlockwise and sagging. */
function singular(load: NamedLoad): Singular[] {
  const value = (formulated: Parameters<typeof evaluate>[0]) => evaluate(formulated, SETTING.value);
  if (load.kind === 'point') return [{ c: -value(load.p), a: value(load.at), n: 0 }];
  if (load.kind === 'couple') return [{ c: -value(load.m), a: value(load.at), n: -1 }];
  const [from, to] = [value(load.from), value(load.to)];
  if (load.kind === 'curvature') {
    const c = VALUES['EI']! * value(load.kappa);
    return [
      { c, a: from, n: -1, isFree: true },
      { c: -c, a: to, n: -1, isFree: true },
    ];
  }
  const [w0, w1] = [value(load.w0), value(load.w1)];
  const rate = (w1 - w0) / (to - from);
  return [
    { c: -w0, a: from, n: 1 },
    { c: -rate, a: from, n: 2 },
    { c: w1, a: to, n: 1 },
    { c: rate, a: to, n: 2 },
  ];
}

const FACTORIAL = [1, 1, 2, 6, 24, 120];

/** The shear integrated so often: the moment (1), and EI times the slope (2) and the deflection (3). */
const integrated = (terms: readonly Singular[], x: number, times: 0 | 1 | 2 | 3): number =>
  terms.reduce((sum, { c, a, n, isFree }) => {
    const power = n + times;
    const isNone = x <= a || power < 0 || (isFree && times < 2);
    return isNone ? sum : sum + (c * (x - a) ** power) / FACTORIAL[power]!;
  }, 0);

/** Forces up and the couple of the fixed or guided end, anticlockwise, that hold the loads in equilibrium. */
function holding({ released, ends }: Beam, acting: readonly Singular[]) {
  const [first, second] = ends.map(number) as [number, number];
  const far = 100; // beyond everything, where no shear and no moment may be left
  const force = integrated(acting, far, 0);
  const momentAbout = (x: number) => integrated(acting, far, 1) - force * (far - x);
  if (released.kind === 'simple') {
    const right = momentAbout(first) / (second - first);
    return { forces: [-force - right, right] as const, couple: 0 };
  }
  return { forces: [-force, 0] as const, couple: momentAbout(released.kind === 'guided' ? second : first) };
}

/** All that acts on the beam and holds it. */
function held(beam: Beam, loads: readonly NamedLoad[]): Singular[] {
  const [first, second] = beam.ends.map(number) as [number, number];
  const acting = loads.flatMap(singular);
  const { forces, couple: turning } = holding(beam, acting);
  const [of, other] = beam.released.kind === 'guided' ? [second, first] : [first, second];
  return [
    ...acting,
    { c: forces[0], a: of, n: 0 },
    { c: forces[1], a: other, n: 0 },
    { c: -turning, a: first, n: -1 },
  ];
}

/** A line through zero at both supports, at the prop, or at the root, less what it is there; and what turns with it. */
function placed({ released, ends }: Beam, value: (x: number) => number, turn: (x: number) => number) {
  const [first, second] = ends.map(number) as [number, number];
  const zero = released.kind === 'guided' ? second : first;
  const C = released.kind === 'simple' ? -(value(second) - value(first)) / (second - first) : -turn(first);
  return {
    deflection: (x: number) => value(x) - value(zero) + C * (x - zero),
    slope: (x: number) => turn(x) + C,
  } satisfies Record<Movement, (x: number) => number>;
}

/** Deflection down and the turn clockwise, by bending. */
function bent(beam: Beam, loads: readonly NamedLoad[]) {
  const all = held(beam, loads);
  return placed(
    beam,
    (x) => -integrated(all, x, 3) / VALUES['EI']!,
    (x) => -integrated(all, x, 2) / VALUES['EI']!,
  );
}

/** δ′ = V/GA down; the sections do not turn by it unless the beam as a whole does. */
function sheared(beam: Beam, loads: readonly NamedLoad[]) {
  const forces = held(beam, loads).filter(({ n }) => n >= 0);
  return placed(
    beam,
    (x) => integrated(forces, x, 1) / VALUES['GA']!,
    () => 0,
  );
}

const sumOf = (terms: readonly ChartTerm[]) => evaluate(total(terms), SETTING.value);
const near = (actual: number, wanted: number, what: string) =>
  expect(Math.abs(actual - wanted), what).toBeLessThan(1e-9);

/** Whether a place lies before the guide, where no chart reaches. */
const isOutside = ({ released, ends }: Beam, places: readonly string[]): boolean => {
  const [guide, prop] = ends.map(number) as [number, number];
  return (
    released.kind === 'guided' &&
    places.some((place) => Math.sign(number(place) - guide) === Math.sign(guide - prop))
  );
};

describe.each(BEAMS)('on a $name', (beam) => {
  const { released, ends } = beam;
  const [first, second] = ends;
  const loadsAt: [string[], NamedLoad][] = [
    ...['g', 'p', 'r', 'q', 'h'].flatMap((at): [string[], NamedLoad][] => [
      [[at], point(at)],
      [[at], couple(at)],
    ]),
    ...[
      ['0', 'L'],
      ['0', 'g'],
      ['g', 'r'],
      ['p', 'm'],
      ['r', 'm'],
      ['m', 'q'],
      ['r', 'h'],
      ['h', 'L'],
    ].flatMap(([from, to]): [string[], NamedLoad][] => [
      [[from!, to!], line(from!, to!)],
      [[from!, to!], curvature(from!, to!)],
    ]),
  ];

  test.each(MOVEMENTS)('forces, couples, uniform loads and curvatures make the %s', (movement) => {
    for (const [places, load] of loadsAt) {
      const curve = bent(beam, [load])[movement];
      for (const place of PLACES) {
        const terms = chartTerms(released, load, formula(place), movement, SETTING);
        if (terms) near(sumOf(terms), curve(number(place)), `${load.kind} ${places} at ${place}`);
        else expect(isOutside(beam, [...places, place])).toBe(true);
      }
    }
  });

  test.each(MOVEMENTS)('loads that vary from a support or to one make the %s', (movement) => {
    const away = (from: string) => PLACES.filter((place) => number(place) !== number(from));
    const supports = released.kind === 'simple' ? [first, second] : [first];
    const stretches = supports
      .flatMap((support) => away(support).map((place) => [support, place]))
      .map(([a, b]) => (number(a!) < number(b!) ? [a!, b!] : [b!, a!]))
      .filter((places) => !isOutside(beam, places));
    for (const [from, to] of stretches) {
      for (const [w0, w1] of [
        ['0', 'w'],
        ['w', '0'],
        ['w', 'u'],
        ['w-u', 'u'],
      ]) {
        const load = line(from!, to!, w0, w1);
        const curve = bent(beam, [load])[movement];
        for (const place of PLACES.filter((one) => !isOutside(beam, [one]))) {
          const terms = chartTerms(released, load, formula(place), movement, SETTING);
          const what = `${w0} … ${w1} from ${from} to ${to} at ${place}`;
          expect(terms, what).not.toBeNull();
          near(sumOf(terms!), curve(number(place)), what);
        }
      }
    }
  });

  test('a load that varies elsewhere is covered rightly or not at all', () => {
    for (const [from, to] of [
      ['g', 'h'],
      ['p', 'L'],
      ['r', 'm'],
      ['0', 'q'],
    ]) {
      for (const [w0, w1] of [
        ['0', 'w'],
        ['w', 'u'],
      ]) {
        const load = line(from!, to!, w0, w1);
        const curve = bent(beam, [load]).deflection;
        for (const place of PLACES) {
          const terms = chartTerms(released, load, formula(place), 'deflection', SETTING);
          if (terms) near(sumOf(terms), curve(number(place)), `from ${from} to ${to} at ${place}`);
        }
      }
    }
  });

  const sets: NamedLoad[][] = [
    [point('r'), couple('g')],
    [point('L'), point('0')],
    [line('0', 'L'), point('p'), couple('h')],
    [line('g', 'm', 'w', 'u')],
    [couple('m'), curvature('0', 'L')],
  ];

  test.each(MOVEMENTS)('shear adds the area of its diagram to the %s', (movement) => {
    for (const [k, set] of sets.entries()) {
      if (isOutside(beam, k === 2 || k === 1 ? ['0', 'L'] : k === 4 ? ['m'] : ['g'])) continue;
      const curve = sheared(beam, set)[movement];
      for (const place of PLACES.filter((one) => !isOutside(beam, [one]))) {
        const terms = shearTerms(released, set, formula(place), movement, SETTING, formula('GA'));
        near(sumOf(terms), curve(number(place)), `set ${k} at ${place}`);
      }
    }
  });

  test('what holds a load is in equilibrium with it', () => {
    for (const load of [...loadsAt.map(([, one]) => one), line('g', 'm', 'w', 'u')]) {
      const { forces, couple: turning } = supportForces(released, load);
      const wanted = holding(beam, singular(load));
      const values = [...forces, turning].map((one) => evaluate(one, SETTING.value));
      [...wanted.forces, wanted.couple].forEach((want, i) => {
        near(values[i]!, want, `${load.kind} ${i}`);
      });
    }
  });

  test('supports that move carry it along as a rigid body', () => {
    const [s, t, f] = ['s', 't', 'f'].map(number) as [number, number, number];
    const isSimple = released.kind === 'simple';
    const rises = [formula('s'), formula(isSimple ? 't' : '0')] as const;
    const rotation = formula(isSimple ? '0' : 'f');
    const [a, b] = ends.map(number) as [number, number];
    const turn = isSimple ? (t - s) / (b - a) : f;
    const held = released.kind === 'guided' ? b : a;
    for (const place of PLACES) {
      const moved = (movement: Movement, of: Parameters<typeof movementTerms>[1]) =>
        sumOf(movementTerms(released, of, formula(place), movement, SETTING));
      near(moved('deflection', { rises, rotation }), -(s + turn * (number(place) - held)), place);
      near(moved('slope', { rises, rotation }), -turn, place);
      near(moved('slope', { rises: [formula('s'), []], rotation: [] }), isSimple ? s / (b - a) : 0, place);
    }
    // A cantilever has no second rise, a simple span no turn of its own: what is given for them is not asked.
    const more = { rises: [formula('s'), formula(isSimple ? 't' : 'u')] as const, rotation: formula('f') };
    const asked = movementTerms(released, more, formula('m'), 'slope', SETTING);
    near(sumOf(asked), -turn, 'with more than it has');
    const none = { rises: [[], []] as const, rotation: [] };
    expect(movementTerms(released, none, formula('m'), 'deflection', SETTING)).toEqual([]);
  });
});
