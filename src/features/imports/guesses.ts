import { FIELDS } from './fields';
import type { ImportView, Recognised } from './imports';

type Guess = ImportView['guesses'][number];
type Proposed = Recognised['mapping']['columns'][number];

/** What each column of a file is proposed to be, in the order of the columns. */
export function guessesOf({ columns, mapping }: Pick<Recognised, 'columns' | 'mapping'>): Guess[] {
  const proposed = new Map(mapping.columns.map((one) => [one.index, one]));
  return columns.map(({ index, confidence, reason }) => {
    const guess = proposed.get(index);
    return {
      column: index,
      field: guess?.field ?? null,
      unit: guess?.unit ?? null,
      factor: guess?.factor ?? 1,
      confidence,
      reason,
      open: guess ? openOf(guess, mapping.axes !== null) : [],
    };
  });
}

function openOf({ field, unit, byAxes }: Proposed, areAxesKnown: boolean): Guess['open'] {
  const isNumber = byAxes !== undefined || (field !== null && FIELDS[field].quantity !== null);
  return [
    ...(byAxes && !areAxesKnown ? (['axes'] as const) : []),
    ...(isNumber && unit === null ? (['unit'] as const) : []),
  ];
}
