import type { Field } from './field';
import type { Fields } from './fields';
import type { Spot } from './lettered-beam';
import { formula } from './node';
import { rootPlace } from './root';
import type { Acting, Key, Quantity, Side, Trace } from './types';

type ExtremeKey = Extract<Key, { kind: 'extreme' | 'place' }>;

/** The largest or smallest value, which is the value at its place. */
export function extremeOf(fields: Fields, key: ExtremeKey): Trace {
  const { quantity, sense, x, acting } = key;
  const field = fields.of(acting);
  const spot = placeOf(fields, quantity, x, acting);
  const there = sideOf(field, quantity, spot, sense);
  return formula(
    {
      label: `${NAMES[quantity][sense]}, ${field.beam.givens.placeWords(x)}`,
      symbol: `{${there.symbol}}_{\\mathrm{${sense}}}`,
      value: there.value,
      measure: there.measure,
    },
    { method: 'extreme', tree: there.symbol },
    () => [
      { name: there.symbol, trace: there },
      { name: 'x', trace: spot.trace },
    ],
  );
}

const NAMES: Readonly<Record<Quantity, Record<'max' | 'min', string>>> = {
  shear: { max: 'Largest shear', min: 'Smallest shear' },
  moment: { max: 'Largest sagging moment', min: 'Largest hogging moment' },
  slope: { max: 'Largest slope, anticlockwise', min: 'Largest slope, clockwise' },
  deflection: { max: 'Largest deflection, upward', min: 'Largest deflection, downward' },
};

/** Where a value jumps, the side that the extreme is on; slopes and deflections are turned against the engine's. */
function sideOf(field: Field, quantity: Quantity, spot: Spot, sense: 'max' | 'min'): Trace {
  const [left, right] = (['left', 'right'] as const).map((side: Side) => field.at(quantity, spot, side));
  const isTurned = quantity === 'slope' || quantity === 'deflection';
  const isLargest = isTurned ? sense === 'min' : sense === 'max';
  return isLargest === left!.value >= right!.value ? left! : right!;
}

/** A place where an extreme is: given, where something acts or ends there, else where the derivative is zero. */
export function placeOf(
  fields: Fields,
  of: Quantity | 'contraflexure',
  x: number,
  acting: Acting,
  chord: Trace | null = null,
): Spot {
  const { beam } = fields.all();
  const { breaks } = beam.worked.solution.diagrams.moment;
  const at = [...breaks].find((one) => beam.givens.isSame(one, x));
  if (at !== undefined) return beam.spot(at);
  const before = breaks.findLast((one) => one < x) ?? 0;
  return { x, trace: rootPlace(fields.of(acting), of, beam.spot(before), x, chord) };
}
