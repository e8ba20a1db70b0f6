import { describe, expect, test } from 'vitest';
import { type Load, readBeam, type SupportDocument } from '../model/index';
import { actingCombinations, arrangementNamer, cutLoads, factoredLoads, groupsOf, regionsOf } from './index';

function regions(length: number, supports: SupportDocument[]) {
  const reading = readBeam({ length, ei: 1, supports, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return regionsOf(reading.value);
}

const roller = (at: number) => ({ at, kind: 'roller' as const });
const spansOf = (spans: ReturnType<typeof regions>, load: Load) =>
  cutLoads([load], spans).map(({ span, load: part }) => [
    span,
    'from' in part ? [part.from, part.to] : part.at,
  ]);

describe('pattern spans', () => {
  test('run between vertical supports, overhangs included, whatever the order of the supports', () => {
    const spans = regions(9, [roller(7), roller(3), roller(1)]);
    expect(spans.map(({ from, to, name }) => [from, to, name])).toEqual([
      [0, 1, 'overhang beyond A'],
      [1, 3, 'span A–B'],
      [3, 7, 'span B–C'],
      [7, 9, 'overhang beyond C'],
    ]);
  });

  test('end at springs as well, and not at what slides up and down', () => {
    const spans = regions(8, [
      { at: 0, kind: 'fixed' },
      { at: 3, kind: 'free', kv: 1e6 },
      { at: 5, kind: 'guided' },
      roller(8),
    ]);
    expect(spans.map(({ from, to }) => [from, to])).toEqual([
      [0, 3],
      [3, 8],
    ]);
  });

  test('of a cantilever is one, the overhang', () => {
    expect(regions(2, [{ at: 0, kind: 'fixed' }])).toMatchObject([{ kind: 'overhang', from: 0, to: 2 }]);
  });
});

describe('cutLoads', () => {
  const spans = regions(9, [roller(0), roller(3), roller(7)]);

  test('cuts a line load where spans meet, along its own slope', () => {
    const parts = cutLoads([{ kind: 'line', from: 1, to: 9, w0: 0, w1: 16, group: 'Q' }], spans);
    expect(parts.map(({ span, load }) => [span, load])).toEqual([
      [0, { kind: 'line', from: 1, to: 3, w0: 0, w1: 4, group: 'Q' }],
      [1, { kind: 'line', from: 3, to: 7, w0: 4, w1: 12, group: 'Q' }],
      [2, { kind: 'line', from: 7, to: 9, w0: 12, w1: 16, group: 'Q' }],
    ]);
  });

  test('cuts a curvature like a line load, and drops what has no length', () => {
    expect(spansOf(spans, { kind: 'curvature', from: 2, to: 4, kappa: 1 })).toEqual([
      [0, [2, 3]],
      [1, [3, 4]],
    ]);
    expect(spansOf(spans, { kind: 'line', from: 3, to: 3, w0: 1, w1: 1 })).toEqual([]);
  });

  test.each([
    [0, 0], // a load on the first support has no span at its left
    [1, 0],
    [3, 0],
    [5, 1],
    [7, 1],
    [9, 2],
  ])('gives a point load or a couple at %s m to span %s, that at the left of a support', (at, span) => {
    expect(spansOf(spans, { kind: 'point', at, p: 1 })).toEqual([[span, at]]);
    expect(spansOf(spans, { kind: 'couple', at, m: 1 })).toEqual([[span, at]]);
  });
});

test('factored loads are those with a factor, each times it', () => {
  const loads: Load[] = [
    { kind: 'point', at: 1, p: 10, group: 'G' },
    { kind: 'couple', at: 1, m: 10, group: 'Q' },
    { kind: 'curvature', from: 0, to: 1, kappa: 10, group: 'toString' },
    { kind: 'line', from: 0, to: 1, w0: 10, w1: 20, group: 'G' },
    { kind: 'curvature', from: 0, to: 1, kappa: 4, group: 'G' },
    { kind: 'point', at: 1, p: 10 },
  ];
  expect(factoredLoads(loads, { name: '1', factors: { G: 1.5, Q: -2 } })).toEqual([
    { kind: 'point', at: 1, p: 15, group: 'G' },
    { kind: 'couple', at: 1, m: -20, group: 'Q' },
    { kind: 'line', from: 0, to: 1, w0: 15, w1: 30, group: 'G' },
    { kind: 'curvature', from: 0, to: 1, kappa: 6, group: 'G' },
  ]);
});

test('known groups come in their usual order, then others by name', () => {
  const loads = ['T', 'S', 'Q', 'crane', 'G', undefined].map((group) => ({ group }));
  expect(groupsOf(loads)).toEqual(['G', 'Q', 'S', 'crane', 'T']);
});

test('a combination is named by what acts in it, in the letters of the criteria', () => {
  const combinations = [
    { name: 'a', factors: { G: 1.2, Q: 1.6, S: 0.5 } },
    { name: 'b', factors: { G: 1.2, Q: 1.6, W: 1 } },
    { name: 'c', factors: { S: 1 } },
  ];
  expect(actingCombinations(combinations, ['G', 'Q'], { G: 'D', Q: 'L' })).toEqual([
    { name: '1.2 D + 1.6 L', factors: { G: 1.2, Q: 1.6 } },
  ]);
});

describe('an arrangement is named', () => {
  const reading = readBeam({
    length: 9,
    ei: 1,
    supports: [roller(0), roller(3), roller(7)],
    loads: [
      { kind: 'line', from: 0, to: 9, w0: 1, w1: 1, group: 'Q' },
      { kind: 'point', at: 8, p: 1, group: 'S' },
    ],
    horizontal: 'ignore',
  });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  const combinations = [
    { name: '1.35 G', factors: { G: 1.35 } },
    { name: 'G + 1.5 Q', factors: { G: 1, Q: 1.5 } },
    { name: 'G + 1.5 S', factors: { G: 1, S: 1.5 } },
  ];
  const nameOf = arrangementNamer(reading.value, ['Q', 'S'], combinations);

  test.each([
    ['G + 1.5 Q', [0, 1, 2], 'G + 1.5 Q, all spans loaded'],
    ['G + 1.5 Q', [0, 1], 'G + 1.5 Q, spans A–B and B–C loaded'],
    ['G + 1.5 Q', [1, 2], 'G + 1.5 Q, span B–C and the overhang beyond C loaded'],
    ['G + 1.5 Q', [2], 'G + 1.5 Q, overhang beyond C loaded'],
    ['G + 1.5 Q', [], 'G + 1.5 Q, no span loaded'],
    ['G + 1.5 S', [2], 'G + 1.5 S'], // its only place
    ['G + 1.5 S', [], 'G + 1.5 S, no span loaded'],
    ['1.35 G', [], '1.35 G'],
  ])('%s with %j: %s', (combination, pattern, name) => {
    expect(nameOf({ combination, pattern })).toBe(name);
  });
});
