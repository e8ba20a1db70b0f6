import {
  divide,
  type Expression,
  formula as expressionOf,
  negate,
  substitute,
  symbolsOf,
  ZERO,
} from '../chart/index';
import type { Tree } from '../template/index';
import type { Field, Local } from './field';
import type { Spot } from './lettered-beam';
import { texOf } from './names';
import { formula, type Head, node } from './node';
import { positive, total, treeOf, withNames } from './tree';
import type { Part, Quantity, Trace } from './types';

type Names = Readonly<Record<string, Trace | null>>;

/** Coefficients of s from a place, lowest power first, of what vanishes where a quantity has its extreme. */
function coefficientsOf(of: Quantity | 'contraflexure', { GA }: Local): string[] {
  const shear = (term: string) => (GA ? term : '');
  switch (of) {
    case 'shear':
      return ['w', 'r'];
    case 'moment':
      return ['V', '-w', '-r/2'];
    case 'contraflexure':
      return ['M', 'V', '-w/2', '-r/6'];
    case 'slope':
      return [`M/EI+kappa${shear('+w/GA')}`, `V/EI${shear('+r/GA')}`, '-w/(2*EI)', '-r/(6*EI)'];
    case 'deflection':
      return [
        'theta-psi',
        `-M/EI-kappa${shear('-w/GA')}`,
        `-V/(2*EI)${shear('-r/(2*GA)')}`,
        'w/(6*EI)',
        'r/(24*EI)',
      ];
  }
}

/** All that the coefficients speak of, at the left end of the piece that they belong to; null for nothing. */
function namesAt(field: Field, of: Quantity | 'contraflexure', spot: Spot): Names {
  const read = (quantity: Quantity) => {
    const trace = field.at(quantity, spot, 'right');
    return trace.value === 0 ? null : trace;
  };
  return {
    ...field.local(spot.x),
    V: of === 'shear' ? null : read('shear'),
    M: of === 'shear' || of === 'moment' ? null : read('moment'),
    theta: of === 'deflection' ? read('slope') : null,
  };
}

function polynomialAt(field: Field, of: Quantity | 'contraflexure', spot: Spot, chord: Trace | null) {
  const names: Names = { ...namesAt(field, of, spot), psi: chord };
  const nothing = Object.keys(names).filter((name) => names[name] === null);
  const gone = Object.fromEntries(nothing.map((name) => [name, ZERO]));
  const all = coefficientsOf(of, field.local(spot.x)).map((text) => substitute(expressionOf(text), gone));
  const highest = all.findLastIndex((expression) => expression.length > 0);
  return { names, coefficients: all.slice(0, highest + 1) };
}

const partsOf = (names: Names, expressions: readonly Expression[]): Part[] =>
  [...new Set(expressions.flatMap(symbolsOf))].map((name) => ({ name: texOf(name), trace: names[name]! }));

const treeIn = (expression: Expression): Tree => withNames(treeOf(expression), texOf);

const WHERE: Readonly<Record<Quantity | 'contraflexure', string>> = {
  shear: 'the line load is zero',
  moment: 'the shear is zero',
  slope: 'the curvature is zero',
  deflection: 'the slope is zero',
  contraflexure: 'the moment is zero',
};

/**
 * The place in the piece from `left` where a quantity has an extreme, or the moment is zero; of a deflection that is
 * measured from a chord, with the chord's slope.
 */
export function rootPlace(
  field: Field,
  of: Quantity | 'contraflexure',
  left: Spot,
  x: number,
  chord: Trace | null = null,
): Trace {
  const { names, coefficients } = polynomialAt(field, of, left, chord);
  const head: Head = {
    label: `Place where ${chord ? 'the slope is that of the chord' : WHERE[of]}`,
    symbol: 'x',
    value: x,
    measure: 'position',
  };
  const origin: Part[] = left.x === 0 ? [] : [{ name: 'x_0', trace: left.trace }];
  const parts = () => [...origin, ...partsOf(names, coefficients)];
  const from = left.x === 0 ? 0 : 'x_0';
  const [c0, c1] = coefficients;
  if (c0 && c1?.length === 1 && coefficients.length === 2) {
    const distance = treeIn(divide(negate(c0), c1));
    return formula(head, { method: 'extreme', tree: from === 0 ? distance : ['+', from, distance] }, parts);
  }
  return node(head, { kind: 'root', from, polynomial: coefficients.map(treeIn) }, parts);
}

/** The slope further on in the piece from a place, by what acts there. */
export function slopeBeyond(field: Field, from: number, spot: Spot, value: number): Trace {
  const { names, coefficients } = polynomialAt(field, 'deflection', field.beam.spot(from), null);
  const length = field.beam.distance(from, spot.x);
  const tree = total(
    coefficients.map((one, k) => positive(k === 0 ? treeIn(one) : ['*', treeIn(one), ['^', 's', k]])),
  );
  const words = field.beam.givens.placeWords(spot.x);
  return formula(
    { label: `Slope ${words}, just left`, symbol: '\\theta', value, measure: 'slope' },
    { method: 'definition', tree },
    () => [...partsOf(names, coefficients), { name: 's', trace: length }],
  );
}
