/** A point of the sweep as a proof case that its author can keep. */

import { supportLetter } from '../model/index';
import { formatNumber, MINUS, THIN_SPACE, toUnit } from '../quantity/index';
import { solveStiffness } from '../stiffness/index';
import type { Template } from './document';
import type { BoxPoint } from './proof-box';
import { compareForms, solvePoint } from './proof-solve';

/** A proof case as an author writes it, its expressions as text. */
export type WrittenCase = {
  readonly name: string;
  readonly parameters: BoxPoint['parameters'];
  readonly ei: string;
  readonly source: string;
  readonly expect: readonly object[];
};

/** Figures of what direct stiffness found. */
const FIGURES = 6;

/**
 * The point with what must come out there: the closed forms that hold, or else the reactions that direct stiffness
 * finds, which the force method knows nothing of. Null where the point has no result.
 */
export function asProofCase(template: Template, point: BoxPoint, name: string): WrittenCase | null {
  const reading = solvePoint(template, point);
  const source = template.sources[0]?.id;
  if (reading.state !== 'solved' || source === undefined) return null;
  const { beam, limit } = reading.solved;
  const forms = compareForms(template, reading.solved).filter(({ share }) => share <= Math.min(limit, EXACT));
  const expect =
    forms.length > 0
      ? forms.slice(0, MOST_EXPECTED).map(({ id }) => ({ result: id }))
      : solveStiffness(beam).reactions.map(({ vertical }, k) => ({
          quantity: { reaction: supportLetter(k) },
          printed: `${printed(toUnit(vertical, 'kN'))} kN`,
        }));
  return { name, parameters: point.parameters, ei: point.ei, source, expect };
}

/** As proof cases compare closed forms, and how many they may expect. */
const EXACT = 1e-9;
const MOST_EXPECTED = 30;

const printed = (value: number): string =>
  formatNumber(value, { significant: FIGURES, places: 3 }).replaceAll(THIN_SPACE, '').replace(MINUS, '-');
