/** Parameters that a part brings with it when it is added, ready to be renamed. */
import { isSymbol } from '@/engine/template/tree';
import type { Written } from '@/features/review/draft';
import { type Edit, listAt, textAt } from '../edit';

type Needed =
  | 'span'
  | 'overhang'
  | 'place'
  | 'force'
  | 'uniform'
  | 'varying'
  | 'couple'
  | 'curvature'
  | 'spring'
  | 'turning'
  | 'settlement';

interface Model {
  readonly letter: string;
  readonly tex?: string;
  readonly name: string;
  readonly help: string;
  readonly dimension: string;
  readonly default: string;
  readonly min: string;
  readonly max: string;
  readonly step: string;
  readonly group?: string;
  readonly units?: Readonly<Record<'metric' | 'us', string>>;
}

const MODELS: Readonly<Record<Needed, Model>> = {
  span: {
    letter: 'L',
    name: 'Span',
    help: 'Between the centres of the supports.',
    dimension: 'length',
    default: '6 m',
    min: '0.3 m',
    max: '30 m',
    step: '0.05 m',
  },
  overhang: {
    letter: 'a',
    name: 'Overhang',
    help: 'From the centre of the outer support to the free end. Zero is allowed.',
    dimension: 'length',
    default: '1.5 m',
    min: '0 m',
    max: '15 m',
    step: '0.05 m',
  },
  place: {
    letter: 'c',
    name: 'Place',
    help: 'From the support on its left.',
    dimension: 'length',
    default: '1 m',
    min: '0 m',
    max: '30 m',
    step: '0.05 m',
  },
  force: {
    letter: 'P',
    name: 'Point load',
    help: 'Down positive; uplift is negative.',
    dimension: 'force',
    default: '10 kN',
    min: '-500 kN',
    max: '2500 kN',
    step: '0.5 kN',
    group: 'G',
  },
  uniform: {
    letter: 'w',
    name: 'Uniform load',
    help: 'Per length of beam, down positive; an area load times the width it is carried over.',
    dimension: 'line_load',
    default: '10 kN/m',
    min: '-50 kN/m',
    max: '250 kN/m',
    step: '0.5 kN/m',
    group: 'G',
  },
  varying: {
    letter: 'w',
    name: 'Largest load',
    help: 'Per length of beam where the load is largest, down positive.',
    dimension: 'line_load',
    default: '10 kN/m',
    min: '-50 kN/m',
    max: '250 kN/m',
    step: '0.5 kN/m',
    group: 'G',
  },
  couple: {
    letter: 'M',
    name: 'Couple',
    help: 'Anticlockwise positive.',
    dimension: 'moment',
    default: '15 kNm',
    min: '-500 kNm',
    max: '500 kNm',
    step: '0.5 kNm',
    group: 'G',
  },
  curvature: {
    letter: 'K',
    tex: '\\kappa',
    name: 'Free curvature',
    help: 'Of a beam that is warmer below than above: α times the difference over the depth. Sagging positive.',
    dimension: 'curvature',
    default: '0.001 1/m',
    min: '-0.02 1/m',
    max: '0.02 1/m',
    step: '0.0001 1/m',
    group: 'T',
  },
  spring: {
    letter: 'k',
    name: 'Support stiffness',
    help: 'Force for one unit of movement of the support, calculated or tested.',
    dimension: 'spring',
    default: '2000 kN/m',
    min: '1 kN/m',
    max: '10000000 kN/m',
    step: '50 kN/m',
  },
  turning: {
    letter: 'k',
    tex: 'k_{\\theta}',
    name: 'Rotational stiffness',
    help: 'Moment for one radian of turn of the support, calculated or tested.',
    dimension: 'rotational_spring',
    default: '6000 kNm/rad',
    min: '1 kNm/rad',
    max: '10000000 kNm/rad',
    step: '100 kNm/rad',
  },
  settlement: {
    letter: 'D',
    tex: '\\Delta',
    name: 'Settlement',
    help: 'Of the support, down positive; negative where it rises.',
    dimension: 'length',
    default: '10 mm',
    min: '-200 mm',
    max: '200 mm',
    step: '1 mm',
    units: { metric: 'mm', us: 'in' },
  },
};

/** Symbols that parameters, their columns and derived values go by, and those that the template keeps for itself. */
function takenSymbols(document: Written): Set<string> {
  const symbols = (list: readonly unknown[]) => list.map((one) => textAt(one, '/symbol'));
  const parameters = listAt(document, '/parameters');
  return new Set([
    ...symbols(parameters),
    ...parameters.flatMap((one) => symbols(listAt(one, '/columns'))),
    ...symbols(listAt(document, '/derived')),
  ]);
}

const RESERVED = /^(EI|h|shear|dmax|R[A-Z])$/;

/** The letter itself, or with the first number that makes it new; a span has a number from the first. */
function freeSymbol(document: Written, letter: string, isNumbered: boolean): string {
  const taken = takenSymbols(document);
  const isFree = (symbol: string) => !taken.has(symbol) && !RESERVED.test(symbol) && isSymbol(symbol);
  if (!isNumbered && isFree(letter)) return letter;
  let number = isNumbered ? 1 : 2;
  while (!isFree(`${letter}${number}`)) number++;
  return `${letter}${number}`;
}

/** A new parameter of this sort: its symbol, and the edit that makes it. */
export function newParameter(
  document: Written,
  needed: Needed,
  own: Partial<Model> = {},
): { readonly symbol: string; readonly edit: Edit } {
  const { letter, tex = letter, name, ...rest } = { ...MODELS[needed], ...own };
  const symbol = freeSymbol(document, letter, needed === 'span');
  const number = symbol.slice(letter.length);
  const value = {
    kind: 'quantity',
    symbol,
    tex: number === '' ? tex : tex.includes('_') ? `${tex.slice(0, -1)},${number}}` : `${tex}_{${number}}`,
    name: number === '' ? name : `${name} ${number}`,
    ...rest,
  };
  return { symbol, edit: { do: 'insert', at: '/parameters/-', value } };
}
