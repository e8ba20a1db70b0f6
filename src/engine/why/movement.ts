import type { ChartTerm, Movement } from '../chart/index';
import { type Piece, unitOn } from '../derivation/index';
import type { Segment } from '../model/index';
import { byChart, type Cause, chartedCauses, chartedUnit } from './charted';
import { LetteredBeam, type Spot } from './lettered-beam';
import { formula, type Head } from './node';
import { valueAt } from './read';
import { Redundants } from './redundants';
import type { State } from './state';
import { positive, total } from './tree';
import type { Measure, Part, Side, Trace } from './types';
import { byUnitLoad } from './work';

/** Closed forms may differ from the exact value by rounding alone. */
const SAME = 1e-9;

const WORDS = {
  deflection: { name: 'Deflection', symbol: '\\delta', measure: 'deflection' },
  slope: { name: 'Slope', symbol: '\\theta', measure: 'slope' },
} as const satisfies Record<Movement, { name: string; symbol: string; measure: Measure }>;

/**
 * The deflection, positive down, or the slope, clockwise, at a place (where the beam shears, the turn of its section): by closed forms of the released beam, and of each
 * redundant times its unit case; or by a unit load where no charts give it. Null for the slope just left of a hinge that
 * no charts give, since a couple there turns its right side.
 */
export function movementAt(redundants: Redundants, spot: Spot, movement: Movement, side: Side): Trace | null {
  const { beam, built } = redundants;
  const { name, symbol, measure } = WORDS[movement];
  const value = turned(built, movement, spot.x, side);
  const isTurn = movement === 'slope' && segmentAt(beam, spot.x, side).ga !== null;
  const words = beam.givens.placeWords(spot.x);
  const head: Head = isTurn
    ? { label: `Turn of the section ${words}`, symbol: '\\psi', value, measure }
    : { label: `${name} ${words}`, symbol, value, measure };
  const charted = superposed(redundants, head, spot, movement, side);
  if (charted) return charted;
  const isHinged = beam.named.beam.hinges.some((x) => beam.givens.isSame(x, spot.x));
  const isBeyond = movement === 'slope' && side === 'left' && isHinged;
  return isBeyond ? null : unitLoaded(redundants, head, spot, movement);
}

/** The segment of the beam just left or right of a place. */
export const segmentAt = ({ named }: LetteredBeam, x: number, side: Side): Segment =>
  named.beam.segments.find(({ from, to }) => (side === 'left' && x > 0 ? x <= to : x < to && from <= x)) ??
  named.beam.segments.at(-1)!;

/** Down, and clockwise; where the beam shears, the turn of the section, of which the slope is more by V/GA. */
function turned(state: State, movement: Movement, x: number, side: Side): number {
  const { diagrams, beam } = state;
  const { ga } = segmentAt(beam, x, side);
  const sheared = movement === 'slope' && ga !== null ? valueAt(diagrams.shear, x, side) / ga : 0;
  return -valueAt(diagrams[movement], x, side) - sheared + 0;
}

type UnitCase = { readonly i: number; readonly terms: ChartTerm[] };

function superposed(
  redundants: Redundants,
  head: Head,
  spot: Spot,
  movement: Movement,
  side: Side,
): Trace | null {
  const { beam, movements } = redundants;
  const { named, worked } = beam;
  const end = named.beam.length;
  const piece = movements.pieces?.find(({ from, to }) => isOn({ from, to, end }, spot.x, side));
  if (!piece) return null;
  const place = beam.at(spot);
  const causes = chartedCauses(named, piece, place, movement);
  const units = worked.unknowns.map((_, i) => unitCase(redundants, piece, i, spot, movement));
  if (!causes || !units.every((unit) => unit !== null)) return null;
  const acting = units.filter(({ terms }) => terms.length > 0);
  if (!comesTo(redundants, causes, acting, head.value)) return null;
  if (worked.unknowns.length === 0) return ofCauses(redundants.built, head, causes);
  return ofCases(redundants, head, { causes, units: acting, spot, movement, side });
}

type Stretch = { readonly from: number; readonly to: number; readonly end: number };

const isOn = ({ from, to, end }: Stretch, x: number, side: Side): boolean =>
  side === 'left' && x > 0 ? from < x && x <= to : from <= x && (x < to || to === end);

function unitCase(
  { beam }: Redundants,
  piece: Piece,
  i: number,
  spot: Spot,
  movement: Movement,
): UnitCase | null {
  const { named, worked } = beam;
  const load = unitOn(named, worked.unknowns[i]!, piece);
  if (!load) return { i, terms: [] };
  const terms = chartedUnit(named, piece, load, beam.at(spot), movement);
  return terms && { i, terms };
}

function comesTo(
  { beam }: Redundants,
  causes: readonly Cause[],
  units: readonly UnitCase[],
  value: number,
): boolean {
  const { letters } = beam.named;
  const of = (terms: readonly ChartTerm[]) => letters.of(terms.flatMap((term) => term.value));
  const parts = [
    ...causes.map(({ terms }) => of(terms)),
    ...units.map(({ i, terms }) => beam.worked.values[i]! * of(terms)),
  ];
  const sum = parts.reduce((a, b) => a + b, 0);
  return Math.abs(sum - value) <= SAME * Math.max(Math.abs(value), ...parts.map(Math.abs));
}

/** One part for the loads of each letter, and for what else moves the beam. */
function ofCauses(state: State, head: Head, causes: readonly Cause[], index = ''): Trace {
  const { letters } = state.beam.named;
  const expressionOf = ({ terms }: Cause) => terms.flatMap(({ value }) => value);
  const [only] = causes;
  if (only && causes.length === 1) return byChart(head, state, expressionOf(only), only.terms);
  const letter = head.symbol.replace(/_.*$/, '');
  const names = causes.map(({ name }) => `${letter}_{${index}${name}}`);
  return formula(head, { method: 'sum', tree: total(names.map(positive)) }, () =>
    causes.map((cause, k): Part => {
      const expression = expressionOf(cause);
      const symbol = names[k]!;
      const part = { ...head, label: `${head.label}, its part`, symbol, value: letters.of(expression) };
      return { name: symbol, trace: byChart(part, state, expression, cause.terms) };
    }),
  );
}

type Cases = {
  readonly causes: readonly Cause[];
  readonly units: readonly UnitCase[];
  readonly spot: Spot;
  readonly movement: Movement;
  readonly side: Side;
};

/** δ = δ₀ + Σ X_j δ_j */
function ofCases(redundants: Redundants, head: Head, { causes, units, spot, movement, side }: Cases): Trace {
  const { beam, built, released } = redundants;
  const { unknowns } = beam.worked;
  const { x } = spot;
  const loaded: Head = {
    ...head,
    label: `${head.label} of the released beam`,
    symbol: `${head.symbol}_{0}`,
    value: turned(released, movement, x, side),
  };
  const own = units.map(({ i, terms }) => {
    const { kind, letter, index, tex } = unknowns[i]!;
    const isForce = kind === 'reaction';
    const unit: Head = {
      label: `${head.label} for ${isForce ? 'a unit reaction' : 'a unit moment'} at ${letter}`,
      symbol: `${head.symbol}_{${index}}`,
      value: redundants.unit(i).signed(turned(redundants.unit(i), movement, x, side)),
      measure: `${movement === 'slope' ? 'rotation' : 'deflection'}_per_${isForce ? 'force' : 'moment'}`,
    };
    return { i, terms, tex, unit };
  });
  const products = own.map(({ tex, unit }) => positive(['*', tex, unit.symbol]));
  const tree = total([...(causes.length > 0 ? [positive(loaded.symbol)] : []), ...products]);
  return formula(head, { method: 'superposition', tree }, () => [
    ...(causes.length > 0 ? [{ name: loaded.symbol, trace: ofCauses(built, loaded, causes, '0,') }] : []),
    ...own.flatMap(({ i, terms, tex, unit }): Part[] => [
      { name: tex, trace: redundants.value(i) },
      {
        name: unit.symbol,
        trace: byChart(
          unit,
          built,
          terms.flatMap(({ value }) => value),
          terms,
        ),
      },
    ]),
  ]);
}

function unitLoaded(redundants: Redundants, head: Head, spot: Spot, movement: Movement): Trace {
  const { beam, built } = redundants;
  const { x } = spot;
  beam.know(spot);
  const load =
    movement === 'deflection'
      ? ({ kind: 'point', at: x, p: 1 } as const)
      : ({ kind: 'couple', at: x, m: -1 } as const);
  const unit = new Redundants(new LetteredBeam(beam.givens, [{ load, index: null }], false, spot));
  return byUnitLoad(head, {
    own: unit.released,
    other: built,
    isLoaded: true,
    sense: 1,
    cuts: [x],
  });
}
