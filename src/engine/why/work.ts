import {
  add,
  type Expression,
  evaluate as evaluateExpression,
  formula as expressionOf,
  substitute,
  symbolsOf,
  ZERO,
} from '../chart/index';
import { fixingSense } from '../derivation/index';
import { texOf } from './names';
import { formula, type Head } from './node';
import { valueAt } from './read';
import type { State } from './state';
import { positive, total, treeOf, withNames } from './tree';
import type { Measure, Part, Trace } from './types';

/** ∫ (m + v s)(M + V s − w s²/2 − r s³/6)/EI ds from 0 to l, and what shear and free curvature add. */
const BENDING = expressionOf('(m*(M*l+V*l^2/2-w*l^3/6-r*l^4/24)+v*(M*l^2/2+V*l^3/3-w*l^4/8-r*l^5/30))/EI');
const SHEARING = expressionOf('v*(V*l-w*l^2/2-r*l^3/6)/GA');
const BENT = expressionOf('kappa*(m*l+v*l^2/2)');

export type Work = {
  /** The released beam under a unit load or redundant. */
  readonly own: State;
  /** The beam whose movement is found, with its loads unless a unit redundant is all that acts. */
  readonly other: State;
  /** Whether its free curvatures and the movements of its supports come with it. */
  readonly isLoaded: boolean;
  readonly sense: 1 | -1;
  /** Sections where a diagram has a break beside the beam's own points. */
  readonly cuts?: readonly number[];
};

/**
 * A movement by the theorem of the unit load: sense · (∫ m M/EI dx + ∫ m κ dx + ∫ v V/GA dx + Σ r R/k − Σ r Δ), a part
 * for each stretch of the beam and for each support that gives.
 */
export function byUnitLoad(head: Head, work: Work): Trace {
  const parts = [
    ...stretchesOf(work).flatMap((stretch) => ofStretch(work, stretch, head.measure)),
    ...ofSupports(work, head.measure),
  ];
  const names = parts.map((_, k) => `\\Delta_{${k + 1}}`);
  const sum = total(names.map(positive));
  const tree = work.sense < 0 && parts.length > 0 ? (['neg', sum] as const) : sum;
  return formula(
    head,
    { method: 'unit load', tree, sources: [{ text: 'Theorem of the unit load', fromMemory: false }] },
    () => parts.map((trace, k): Part => ({ name: names[k]!, trace })),
  );
}

type Stretch = { readonly from: number; readonly to: number };
type Letters = Readonly<Record<string, Trace | null>>;

function stretchesOf({ own, other, cuts = [] }: Work): Stretch[] {
  const { beam } = own.beam.named;
  const ends = other.beam.named.beam.loads.flatMap((load) => ('from' in load ? [load.from, load.to] : []));
  const breaks = [own, other].flatMap(({ diagrams }) => [...diagrams.moment.breaks]);
  const all = [0, beam.length, ...beam.segments.map(({ to }) => to), ...breaks, ...ends, ...cuts];
  const points = [...new Set(all)].sort((a, b) => a - b);
  return points.slice(1).map((to, k) => ({ from: points[k]!, to }));
}

function ofStretch(work: Work, { from, to }: Stretch, measure: Measure): Trace[] {
  const { own, other, isLoaded } = work;
  const { givens } = own.beam;
  const [start, end] = [from, to].map((x) => givens.placeWords(x).replace(/^at /, ''));
  const letters: Letters = {
    ...unitLetters(own, from),
    ...beamLetters(other, from),
    ...stiffnessLetters(other, from),
    kappa: isLoaded ? curvatureAt(other, from) : null,
    l: own.beam.distance(from, to),
  };
  const integral = (name: string, whole: Expression) =>
    written({ label: `${name} from ${start} to ${end}`, measure }, whole, letters);
  return [
    ...integral('Bending', BENDING),
    ...(letters['GA'] ? integral('Shear', SHEARING) : []),
    ...integral('Free curvature', BENT),
  ];
}

/** The formula without what is nothing; none where nothing is left. */
function written(head: Pick<Head, 'label' | 'measure'>, whole: Expression, letters: Letters): Trace[] {
  const nothing = Object.entries(letters).filter(([, trace]) => trace === null);
  const expression = substitute(whole, Object.fromEntries(nothing.map(([name]) => [name, ZERO])));
  if (expression.length === 0) return [];
  const parts = symbolsOf(expression).map((name): Part => ({ name: texOf(name), trace: letters[name]! }));
  const tree = withNames(treeOf(expression), texOf);
  const value = evaluateExpression(expression, (name) => letters[name]!.value);
  return [formula({ ...head, symbol: '', value }, { method: 'closed form', tree }, () => parts)];
}

/** Moment and shear of the unit load just right of a place; null for nothing. */
const unitLetters = (own: State, from: number): Letters => ({
  m: ordinate(own, 'moment', from),
  v: ordinate(own, 'shear', from),
});

const beamLetters = (other: State, from: number): Letters => ({
  M: ordinate(other, 'moment', from),
  V: ordinate(other, 'shear', from),
  ...(typeof other.kind === 'number' ? { w: null, r: null } : loadingLetters(other, from)),
});

/** The line load just right of a place, and by how much it grows along the beam. */
export function loadingLetters(state: State, from: number): { w: Trace | null; r: Trace | null } {
  const { intensity, rate } = state.loading(state.beam.spot(from));
  const words = state.beam.givens.placeWords(from);
  return {
    w: given(state, `Line load ${words}`, 'line_load', intensity),
    r: given(state, `Growth of the line load ${words.replace(/^at /, 'from ')}`, 'area_load', rate),
  };
}

function given(state: State, label: string, measure: Measure, expression: Expression): Trace | null {
  if (expression.length === 0) return null;
  const value = state.beam.named.letters.of(expression);
  return state.worked({ label, symbol: '', value, measure }, 'definition', expression);
}

function ordinate(state: State, quantity: 'moment' | 'shear', from: number): Trace | null {
  if (valueAt(state.diagrams[quantity], from, 'right') === 0) return null;
  const spot = state.beam.spot(from);
  return quantity === 'moment' ? state.moment(spot, 'right') : state.shear(spot, 'right');
}

/** EI and GA just right of a place. */
export function stiffnessLetters({ beam }: State, from: number): { EI: Trace; GA: Trace | null } {
  const segment = beam.named.segments.find((one) => one.from <= from && from < one.to)!;
  const letter = (expression: Expression) => beam.given(symbolsOf(expression)[0]!);
  return { EI: letter(segment.ei), GA: segment.ga && letter(segment.ga) };
}

/** The free curvature just right of a place; null for none. */
export function curvatureAt(state: State, from: number): Trace | null {
  const { named, givens } = state.beam;
  const here = named.groups.flatMap(({ fine }) =>
    fine.flatMap((load) => {
      if (load.kind !== 'curvature') return [];
      const [start, end] = [named.letters.of(load.from), named.letters.of(load.to)];
      const isOver = (start < from || givens.isSame(start, from)) && from < end && !givens.isSame(from, end);
      return isOver ? [load.kappa] : [];
    }),
  );
  return given(state, `Free curvature ${givens.placeWords(from)}`, 'curvature', add(...here));
}

/** Springs give by their force, and supports move as prescribed. */
function ofSupports({ own, other, isLoaded }: Work, measure: Measure): Trace[] {
  const { unknowns } = own.beam.worked;
  return other.beam.named.supports.flatMap((named) =>
    COMPONENTS.flatMap(({ component, force }): Trace[] => {
      const restraint = named.support[component];
      const r = own.reaction(named.index, force);
      if (restraint.kind === 'free' || !r) return [];
      const isReleased = unknowns.some(
        ({ redundant }) => redundant.component === component && redundant.support === named.index,
      );
      const R = other.reaction(named.index, force);
      const head = { symbol: '', measure };
      return [
        ...(restraint.kind === 'spring' && R ? [yielded(head, other, named, component, { r, R })] : []),
        ...(isLoaded && restraint.movement !== 0 && !isReleased
          ? [moved(head, other, named, component, r)]
          : []),
      ];
    }),
  );
}

const COMPONENTS = [
  { component: 'vertical', force: 'vertical' },
  { component: 'rotation', force: 'moment' },
] as const;
type Component = 'vertical' | 'rotation';
type NamedSupport = State['beam']['named']['supports'][number];
type Unnamed = Pick<Head, 'symbol' | 'measure'>;

function yielded(
  head: Unnamed,
  { beam }: State,
  { letter }: NamedSupport,
  component: Component,
  { r, R }: { readonly r: Trace; readonly R: Trace },
): Trace {
  const k = beam.given(component === 'vertical' ? `k_{${letter}}` : `k_{\\theta ${letter}}`);
  return formula(
    { ...head, label: `The spring at ${letter}`, value: (r.value * R.value) / k.value },
    { method: 'closed form', tree: ['/', ['*', 'r', 'R'], 'k'] },
    () => [
      { name: 'r', trace: r },
      { name: 'R', trace: R },
      { name: 'k', trace: k },
    ],
  );
}

/** − r Δ: a settlement is down, and a turn anticlockwise. */
function moved(head: Unnamed, { beam }: State, named: NamedSupport, component: Component, r: Trace): Trace {
  const { letter } = named;
  const isTurn = component === 'rotation';
  const given = beam.given(isTurn ? `\\varphi_{${letter}}` : `\\Delta_{${letter}}`);
  const isAgainst = isTurn && fixingSense(beam.named, named) > 0;
  const product = ['*', 'r', given.symbol] as const;
  return formula(
    {
      ...head,
      label: `The support at ${letter} ${isTurn ? 'turns' : 'settles'}`,
      value: r.value * given.value * (isAgainst ? -1 : 1),
    },
    { method: 'closed form', tree: isAgainst ? ['neg', product] : product },
    () => [
      { name: 'r', trace: r },
      { name: given.symbol, trace: given },
    ],
  );
}
