import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Solution, solveBeam } from '@/engine/beam/index';
import { type EnvelopeDocument, readEnvelope, solveEnvelope } from '@/engine/envelope/index';
import { type Beam, findMotion, frameOf, type Load, readBeam } from '@/engine/model/index';
import { evaluate } from '@/engine/polynomial/index';
import { dice } from '../support/random';
import { runs } from '../support/stable-beam';

const line = (from: number, to: number, w: number, group = 'Q'): Load & { group: string } => ({
  kind: 'line',
  from,
  to,
  w0: w,
  w1: w,
  group,
});

function solve(document: Partial<EnvelopeDocument> & Pick<EnvelopeDocument, 'length' | 'supports'>) {
  const task = readEnvelope({
    ei: 1,
    horizontal: 'ignore',
    combinations: [{ name: '1', factors: { G: 1, Q: 1 } }],
    ...document,
  });
  if (!task.ok) throw new Error(task.faults[0]?.message);
  return solveEnvelope(task.value, []);
}

function solved(document: Parameters<typeof solve>[0]) {
  const outcome = solve(document);
  if (!outcome.ok) throw new Error(outcome.faults[0]?.message);
  return outcome.value;
}

const rollers = (...places: number[]) =>
  places.map((at) => ({ at, kind: 'roller' as const, lift_off: true }));

describe('a beam on supports that cannot pull', () => {
  test('of two spans with one loaded rises off the far one: a simple span, its end up by wL⁴/24EI', () => {
    const { envelope } = solved({ length: 2, supports: rollers(0, 1, 2), loads: [line(0, 1, 1)] });
    expect(envelope.extremes.moment.max).toMatchObject({ lifted: [2] });
    expect(envelope.extremes.moment.max.value).toBeCloseTo(1 / 8, 12);
    expect(envelope.extremes.deflection.max.value).toBeCloseTo(1 / 24, 12);
    expect(envelope.reactions.map(({ min }) => min.vertical.value)).toEqual([0.5, 0.5, 0]);
  });

  test('rests everywhere where the weight is enough: 7/16, 5/8 and −1/16 of one span and 3/8, 10/8, 3/8 of both', () => {
    const { envelope } = solved({
      length: 2,
      supports: rollers(0, 1, 2),
      loads: [line(0, 1, 1), line(0, 2, 0.2, 'G')],
      patterns: ['Q'],
    });
    const [, , far] = envelope.reactions;
    expect(far!.min.vertical).toMatchObject({ pattern: [0], lifted: [] });
    expect(far!.min.vertical.value).toBeCloseTo(-1 / 16 + (0.2 * 3) / 8, 12);
  });

  test('is refused with words where nothing keeps it down', () => {
    const outcome = solve({ length: 3, supports: rollers(0, 2), loads: [line(2, 3, 1)] });
    expect(outcome.ok ? [] : outcome.faults).toMatchObject([{ path: ['combinations', 0], code: 'unstable' }]);
    expect(outcome.ok ? '' : outcome.faults[0]?.message).toMatchInlineSnapshot(
      `"Under combination 1, the beam does not stay on its supports. It lifts off the roller at 0.000 m, and nothing keeps it down. It turns about the roller at 2.000 m. Hold it down there, or leave lift_off out."`,
    );
  });

  test('under one pattern of many is refused too, and the pattern is named', () => {
    const outcome = solve({
      length: 3,
      supports: rollers(0, 2),
      loads: [line(0, 3, 1), line(0, 3, 0.1, 'G')],
      patterns: ['Q'],
    });
    expect(outcome.ok ? '' : outcome.faults[0]?.message).toContain('with the pattern [1]');
  });

  test('falls onto the support that it was above', () => {
    // The middle support stands 1 m too high. The stiff beam rests on it and on the left one, which has more load.
    const [left, middle, right] = rollers(0, 1, 2);
    const { envelope } = solved({
      length: 2,
      ei: 1e6,
      supports: [left!, { ...middle!, rise: 1 }, right!],
      loads: [line(0, 1, 1.5), line(1, 2, 1)],
    });
    expect(envelope.reactions.map(({ max }) => max.vertical.lifted)).toEqual([[2], [2], [2]]);
    expect(envelope.reactions[0]!.max.vertical.value).toBeCloseTo(0.25, 9);
  });
});

type Contact = { document: Parameters<typeof solve>[0]; oneSided: number[] };

/** Two to five spans, some supports sprung or far out of line, loads both ways: much of it lifts, and meets others. */
function randomContact(seed: number): Contact {
  const roll = dice(seed);
  const count = roll.whole(3, 6);
  const unevenness = roll.pick([0.05, 0.5, 3]);
  let at = roll.chance(0.3) ? roll.between(0.2, 0.6) : 0;
  const supports = Array.from({ length: count }, (_, i) => {
    if (i > 0) at += roll.between(0.6, 1.6);
    const rise = roll.chance(0.5) ? { rise: roll.between(-unevenness, unevenness) } : {};
    const held = roll.chance(0.2)
      ? { kind: 'free' as const, kv: roll.logBetween(5, 500) }
      : { kind: 'roller' as const };
    return { at, ...held, ...rise, lift_off: roll.chance(0.85) };
  });
  const length = at + (roll.chance(0.4) ? roll.between(0.2, 0.8) : 0);
  const loads = Array.from({ length: roll.whole(1, 3) }, () => {
    const [a, b] = [roll.between(0, length), roll.between(0, length)];
    return line(Math.min(a, b), Math.max(a, b), (roll.chance(0.25) ? -1 : 1) * roll.logBetween(0.2, 3));
  });
  loads.push(line(0, length, roll.between(0.02, 0.3), 'G'));
  const oneSided = supports.flatMap(({ lift_off }, i) => (lift_off ? [i] : []));
  return { document: { length, supports, loads }, oneSided };
}

/** Every set of supports on which the beam rests without a pull and without sinking into one that it is off. */
function restingStates({ document, oneSided }: Contact): { lifted: number[]; solution: Solution }[] {
  const reading = readBeam({ ei: 1, horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  const beam = reading.value;
  return Array.from({ length: 2 ** oneSided.length }, (_, set) =>
    oneSided.filter((_, bit) => (set >> bit) & 1),
  ).flatMap((lifted) => {
    const supports = beam.supports.map((support, i) =>
      lifted.includes(i) ? { ...support, vertical: { kind: 'free' as const } } : support,
    );
    const held: Beam = { ...beam, supports, degree: beam.degree - lifted.length };
    if (findMotion(frameOf(held))) return [];
    const solution = solveBeam(held);
    const rests = oneSided.every((i) => {
      const { at, vertical } = beam.supports[i]!;
      const ground = vertical.kind === 'free' ? 0 : vertical.movement;
      const above = evaluate(solution.diagrams.deflection, at)[0] - ground;
      return lifted.includes(i) ? above > -1e-12 : solution.reactions[i]!.vertical > -1e-12;
    });
    return rests ? [{ lifted, solution }] : [];
  });
}

describe('of any continuous beam', { timeout: 60_000 }, () => {
  const counts = { resting: 0, lifting: 0, falling: 0 };
  test('the state found is the one of all sets of supports that neither pull nor are pierced', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1e6 }).map(randomContact), (given) => {
        const states = restingStates(given);
        const outcome = solve(given.document);
        if (!outcome.ok) {
          counts.falling++;
          expect(states).toEqual([]);
          return;
        }
        const { lifted, solution } = outcome.value.arrangements()[0]!;
        counts[lifted.length > 0 ? 'lifting' : 'resting']++;
        expect(states.map((state) => state.lifted)).toContainEqual(lifted);
        const size = Math.max(...solution.reactions.map(({ vertical }) => Math.abs(vertical)));
        for (const state of states) {
          state.solution.reactions.forEach(({ vertical }, i) => {
            expect(Math.abs(vertical - solution.reactions[i]!.vertical)).toBeLessThanOrEqual(1e-9 * size);
          });
        }
      }),
      runs(120),
    );
    // A test of lift-off that never lifts would pass as well.
    expect(counts.lifting).toBeGreaterThan(30);
    expect(counts.resting).toBeGreaterThan(10);
    expect(counts.falling).toBeGreaterThan(3);
  });
});
