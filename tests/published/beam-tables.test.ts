import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { influenceLine } from '@/engine/influence/index';
import type { BeamDocument } from '@/engine/model/index';
import { evaluate } from '@/engine/polynomial/index';
import { isProven, proveSolution } from '@/engine/proof/index';
import { expectPrinted } from '../support/printed';
import { type PrintedBeamValue, printedBeamValues } from '../support/printed-tables';
import { ordinateLine, quantityOf } from '../support/printed-value';
import { stableBeam } from '../support/stable-beam';

const values = printedBeamValues();
/** Values printed of one beam stand together. */
const beams = new Map<BeamDocument, PrintedBeamValue[]>();
for (const value of values) beams.set(value.document, [...(beams.get(value.document) ?? []), value]);

describe.each([...beams].map(([document, printed]) => ({ document, printed, first: printed[0]! })))(
  '$first.source, $first.title',
  ({ document, printed }) => {
    const beam = stableBeam(document);
    const solution = solveBeam(beam);

    test('is proven', () => {
      expect(isProven(proveSolution(beam, solution), beam)).toBe(true);
    });

    test.each(printed)('$quantity is printed $printed', (value) => {
      expectPrinted(quantityOf(value.quantity, beam, solution), value.printed, value.units);
    });
  },
);

describe('influence lines', () => {
  test.each(values.filter(({ family }) => family === 'influence ordinates'))(
    '$title is printed $printed',
    ({ document, quantity, printed }) => {
      const ordinate = ordinateLine(stableBeam(document), quantity);
      const { line } = influenceLine(ordinate.unloaded, ordinate.quantity);
      expectPrinted(evaluate(line, ordinate.at)[0], printed);
    },
  );
});

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
