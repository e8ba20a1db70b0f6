import { describe, expect, test } from 'vitest';
import { stationPositions } from '@/engine/beam/index';
import { type Envelope, type EnvelopeDocument, readEnvelope, solveEnvelope } from '@/engine/envelope/index';
import { expectPrinted } from '../support/printed';

/**
 * Equal spans on rollers with a uniform load that may stand on any of them: coefficients of wL², wL and wL⁴/EI as tables
 * of continuous beams print them (AISC Manual Table 3-23 cases 29 and 34–39; for five spans, the German tables that are
 * named after Schneider), all from memory.
 */
const STEPS = 1000;

const rollers = (...places: number[]) => places.map((at) => ({ at, kind: 'roller' as const }));

function envelopeOf(
  document: Pick<EnvelopeDocument, 'length' | 'supports' | 'loads' | 'combinations'>,
  stations = 2,
): Envelope {
  const task = readEnvelope({ ei: 1, patterns: ['Q'], horizontal: 'ignore', ...document });
  if (!task.ok) throw new Error(task.faults[0]?.message);
  const solved = solveEnvelope(task.value, stationPositions(document, stations));
  if (!solved.ok) throw new Error(solved.faults[0]?.message);
  return solved.value.envelope;
}

const patterned = (spans: number): Envelope =>
  envelopeOf(
    {
      length: spans,
      supports: rollers(...Array.from({ length: spans + 1 }, (_, at) => at)),
      loads: [{ kind: 'line', from: 0, to: spans, w0: 1, w1: 1, group: 'Q' }],
      combinations: [{ name: 'Q', factors: { Q: 1 } }],
    },
    spans * STEPS + 1,
  );

/** The largest sagging moment of a span and the loaded spans that give it, by its finely spaced stations. */
function sagging({ stations }: Envelope, span: number) {
  const within = stations.slice(span * STEPS, (span + 1) * STEPS + 1).map(({ moment }) => moment.max);
  return within.reduce((a, b) => (b.value > a.value ? b : a));
}
const hogging = ({ stations }: Envelope, support: number) => stations[support * STEPS]!.moment.min;
const reaction = ({ reactions }: Envelope, support: number) => reactions[support]!.max.vertical;
const sag = ({ stations }: Envelope, span: number) =>
  Math.max(
    ...stations.slice(span * STEPS, (span + 1) * STEPS).map(({ deflection }) => -deflection.min.value),
  );

describe('two equal spans', () => {
  const envelope = patterned(2);
  test('have the printed moments, with the loaded spans that the table draws', () => {
    expectPrinted(sagging(envelope, 0).value, '0.0957');
    expect(sagging(envelope, 0).pattern).toEqual([0]);
    expectPrinted(hogging(envelope, 1).value, '-0.125');
    expect(hogging(envelope, 1).pattern).toEqual([0, 1]);
  });

  test('have the printed reactions, upward and downward, and deflection', () => {
    expectPrinted(reaction(envelope, 0).value, '0.4375');
    expectPrinted(reaction(envelope, 1).value, '1.250');
    expectPrinted(envelope.reactions[2]!.min.vertical.value, '-0.0625');
    expect(envelope.reactions[2]!.min.vertical.pattern).toEqual([0]);
    expectPrinted(sag(envelope, 0), '0.0092'); // 0.00915
  });
});

describe('three equal spans', () => {
  const envelope = patterned(3);
  test('have the printed moments, with the loaded spans that the table draws', () => {
    expectPrinted(sagging(envelope, 0).value, '0.1013');
    expect(sagging(envelope, 0).pattern).toEqual([0, 2]);
    expectPrinted(sagging(envelope, 1).value, '0.075');
    expect(sagging(envelope, 1).pattern).toEqual([1]);
    expectPrinted(hogging(envelope, 1).value, '-0.1167');
    expect(hogging(envelope, 1).pattern).toEqual([0, 1]);
  });

  test('have the printed reactions, shears and deflections', () => {
    expectPrinted(reaction(envelope, 0).value, '0.450');
    expectPrinted(reaction(envelope, 1).value, '1.200');
    expect(reaction(envelope, 1).pattern).toEqual([0, 1]);
    expectPrinted(envelope.extremes.shear.min.value, '-0.617');
    expectPrinted(envelope.stations[STEPS]!.shear.max.value, '0.583');
    expectPrinted(sag(envelope, 0), '0.0099');
    expectPrinted(sag(envelope, 1), '0.00677');
  });

  test('have their extremes exactly: 0.45L from either end, 81/800', () => {
    const { max, min } = envelope.extremes.moment;
    expectPrinted(max.value, '81/800');
    expect(max.pattern).toEqual([0, 2]);
    expect(max.at.map((x) => x.toFixed(9))).toEqual(['0.450000000', '2.550000000']);
    expectPrinted(-min.value, '7/60');
    expect(min.at).toEqual(min.pattern.includes(0) ? [1] : [2]);
  });
});

describe('four equal spans', () => {
  const envelope = patterned(4);
  test('have the printed moments, with the loaded spans that the table draws', () => {
    expectPrinted(sagging(envelope, 0).value, '0.0996');
    expect(sagging(envelope, 0).pattern).toEqual([0, 2]);
    expectPrinted(sagging(envelope, 1).value, '0.0805');
    expect(sagging(envelope, 1).pattern).toEqual([1, 3]);
    expectPrinted(hogging(envelope, 1).value, '-0.1205');
    expect(hogging(envelope, 1).pattern).toEqual([0, 1, 3]);
    expectPrinted(hogging(envelope, 2).value, '-0.1071');
    expect(hogging(envelope, 2).pattern).toEqual([1, 2]);
  });

  test('have the printed reactions and deflection', () => {
    expectPrinted(reaction(envelope, 0).value, '0.446');
    expectPrinted(reaction(envelope, 1).value, '1.223');
    expectPrinted(reaction(envelope, 2).value, '1.143');
    expectPrinted(sag(envelope, 0), '0.0097');
  });
});

describe('five equal spans', () => {
  const envelope = patterned(5);
  test('have the printed moments', () => {
    expectPrinted(sagging(envelope, 0).value, '0.100');
    expectPrinted(sagging(envelope, 1).value, '0.079');
    expectPrinted(sagging(envelope, 2).value, '0.086');
    expect(sagging(envelope, 2).pattern).toEqual([0, 2, 4]);
    expectPrinted(hogging(envelope, 1).value, '-0.120');
    expect(hogging(envelope, 1).pattern).toEqual([0, 1, 3]);
    expectPrinted(hogging(envelope, 2).value, '-0.111');
    expect(hogging(envelope, 2).pattern).toEqual([1, 2, 4]);
  });

  test('have the printed reactions', () => {
    expectPrinted(reaction(envelope, 0).value, '0.447');
    expectPrinted(reaction(envelope, 1).value, '1.218');
    expectPrinted(reaction(envelope, 2).value, '1.167');
  });
});

// A member of the demo, its figures from a separate stiffness program before this engine was written.
test('a plant deck of two spans of 5.4 m pulls at its far support: kN, m', () => {
  const uniform = (w: number, group: string) =>
    ({ kind: 'line', from: 0, to: 10.8, w0: w, w1: w, group }) as const;
  const { extremes, reactions } = envelopeOf({
    length: 10.8,
    supports: rollers(0, 5.4, 10.8),
    loads: [uniform(4.42, 'G'), uniform(18, 'Q')],
    combinations: [
      { name: 'strength', factors: { G: 1.25, Q: 1.5 } },
      { name: 'equilibrium', factors: { G: 0.9, Q: 1.5 } },
    ],
  });
  expectPrinted(extremes.moment.min.value, '-118.5', 0.6);
  expectPrinted(extremes.moment.max.value, '86.4');
  expectPrinted(reactions[2]!.min.vertical.value, '-1.1');
  expect(reactions[2]!.min.vertical).toMatchObject({ combination: 'equilibrium', pattern: [0] });
});
