/** Questions about what a drawing and its table show. Pure. */
import type { Solution } from '@/engine/beam';
import type { Acting, Key, Quantity, Side } from '@/engine/why';

/** Which loads give what is shown; null where nothing does. */
export interface Loading {
  readonly at: (quantity: Quantity, x: number, bound: 'upper' | 'lower' | null) => Acting | null;
  readonly reaction: (support: number, component: 'vertical' | 'moment') => Acting | null;
}

export const always = (acting: Acting): Loading => ({ at: () => acting, reaction: () => acting });

/** All loads together, unfactored. */
export const UNFACTORED = always({ kind: 'all' });

/** A number of a drawing, engine's units and signs. */
type Figure =
  | { readonly kind: 'reaction'; readonly support: number; readonly component: 'vertical' | 'moment' }
  | {
      readonly kind: 'peak';
      readonly quantity: Quantity;
      readonly x: number;
      readonly value: number;
      readonly isZero: boolean;
    };

/** A cell of the table of stations: of one curve, or of one side of an envelope. */
interface Station {
  readonly quantity: Quantity;
  readonly x: number;
  readonly side: Side;
  readonly bound: 'upper' | 'lower' | null;
}

type Shown = Pick<Solution, 'extremes'>;

/** The question that a figure of the drawing puts. */
export function figureKey(figure: Figure, solution: Shown, loading: Loading): Key | null {
  if (figure.kind === 'reaction') {
    const { support, component } = figure;
    const acting = loading.reaction(support, component);
    return acting && { kind: 'reaction', support, component, acting };
  }
  const { quantity, x, value, isZero } = figure;
  const acting = loading.at(quantity, x, value < 0 ? 'lower' : 'upper');
  if (!acting) return null;
  if (isZero) return { kind: 'contraflexure', x, acting };
  const isOne = loading.at(quantity, x, null) !== null;
  const sense = isOne ? senseOf(solution, quantity, x, value) : null;
  return { kind: 'extreme', quantity, sense: sense ?? 'local', x, acting };
}

/** The question that a cell of the table puts. */
export function stationKey(station: Station, solution: Shown, loading: Loading): Key | null {
  const { quantity, x, side, bound } = station;
  const acting = loading.at(quantity, x, bound);
  if (!acting) return null;
  const sense = bound === null ? senseOf(solution, quantity, x) : null;
  return sense
    ? { kind: 'extreme', quantity, sense, x, acting }
    : { kind: 'value', quantity, x, side, acting };
}

function senseOf({ extremes }: Shown, quantity: Quantity, x: number, value?: number): 'max' | 'min' | null {
  const isAt = (sense: 'max' | 'min') => {
    const extreme = extremes[quantity][sense];
    return extreme.at.includes(x) && (value === undefined || extreme.value === value);
  };
  if (isAt('max')) return 'max';
  return isAt('min') ? 'min' : null;
}
