import { describe, expect, test } from 'vitest';
import { type ExactBeam, exactBeams } from '../../../tests/support/exact-beams';
import { stableBeam } from '../../../tests/support/stable-beam';
import type { Beam } from '../model/index';
import { PlainStiffness, type State, solveStiffness } from './index';

/** V, M, θ and v, or a reaction's force and couple: what was found, and sympy's. */
type Found = { kind: 'shear' | 'moment' | 'slope' | 'deflection'; actual: number; exact: number };

type SolvedBeam = ExactBeam & { beam: Beam };

const beams: SolvedBeam[] = exactBeams().map((one) => ({ ...one, beam: stableBeam(one.document) }));

function statesOf({ exact }: ExactBeam, i: number, side: 0 | 1, { shear, moment, slope, deflection }: State) {
  return [
    { kind: 'shear', actual: shear, exact: exact.shear[2 * i + side]! },
    { kind: 'moment', actual: moment, exact: exact.moment[2 * i + side]! },
    { kind: 'slope', actual: slope, exact: exact.slope[2 * i + side]! },
    { kind: 'deflection', actual: deflection, exact: exact.deflection[i]! },
  ] satisfies Found[];
}

/**
 * All values within a part of the largest exact one of their kind, reactions beside shear and moment; of the moment that
 * holds the free curvature, EI κ, where there is none.
 */
function expectExact({ exact, beam }: SolvedBeam, found: readonly Found[], within: number): void {
  const largest = (...lists: number[][]) => Math.max(0, ...lists.flat().map(Math.abs));
  const held = beam.loads.map((load) => (load.kind === 'curvature' ? load.kappa * beam.segments[0]!.ei : 0));
  const moment = largest(exact.couple, exact.moment) || largest(held);
  const scales = {
    shear: largest(exact.force, exact.shear) || moment / beam.length,
    moment,
    slope: largest(exact.slope),
    deflection: largest(exact.deflection),
  };
  for (const { kind, actual, exact: want } of found)
    expect(Math.abs(actual - want), kind).toBeLessThanOrEqual(within * scales[kind]);
}

describe('solveStiffness has sympy’s rationals to the last digit', () => {
  test.each(beams)('$name', (one) => {
    const { pieces, reactions } = solveStiffness(one.beam);
    const at = (x: number) => one.positions.findIndex((position) => Math.abs(position - x) < 1e-12);
    const found = pieces.flatMap(({ from, to, left, middle, right }) => [
      ...statesOf(one, at(from), 1, left),
      ...statesOf(one, at((from + to) / 2), 1, middle),
      ...statesOf(one, at(to), 0, right),
    ]);
    const held = reactions.flatMap(({ vertical, moment }, i): Found[] => [
      { kind: 'shear', actual: vertical, exact: one.exact.force[i]! },
      { kind: 'moment', actual: moment, exact: one.exact.couple[i]! },
    ]);
    expectExact(one, [...found, ...held], 1e-15);
  });
});

describe('PlainStiffness has them to the digits that doubles leave', () => {
  const plain = new PlainStiffness();
  const fit = beams.filter(({ beam }) => beam.hinges.length === 0);

  const states = (one: SolvedBeam): Found[] =>
    plain.element.slice(0, plain.elements).flatMap(({ from, length, left, right }) => {
      const { ga } = one.beam.segments.find(({ to }) => to >= from + length)!;
      // ψ = θ + V/GA
      const state = ([shear, moment, psi, deflection]: Float64Array): State => ({
        shear: shear!,
        moment: moment!,
        slope: psi! - (ga === null ? 0 : shear! / ga),
        deflection: deflection!,
      });
      return [
        ...statesOf(one, one.positions.indexOf(from), 1, state(left)),
        ...statesOf(one, one.positions.indexOf(from + length), 0, state(right)),
      ];
    });
  const held = ({ exact, beam }: SolvedBeam): Found[] =>
    beam.supports.flatMap((_, i): Found[] => [
      { kind: 'shear', actual: plain.vertical[i]!, exact: exact.force[i]! },
      { kind: 'moment', actual: plain.moment[i]!, exact: exact.couple[i]! },
    ]);

  test.each(fit)('$name', (one) => {
    expect(plain.take(one.beam)).toBe(true);
    plain.solve();
    expectExact(one, [...states(one), ...held(one)], 1e-12);
  });

  test('of beams that it has not seen before, too', () => {
    for (const one of fit) {
      const fresh = new PlainStiffness();
      fresh.take(one.beam);
      fresh.solve();
      one.beam.supports.forEach((_, i) => {
        expect(fresh.vertical[i]).toBe(plainly(one.beam).vertical[i]);
      });
    }
  });

  const plainly = (beam: Beam) => {
    plain.take(beam);
    plain.solve();
    return plain;
  };
});
