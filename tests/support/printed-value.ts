import type { Solution } from '@/engine/beam/index';
import type { InfluenceQuantity } from '@/engine/influence/index';
import type { Beam } from '@/engine/model/index';
import { evaluate, extremes, type Piecewise, piecewise } from '@/engine/polynomial/index';

/** What a printed text says, and how far from it a value may be and still be printed so. */
export type PrintedValue = { want: number; tolerance: number };

/** A value halfway between two digits may be printed as either. */
const TIE = 1 + 1e-9;

/**
 * Half a unit of the last printed digit (or as many as the table is known to be off by); a fraction, and a whole number
 * below ten, are exact but for rounding. NaN where the text is no number.
 */
export function readPrinted(printed: string, units = 0.5): PrintedValue {
  const [top = '', bottom] = printed.split('/');
  const want = bottom === undefined ? Number(top) : Number(top) / Number(bottom);
  const decimals = top.split('.')[1]?.length ?? 0;
  const whole = bottom !== undefined || (decimals === 0 && Math.abs(want) < 10);
  return { want, tolerance: whole ? 1e-11 * Math.abs(want) : units * 10 ** -decimals * TIE };
}

/**
 * A quantity by the name that the tables of data/published give it, with the tables' signs: reactions up, their moments
 * anticlockwise, moments sagging, deflection down, slope clockwise. Supports are R1, R2 … or RA, RB … from the left,
 * spans 1, 2 … where every span is 1.
 */
export function quantityOf(quantity: string, beam: Beam, solution: Solution): number {
  const { reactions, diagrams, extremes: most } = solution;
  const at = Number(/ at ([\d.]+)$/.exec(quantity)?.[1]);
  switch (true) {
    case /^R[1-9A-F]$/.test(quantity):
      return reactions[placeOf(quantity[1]!)]!.vertical;
    case /^C[1-9]$/.test(quantity):
      return reactions[placeOf(quantity[1]!)]!.moment;
    case /^M[A-F]$/.test(quantity):
      return evaluate(diagrams.moment, beam.supports[placeOf(quantity[1]!)]!.at)[0];
    case /^V[A-F][lr]?$/.test(quantity):
      return evaluate(diagrams.shear, beam.supports[placeOf(quantity[1]!)]!.at)[quantity[2] === 'l' ? 0 : 1];
    case /^M[1-9]$/.test(quantity):
      return extremes(within(diagrams.moment, placeOf(quantity[1]!))).max.value;
    case /^f[1-9]$/.test(quantity):
      return -100 * evaluate(diagrams.deflection, placeOf(quantity[1]!) + 0.5)[0];
    case quantity === 'M max':
      return most.moment.max.value;
    case quantity === 'M min':
      return most.moment.min.value;
    case quantity === 'x of M max':
      return most.moment.max.at[0]!;
    case quantity === 'd max':
      return -most.deflection.min.value;
    case quantity === '1/d max':
      return -1 / most.deflection.min.value;
    case quantity === 'rise max':
      return most.deflection.max.value;
    case quantity === 'x of d max':
      return most.deflection.min.at[0]!;
    case quantity === 'x of d max from right':
      return beam.length - most.deflection.min.at[0]!;
    case quantity.startsWith('M at'):
      return evaluate(diagrams.moment, at)[0];
    case quantity.startsWith('d at'):
      return -evaluate(diagrams.deflection, at)[0];
    case quantity.startsWith('slope at'):
      return -evaluate(diagrams.slope, at)[0];
    default:
      throw new Error(`"${quantity}" is no quantity`);
  }
}

/**
 * The influence line that an ordinate is of, where the beam's one load is the unit force: RA, RB … a vertical reaction,
 * MA, MB … the moment over a support, "M at x" that at a place.
 */
export function ordinateLine({ loads, ...beam }: Beam, quantity: string): OrdinateLine {
  const [load] = loads;
  if (load?.kind !== 'point') throw new Error('an ordinate is of one unit force');
  const support = 'ABCDEF'.indexOf(quantity[1] ?? '');
  const at = support < 0 ? Number(quantity.replace('M at ', '')) : beam.supports[support]!.at;
  return {
    unloaded: { ...beam, loads: [] },
    at: load.at,
    quantity: quantity.startsWith('R')
      ? { kind: 'reaction', support, component: 'vertical' }
      : { kind: 'moment', at, side: 'left' },
  };
}

type OrdinateLine = { unloaded: Beam; at: number; quantity: InfluenceQuantity };

/** 0 for the first of 1, 2 … or A, B … */
const placeOf = (mark: string): number => (mark < 'A' ? Number(mark) - 1 : mark.charCodeAt(0) - 65);

/** The pieces between `from` and one length farther. */
function within({ breaks, degree, coefficients }: Piecewise, from: number): Piecewise {
  const pieces = Array.from(breaks.subarray(0, -1), (_, k) => k).filter(
    (k) => breaks[k]! >= from && breaks[k + 1]! <= from + 1,
  );
  const [first, last] = [pieces[0]!, pieces.at(-1)!];
  return piecewise(
    breaks.subarray(first, last + 2),
    pieces.map((k) => [...coefficients.subarray(k * (degree + 1), (k + 1) * (degree + 1))]),
  );
}
