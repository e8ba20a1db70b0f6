import { describe, expect, test } from 'vitest';
import { type Beam, type BeamDocument, type Load, readBeam, type SupportDocument } from '../model/index';
import { PlainStiffness } from './index';

const EI = 2e7;
const GA = 3e7;
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

function beamOf(
  length: number,
  supports: SupportDocument[],
  loads: Load[],
  more: Partial<BeamDocument> = {},
): Beam {
  const stiffness = more.segments ? {} : { ei: EI };
  const reading = readBeam({ length, ...stiffness, supports, loads, horizontal: 'ignore', ...more });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

function solved(...of: Parameters<typeof beamOf>): PlainStiffness {
  const check = new PlainStiffness();
  expect(check.take(beamOf(...of))).toBe(true);
  check.solve();
  return check;
}

/** Our own algebra: within 1e-12 of the scale, the value's own unless said otherwise. */
const near = (got: number, want: number, scale = Math.abs(want)) =>
  expect(Math.abs(got - want)).toBeLessThanOrEqual(1e-12 * scale);

describe('plain direct stiffness', () => {
  const [L, w, P] = [6, 5000, 9000];

  test('its elements reach from support to support and to the steps', () => {
    const segments = [
      { from: 0, to: 2, ei: 1 },
      { from: 2, to: 9, ei: 3, ga: 5 },
    ];
    const { elements, element } = solved(9, [roller(7), roller(1)], [{ kind: 'point', at: 4, p: 1 }], {
      segments,
    });
    expect(element.slice(0, elements).map(({ from }) => from)).toEqual([0, 1, 2, 7]);
    expect(element.slice(0, elements).map(({ length }) => length)).toEqual([1, 1, 5, 2]);
    expect(element.slice(0, elements).map(({ ei }) => ei)).toEqual([1, 1, 3, 3]);
    expect(element.slice(0, elements).map(({ phi }) => phi)).toEqual([0, 0, 36 / 125, 36 / 20]);
  });

  test('propped cantilever with overhang: the prop carries 3wL/8 + wa + 3wa²/4L', () => {
    const a = 1.8;
    const { vertical, moment } = solved(
      L + a,
      [fixed(0), roller(L)],
      [{ kind: 'line', from: 0, to: L + a, w0: w, w1: w }],
    );
    near(vertical[1]!, (3 * w * L) / 8 + w * a + (3 * w * a * a) / (4 * L));
    near(moment[0]!, (w * L * L) / 8 - (w * a * a) / 4, w * L * L);
    expect(moment[1]).toBe(0);
  });

  test('fixed ends: Pab²/L² and Pa²b/L²; wL²/30 and wL²/20 of a rising load; Mb(2a − b)/L² of a couple', () => {
    const [a, b] = [2, 4];
    const point = solved(L, [fixed(0), fixed(L)], [{ kind: 'point', at: a, p: P }]);
    near(point.moment[0]!, (P * a * b * b) / L ** 2);
    near(point.moment[1]!, (-P * a * a * b) / L ** 2);
    near(point.vertical[0]!, (P * b * b * (3 * a + b)) / L ** 3);
    const rising = solved(L, [fixed(0), fixed(L)], [{ kind: 'line', from: 0, to: L, w0: 0, w1: w }]);
    near(rising.moment[0]!, (w * L ** 2) / 30);
    near(rising.moment[1]!, (-w * L ** 2) / 20);
    const [c, d] = [1, 5];
    const couple = solved(L, [fixed(0), fixed(L)], [{ kind: 'couple', at: c, m: P }]);
    near(couple.moment[0]!, (P * d * (2 * c - d)) / L ** 2);
    near(couple.moment[1]!, (P * c * (2 * d - c)) / L ** 2);
    near(couple.vertical[0]!, (6 * P * c * d) / L ** 3);
  });

  test('a part of a span loaded: the simple span’s reactions by statics, the tip of a cantilever by integration', () => {
    const part: Load = { kind: 'line', from: 1, to: 4, w0: 2 * w, w1: w };
    const { vertical } = solved(L, [roller(0), roller(L)], [part]);
    const [force, about] = [4.5 * w, 2 * w * 3 * 2.5 - (w * 3 * 3) / 2]; // trapezoid: 2w over 3, less a triangle at its right
    near(vertical[1]!, about / L, w * L);
    near(vertical[0]! + vertical[1]!, force);
    // ∫ q x² (3L − x)/6EI dx of q = (7 − x) w/3 from 1 to 4, worked out as fractions
    const tip = solved(L, [fixed(0)], [part]).element[0]!.right[3]!;
    let want = 0;
    const n = 20000;
    for (let k = 0; k < n; k++) {
      const x = 1 + (3 * (k + 0.5)) / n;
      want -= (((7 - x) * w) / 3) * ((x * x * (3 * L - x)) / (6 * EI)) * (3 / n);
    }
    expect(Math.abs(tip / want - 1)).toBeLessThan(1e-8);
  });

  test('a load over several elements, and one of no length', () => {
    const supports = [roller(0), roller(2), roller(6)];
    const { vertical } = solved(6, supports, [
      { kind: 'line', from: 0, to: 6, w0: w, w1: w },
      { kind: 'line', from: 3, to: 3, w0: w, w1: w },
      { kind: 'curvature', from: 5, to: 5, kappa: 1 },
    ]);
    // Three moments: M (2 + 4)/3 = −w(2³ + 4³)/24
    const M = (-w * (8 + 64)) / 48;
    near(vertical[0]!, w + M / 2);
    near(vertical[1]!, 3 * w - M / 2 - M / 4);
    near(vertical[2]!, 2 * w + M / 4);
  });

  test('shear: a cantilever sags wL⁴/8EI + wL²/2GA, a triangular one 11wL⁴/120EI + wL²/3GA; a sunk end 6EIδ/L²(1 + Φ)', () => {
    const uniform = solved(L, [fixed(0)], [{ kind: 'line', from: 0, to: L, w0: w, w1: w }], { ga: GA });
    near(uniform.element[0]!.right[3]!, -((w * L ** 4) / (8 * EI) + (w * L ** 2) / (2 * GA)));
    const rising = solved(L, [fixed(0)], [{ kind: 'line', from: 0, to: L, w0: 0, w1: w }], { ga: GA });
    near(rising.element[0]!.right[3]!, -((11 * w * L ** 4) / (120 * EI) + (w * L ** 2) / (3 * GA)));
    const sunk = solved(L, [fixed(0), fixed(L, { rise: -0.01 })], [], { ga: GA });
    near(sunk.moment[0]!, (6 * EI * 0.01) / (L ** 2 * (1 + (12 * EI) / (GA * L ** 2))));
    const point = solved(L, [fixed(0)], [{ kind: 'point', at: 2, p: P }], { ga: GA });
    near(point.element[0]!.right[3]!, -((P * 4 * (3 * L - 2)) / (6 * EI) + (P * 2) / GA));
    const couple = solved(L, [fixed(0)], [{ kind: 'couple', at: 2, m: P }], { ga: GA });
    near(couple.element[0]!.right[2]!, (P * 2) / EI);
  });

  test('imposed curvature on a part: a cantilever turns κc and rises with it, and carries nothing', () => {
    const { element, vertical, moment } = solved(
      L,
      [fixed(0)],
      [{ kind: 'curvature', from: 1, to: 3, kappa: 1e-3 }],
    );
    near(element[0]!.right[2]!, 2e-3);
    near(element[0]!.right[3]!, 2e-3 * 4);
    near(vertical[0]!, 0, (EI * 1e-3) / L);
    near(moment[0]!, 0, EI * 1e-3);
    near(
      solved(L, [fixed(0), fixed(L)], [{ kind: 'curvature', from: 0, to: L, kappa: 1e-3 }]).element[0]!
        .left[1]!,
      -EI * 1e-3,
    );
  });

  test('movements: 3EIδ/L³, 4EIθ/L, a sprung ground; and left out where asked', () => {
    const sunk = solved(L, [fixed(0), roller(L, { rise: -0.01 })], []);
    near(sunk.vertical[1]!, (-3 * EI * 0.01) / L ** 3);
    const turned = solved(L, [fixed(0, { rotation: 0.002 }), fixed(L)], []);
    near(turned.moment[0]!, (4 * EI * 0.002) / L);
    near(turned.moment[1]!, (2 * EI * 0.002) / L);
    const k = 4e5;
    const ground: SupportDocument = { at: L, kind: 'free', kv: k, rise: -0.01 };
    const sprung = solved(L, [fixed(0), ground], []);
    near(sprung.vertical[1]!, -0.01 / (1 / k + L ** 3 / (3 * EI)));
    const kr = 3e6;
    const twisted = solved(L, [roller(0, { kr, rotation: 0.01 }), roller(L)], []);
    near(twisted.moment[0]!, 0.01 / (1 / kr + L / (3 * EI)));
    sunk.solve([], false);
    expect([...sunk.vertical.subarray(0, 2)]).toEqual([0, 0]);
    sprung.solve([], false);
    expect([...sprung.vertical.subarray(0, 2)]).toEqual([0, 0]);
  });

  test('loads on nodes go into the supports there, and free ones carry nothing', () => {
    const supports: SupportDocument[] = [{ at: 3, kind: 'free' }, fixed(0), roller(L)];
    const { vertical, moment, node } = solved(L, supports, [
      { kind: 'point', at: 0, p: P },
      { kind: 'couple', at: 0, m: 70 },
      { kind: 'point', at: L, p: 40 },
    ]);
    expect([...node.subarray(0, 3)]).toEqual([1, 0, 2]);
    expect([...vertical.subarray(0, 3)]).toEqual([0, P, 40]);
    expect([...moment.subarray(0, 3)]).toEqual([0, -70, 0]);
  });

  test('another beam in the same memory, larger and smaller, as in its own', () => {
    const check = new PlainStiffness();
    for (const spans of [1, 30, 2]) {
      const supports = Array.from({ length: spans + 1 }, (_, k) => roller(k));
      const beam = beamOf(spans, supports, [{ kind: 'line', from: 0, to: spans, w0: w, w1: w }]);
      const fresh = new PlainStiffness();
      fresh.take(beam);
      fresh.solve();
      check.take(beam);
      check.solve();
      expect([...check.vertical.subarray(0, spans + 1)]).toEqual([...fresh.vertical.subarray(0, spans + 1)]);
    }
  });

  test('hinges, and a stiffness that doubles cannot factorise, are refused', () => {
    const check = new PlainStiffness();
    expect(check.take({ ...beamOf(L, [fixed(0), roller(L)], []), hinges: [3] })).toBe(false);
    const floating: SupportDocument[] = [0, 3, 6].map((at) => ({ at, kind: 'free', kv: 1e-9 }));
    expect(check.take(beamOf(L, floating, [], { ei: 1e14 }))).toBe(false);
  });
});
