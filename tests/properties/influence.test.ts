import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { prepareBeam, type Solution } from '@/engine/beam/index';
import {
  type AskedQuantity,
  type InfluenceQuantity,
  influenceLine,
  readInfluenceQuantity,
} from '@/engine/influence/index';
import type { Beam } from '@/engine/model/index';
import { evaluate, magnitude } from '@/engine/polynomial/index';
import { isProven } from '@/engine/proof/index';
import { expectPrinted } from '../support/printed';
import { dice } from '../support/random';
import { anyBeam, runs, samplesOf, stableBeam } from '../support/stable-beam';

const RUNS = runs(60);

/** The quantity in a beam that was solved under a load. */
function valueIn({ reactions, diagrams }: Solution, quantity: InfluenceQuantity): number {
  switch (quantity.kind) {
    case 'reaction': {
      const { vertical, moment } = reactions[quantity.support]!;
      return quantity.component === 'vertical' ? vertical : moment;
    }
    case 'deflection':
      return evaluate(diagrams.deflection, quantity.at)[0];
    default:
      return evaluate(diagrams[quantity.kind], quantity.at)[quantity.side === 'left' ? 0 : 1];
  }
}

/** Any quantity of the beam, often at one of its points. */
function quantityOf(beam: Beam, seed: number): InfluenceQuantity {
  const roll = dice(seed);
  const reactions = beam.supports.flatMap((support, i) =>
    (['vertical', 'rotation'] as const)
      .filter((component) => support[component].kind !== 'free')
      .map((component): AskedQuantity => ({ kind: 'reaction', support: i, component })),
  );
  const points = [0, beam.length, ...beam.supports.map(({ at }) => at), ...beam.hinges];
  const at = roll.chance(0.4) ? roll.pick(points) : roll.between(0.01, 0.99) * beam.length;
  const side = roll.pick(['left', 'right'] as const);
  const asked = roll.pick<AskedQuantity>([
    roll.pick(reactions),
    { kind: 'shear', at, side },
    { kind: 'moment', at, side },
    { kind: 'deflection', at },
  ]);
  const reading = readInfluenceQuantity(beam, asked);
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return reading.value;
}

/** What rounding leaves of a line that is zero throughout, as that of the deflection at a support. */
function nothing(beam: Beam, quantity: InfluenceQuantity): number {
  const softest = Math.min(...beam.segments.map(({ ei }) => ei));
  return 1e-13 * (quantity.kind === 'deflection' ? beam.length ** 3 / softest : beam.length);
}

describe('the influence line of any quantity of any beam', { timeout: 60_000 }, () => {
  test('gives what the beam has under a unit load, wherever it stands', () => {
    const kinds = new Map<string, number>();
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        const quantity = quantityOf(beam, seed);
        kinds.set(quantity.kind, (kinds.get(quantity.kind) ?? 0) + 1);
        const { line, proof } = influenceLine(beam, quantity);
        expect(isProven(proof, beam)).toBe(true);
        expect(line.degree).toBeLessThanOrEqual(3);
        const section = 'at' in quantity ? [quantity.at] : [];
        const places = samplesOf(line).filter((x) => !section.includes(x));
        const loads = places.map((at) => ({ kind: 'point', at, p: 1 }) as const);
        const prepared = prepareBeam({ ...beam, loads });
        const limit = 1e-9 * magnitude(line) + nothing(beam, quantity);
        loads.forEach((load) => {
          const expected = valueIn(prepared.solve([load], { movements: false }), quantity);
          expect(Math.abs(evaluate(line, load.at)[0] - expected)).toBeLessThanOrEqual(limit);
        });
      }),
      RUNS,
    );
    expect([...kinds.keys()].sort()).toEqual(['deflection', 'moment', 'reaction', 'shear']);
    for (const count of kinds.values()) expect(count).toBeGreaterThan(5);
  });

  test('has under it what a uniform load makes, span by span and over all', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        const quantity = quantityOf(beam, seed);
        const { areas, line } = influenceLine(beam, quantity);
        const loads = areas.map(({ from, to }) => ({ kind: 'line', from, to, w0: 1, w1: 1 }) as const);
        const section = 'at' in quantity ? [{ kind: 'point', at: quantity.at, p: 0 } as const] : [];
        const prepared = prepareBeam({ ...beam, loads: [...loads, ...section] });
        const limit = (1e-9 * magnitude(line) + nothing(beam, quantity)) * beam.length;
        areas.forEach(({ positive, negative }, i) => {
          expect(positive).toBeGreaterThanOrEqual(0);
          expect(negative).toBeLessThanOrEqual(0);
          const expected = valueIn(prepared.solve([loads[i]!], { movements: false }), quantity);
          expect(Math.abs(positive + negative - expected)).toBeLessThanOrEqual(limit);
        });
        expect(areas[0]!.from).toBe(0);
        expect(areas.at(-1)!.to).toBe(beam.length);
      }),
      RUNS,
    );
  });
});

/** Tables of ordinates: data/published/influence-ordinates.csv, whose sources beams.source.md names. */
type Row = { source: string; spans: string; line: string; span: string; at: string; printed: string };
const text = readFileSync(new URL('../../data/published/influence-ordinates.csv', import.meta.url), 'utf8');
const rows = Papa.parse<Row>(text, { header: true, skipEmptyLines: true }).data;

/** "MB", "RA", "M at 0.4" */
function printedQuantity(line: string, ends: readonly number[]): AskedQuantity {
  const support = 'ABCDEF'.indexOf(line[1]!);
  if (line.startsWith('R')) return { kind: 'reaction', support, component: 'vertical' };
  return { kind: 'moment', at: support >= 0 ? ends[support]! : Number(line.slice(5)) };
}

describe('printed ordinates', () => {
  test.each(rows)(
    '$source: $line of spans $spans, load in span $span',
    ({ spans, line, span, at, printed }) => {
      const ends = [0];
      for (const length of spans.split(' ')) ends.push(ends.at(-1)! + Number(length));
      const beam = stableBeam({
        length: ends.at(-1)!,
        ei: 1,
        supports: ends.map((x) => ({ at: x, kind: 'roller' })),
        horizontal: 'ignore',
      });
      const reading = readInfluenceQuantity(beam, printedQuantity(line, ends));
      if (!reading.ok) throw new Error(reading.faults[0]?.message);
      const { line: curve } = influenceLine(beam, reading.value);
      const [from, to] = [ends[Number(span) - 1]!, ends[Number(span)]!];
      const parts = at.split(' ');
      const values = printed.split(' ');
      expect(values).toHaveLength(parts.length);
      parts.forEach((part, i) => {
        expectPrinted(evaluate(curve, from + Number(part) * (to - from))[0], values[i]!);
      });
    },
  );
});
