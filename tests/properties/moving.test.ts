import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import {
  absoluteMoment,
  type Direction,
  type InfluenceQuantity,
  influenceLine,
  type Wheel,
  worstTrain,
} from '@/engine/influence/index';
import type { Beam } from '@/engine/model/index';
import { evaluate, magnitude, type Piecewise } from '@/engine/polynomial/index';
import { dice } from '../support/random';
import { anyBeam, runs } from '../support/stable-beam';

const DIRECTIONS: readonly Direction[] = ['right', 'left'];

/** One to five wheels, the spacings often those of the beam's own points, so that two meet breaks at once. */
function trainFor({ length, supports }: Beam, seed: number): Wheel[] {
  const roll = dice(seed);
  const gaps = supports.slice(1).map(({ at }, k) => Math.abs(at - supports[k]!.at));
  let offset = 0;
  return Array.from({ length: roll.whole(1, 5) }, (_, i) => {
    if (i > 0)
      offset += roll.chance(0.3) && gaps.length > 0 ? roll.pick(gaps) : roll.logBetween(0.01, 0.7) * length;
    return { offset, force: roll.logBetween(0.2, 5) * 1e4 };
  });
}

const wheelsAt = (wheels: readonly Wheel[], direction: Direction, front: number): number[] =>
  wheels.map(({ offset }) => (direction === 'right' ? front - offset : front + offset));

const isOn = (x: number, { length }: Beam) => x >= 0 && x <= length;

/** Places of the front along all of the train's way. */
function fronts({ length }: Beam, wheels: readonly Wheel[], direction: Direction, count: number): number[] {
  const reach = Math.max(...wheels.map(({ offset }) => offset));
  const start = direction === 'right' ? 0 : -reach;
  return Array.from({ length: count }, (_, k) => start + ((length + reach) * (k + 0.37)) / count);
}

function effectOf(line: Piecewise, beam: Beam, wheels: readonly Wheel[], places: readonly number[]): number {
  return places.reduce((sum, x, i) => sum + (isOn(x, beam) ? wheels[i]!.force * evaluate(line, x)[0] : 0), 0);
}

/** The beam under the wheels that are on it, and nothing else. */
function under(beam: Beam, wheels: readonly Wheel[], places: readonly (number | null)[]) {
  const loads = places.flatMap((at, i) =>
    at !== null && isOn(at, beam) ? [{ kind: 'point', at, p: wheels[i]!.force } as const] : [],
  );
  const still = beam.supports.map((support) => ({
    ...support,
    vertical: support.vertical.kind === 'free' ? support.vertical : { ...support.vertical, movement: 0 },
    rotation: support.rotation.kind === 'free' ? support.rotation : { ...support.rotation, movement: 0 },
  }));
  return solveBeam({ ...beam, supports: still, loads });
}

function sectionOf(beam: Beam, seed: number): Exclude<InfluenceQuantity, { kind: 'reaction' }> {
  const at = dice(seed).between(0.05, 0.95) * beam.length;
  const kind = dice(seed + 1).pick(['shear', 'moment', 'deflection'] as const);
  return kind === 'deflection' ? { kind, at } : { kind, at, side: 'right' };
}

describe('a train of wheels on any beam', { timeout: 60_000 }, () => {
  test('is never worse anywhere than at its worst, and is as bad there', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        const quantity = sectionOf(beam, seed);
        const { line } = influenceLine(beam, quantity);
        const wheels = trainFor(beam, seed);
        const total = wheels.reduce((sum, { force }) => sum + force, 0);
        const limit = 1e-9 * magnitude(line) * total;
        const { max, min } = worstTrain(line, wheels, DIRECTIONS);
        for (const direction of DIRECTIONS) {
          for (const front of fronts(beam, wheels, direction, 300)) {
            const effect = effectOf(line, beam, wheels, wheelsAt(wheels, direction, front));
            expect(effect).toBeLessThanOrEqual(max.value + limit);
            expect(effect).toBeGreaterThanOrEqual(min.value - limit);
          }
        }
        for (const { value, wheels: places } of [max, min]) {
          if (quantity.kind === 'deflection') {
            const solved = evaluate(under(beam, wheels, places).diagrams.deflection, quantity.at)[0];
            expect(Math.abs(solved - value)).toBeLessThanOrEqual(limit);
          } else {
            const sides = evaluate(under(beam, wheels, places).diagrams[quantity.kind], quantity.at);
            expect(Math.min(...sides.map((side) => Math.abs(side - value)))).toBeLessThanOrEqual(limit);
          }
        }
      }),
      runs(60),
    );
  });

  test('makes nowhere and never a moment beyond the absolute ones, and makes those', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        if (beam.supports.length > 7) return;
        const wheels = trainFor(beam, seed);
        const { max, min } = absoluteMoment(beam, wheels, DIRECTIONS);
        const limit = 1e-9 * Math.max(max.value, -min.value);
        for (const direction of DIRECTIONS) {
          for (const front of fronts(beam, wheels, direction, 25)) {
            const { moment } = under(beam, wheels, wheelsAt(wheels, direction, front)).extremes;
            expect(moment.max.value).toBeLessThanOrEqual(max.value + limit);
            expect(moment.min.value).toBeGreaterThanOrEqual(min.value - limit);
          }
        }
        for (const [extreme, side] of [
          [max, 'max'],
          [min, 'min'],
        ] as const) {
          const { value } = under(beam, wheels, extreme.wheels).extremes.moment[side];
          expect(Math.abs(value - extreme.value)).toBeLessThanOrEqual(limit);
        }
      }),
      runs(40),
    );
  });
});
