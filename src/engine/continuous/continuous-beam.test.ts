import { describe, expect, test } from 'vitest';
import { type BeamDocument, type Load, readBeam, type SupportDocument } from '../model/index';
import { evaluate } from '../polynomial/index';
import { type ContinuousBeam, continuousBeam } from './index';

const EI = 2e7;
const GA = 3e7;

function solverOf(document: BeamDocument): ContinuousBeam {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  const solver = continuousBeam(reading.value);
  if (!solver) throw new Error('this is no continuous beam');
  return solver;
}

function solved(
  length: number,
  supports: SupportDocument[],
  loads: Load[],
  more: Partial<BeamDocument> = {},
) {
  const solver = solverOf({ length, ...(more.segments ? {} : { ei: EI }), supports, loads, ...more });
  solver.solve();
  return solver;
}

const fixed = (at: number, more: Partial<SupportDocument> = {}): SupportDocument => ({
  at,
  kind: 'fixed',
  ...more,
});
const roller = (at: number, more: Partial<SupportDocument> = {}): SupportDocument => ({
  at,
  kind: 'roller',
  ...more,
});
const uniform = (w: number, from: number, to: number): Load => ({ kind: 'line', from, to, w0: w, w1: w });
const point = (at: number, p: number): Load => ({ kind: 'point', at, p });
const couple = (at: number, m: number): Load => ({ kind: 'couple', at, m });

/** Our own algebra: within 1e-13 of the scale, the value's own unless said otherwise. */
const near = (got: number, want: number, scale = Math.abs(want)) =>
  expect(Math.abs(got - want)).toBeLessThanOrEqual(1e-13 * scale);

const at = (solver: ContinuousBeam, x: number, side: 0 | 1 = 1) => {
  const { shear, moment, slope, deflection } = solver.diagrams();
  const [V, M, theta, v] = [shear, moment, slope, deflection].map((p) => evaluate(p, x)[side]!);
  return { V: V!, M: M!, theta: theta!, v: v! };
};

describe('one span, by the formulas of the AISC Manual, table 3-23 (from memory)', () => {
  const [L, w, P] = [6, 5000, 9000];

  test('propped cantilever, uniform: 3wL/8 in the prop, −wL²/8 at the root, 9wL²/128 at 5L/8 from it', () => {
    const solver = solved(L, [fixed(0), roller(L)], [uniform(w, 0, L)]);
    const [root, prop] = solver.reactions();
    near(prop!.vertical, (3 * w * L) / 8);
    near(root!.vertical, (5 * w * L) / 8);
    near(root!.moment, (w * L ** 2) / 8);
    expect(prop!.moment).toBe(0);
    const { moment, deflection, shear, slope } = solver.extremes();
    near(moment.max, (9 * w * L ** 2) / 128);
    near(moment.maxAt, (5 * L) / 8);
    near(moment.min, (-w * L ** 2) / 8);
    expect(moment.minAt).toBe(0);
    near(shear.max, (5 * w * L) / 8);
    near(shear.min, (-3 * w * L) / 8);
    near(deflection.minAt, (L * (15 - Math.sqrt(33))) / 16);
    near(slope.max, (w * L ** 3) / (48 * EI));
    expect(deflection.max).toBeLessThanOrEqual(1e-18);
  });

  test('fixed ends, rising load: wL²/30 and wL²/20, 3wL/20 and 7wL/20', () => {
    const { 0: left, 1: right } = solved(
      L,
      [fixed(0), fixed(L)],
      [{ kind: 'line', from: 0, to: L, w0: 0, w1: w }],
    ).reactions();
    near(left!.moment, (w * L ** 2) / 30);
    near(right!.moment, (-w * L ** 2) / 20);
    near(left!.vertical, (3 * w * L) / 20);
    near(right!.vertical, (7 * w * L) / 20);
  });

  test('fixed ends, point load at a: Pab²/L² and Pa²b/L², and the deflection under it Pa³b³/3EIL³', () => {
    const [a, b] = [2, 4];
    const solver = solved(L, [fixed(0), fixed(L)], [point(a, P)]);
    near(solver.reactions()[0]!.moment, (P * a * b ** 2) / L ** 2);
    near(solver.reactions()[1]!.moment, (-P * a ** 2 * b) / L ** 2);
    near(at(solver, a).v, (-P * a ** 3 * b ** 3) / (3 * EI * L ** 3));
  });

  test('simple span, rising load: wL²/9√3 at L/√3, and 0.01304 of 2·(wL/2)L³/EI… at 0.5193 L', () => {
    const { moment, deflection } = solved(
      L,
      [roller(0), roller(L)],
      [{ kind: 'line', from: 0, to: L, w0: 0, w1: w }],
    ).extremes();
    near(moment.max, (w * L ** 2) / (9 * Math.sqrt(3)));
    near(moment.maxAt, L / Math.sqrt(3), L);
    expect((-deflection.min * EI) / ((w * L * L ** 3) / 2)).toBeCloseTo(0.01304, 5);
    expect(deflection.minAt / L).toBeCloseTo(0.5193, 4);
  });

  test('cantilevers from either end: tip −wL⁴/8EI, −PL³/3EI; couple at the tip turns it M L/EI', () => {
    for (const root of [0, L]) {
      const tip = L - root;
      near(at(solved(L, [fixed(root)], [uniform(w, 0, L)]), tip).v, (-w * L ** 4) / (8 * EI));
      near(at(solved(L, [fixed(root)], [point(tip, P)]), tip).v, (-P * L ** 3) / (3 * EI));
      near(at(solved(L, [fixed(root)], [couple(tip, P)]), tip).theta, (P * L) / EI);
      const { vertical, moment } = solved(
        L,
        [fixed(root)],
        [point(tip, P), couple(tip, 700)],
      ).reactions()[0]!;
      near(vertical, P);
      near(moment, (root === 0 ? P * L : -P * L) - 700);
    }
  });

  test('a cantilever both ways from one fixed support, at 2 of 6', () => {
    const solver = solved(6, [fixed(2)], [uniform(w, 0, 6), couple(2, 400)]);
    const { vertical, moment } = solver.reactions()[0]!;
    near(vertical, 6 * w);
    near(moment, (w * 4 ** 2) / 2 - (w * 2 ** 2) / 2 - 400);
    near(at(solver, 0).v, (-w * 2 ** 4) / (8 * EI));
    near(at(solver, 6).v, (-w * 4 ** 4) / (8 * EI));
  });
});

describe('what a beam may have beside spans', () => {
  const [L, w, P] = [6, 5000, 9000];

  test('overhangs left and right: wa²/2 over the supports, tips as cantilevers that turn with the support', () => {
    const solver = solved(10, [roller(2), roller(8)], [uniform(w, 0, 2), uniform(w, 8, 10)]);
    near(at(solver, 2).M, (-w * 2 ** 2) / 2);
    near(at(solver, 8).M, (-w * 2 ** 2) / 2);
    const turn = (((w * 2 ** 2) / 2) * 6) / (2 * EI); // both ends of the span turn by ML/2EI
    near(at(solver, 0).v, -turn * 2 - (w * 2 ** 4) / (8 * EI));
    near(at(solver, 10).v, -turn * 2 - (w * 2 ** 4) / (8 * EI));
    near(at(solver, 5).v, (((w * 2 ** 2) / 2) * 6 ** 2) / (8 * EI));
  });

  test('forces and couples at the tips and over the supports', () => {
    const solver = solved(
      10,
      [roller(2), roller(8)],
      [point(0, P), couple(10, 600), couple(2, 300), point(8, 50)],
    );
    near(at(solver, 2, 0).M, -2 * P);
    near(at(solver, 2, 1).M, -2 * P - 300);
    near(at(solver, 8, 0).M, 600);
    const [left, right] = solver.reactions();
    near(left!.vertical, P + (2 * P + 300 + 600) / 6);
    near(right!.vertical, 50 - (2 * P + 300 + 600) / 6);
  });

  test('shear: a simple span sags wL²/8GA more, and a fixed root stays upright while the axis slopes −V/GA', () => {
    const simple = solved(L, [roller(0), roller(L)], [uniform(w, 0, L)], { ga: GA });
    near(at(simple, L / 2).v, (-5 * w * L ** 4) / (384 * EI) - (w * L ** 2) / (8 * GA));
    const root = solved(L, [fixed(0)], [uniform(w, 0, L)], { ga: GA });
    near(at(root, 0).theta, (-w * L) / GA);
    near(at(root, L).v, (-w * L ** 4) / (8 * EI) - (w * L ** 2) / (2 * GA));
    const phi = (12 * EI) / (GA * L ** 2); // a fixed-fixed beam whose end sinks by δ: 6EIδ/L²(1 + Φ)
    const sunk = solved(L, [fixed(0), fixed(L, { rise: -0.01 })], [], { ga: GA });
    near(sunk.reactions()[0]!.moment, (6 * EI * 0.01) / (L ** 2 * (1 + phi)));
  });

  test('prescribed movements: 3EIδ/L³ in a sunk prop, 4EIθ/L where an end is turned, nothing where all sink alike', () => {
    const sunk = solved(L, [fixed(0), roller(L, { rise: -0.01 })], []);
    near(sunk.reactions()[1]!.vertical, (-3 * EI * 0.01) / L ** 3);
    near(at(sunk, L, 0).v, -0.01);
    const turned = solved(L, [fixed(0, { rotation: 0.002 }), fixed(L)], []);
    near(turned.reactions()[0]!.moment, (4 * EI * 0.002) / L);
    near(turned.reactions()[1]!.moment, (2 * EI * 0.002) / L);
    const all = solved(
      2 * L,
      [0, L, 2 * L].map((x) => roller(x, { rise: -0.01 })),
      [],
    );
    near(all.reactions()[1]!.vertical, 0, (EI * 0.01) / L ** 3);
    near(all.extremes().deflection.max, -0.01);
  });

  test('movements can be left out', () => {
    const solver = solved(L, [fixed(0, { rotation: 0.002 }), roller(L, { rise: -0.01 })], [point(2, P)]);
    solver.solve([], { movements: false });
    expect(solver.reactions().map(({ vertical, moment }) => [vertical, moment])).toEqual([
      [0, 0],
      [0, 0],
    ]);
    expect(Math.abs(solver.extremes().deflection.min)).toBe(0);
  });

  test('a spring under the tip of a cantilever takes P/(1 + 3EI/kL³)', () => {
    const k = 4e5;
    const solver = solved(L, [fixed(0), { at: L, kind: 'free', kv: k }], [point(L, P)]);
    const force = P / (1 + (3 * EI) / (k * L ** 3));
    near(solver.reactions()[1]!.vertical, force);
    near(at(solver, L, 0).v, -force / k);
  });

  test('a spring in the middle of three supports takes the part of the load that its stiffness gives it', () => {
    const k = 3e6;
    const supports = [roller(0), { at: L, kind: 'free', kv: k } as const, roller(2 * L)];
    const beam = 48 / (2 * L) ** 3; // EI δ per unit force
    const sag = (5 * w * (2 * L) ** 4) / (384 * EI);
    const solver = solved(2 * L, supports, [uniform(w, 0, 2 * L)]);
    near(solver.reactions()[1]!.vertical, sag / (1 / (EI * beam) + 1 / k));
  });

  test('a sprung ground that moves, and supports that are all springs: a stiff beam settles as a lever', () => {
    const solver = solved(
      4,
      [
        { at: 0, kind: 'free', kv: 1000, rise: 0.5 },
        { at: 4, kind: 'free', kv: 1000 },
      ],
      [point(1, 800)],
    );
    near(solver.reactions()[0]!.vertical, 600);
    near(at(solver, 0).v, 0.5 - 0.6);
    near(at(solver, 4, 0).v, -0.2);
  });

  test('rotational springs: kθ between free and fixed, at an end and over an inner support', () => {
    const kr = 5e6;
    const end = solved(L, [roller(0, { kr }), roller(L)], [uniform(w, 0, L)]);
    near(end.reactions()[0]!.moment, (w * L ** 2) / 8 / (1 + (3 * EI) / (kr * L)));
    // Over the middle of two spans with one of them loaded, both halves and the spring share wL²/8 as 3EI/L : 3EI/L : k.
    const inner = solved(2 * L, [roller(0), roller(L, { kr }), roller(2 * L)], [uniform(w, 0, L)]);
    const stiffness = (6 * EI) / L + kr;
    near(inner.reactions()[1]!.moment, (-(w * L ** 2) / 8) * (kr / stiffness));
    near(at(inner, L, 1).M, ((-(w * L ** 2) / 8) * (3 * EI)) / L / stiffness);
  });

  test('rotation held over an inner support parts the spans, also on springs and with a turn and a couple', () => {
    const solver = solved(2 * L, [roller(0), fixed(L), roller(2 * L)], [uniform(w, 0, L), couple(L, 70)]);
    near(at(solver, L, 0).M, (-w * L ** 2) / 8);
    near(at(solver, L, 1).M, 0, w * L ** 2);
    near(solver.reactions()[1]!.moment, (-w * L ** 2) / 8 - 70);
    const turned = solved(2 * L, [roller(0), fixed(L, { rotation: 1e-3 }), roller(2 * L)], []);
    near(turned.reactions()[1]!.moment, (6 * EI * 1e-3) / L);
    const guide = { at: L, kind: 'guided', kv: 2e6 } as const;
    const sprung = solved(2 * L, [fixed(0), guide, fixed(2 * L)], [point(L, P)]);
    near(sprung.reactions()[1]!.vertical, P / (1 + (24 * EI) / (2e6 * L ** 3)));
    near(sprung.reactions()[1]!.moment, 0, P * L);
  });

  test('steps: a cantilever twice as stiff in its inner half sags 3PL³/16EI at the tip', () => {
    const segments = [
      { from: 0, to: L / 2, ei: 2 * EI },
      { from: L / 2, to: L, ei: EI },
    ];
    near(at(solved(L, [fixed(0)], [point(L, P)], { segments }), L).v, (-3 * P * L ** 3) / (16 * EI));
    // With a prop at the tip that takes all of P there is no moment anywhere.
    const propped = solved(L, [fixed(0), roller(L)], [point(L / 2, P)], { segments });
    // tip: P(L/2)³/3·2EI + P(L/2)²/2·2EI · L/2 = 5PL³/96EI; R = 5/96 · 16/3
    near(propped.reactions()[1]!.vertical, (5 * P) / 18);
  });

  test('imposed curvature: 3EIκ/2L in the prop of a cantilever, κL²/8 in a simple span, EIκ between fixed ends', () => {
    const kappa = 1e-3;
    const bent = (from: number, to: number): Load => ({ kind: 'curvature', from, to, kappa });
    near(
      solved(L, [fixed(0), roller(L)], [bent(0, L)]).reactions()[1]!.vertical,
      (-3 * EI * kappa) / (2 * L),
    );
    near(at(solved(L, [roller(0), roller(L)], [bent(0, L)]), L / 2).v, (-kappa * L ** 2) / 8);
    near(at(solved(L, [fixed(0), fixed(L)], [bent(0, L)]), 1).M, -EI * kappa);
    const half = solved(L, [fixed(0)], [bent(0, L / 2)]);
    near(at(half, L).v, (kappa * (L / 2) ** 2) / 2 + ((kappa * L) / 2) * (L / 2));
  });

  test('a couple within a span: ±M/L in the supports, and a jump of M', () => {
    const solver = solved(L, [roller(0), roller(L)], [couple(2, P)]);
    near(solver.reactions()[0]!.vertical, P / L);
    near(at(solver, 2, 0).M - at(solver, 2, 1).M, P);
  });

  test('two spans with couples at all three supports', () => {
    const solver = solved(
      2 * L,
      [roller(0), roller(L), roller(2 * L)],
      [couple(0, 80), couple(L, 60), couple(2 * L, 40)],
    );
    // Slope-deflection over the middle: (3EI/L)·2θ − 80/2·(−1)… solved by hand: the carry-over halves of the end couples.
    const theta = (60 - (80 + 40) / 2) / ((6 * EI) / L);
    near(at(solver, L, 0).theta, theta, (80 * L) / EI);
    near(at(solver, 0).M, -80);
    near(at(solver, 2 * L, 0).M, 40);
  });
});

describe('continuous spans, by the coefficients of equal-span tables (from memory)', () => {
  test('three spans, uniform: 0.4, 1.1, 1.1, 0.4 of wL; 0.08, 0.025 and −0.1 of wL²', () => {
    const solver = solved(
      3,
      [0, 1, 2, 3].map((x) => roller(x)),
      [uniform(1, 0, 3)],
      { ei: 1 },
    );
    [0.4, 1.1, 1.1, 0.4].forEach((want, i) => {
      near(solver.reactions()[i]!.vertical, want);
    });
    near(at(solver, 1).M, -0.1);
    near(at(solver, 1.5).M, 0.025);
    near(solver.extremes().moment.max, 0.08);
    near(solver.extremes().moment.min, -0.1);
  });

  test('four spans, first and third loaded: −0.0536, −0.0357, −0.0536 of wL² over the inner supports', () => {
    const solver = solved(
      4,
      [0, 1, 2, 3, 4].map((x) => roller(x)),
      [uniform(1, 0, 1), uniform(1, 2, 3)],
      { ei: 1 },
    );
    [-3 / 56, -1 / 28, -3 / 56].forEach((want, i) => {
      near(at(solver, i + 1).M, want);
    });
  });
});

describe('how it is used', () => {
  const beam = () =>
    solverOf({
      length: 6,
      ei: EI,
      supports: [roller(0), roller(6)],
      loads: [point(2, 900), uniform(10, 1, 4)],
    });

  test('loads of one beam may be applied one by one and factored, but not elsewhere', () => {
    const solver = beam();
    solver.solve([point(2, 1800)]);
    near(solver.reactions()[0]!.vertical, 1200);
    solver.solve([]);
    expect(solver.reactions()[0]!.vertical).toBe(0);
    expect(() => solver.solve([point(3, 1)])).toThrow(RangeError);
    expect(() => solver.solve([uniform(1, 0, 5)])).toThrow('no load of the beam acts or ends at 5 m');
  });

  test('reactions stand in the order of the document, 0 at supports that hold nothing', () => {
    const supports: SupportDocument[] = [roller(6), { at: 3, kind: 'free' }, fixed(0)];
    const solver = solved(6, supports, [point(6, 40)]);
    const [vertical, moment] = [new Float64Array(3).fill(7), new Float64Array(3).fill(7)];
    solver.readReactions(vertical, moment);
    expect([...vertical]).toEqual([40, 0, 0]);
    expect([...moment]).toEqual([0, 0, 0]);
    expect(solver.reactions()).toEqual([
      { at: 6, vertical: 40, moment: 0 },
      { at: 3, vertical: 0, moment: 0 },
      { at: 0, vertical: 0, moment: 0 },
    ]);
  });

  test('stations: eleven unless asked otherwise, the last exactly the end, the left side where asked for', () => {
    const solver = beam();
    solver.solve([point(2, 900)]);
    const { count, x } = solver.stations();
    expect(count).toBe(11);
    expect([...x.subarray(0, 11)]).toEqual([
      0, 0.6, 1.2, 1.7999999999999998, 2.4, 3, 3.5999999999999996, 4.2, 4.8, 5.3999999999999995, 6,
    ]);
    expect([...solver.stations(3).x.subarray(0, 3)]).toEqual([0, 3, 6]);
    const right = solver.stations([0, 2, 6]);
    expect([...right.shear.subarray(0, 3)]).toEqual([600, -300, -300]);
    expect([...right.moment.subarray(0, 3)].map(Math.round)).toEqual([0, 1200, 0]);
    expect([...solver.stations([0, 2, 6], 'left').shear.subarray(0, 3)]).toEqual([600, 600, -300]);
    expect([...solver.stations([2 - 1e-13, 2 + 1e-13]).shear.subarray(0, 2)]).toEqual([-300, -300]);
    expect(() => solver.stations([3, 1])).toThrow(RangeError);
  });

  test('beams with hinges, and guided ones, are not for it', () => {
    const read = (document: BeamDocument) => {
      const reading = readBeam({ horizontal: 'ignore', ...document });
      return reading.ok ? continuousBeam(reading.value) : 'unread';
    };
    const supports = [fixed(0), roller(6)];
    expect(read({ length: 6, ei: 1, supports, hinges: [3] })).toBeNull();
    expect(read({ length: 6, ei: 1, supports: [fixed(0), { at: 6, kind: 'guided' }] })).toBeNull();
  });

  test.each([
    ['rigid', {}],
    ['sprung', { kind: 'guided', kv: 1e3 } as const],
  ])('a flexibility of which doubles keep no digit is refused, on %s supports', (_, spring) => {
    // It shears 10¹³ times more than it bends, and only bending tells its end moments from each other.
    const read = (ga: number) => {
      const supports = [fixed(0, spring), fixed(1, spring)];
      const reading = readBeam({ length: 1, ei: 1e10, ga, supports, horizontal: 'ignore' });
      return reading.ok ? continuousBeam(reading.value) : 'unread';
    };
    expect(read(1e-3)).toBeNull();
    expect(read(1e6)).not.toBeNull();
  });
});
