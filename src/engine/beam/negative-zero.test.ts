import { describe, expect, test } from 'vitest';
import { exactBeams } from '../../../tests/support/exact-beams';
import { stableBeam } from '../../../tests/support/stable-beam';
import { forceMethod, solveBeam, stationsAt, tipParts } from './index';

const beams = exactBeams();

describe('nothing is −0', () => {
  /** Where the value of any number in it is −0. */
  function negativeZeros(value: unknown, path = ''): string[] {
    if (typeof value === 'number') return Object.is(value, -0) ? [path] : [];
    if (typeof value !== 'object' || value === null) return [];
    const entries: [string, unknown][] = ArrayBuffer.isView(value)
      ? Array.from(value as Float64Array, (x, i) => [String(i), x])
      : Object.entries(value);
    return entries.flatMap(([key, one]) => negativeZeros(one, `${path}.${key}`));
  }

  test.each(beams)('in $name', ({ document, positions }) => {
    const beam = stableBeam(document);
    const solution = solveBeam(beam);
    const { released: _, ...parts } = forceMethod(beam);
    const found = {
      solution,
      parts,
      tips: tipParts(beam, solution),
      stations: stationsAt(solution, positions),
    };
    expect(negativeZeros(found)).toEqual([]);
  });

  test('even where a station is asked for at −0', () => {
    const beam = stableBeam(beams[0]!.document);
    expect(stationsAt(solveBeam(beam), [-0])[0]!.x).toBe(0);
  });
});
