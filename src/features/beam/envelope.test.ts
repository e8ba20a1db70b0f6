import { describe, expect, test } from 'vitest';
import { answerSolve } from './beam';
import { answerEnvelope, envelopeAnswer } from './envelope';

/** Two spans of 6 m and an overhang of 2 m. */
const body = {
  length: 14,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 6, kind: 'roller', rise: -0.004 },
    { at: 12, kind: 'roller' },
  ],
  loads: [
    { kind: 'line', from: 0, to: 14, w0: 5000, w1: 5000, group: 'G' },
    { kind: 'line', from: 0, to: 14, w0: 8000, w1: 8000, group: 'Q' },
    { kind: 'point', at: 12, p: 9000, group: 'Q' },
    { kind: 'point', at: 14, p: 3000, group: 'S' },
  ],
  combinations: [
    { name: '6.10', factors: { G: 1.35, Q: 1.5, S: 0.75 } },
    { name: 'EQU', factors: { G: 0.9, Q: 1.5, W: 1.5 } },
  ],
  patterns: ['Q'],
  stations: 8,
};

function errors(changes: object): string[] {
  const outcome = answerEnvelope({ ...body, ...changes });
  return outcome.ok ? [] : outcome.errors.map(({ pointer, code }) => `${pointer} ${code}`);
}

function answer(changes: object = {}) {
  const outcome = answerEnvelope({ ...body, ...changes });
  if (!outcome.ok) throw new Error(outcome.errors.map(({ message }) => message).join(' '));
  return outcome.answer;
}

/** The same loads at once, as beams/solve answers them. */
function solved(loads: object[]) {
  const { combinations: _, patterns: __, ...beam } = body;
  const outcome = answerSolve({ ...beam, loads });
  if (!outcome.ok) throw new Error(outcome.errors.map(({ message }) => message).join(' '));
  return outcome.answer;
}

describe('answerEnvelope', () => {
  test('answers with exactly the fields of the contract', () => {
    const envelope = answer();
    expect(envelopeAnswer.parse(envelope)).toEqual(envelope);
    expect(Object.keys(envelope)).toEqual(['stations', 'extremes', 'reactions']);
    expect(envelope.stations.map(({ x }) => x)).toEqual([0, 2, 4, 6, 8, 10, 12, 14]);
    expect(Object.keys(envelope.stations[0]!.moment.max)).toEqual(['value', 'combination', 'pattern']);
    expect(Object.keys(envelope.extremes.moment.max).sort()).toEqual([
      'at',
      'combination',
      'pattern',
      'value',
    ]);
    expect(Object.keys(envelope.reactions[0]!)).toEqual(['at', 'max', 'min', 'groups']);
    expect(Object.keys(envelope.reactions[0]!.groups)).toEqual(['G', 'S', 'Q']);
  });

  test('loads the overhang alone for the least reaction at the far end, and never the spans that help', () => {
    const { reactions, stations } = answer();
    expect(reactions[0]!.min.vertical).toMatchObject({ combination: 'EQU', pattern: [1] });
    expect(stations.at(-1)!.deflection.max).toMatchObject({ pattern: [1] });
    expect(stations.at(-1)!.deflection.min).toMatchObject({ combination: '6.10', pattern: [0, 2] });
  });

  test('gives a load on a support to the span at its left', () => {
    const { reactions } = answer({ loads: [body.loads[0], { ...body.loads[2] }] });
    expect(reactions[2]!.max.vertical.pattern).toEqual([1]);
    expect(reactions[2]!.groups['Q']!.vertical).toEqual({ max: 9000, min: 0 });
  });

  test('lets the supports’ own movements act once and unfactored, in no group', () => {
    const only = { ...body, loads: [], combinations: [{ name: '2 ×', factors: { G: 2 } }] };
    const outcome = answerEnvelope(only);
    const alone = solved([]);
    expect(outcome.ok && outcome.answer.reactions.map(({ max }) => max.vertical.value)).toEqual(
      alone.reactions.map(({ vertical }) => vertical),
    );
    expect(outcome.ok && outcome.answer.reactions[1]!.groups).toEqual({});
  });

  test('without loads and movements is zero everywhere', () => {
    const supports = [body.supports[0], body.supports[2]];
    const { extremes, stations } = answer({ supports, loads: [] });
    expect(extremes.moment.max).toEqual({ value: 0, at: [0, 12, 14], combination: '6.10', pattern: [] });
    expect(stations[3]!.shear.min).toEqual({ value: 0, combination: '6.10', pattern: [] });
  });

  test('gives every governing arrangement whole, as beams/solve would', () => {
    const { arrangements, extremes, stations, reactions } = answer({ arrangements: true });
    const named = JSON.stringify([extremes, stations, reactions]).matchAll(
      /"combination":"[^"]*","pattern":\[[^\]]*\]/g,
    );
    const governing = new Set([...named].map(([text]) => text));
    expect(arrangements!.length).toBe(governing.size);
    const all = arrangements!.find(
      ({ combination, pattern }) => combination === '6.10' && `${pattern}` === '0,1',
    )!;
    const line = (to: number, w: number) => ({ kind: 'line', from: 0, to, w0: w, w1: w });
    const whole = solved([
      line(14, 1.35 * 5000),
      line(12, 1.5 * 8000),
      { kind: 'point', at: 12, p: 13500 },
      { kind: 'point', at: 14, p: 2250 },
    ]);
    expect(Object.keys(all).sort()).toEqual([...Object.keys(whole), 'combination', 'pattern'].sort());
    whole.stations.forEach(({ moment }, i) => {
      expect(all.stations[i]!.moment[0]).toBeCloseTo(moment[0], 6);
    });
    expect(all.proof.agreement).toBeLessThan(1e-9);
  });

  test('solves a beam on supports that cannot pull anew, and says what it is off', () => {
    const supports = body.supports.map((support) => ({ ...support, rise: undefined, lift_off: true }));
    const loads = [
      { kind: 'line', from: 0, to: 14, w0: 500, w1: 500, group: 'G' },
      { kind: 'line', from: 12, to: 14, w0: 10000, w1: 10000, group: 'Q' },
    ];
    const { reactions, extremes, arrangements } = answer({ supports, loads, arrangements: true });
    expect(reactions.map(({ min }) => Math.min(min.vertical.value, 0))).toEqual([0, 0, 0]);
    expect(extremes.moment.min).toMatchObject({ combination: '6.10', pattern: [2], lifted: [1] });
    expect(arrangements!.find(({ pattern }) => pattern.length > 0)).toMatchObject({ lifted: [1], degree: 0 });
  });
});

describe('answerEnvelope refuses', () => {
  test('loads without a group, and fields that it does not know', () => {
    const loads = [{ kind: 'point', at: 1, p: 1 }];
    expect(errors({ loads })).toEqual(['/loads/0/group missing']);
    expect(errors({ pattern: ['Q'] })).toEqual(['/pattern unknown_field']);
    expect(errors({ supports: [{ at: 0, kind: 'fixed', liftoff: true }] })).toEqual([
      '/supports/0/liftoff unknown_field',
    ]);
  });

  test('combinations that are missing, without numbers, or of one name', () => {
    const [first] = body.combinations;
    expect(errors({ combinations: undefined })).toEqual(['/combinations missing']);
    expect(errors({ combinations: [] })).toEqual(['/combinations out_of_range']);
    expect(errors({ combinations: [{ name: 'a', factors: { G: '1.35' } }] })).toEqual([
      '/combinations/0/factors/G wrong_type',
    ]);
    expect(errors({ combinations: [first, first] })).toEqual(['/combinations/1/name duplicate']);
  });

  test('everything that is wrong at once', () => {
    const [first] = body.combinations;
    const supports = [
      { at: 0, kind: 'pin' },
      { at: 99, kind: 'roller' },
    ];
    expect(errors({ supports, combinations: [first, first] })).toEqual([
      '/supports/1/at out_of_range',
      '/combinations/1/name duplicate',
    ]);
  });

  test('lift-off where nothing holds up, and where rotation is held as well', () => {
    const supports = [
      { at: 0, kind: 'fixed', lift_off: true },
      { at: 6, kind: 'free', lift_off: true },
      { at: 12, kind: 'roller', lift_off: false },
    ];
    expect(errors({ supports })).toEqual([
      '/supports/0/lift_off conflict',
      '/supports/1/lift_off unrestrained',
    ]);
  });

  test('a beam that lifts away, at the combination that does it', () => {
    const supports = [
      { at: 0, kind: 'pin', lift_off: true },
      { at: 12, kind: 'roller' },
    ];
    expect(errors({ supports, combinations: [{ name: '1', factors: { S: 1 } }] })).toEqual([
      '/combinations/0 unstable',
    ]);
  });

  test('more arrangements on supports that cannot pull than can be solved one by one', () => {
    const supports = Array.from({ length: 12 }, (_, i) => ({
      at: i,
      kind: i === 0 ? 'pin' : 'roller',
      lift_off: true,
    }));
    expect(errors({ supports })).toEqual(['/combinations out_of_range']);
  });

  test('redundants that the beam has not', () => {
    expect(errors({ redundants: [] })).toEqual(['/redundants wrong_count']);
  });
});
