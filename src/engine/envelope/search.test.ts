import { describe, expect, test } from 'vitest';
import type { Combination } from '../combination/index';
import { type Piecewise, piecewise } from '../polynomial/index';
import { Adverse, casesOf } from './cases';
import { curvesOf } from './curves';
import { ExtremeSearch } from './search';
import type { Source } from './sources';

const always = (group: string): Source => ({ group, span: null, loads: [] });
const onSpan = (group: string, span: number): Source => ({ group, span, loads: [] });
const factors = (name: string, of: Record<string, number>): Combination => ({ name, factors: of });

/** The extremes of what the sources give by the curves, over the combinations. */
function extremesOf(
  sources: readonly Source[],
  curves: readonly Piecewise[],
  combinations: readonly Combination[],
) {
  const search = new ExtremeSearch(new Adverse(casesOf(sources, combinations)));
  search.take(curvesOf(curves));
  return search.extremes();
}

const once = [factors('once', { G: 1 })];

describe('ExtremeSearch', () => {
  test('adds what always acts to the adverse span: 3 − x + 8 x (1 − x) comes to 145/32', () => {
    // 3 + 7x − 8x² turns at 7/16; what is least is at the end, with no span loaded: 3 − 1.
    const { max, min } = extremesOf(
      [always('G'), onSpan('Q', 0)],
      [piecewise([0, 1], [[3, -1]]), piecewise([0, 1], [[0, 4, -4]])],
      [factors('without', { G: 1 }), factors('both', { G: 1, Q: 2 })],
    );
    expect(max).toEqual({
      value: expect.closeTo(3 + 49 / 32, 12),
      at: [expect.closeTo(7 / 16, 12)],
      combination: 1,
      pattern: [0],
    });
    expect(min).toEqual({ value: 2, at: [1], combination: 0, pattern: [] });
  });

  test('lets the groups of a span act together: 2 of one and −3 of the other are not worth their span', () => {
    const { max, min } = extremesOf(
      [onSpan('Q', 0), onSpan('S', 0), onSpan('Q', 1)],
      [2, -3, 1].map((value) => piecewise([0, 1], [[value]])),
      [factors('both', { Q: 1, S: 1 })],
    );
    expect(max).toMatchObject({ value: 1, pattern: [1] });
    expect(min).toMatchObject({ value: -1, pattern: [0] });
  });

  test('turns the spans over where a factor is less than nothing', () => {
    const { max, min } = extremesOf(
      [onSpan('W', 0), onSpan('W', 1)],
      [5, -2].map((value) => piecewise([0, 1], [[value]])),
      [factors('suction', { W: -1 })],
    );
    expect(max).toMatchObject({ value: 2, pattern: [1] });
    expect(min).toMatchObject({ value: -5, pattern: [0] });
  });

  test('names the first of combinations that come to the same', () => {
    const same = ['one', 'two', 'three'].map((name) => factors(name, { G: 1 }));
    const { max, min } = extremesOf([always('G')], [piecewise([0, 1], [[0, 4, -4]])], same);
    expect([max.combination, min.combination]).toEqual([0, 0]);
    expect([max.value, max.at, min.value, min.at]).toEqual([1, [0.5], 0, [0, 1]]);
  });

  test('takes a turning point a hair beside a break for the break', () => {
    // 1 − ((s − d)/h)² on a piece of h = 1e-6, d = 3.2e-12 short of its end: 1 − 1e-11 there.
    const [h, d] = [1e-6, 1e-6 - 3.2e-12];
    const peak = [1 - (d / h) ** 2, (2 * d) / h ** 2, -1 / h ** 2];
    const { max } = extremesOf([always('G')], [piecewise([0, 1, 1 + h, 2], [[0], peak, [0]])], once);
    expect(max.value).toBeCloseTo(1, 9);
    expect(max.at).toEqual([1 + h]);
  });

  test('keeps breaks apart that lie closer than a turning point may', () => {
    const breaks = [0, 1, 1 + 1e-10, 2];
    const { max } = extremesOf([always('G')], [piecewise(breaks, [[1], [1], [1]])], once);
    expect(max.at).toEqual(breaks);
  });

  test('refuses sources with breaks of their own', () => {
    const curves = [piecewise([0, 1, 2], [[1], [1]]), piecewise([0, 1.5, 2], [[1], [1]])];
    expect(() => extremesOf([always('G'), always('Q')], curves, once)).toThrow(RangeError);
    const fewer = [piecewise([0, 1, 2], [[1], [1]]), piecewise([0, 1, 2, 3], [[1], [1], [1]])];
    expect(() => extremesOf([always('G'), always('Q')], fewer, once)).toThrow(RangeError);
  });
});
