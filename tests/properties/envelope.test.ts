import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Solution, solveBeam, stationPositions, stationsAt } from '@/engine/beam/index';
import type { Combination } from '@/engine/combination/index';
import { continuousBeam } from '@/engine/continuous/index';
import {
  type Envelope,
  type EnvelopeDocument,
  type Governing,
  QUANTITIES,
  readEnvelope,
  SuperposedBeam,
  solveEnvelope,
} from '@/engine/envelope/index';
import { type Beam, type Load, readBeam } from '@/engine/model/index';
import { evaluate, evaluatePiece, pieceAt } from '@/engine/polynomial/index';
import { dice } from '../support/random';
import { randomBeam } from '../support/random-beam';
import { runs } from '../support/stable-beam';

const GROUPS = ['G', 'Q', 'S', 'W'] as const;
const MOST_SPANS = 6;

type Case = { document: EnvelopeDocument; beam: Beam; spans: [number, number][] };

/** The first stable beam of the series from `seed` with at most MOST_SPANS spans and overhangs, its loads in groups. */
function fromSeed(first: number): Case {
  for (let seed = first; ; seed++) {
    const document = randomBeam(seed);
    const reading = readBeam(document);
    if (!reading.ok || reading.value.loads.length === 0) continue;
    const spans = spansOf(reading.value);
    if (spans.length > MOST_SPANS) continue;
    const roll = dice(seed + 7);
    const loads: (Load & { group: string })[] = document.loads!.map((load, i) => ({
      ...load,
      group: GROUPS[i % GROUPS.length]!,
    }));
    const factor = () => roll.pick([0, 1, 1.35, 1.5, -1, 0.9]);
    const combinations = ['first', 'second'].map((name) => ({
      name,
      factors: { G: roll.pick([1, 1.35]), Q: factor(), S: factor(), W: factor() },
    }));
    const patterns = roll.pick([['Q'], ['Q'], ['Q', 'S'], ['G', 'Q', 'S', 'W'], []]);
    const whole = { kind: 'line' as const, from: 0, to: document.length, group: 'Q' };
    const size = Math.max(...loads.map((load) => ('w0' in load ? Math.abs(load.w0) : 0)), 1);
    loads.push({ ...whole, w0: size, w1: roll.pick([size, -size, 0]) });
    return { document: { ...document, loads, combinations, patterns }, beam: reading.value, spans };
  }
}

/** Between neighbouring vertical supports, and beyond the outer ones where the beam goes on: by the document's words. */
function spansOf({ supports, length }: Beam): [number, number][] {
  const held = supports.filter(({ vertical }) => vertical.kind !== 'free').map(({ at }) => at);
  const points = [...new Set([0, ...held, length])].sort((a, b) => a - b);
  return points.slice(1).map((to, k) => [points[k]!, to]);
}

const within = (load: Load, [from, to]: [number, number]): Load[] => {
  if ('at' in load) return (load.at > from || (load.at === 0 && from === 0)) && load.at <= to ? [load] : [];
  const [a, b] = [Math.max(load.from, from), Math.min(load.to, to)];
  if (a >= b) return [];
  if (load.kind === 'curvature') return [{ ...load, from: a, to: b }];
  const w = (x: number) => load.w0 + ((load.w1 - load.w0) * (x - load.from)) / (load.to - load.from);
  return [{ ...load, from: a, to: b, w0: w(a), w1: w(b) }];
};

const times = (load: Load, factor: number): Load => {
  if (load.kind === 'point') return { ...load, p: factor * load.p };
  if (load.kind === 'couple') return { ...load, m: factor * load.m };
  if (load.kind === 'curvature') return { ...load, kappa: factor * load.kappa };
  return { ...load, w0: factor * load.w0, w1: factor * load.w1 };
};

/** One arrangement solved from scratch as a beam of its own. */
function arranged({ document, spans }: Case, { factors }: Combination, pattern: readonly number[]): Solution {
  const loads = (document.loads ?? []).flatMap((load) => {
    const parts = document.patterns!.includes(load.group)
      ? pattern.flatMap((span) => within(load, spans[span]!))
      : [load];
    return parts.map((part) => times(part, factors[load.group] ?? 0));
  });
  const reading = readBeam({ ...document, loads });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return solveBeam(reading.value);
}

function subsets(count: number): number[][] {
  return Array.from({ length: 2 ** count }, (_, set) =>
    Array.from({ length: count }, (_, span) => span).filter((span) => (set >> span) & 1),
  );
}

function envelopeOf(document: EnvelopeDocument, positions: readonly number[]): Envelope {
  const task = readEnvelope(document);
  if (!task.ok) throw new Error(task.faults.map(({ message }) => message).join(' '));
  const solved = solveEnvelope(task.value, positions);
  if (!solved.ok) throw new Error(solved.faults.map(({ message }) => message).join(' '));
  return solved.value.envelope;
}

const anyCase = fc.integer({ min: 1, max: 1_000_000 }).map(fromSeed);
const RUNS = runs(25);

test('the beams of these tests have spans to pattern', () => {
  const sizes = Array.from({ length: 40 }, (_, i) => fromSeed(1 + 977 * i).spans.length);
  expect(new Set(sizes)).toEqual(new Set([1, 2, 3, 4, 5, 6]));
});

describe('the envelope of any beam', { timeout: 120_000 }, () => {
  test('is what solving every combination with every set of loaded spans comes to', () => {
    fc.assert(
      fc.property(anyCase, (given) => {
        const { document, beam, spans } = given;
        const positions = stationPositions(beam, 7);
        const envelope = envelopeOf(document, positions);
        const all = document.combinations.flatMap((combination) =>
          subsets(spans.length).map((pattern) => arranged(given, combination, pattern)),
        );
        const stations = all.map((solution) => stationsAt(solution, positions));
        for (const quantity of QUANTITIES) {
          const extremes = all.map((solution) => solution.extremes[quantity]);
          const most = Math.max(...extremes.map(({ max }) => max.value));
          const least = Math.min(...extremes.map(({ min }) => min.value));
          const size = Math.max(
            ...extremes.flatMap(({ max, min }) => [Math.abs(max.value), Math.abs(min.value)]),
          );
          const close = (value: number, expected: number) =>
            expect(Math.abs(value - expected), `${quantity} ${value} is ${expected}`).toBeLessThanOrEqual(
              1e-9 * size,
            );
          close(envelope.extremes[quantity].max.value, most);
          close(envelope.extremes[quantity].min.value, least);
          positions.forEach((_, i) => {
            const values = stations.flatMap((each) => each[i]![quantity]);
            close(envelope.stations[i]![quantity].max.value, Math.max(...values));
            close(envelope.stations[i]![quantity].min.value, Math.min(...values));
          });
        }
        for (const component of ['vertical', 'moment'] as const) {
          const size = Math.max(
            ...all.flatMap(({ reactions }) => reactions.map((r) => Math.abs(r[component]))),
          );
          envelope.reactions.forEach(({ max, min }, support) => {
            const values = all.map(({ reactions }) => reactions[support]![component]);
            expect(Math.abs(max[component].value - Math.max(...values))).toBeLessThanOrEqual(1e-9 * size);
            expect(Math.abs(min[component].value - Math.min(...values))).toBeLessThanOrEqual(1e-9 * size);
          });
        }
      }),
      RUNS,
    );
  });

  test('names loads that give its values, where it says', () => {
    fc.assert(
      fc.property(anyCase, (given) => {
        const { document, beam } = given;
        const positions = stationPositions(beam, 5);
        const { stations, extremes, reactions } = envelopeOf(document, positions);
        const solution = ({ combination, pattern }: Governing) =>
          arranged(given, document.combinations.find(({ name }) => name === combination)!, pattern);
        for (const quantity of QUANTITIES) {
          const { max, min } = extremes[quantity];
          const size = Math.max(Math.abs(max.value), Math.abs(min.value));
          for (const extreme of [max, min]) {
            const { diagrams } = solution(extreme);
            expect(extreme.at.length).toBeGreaterThan(0);
            expect(extreme.at).toEqual([...extreme.at].sort((a, b) => a - b));
            for (const x of extreme.at) {
              const nearest = Math.min(
                ...evaluate(diagrams[quantity], x).map((v) => Math.abs(v - extreme.value)),
              );
              expect(nearest).toBeLessThanOrEqual(3e-9 * size);
            }
          }
          for (const station of stations.filter((_, i) => i % 2 === 1)) {
            for (const found of [station[quantity].max, station[quantity].min]) {
              const there = stationsAt(solution(found), [station.x])[0]!;
              const nearest = Math.min(...[there[quantity]].flat().map((v) => Math.abs(v - found.value)));
              expect(nearest).toBeLessThanOrEqual(1e-9 * size);
            }
          }
        }
        const forces = Math.max(
          ...reactions.map(({ max, min }) => Math.max(max.vertical.value, -min.vertical.value)),
        );
        reactions.forEach(({ max, min }, support) => {
          for (const { vertical } of [max, min]) {
            const { reactions: own } = solution(vertical);
            expect(Math.abs(own[support]!.vertical - vertical.value)).toBeLessThanOrEqual(1e-9 * forces);
          }
        });
      }),
      RUNS,
    );
  });

  test('is the same from the fast solver of continuous beams', () => {
    let compared = 0;
    fc.assert(
      fc.property(anyCase, ({ document, beam: { length } }) => {
        const task = readEnvelope(document);
        const fast = task.ok ? continuousBeam(task.value.beam) : null;
        if (!task.ok || !fast) return;
        compared++;
        const { sources, combinations } = task.value;
        const elementary = sources.map(({ group, loads }) => {
          fast.solve(loads, { movements: group === null });
          return { diagrams: fast.diagrams(), reactions: fast.reactions() };
        });
        const positions = stationPositions({ length }, 9);
        const exact = envelopeOf(document, positions);
        const found = new SuperposedBeam(sources, elementary).envelope(combinations, positions);
        for (const quantity of QUANTITIES) {
          const { max, min } = exact.extremes[quantity];
          const room = 1e-9 * Math.max(Math.abs(max.value), Math.abs(min.value));
          expect(Math.abs(found.extremes[quantity].max.value - max.value)).toBeLessThanOrEqual(room);
          expect(Math.abs(found.extremes[quantity].min.value - min.value)).toBeLessThanOrEqual(room);
          exact.stations.forEach(({ [quantity]: range }, i) => {
            const other = found.stations[i]![quantity];
            expect(Math.abs(other.max.value - range.max.value)).toBeLessThanOrEqual(room);
            expect(Math.abs(other.min.value - range.min.value)).toBeLessThanOrEqual(room);
          });
        }
      }),
      runs(60),
    );
    expect(compared).toBeGreaterThan(10);
  });

  test('gives the groups’ own reactions, which add up to those of whole combinations', () => {
    fc.assert(
      fc.property(anyCase, (given) => {
        const { document } = given;
        const { reactions } = envelopeOf({ ...document, patterns: [] }, []);
        const [combination] = document.combinations;
        const whole = arranged({ ...given, document: { ...document, patterns: [] } }, combination!, []);
        const size = Math.max(...whole.reactions.map(({ vertical }) => Math.abs(vertical)));
        const moved = arranged({ ...given, document: { ...document, loads: [] } }, combination!, []);
        reactions.forEach(({ groups }, support) => {
          const sum = Object.entries(groups).reduce(
            (total, [group, { vertical }]) =>
              total + (vertical as number) * (combination!.factors[group] ?? 0),
            moved.reactions[support]!.vertical,
          );
          expect(Math.abs(sum - whole.reactions[support]!.vertical)).toBeLessThanOrEqual(1e-9 * size);
        });
      }),
      RUNS,
    );
  });
});

test('no sampled point of any arrangement is outside the envelope’s extremes', () => {
  const given = fromSeed(4242);
  const { extremes } = envelopeOf(given.document, []);
  for (const combination of given.document.combinations) {
    for (const pattern of subsets(given.spans.length)) {
      const { diagrams } = arranged(given, combination, pattern);
      for (const quantity of QUANTITIES) {
        const { max, min } = extremes[quantity];
        const room = 1e-9 * Math.max(Math.abs(max.value), Math.abs(min.value));
        for (let i = 0; i <= 300; i++) {
          const x = (given.beam.length * i) / 300;
          const p = diagrams[quantity];
          const k = pieceAt(p, x);
          const value = evaluatePiece(p, k, x - p.breaks[k]!);
          expect(value).toBeLessThanOrEqual(max.value + room);
          expect(value).toBeGreaterThanOrEqual(min.value - room);
        }
      }
    }
  }
});
