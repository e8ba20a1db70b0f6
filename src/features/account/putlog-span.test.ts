import { expect, test } from 'vitest';
import { spanMoments } from './putlog-span';

test('boards over the whole span give wL²/8 at midspan', () => {
  // AISC Manual, table 3-23, case 1 (from memory): M = wL²/8
  const { reactionA, reactionB, largest } = spanMoments({ span: 2, boardsFrom: 0, boardsTo: 2, load: 3 });
  expect(largest).toEqual({ x: 1, moment: 1.5 });
  expect([reactionA, reactionB]).toEqual([3, 3]);
});

test('boards at one end leave the far end straight', () => {
  // AISC Manual, table 3-23, case 5 (from memory): R1 = wa(2L − a)/2L, M = R1²/2w
  const { reactionA, reactionB, knots, largest } = spanMoments({
    span: 4,
    boardsFrom: 0,
    boardsTo: 2,
    load: 2,
  });
  expect(reactionA).toBe(3);
  expect(reactionB).toBe(1);
  expect(largest).toEqual({ x: 1.5, moment: 2.25 });
  expect(knots[2]).toEqual([2, 2]);
});

test('the parabola leaves and meets the straight parts without a kink', () => {
  const { reactionA, reactionB, knots } = spanMoments({
    span: 1.45,
    boardsFrom: 0.18,
    boardsTo: 1.325,
    load: 2.4,
  });
  const [start, middle, end] = knots;
  if (!start || !middle || !end) throw new Error('three knots expected');
  expect((middle[1] - start[1]) / (middle[0] - start[0])).toBeCloseTo(reactionA, 12);
  expect((end[1] - middle[1]) / (end[0] - middle[0])).toBeCloseTo(-reactionB, 12);
});
