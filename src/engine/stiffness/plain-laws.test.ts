import { describe, expect, test } from 'vitest';
import { exactBeams } from '../../../tests/support/exact-beams';
import { stableBeam } from '../../../tests/support/stable-beam';
import type { Beam, Load, Restraint, Support } from '../model/index';
import { PlainStiffness } from './index';

const unhinged = exactBeams()
  .map(({ name, document }) => ({ name, beam: stableBeam(document) }))
  .filter(({ beam }) => beam.hinges.length === 0);

/** Reactions, and V, M, ψ and v inside the ends of every element. */
const answer = ({ vertical, moment, elements, element }: PlainStiffness, { supports }: Beam): number[] => [
  ...vertical.slice(0, supports.length),
  ...moment.slice(0, supports.length),
  ...element.slice(0, elements).flatMap(({ left, right }) => [...left, ...right]),
];

describe('PlainStiffness', () => {
  test.each(unhinged)('adds up loads and movements: $name', ({ beam }) => {
    const plain = new PlainStiffness();
    plain.take(beam);
    const solved = (...given: Parameters<PlainStiffness['solve']>) => {
      plain.solve(...given);
      return answer(plain, beam);
    };
    const whole = solved();
    const parts = [solved([], true), ...beam.loads.map((load) => solved([load], false))];
    const largest = Math.max(...parts.flat().map(Math.abs));
    whole.forEach((value, i) => {
      const sum = parts.reduce((total, part) => total + part[i]!, 0);
      expect(Math.abs(sum - value)).toBeLessThanOrEqual(1e-12 * largest);
    });
  });

  test('answers alike whatever it solved before', () => {
    const used = new PlainStiffness();
    for (const { beam } of unhinged) {
      const fresh = new PlainStiffness();
      for (const plain of [used, fresh]) {
        plain.take(beam);
        plain.solve();
      }
      expect(answer(used, beam)).toEqual(answer(fresh, beam));
    }
  });

  const FREE: Restraint = { kind: 'free' };
  const held = (movement = 0): Restraint => ({ kind: 'rigid', movement });
  const sprung = (stiffness: number, movement: number): Restraint => ({
    kind: 'spring',
    stiffness,
    movement,
  });
  const support = (at: number, vertical: Restraint, rotation: Restraint): Support => ({
    at,
    kind: 'free',
    vertical,
    rotation,
    horizontal: true,
  });
  const near = (actual: Iterable<number>, wanted: readonly number[], largest: number) => {
    const found = [...actual].slice(0, wanted.length);
    wanted.forEach((want, i) => {
      expect(Math.abs(found[i]! - want)).toBeLessThanOrEqual(1e-12 * largest);
    });
  };
  const solved = (supports: Support[], loads: Load[], ga: number | null = null) => {
    const plain = new PlainStiffness();
    const segments = [{ from: 0, to: 6, ei: 4e6, ga }];
    expect(plain.take({ length: 6, segments, supports, hinges: [], loads, degree: 0 })).toBe(true);
    plain.solve();
    return plain;
  };

  test('follows the ground of all its springs as a rigid body, and nothing is strained', () => {
    const [rise, turn] = [0.02, -0.003];
    const places = [0, 1.5, 4, 6];
    const { element, vertical, moment } = solved(
      places.map((at) => support(at, sprung(3e5, rise + turn * at), sprung(7e5, turn))),
      [],
    );
    near(vertical, [0, 0, 0, 0], 3e5 * rise);
    near(moment, [0, 0, 0, 0], 7e5 * Math.abs(turn));
    element.slice(0, 3).forEach(({ left, right }, k) => {
      near(left, [0, 0, turn, rise + turn * places[k]!], 1e3);
      near(right, [0, 0, turn, rise + turn * places[k + 1]!], 1e3);
    });
  });

  test('gives a couple on a support that cannot turn to that support alone', () => {
    const roots = [0, 2, 6].map((at) => support(at, held(), held()));
    const { vertical, moment } = solved(roots, [{ kind: 'couple', at: 2, m: 900 }]);
    near(vertical, [0, 0, 0], 900);
    near(moment, [0, -900, 0], 900);
  });

  test('bends a cantilever under a couple at a to Ma(L − a/2)/EI, whatever its GA', () => {
    const [m, a, L, ei] = [900, 2.2, 6, 4e6];
    for (const ga of [null, 3e5]) {
      const { element, vertical, moment } = solved(
        [support(0, held(), held())],
        [{ kind: 'couple', at: a, m }],
        ga,
      );
      near(vertical, [0], m / L);
      near(moment, [-m], m);
      const tip = (m * a * (L - a / 2)) / ei;
      near(element[0]!.right, [0, 0, (m * a) / ei, tip], 1e-3 * m);
      expect(element[0]!.right[3]! / tip).toBeCloseTo(1, 12);
      expect(element[0]!.right[2]! / ((m * a) / ei)).toBeCloseTo(1, 12);
    }
  });

  test('takes no beam with hinges, and no mechanism', () => {
    const beam: Beam = {
      length: 4,
      segments: [{ from: 0, to: 4, ei: 1e7, ga: null }],
      supports: [support(0, held(), FREE), support(4, held(), FREE)],
      hinges: [],
      loads: [],
      degree: 0,
    };
    const plain = new PlainStiffness();
    expect(plain.take(beam)).toBe(true);
    expect(plain.take({ ...beam, hinges: [2] })).toBe(false);
    expect(plain.take({ ...beam, supports: beam.supports.slice(1) })).toBe(false);
  });
});
