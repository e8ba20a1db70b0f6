import type { Field } from './field';
import type { Fields } from './fields';
import { type Spot, station } from './lettered-beam';
import { formula } from './node';
import { recompute } from './recompute';
import { rootPlace } from './root';
import type { Acting, Key, Quantity, Side, Trace } from './types';

/** Part of the length by which a drawing may miss a peak. */
const DRAWN = 1e-5;

type ExtremeKey = Extract<Key, { kind: 'extreme' | 'place' }>;

/** The largest or smallest value, which is the value at its place. */
export function extremeOf(fields: Fields, key: ExtremeKey): Trace {
  const { quantity, sense, x, acting } = key;
  const field = fields.of(acting);
  const spot =
    sense === 'local' ? localSpot(fields, quantity, x, acting) : placeOf(fields, quantity, x, acting);
  const there = sideOf(field, quantity, spot, sense);
  const index = sense === 'local' ? 'loc' : sense;
  return formula(
    {
      label: `${NAMES[quantity][sense]}, ${field.beam.givens.placeWords(x)}`,
      symbol: `{${there.symbol}}_{\\mathrm{${index}}}`,
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

const NAMES: Readonly<Record<Quantity, Record<ExtremeKey['sense'], string>>> = {
  shear: { max: 'Largest shear', min: 'Smallest shear', local: 'Peak of the shear' },
  moment: { max: 'Largest sagging moment', min: 'Largest hogging moment', local: 'Peak of the moment' },
  slope: { max: 'Largest slope, anticlockwise', min: 'Largest slope, clockwise', local: 'Peak of the slope' },
  deflection: {
    max: 'Largest deflection, upward',
    min: 'Largest deflection, downward',
    local: 'Peak of the deflection',
  },
};

/** Where a value jumps, the side that the extreme is on; slopes and deflections are turned against the engine's. */
function sideOf(field: Field, quantity: Quantity, spot: Spot, sense: ExtremeKey['sense']): Trace {
  const [left, right] = (['left', 'right'] as const).map((side: Side) => field.at(quantity, spot, side));
  if (sense === 'local') return Math.abs(right!.value) > Math.abs(left!.value) ? right! : left!;
  const isTurned = quantity === 'slope' || quantity === 'deflection';
  const isLargest = isTurned ? sense === 'min' : sense === 'max';
  return isLargest === left!.value >= right!.value ? left! : right!;
}

/** A peak that a drawing found, brought to where the derivative is zero; one that is none stays where it is. */
function localSpot(fields: Fields, quantity: Quantity, x: number, acting: Acting): Spot {
  const { beam } = fields.all();
  const exact = recompute(placeOf(fields, quantity, x, acting).trace);
  return Math.abs(exact - x) <= DRAWN * beam.named.beam.length
    ? placeOf(fields, quantity, exact, acting)
    : { x, trace: station(x, 'Place on the drawing') };
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
