import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { type BeamDocument, readBeam } from '@/engine/model/index';
import { isProven, proveSolution } from '@/engine/proof/index';
import { expectPrinted } from '../support/printed';
import { type PrintedBeamValue, printedBeamValues } from '../support/printed-tables';
import { quantityOf } from '../support/printed-value';

const values = printedBeamValues();
/** Values printed of one beam stand together. */
const beams = new Map<BeamDocument, PrintedBeamValue[]>();
for (const value of values) beams.set(value.document, [...(beams.get(value.document) ?? []), value]);

describe.each([...beams].map(([document, printed]) => ({ document, printed, first: printed[0]! })))(
  '$first.source, $first.title',
  ({ document, printed }) => {
    const reading = readBeam(document);
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    const solution = solveBeam(reading.value);

    test('is proven', () => {
      expect(isProven(proveSolution(reading.value, solution), reading.value)).toBe(true);
    });

    test.each(printed)('$quantity is printed $printed', (value) => {
      expectPrinted(quantityOf(value.quantity, reading.value, solution), value.printed, value.units);
    });
  },
);

test('the tables hold as many values of each family as were typed', () => {
  const counts: Record<string, number> = {};
  for (const { family } of values) counts[family] = (counts[family] ?? 0) + 1;
  expect(counts).toEqual({
    'single beams': 158,
    'equal spans, all patterns': 988,
    'influence ordinates': 111,
    'sinking supports': 48,
    'turned ends and springs': 21,
  });
});
