import { describe, expect, test } from 'vitest';
import type { Beam, Load, Restraint, Support } from '../model/index';
import { SingularStiffness, solveStiffness } from './index';

const FREE: Restraint = { kind: 'free' };
const HELD: Restraint = { kind: 'rigid', movement: 0 };
const support = (at: number, vertical: Restraint = HELD, rotation: Restraint = FREE): Support => ({
  at,
  kind: rotation.kind === 'rigid' ? 'fixed' : 'roller',
  vertical,
  rotation,
  horizontal: true,
});
const beam = (length: number, supports: Support[], loads: Load[], more: Partial<Beam> = {}): Beam => ({
  length,
  segments: [{ from: 0, to: length, ei: 1e7, ga: null }],
  supports,
  hinges: [],
  loads,
  degree: 0,
  ...more,
});
const uniform = (w: number, from: number, to: number): Load => ({ kind: 'line', from, to, w0: w, w1: w });

/** Within ε · scale: our own algebra, so a stated multiple of the double's rounding. */
const near = (got: number, want: number, scale = Math.abs(want)) =>
  expect(Math.abs(got - want)).toBeLessThanOrEqual(1e-14 * scale);

describe('solveStiffness', () => {
  test('propped cantilever with overhang: the prop carries 3wL/8 + wa + 3wa²/4L', () => {
    const [L, a, w] = [6, 1.8, 5517];
    const { reactions } = solveStiffness(
      beam(L + a, [support(0, HELD, HELD), support(L)], [uniform(w, 0, L + a)]),
    );
    near(reactions[1]!.vertical, (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L));
    near(reactions[0]!.moment, (w * L * L) / 8 - (w * a * a) / 4, w * L * L);
  });

  test('fixed-fixed: a load rising to the right gives wL²/30 and wL²/20', () => {
    const { reactions } = solveStiffness(
      beam(
        5,
        [support(0, HELD, HELD), support(5, HELD, HELD)],
        [{ kind: 'line', from: 0, to: 5, w0: 0, w1: 3000 }],
      ),
    );
    near(reactions[0]!.moment, (3000 * 25) / 30);
    near(reactions[1]!.moment, (-3000 * 25) / 20);
  });

  test('a cantilever that shears sags wL⁴/8EI + wL²/2GA and stays fixed in rotation', () => {
    const [L, w, ei, ga] = [3, 4000, 1e7, 2e7];
    const { pieces } = solveStiffness(
      beam(L, [support(0, HELD, HELD)], [uniform(w, 0, L)], { segments: [{ from: 0, to: L, ei, ga }] }),
    );
    near(pieces[0]!.right.deflection, -((w * L ** 4) / (8 * ei) + (w * L ** 2) / (2 * ga)));
    near(pieces[0]!.left.slope, (-w * L) / ga);
  });

  test('a cantilever that shears under a triangular load: both halves of the closed form, cut anywhere', () => {
    const [L, w, ei, ga] = [3, 4000, 1e7, 2e7];
    const triangle: Load = { kind: 'line', from: 0, to: L, w0: 0, w1: w };
    const tip = (11 * w * L ** 4) / (120 * ei) + (w * L ** 2) / (3 * ga);
    for (const cut of [0.1, 1, 2.9]) {
      const { pieces } = solveStiffness(
        beam(L, [support(0, HELD, HELD)], [triangle, { kind: 'point', at: cut, p: 0 }], {
          segments: [{ from: 0, to: L, ei, ga }],
        }),
      );
      near(pieces[1]!.right.deflection, -tip);
    }
  });

  test('an imposed curvature bends a simple span to κL²/8 and strains nothing', () => {
    const { pieces } = solveStiffness(
      beam(4, [support(0), support(4)], [{ kind: 'curvature', from: 0, to: 4, kappa: 1e-3 }]),
    );
    near(pieces[0]!.middle.deflection, -1e-3 * 2);
    near(pieces[0]!.middle.moment, 0, 1e7 * 1e-3);
  });

  test('a fixed-fixed beam whose right end settles by Δ takes 6EIΔ/L²', () => {
    const settled: Restraint = { kind: 'rigid', movement: -0.01 };
    const { reactions } = solveStiffness(beam(4, [support(0, HELD, HELD), support(4, settled, HELD)], []));
    near(reactions[0]!.moment, (6 * 1e7 * 0.01) / 16);
    near(reactions[1]!.vertical, (-12 * 1e7 * 0.01) / 64);
  });

  test('a prop on a spring carries (3wL/8) / (1 + 3EI/kL³)', () => {
    const [L, w, k] = [5, 3000, 2e5];
    const { reactions } = solveStiffness(
      beam(
        L,
        [support(0, HELD, HELD), support(L, { kind: 'spring', stiffness: k, movement: 0 })],
        [uniform(w, 0, L)],
      ),
    );
    near(reactions[1]!.vertical, (3 * w * L) / 8 / (1 + (3 * 1e7) / (k * L ** 3)));
  });

  test('a hinge passes no moment, and the couple beside it turns only its own side', () => {
    const { pieces, reactions } = solveStiffness(
      beam(8, [support(0, HELD, HELD), support(8)], [uniform(2000, 5, 8)], { hinges: [5] }),
    );
    near(reactions[1]!.vertical, 3000);
    near(pieces[0]!.right.moment, 0, 3000 * 5);
    near(reactions[0]!.moment, 3000 * 5);
    expect(pieces[0]!.right.slope).not.toBe(pieces[1]!.left.slope);
  });

  test.each([1e-2, 1e-4, 1e-6])(
    'two supports %f of the beam apart still give the three-moment answer',
    (part) => {
      const [L, w] = [7, 3000];
      const e = part * L;
      const { pieces } = solveStiffness(
        beam(e + L, [support(0), support(e), support(e + L)], [uniform(w, 0, e + L)]),
      );
      const want = (-w * (e ** 3 + (e + L - e) ** 3)) / (8 * (e + L));
      near(pieces[0]!.right.moment, want, 4 * Math.abs(want));
      near(pieces[1]!.left.moment, want, 4 * Math.abs(want));
    },
  );

  test('points without effect, 1e-4 to 1e-7 of the beam apart, change nothing', () => {
    const L = 6;
    const marks = [1e-4, 1e-5, 1e-6, 1e-7].flatMap((part) => [2 + part * L, 4 - part * L]);
    const { reactions } = solveStiffness(
      beam(
        L,
        [support(0, HELD, HELD), support(L)],
        [uniform(1000, 0, L), ...marks.map((at): Load => ({ kind: 'point', at, p: 0 }))],
      ),
    );
    near(reactions[1]!.vertical, 2250);
  });

  test('loads and curvatures that overlap, meet, and leave gaps act as each does alone', () => {
    const L = 10;
    const loads: Load[] = [
      { kind: 'line', from: 1, to: 4, w0: 0.1, w1: 1e6 },
      { kind: 'line', from: 4, to: 7, w0: 300, w1: -700 },
      { kind: 'line', from: 2, to: 6, w0: 1 / 3, w1: 2 / 3 },
      { kind: 'line', from: 8, to: 8, w0: 1e9, w1: 1e9 },
      { kind: 'curvature', from: 3, to: 9, kappa: 1e-3 },
      { kind: 'curvature', from: 5, to: 6, kappa: -2e-3 },
      { kind: 'curvature', from: 7, to: 7, kappa: 1 },
    ];
    const supports = [support(0, HELD, HELD), support(L)];
    const marks = [1, 2, 3, 4, 5, 6, 7, 8, 9].map((at): Load => ({ kind: 'point', at, p: 0 }));
    const all = solveStiffness(beam(L, supports, [...loads, ...marks]));
    const each = loads.map((load) => solveStiffness(beam(L, supports, [load, ...marks])));
    all.pieces.forEach(({ middle }, k) => {
      for (const quantity of ['shear', 'moment', 'slope', 'deflection'] as const) {
        const parts = each.map(({ pieces }) => pieces[k]!.middle[quantity]);
        const sum = parts.reduce((total, part) => total + part, 0);
        near(middle[quantity], sum, 100 * Math.max(...parts.map(Math.abs)));
      }
    });
  });

  test('a load on a support goes straight into it', () => {
    const { reactions, pieces } = solveStiffness(
      beam(4, [support(0), support(2), support(4)], [{ kind: 'point', at: 2, p: 5000 }]),
    );
    near(reactions[1]!.vertical, 5000);
    near(pieces[0]!.right.moment, 0, 5000);
  });

  test('a beam that nothing stops is a SingularStiffness, loaded or not', () => {
    expect(() => solveStiffness(beam(4, [support(0)], []))).toThrow(SingularStiffness);
    expect(() =>
      solveStiffness(beam(6, [support(0, HELD, HELD), support(6, HELD, HELD)], [], { hinges: [1, 3, 5] })),
    ).toThrow(SingularStiffness);
  });
});
