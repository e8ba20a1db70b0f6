import { describe, expect, test } from 'vitest';
import { answerFrequency, frequencyAnswer } from './frequency';
import { answerInfluence, influenceAnswer } from './influence';
import { answerMovingLoad, movingLoadAnswer } from './moving-load';

/** A span of 10 m with an arm of 2 m. */
const beam = {
  length: 12,
  ei: '30000 kNm²',
  supports: [
    { at: 0, kind: 'pin' },
    { at: 10, kind: 'roller', rise: -0.02 },
  ],
  loads: [
    { kind: 'line', from: 0, to: 12, w0: 980.665, w1: 980.665, group: 'G' },
    { kind: 'point', at: 5, p: 5000, group: 'Q' },
  ],
};
/** A propped cantilever, one degree indeterminate. */
const propped = {
  length: 8,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 8, kind: 'roller' },
  ],
};

const moment = { kind: 'moment', at: 5 };
const wheels = [
  { offset: 0, force: '40 kN' },
  { offset: '2 m', force: 40e3 },
];

type Outcome<T> = { ok: true; answer: T } | { ok: false; errors: { pointer: string; code: string }[] };
const errorsOf = (outcome: Outcome<unknown>): string[] =>
  outcome.ok ? [] : outcome.errors.map(({ pointer, code }) => `${pointer} ${code}`);
function answerOf<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(errorsOf(outcome).join(' '));
  return outcome.answer;
}

/** Faults that every one of the three answers with at the same place. */
const SHARED: [string, object, string[]][] = [
  ['an unknown field', { lenght: 3 }, ['/lenght unknown_field']],
  ['a length without unit', { length: '12' }, ['/length unit_missing']],
  ['a span of zero', { length: 0 }, ['/length not_positive']],
  ['an unstable beam', { supports: [{ at: 3, kind: 'pin' }] }, ['/supports unstable']],
  [
    'redundants of a determinate beam',
    { redundants: [{ support: 0, component: 'vertical' }] },
    ['/redundants/0 ineligible_redundant', '/redundants wrong_count'],
  ],
];
const plain = { ...beam, loads: [] };

describe('answerInfluence', () => {
  test('answers with exactly the fields of its schema, and a line that can be recomputed', () => {
    const answer = answerOf(answerInfluence({ ...beam, quantity: moment, stations: 7 }));
    expect(influenceAnswer.parse(answer)).toEqual(answer);
    expect(answer.quantity).toEqual({ kind: 'moment', at: 5, side: 'right' });
    expect(answer.unit).toBe('N·m/N');
    expect(answer.stations.map(({ x }) => x)).toEqual([0, 2, 4, 6, 8, 10, 12]);
    const expected = [0, 1, 2, 2, 1, 0, -1]; // straight lines by hand
    answer.stations.forEach(({ value }, i) => {
      for (const side of value) expect(side).toBeCloseTo(expected[i]!, 12);
    });
    expect(answer.breaks).toEqual([0, 5, 10, 12]);
    const [constant, slope] = answer.coefficients[1]!;
    expect([constant, slope]).toEqual([expect.closeTo(2.5, 12), expect.closeTo(-0.5, 12)]);
    expect(answer.areas).toEqual([
      { from: 0, to: 10, positive: expect.closeTo(12.5, 12), negative: 0 },
      { from: 10, to: 12, positive: 0, negative: expect.closeTo(-1, 12) },
    ]);
    expect(answer.extremes.max).toEqual({ value: expect.closeTo(2.5, 12), at: [5] });
  });

  test.each<[object, string]>([
    [{ kind: 'reaction', support: 1, component: 'vertical' }, 'N/N'],
    [{ kind: 'reaction', support: 0, component: 'rotation' }, 'N·m/N'],
    [{ kind: 'shear', at: '4 m', side: 'left' }, 'N/N'],
    [{ kind: 'moment', at: 0 }, 'N·m/N'],
    [{ kind: 'deflection', at: 4 }, 'm/N'],
  ])('gives the unit of %j', (quantity, unit) => {
    expect(answerOf(answerInfluence({ ...propped, quantity })).unit).toBe(unit);
  });

  test('brings a station to the break that it coincides with, and gives both sides of a step', () => {
    const answer = answerOf(
      answerInfluence({ ...beam, quantity: { kind: 'shear', at: 5 }, stations: [5 + 1e-12] }),
    );
    expect(answer.stations[0]!.value).toEqual([expect.closeTo(-0.5, 12), expect.closeTo(0.5, 12)]);
  });

  test('is the same with redundants that are chosen', () => {
    const quantity = { kind: 'moment', at: 3 };
    const own = answerOf(answerInfluence({ ...propped, quantity }));
    const chosen = answerOf(
      answerInfluence({ ...propped, quantity, redundants: [{ support: 0, component: 'vertical' }] }),
    );
    expect(chosen.extremes.max.value).toBeCloseTo(own.extremes.max.value, 12);
  });

  test.each<[string, object, string[]]>([
    ...SHARED,
    ['no quantity', { quantity: undefined }, ['/quantity missing']],
    ['a section off the beam', { quantity: { kind: 'shear', at: 13 } }, ['/quantity/at out_of_range']],
    ['a section without unit', { quantity: { kind: 'shear', at: '3' } }, ['/quantity/at unit_missing']],
    [
      'a support that is not there',
      { quantity: { kind: 'reaction', support: 4, component: 'vertical' } },
      ['/quantity/support out_of_range'],
    ],
    [
      'a reaction that nothing holds',
      { quantity: { kind: 'reaction', support: 0, component: 'rotation' } },
      ['/quantity/component unrestrained'],
    ],
    [
      'a side of a deflection',
      { quantity: { kind: 'deflection', at: 3, side: 'left' } },
      ['/quantity/side unknown_field'],
    ],
    ['a quantity of no kind', { quantity: { kind: 'torsion', at: 3 } }, ['/quantity/kind wrong_type']],
  ])('refuses %s', (_, changes, expected) => {
    expect(errorsOf(answerInfluence({ ...plain, quantity: moment, ...changes }))).toEqual(expected);
  });
});

describe('answerMovingLoad', () => {
  test('answers with exactly the fields of its schema', () => {
    const answer = answerOf(answerMovingLoad({ ...beam, wheels, quantity: moment, absolute_moment: true }));
    expect(movingLoadAnswer.parse(answer)).toEqual(answer);
    expect(answer.worst?.quantity).toEqual({ kind: 'moment', at: 5, side: 'right' });
    // Either wheel at midspan, the other 2 m from it: 40 (2.5 + 1.5)
    expect(answer.worst?.max.value).toBeCloseTo(160e3, 6);
    expect(answer.worst?.min.value).toBeCloseTo(-40e3, 6);
    // P(L − a/2)²/(2L): AISC Manual, Table 3-23, case 43 (from memory)
    expect(answer.absolute_moment?.max.value).toBeCloseTo((40e3 * 9 ** 2) / 20, 6);
    expect(answer.absolute_moment?.min).toMatchObject({ value: expect.closeTo(-80e3, 6), section: 10 });
  });

  test('finds the absolute moment where no quantity is asked for, and only then by itself', () => {
    const bare = answerOf(answerMovingLoad({ ...beam, wheels }));
    expect(Object.keys(bare)).toEqual(['absolute_moment']);
    const one = answerOf(answerMovingLoad({ ...beam, wheels, quantity: moment }));
    expect(Object.keys(one)).toEqual(['worst']);
  });

  test('runs the train the way that is said', () => {
    const heavyBehind = [wheels[0], { offset: 2, force: 90e3 }];
    const shear = { kind: 'shear', at: 0 };
    const to = (direction: string) =>
      answerOf(answerMovingLoad({ ...beam, wheels: heavyBehind, quantity: shear, direction })).worst!.max;
    expect(to('left').value).toBeCloseTo(90e3 * 0.8 + 40e3, 6);
    expect(to('right').value).toBeCloseTo(90e3 + 40e3 * 0.8, 6);
    expect(to('both')).toEqual(to('right'));
  });

  test.each<[string, object, string[]]>([
    ...SHARED,
    ['no wheels', { wheels: [] }, ['/wheels out_of_range']],
    [
      'a wheel that pulls up, and one ahead of the front',
      {
        wheels: [
          { offset: 0, force: -1 },
          { offset: -1, force: 1 },
        ],
      },
      ['/wheels/0/force not_positive', '/wheels/1/offset out_of_range'],
    ],
    [
      'a wheel that pulls up, where no section is asked for',
      { wheels: [{ offset: 0, force: -1 }], quantity: undefined },
      ['/wheels/0/force not_positive'],
    ],
    ['a force without unit', { wheels: [{ offset: 0, force: '40' }] }, ['/wheels/0/force unit_missing']],
    ['a section off the beam', { quantity: { kind: 'shear', at: 13 } }, ['/quantity/at out_of_range']],
    ['another direction', { direction: 'up' }, ['/direction not_allowed']],
    ['too many wheels', { wheels: Array(41).fill({ offset: 0, force: 1 }) }, ['/wheels out_of_range']],
  ])('refuses %s', (_, changes, expected) => {
    expect(errorsOf(answerMovingLoad({ ...plain, wheels, quantity: moment, ...changes }))).toEqual(expected);
  });

  const rollers = (count: number) => ({
    length: 6 * (count - 1),
    ei: 1e7,
    supports: Array.from({ length: count }, (_, i) => ({ at: 6 * i, kind: 'pin' })),
    horizontal: 'ignore',
  });
  const train = (count: number) => Array.from({ length: count }, (_, i) => ({ offset: i, force: 1e4 }));

  test.each<[string, number, number, string]>([
    ['too many wheels for the supports', 100, 10, 'at most 5 wheels'],
    ['a single wheel on too many supports', 400, 1, 'takes too long. Ask for one section'],
  ])(
    'refuses %s where the absolute moment is asked for, and says what is possible',
    (_, count, wheelCount, words) => {
      expect(answerMovingLoad({ ...rollers(count), wheels: train(wheelCount) })).toMatchObject({
        errors: [{ pointer: '/wheels', message: expect.stringContaining(words) }],
      });
    },
  );

  test('refuses every line of hundreds of supports with hinges, and takes one', () => {
    const asked = { ...rollers(400), wheels: train(1), quantity: { kind: 'moment', at: 1197 } };
    expect(errorsOf(answerMovingLoad({ ...rollers(400), wheels: train(1), hinges: [3] }))).toEqual([
      '/supports out_of_range',
    ]);
    // A force in the middle of one of many equal spans. By the three-moment equation, with the moments over the further
    // supports falling by 2 − √3 from one to the next, (−(2 − √3) + 4 + 1) M = −3/8 P L; in the middle P L/4 + M.
    // A hinge two hundred spans away is too far to be felt.
    for (const hinges of [[], [3]]) {
      const { value } = answerOf(answerMovingLoad({ ...asked, hinges })).worst!.max;
      expect(value / (1e4 * 6)).toBeCloseTo(0.25 - 0.375 / (3 + Math.sqrt(3)), 10);
    }
  });
});

describe('answerFrequency', () => {
  test('refuses more pieces than a request may have, and takes hundreds of equal spans', () => {
    const lumped = Array.from({ length: 450 }, (_, i) => ({ at: (12 * (i + 0.5)) / 450, mass: 3 }));
    const refused = answerFrequency({ ...plain, mass: 100, lumped });
    expect(refused).toMatchObject({
      errors: [
        {
          pointer: '',
          code: 'out_of_range',
          message: expect.stringContaining('452 pieces, and at most 400'),
        },
      ],
    });
    const supports = Array.from({ length: 301 }, (_, i) => ({ at: 6 * i, kind: 'pin' }));
    const many = { length: 1800, ei: 2e7, supports, horizontal: 'ignore', mass: 100 };
    // Equal spans move by turns up and down, each as if it were alone: f = π/2 · √(EI/m)/L².
    const { frequency } = answerOf(answerFrequency(many));
    const alone = ((Math.PI / 2) * Math.sqrt(2e7 / 100)) / 36;
    expect(frequency).toBeCloseTo(alone, 8);
    // A hinge in a span lets that one move more, and no piece of a beam moves faster for it.
    expect(answerOf(answerFrequency({ ...many, hinges: [3] })).frequency).toBeLessThan(alone - 0.1);
  });

  test('answers with exactly the fields of its schema, from the weights of the permanent loads', () => {
    const answer = answerOf(answerFrequency({ ...beam, permanent: ['G'] }));
    expect(frequencyAnswer.parse(answer)).toEqual(answer);
    expect(answer.mass).toEqual({ distributed: expect.closeTo(1200, 9), lumped: 0 });
    expect(answer.left_out).toEqual([]);
    expect(answer.bounds.count).toBe(1);
    expect(answer.estimate).toMatchObject({ rule: '18/√δ, δ in mm' });
  });

  test('of a simple span with its own mass is π/2 √(EI/(mL⁴))', () => {
    const simple = {
      length: '10 m',
      ei: 3e7,
      supports: [
        { at: 0, kind: 'pin' },
        { at: 10, kind: 'roller' },
      ],
    };
    const answer = answerOf(answerFrequency({ ...simple, mass: '120 kg/m' }));
    expect(answer.frequency).toBeCloseTo((Math.PI / 2) * Math.sqrt(3e7 / (120 * 1e4)), 9);
    expect(answer.mass).toEqual({ distributed: 1200, lumped: 0 });
    const heavier = answerOf(
      answerFrequency({
        ...simple,
        mass: 60,
        distributed: [{ from: 0, to: 10, start: 60, end: 60 }],
        lumped: [{ at: 0, mass: 5000 }],
      }),
    );
    expect(heavier.frequency).toBeCloseTo(answer.frequency, 9);
    expect(heavier.mass.lumped).toBe(5000);
  });

  test('names the permanent loads that are no weight', () => {
    const loads = [
      { kind: 'couple', at: 3, m: 5, group: 'G' },
      { kind: 'point', at: 3, p: 5000, group: 'Q' },
      { kind: 'point', at: 4, p: -5000, group: 'G' },
    ];
    expect(answerOf(answerFrequency({ ...beam, loads, mass: 10, permanent: ['G'] })).left_out).toEqual([
      0, 2,
    ]);
  });

  test.each<[string, object, string[]]>([
    ...SHARED,
    ['no mass at all', { mass: undefined }, [' required']],
    ['a mass that is a force', { mass: '3 kN/m' }, ['/mass unit_wrong_dimension']],
    ['a mass below zero', { mass: -3 }, ['/mass out_of_range']],
    [
      'a stretch below zero',
      { distributed: [{ from: 0, to: 1, start: -1, end: 1 }] },
      ['/distributed/0/start out_of_range'],
    ],
    ['a mass off the beam', { lumped: [{ at: 13, mass: 3 }] }, ['/lumped/0/at out_of_range']],
  ])('refuses %s', (_, changes, expected) => {
    expect(errorsOf(answerFrequency({ ...plain, mass: 100, ...changes }))).toEqual(expected);
  });
});
