import { describe, expect, test } from 'vitest';
import { solveBeam, stationPositions, stationsAt } from '@/engine/beam/index';
import { type BeamDocument, readBeam } from '@/engine/model/index';
import file from '../support/solve-examples.json';

/** Exact answers in rational arithmetic, made by another program than ours (see `about` in the file). */
const WITHIN = 1e-9; // of the largest value of each quantity

const QUANTITIES = ['shear', 'moment', 'deflection'] as const;

function solved(document: BeamDocument) {
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  const solution = solveBeam(reading.value);
  return { solution, stations: stationsAt(solution, stationPositions(reading.value, document.stations)) };
}

function near(actual: number, expected: number, largest: number): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(WITHIN * largest);
}

describe.each(file.examples.map((example, i) => ({ ...example, title: `${i}: ${example.name}` })))(
  'example $title',
  ({ request, answer }) => {
    const document = request as BeamDocument;
    const { solution, stations } = solved(document);

    test('has the degree and the reactions', () => {
      expect(solution.degree).toBe(answer.degree);
      expect(solution.reactions.map(({ at }) => at)).toEqual(answer.reactions.map(({ at }) => at));
      for (const component of ['vertical', 'moment'] as const) {
        const largest = Math.max(...answer.reactions.map((reaction) => Math.abs(reaction[component])));
        solution.reactions.forEach((reaction, i) => {
          near(reaction[component], answer.reactions[i]![component], largest);
        });
      }
    });

    test('has the diagrams at the stations, left and right', () => {
      expect(stations.map(({ x }) => x)).toEqual(answer.stations.map(({ x }) => expect.closeTo(x, 9)));
      for (const quantity of ['shear', 'moment', 'slope'] as const) {
        const largest = Math.max(...answer.stations.flatMap((station) => station[quantity].map(Math.abs)));
        stations.forEach((station, i) => {
          near(station[quantity][0], answer.stations[i]![quantity][0]!, largest);
          near(station[quantity][1], answer.stations[i]![quantity][1]!, largest);
        });
      }
      const largest = Math.max(...answer.stations.map(({ deflection }) => Math.abs(deflection)));
      stations.forEach(({ deflection }, i) => {
        near(deflection, answer.stations[i]!.deflection, largest);
      });
    });

    test.each(QUANTITIES)(
      'has the extremes of the %s and every place where they are attained',
      (quantity) => {
        const expected = answer.extremes[quantity];
        const largest = Math.max(Math.abs(expected.max.value), Math.abs(expected.min.value));
        for (const side of ['max', 'min'] as const) {
          const extreme = solution.extremes[quantity][side];
          near(extreme.value, expected[side].value, largest);
          expect(extreme.at).toHaveLength(expected[side].at.length);
          extreme.at.forEach((x, i) => {
            near(x, expected[side].at[i]!, document.length);
          });
        }
      },
    );
  },
);
