import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { prepareBeam, stationPositions } from '@/engine/beam/index';
import {
  type EnvelopeTask,
  QUANTITIES,
  readEnvelope,
  SuperposedBeam,
  solveSources,
} from '@/engine/envelope/index';
import { evaluate } from '@/engine/polynomial/index';
import { dice } from '../support/random';
import { randomBeam } from '../support/random-beam';
import { runs } from '../support/stable-beam';

/** The first stable, loaded beam of the series from `seed`, its loads in three groups, two of them patterned. */
function fromSeed(first: number): EnvelopeTask {
  for (let seed = first; ; seed++) {
    const document = randomBeam(seed);
    const roll = dice(seed);
    const loads = document.loads!.map((load, i) => ({ ...load, group: ['G', 'Q', 'S'][i % 3]! }));
    const task = readEnvelope({
      ...document,
      loads: [
        ...loads,
        { kind: 'line', from: 0, to: document.length, w0: roll.logBetween(1e2, 1e5), w1: 0, group: 'Q' },
      ],
      combinations: [
        { name: '1', factors: { G: 1.35, Q: 1.5 } },
        { name: '2', factors: { G: 0.9, Q: roll.between(-1, 2), S: 1.5 } },
        { name: '3', factors: { G: 1.35, S: roll.between(-1, 2) } },
      ],
      patterns: ['Q', 'S'],
    });
    if (task.ok) return task.value;
  }
}

const anyTask = fc.integer({ min: 1, max: 1_000_000 }).map(fromSeed);

describe('the outline of an envelope', { timeout: 60_000 }, () => {
  test('goes through the values at any position, and its top and bottom are the extremes', () => {
    fc.assert(
      fc.property(anyTask, ({ beam, sources, combinations }) => {
        const elementary = solveSources(prepareBeam(beam), sources).map(({ solution }) => solution);
        const superposed = new SuperposedBeam(sources, elementary);
        // Not on a break, where a jump has two sides.
        const positions = stationPositions(beam, 38).map((x) => x * 0.9973 + 0.00131 * beam.length);
        const { stations, extremes } = superposed.envelope(combinations, positions);
        for (const quantity of QUANTITIES) {
          const { max, min } = extremes[quantity];
          const size = Math.max(Math.abs(max.value), Math.abs(min.value));
          const { upper, lower } = superposed.outline(quantity, combinations);
          expect([upper.breaks[0], upper.breaks.at(-1)]).toEqual([0, beam.length]);
          for (const { x, [quantity]: range } of stations) {
            expect(Math.abs(evaluate(upper, x)[0] - range.max.value)).toBeLessThanOrEqual(1e-8 * size);
            expect(Math.abs(evaluate(lower, x)[0] - range.min.value)).toBeLessThanOrEqual(1e-8 * size);
          }
          const tops = max.at.map((x) => Math.max(...evaluate(upper, x)));
          for (const top of tops) expect(Math.abs(top - max.value)).toBeLessThanOrEqual(1e-8 * size);
        }
      }),
      runs(40),
    );
  });
});
