import type { Extreme, Solution } from '../beam/index';
import { evaluate, type Piecewise } from '../polynomial/index';
import type { DimensionName } from '../quantity/index';
import type { Selector } from './document';
import { evaluateNumber, type Scope, within } from './evaluate';
import { reactionsOf } from './scope';

type Expression = { text: string; tree: Parameters<typeof evaluateNumber>[0] };
type Side = 'left' | 'right' | undefined;

/** What a selector reads, in words, its dimension, and the largest value of its kind (to which 1e-9 refers). */
export type Selected = { value: number; scale: number; dimension: DimensionName; name: string };

const isPosition = (selector: Selector): boolean =>
  'contraflexure' in selector || ('read' in selector && selector.read === 'position');

/** Dimension of what a selector reads. */
export function selectorDimension(selector: Selector): DimensionName {
  if ('figure' in selector) return selector.dimension;
  if (isPosition(selector) || 'deflection' in selector) return 'length';
  if ('reaction' in selector) return selector.component === 'moment' ? 'moment' : 'force';
  if ('shear' in selector) return 'force';
  if ('moment' in selector) return 'moment';
  if ('slope' in selector) return 'rotation';
  return 'largest' in selector && selector.largest === 'moment' ? 'moment' : 'length';
}

/** A selector in words: "reaction at B", "moment at L + a", "largest deflection down". */
function selectorName(selector: Selector): string {
  if ('figure' in selector) return selector.figure.text;
  if ('reaction' in selector)
    return selector.component === 'moment'
      ? `moment reaction at ${selector.reaction}`
      : `reaction at ${selector.reaction}`;
  if ('shear' in selector) return `shear at x = ${selector.shear.text}`;
  if ('moment' in selector) return `moment at x = ${selector.moment.text}`;
  if ('slope' in selector) return `slope at x = ${selector.slope.text}, ${selector.sense}`;
  if ('deflection' in selector) return `deflection at x = ${selector.deflection.text}, ${selector.sense}`;
  if ('contraflexure' in selector) return `contraflexure ${selector.contraflexure + 1}`;
  const name =
    selector.largest === 'moment'
      ? `largest ${selector.sense} moment`
      : `largest deflection ${selector.sense}`;
  return selector.read === 'position' ? `place of the ${name}` : name;
}

/**
 * Reads one quantity off a solution. Moments are sagging positive, also the largest hogging one; deflections and
 * slopes are positive in the sense that the selector names. A place is measured from `from`. NaN where there is no
 * such support or contraflexure: a NaN agrees with nothing.
 */
export function select(selector: Selector, solution: Solution, scope: Scope): Selected {
  const length = solution.diagrams.moment.breaks.at(-1) ?? 0;
  const value = readValue(selector, solution, scope);
  return {
    value,
    scale:
      'figure' in selector ? Math.abs(value) : isPosition(selector) ? length : scaleOf(selector, solution),
    dimension: selectorDimension(selector),
    name: selectorName(selector),
  };
}

function readValue(selector: Selector, solution: Solution, scope: Scope): number {
  const { diagrams, extremes, reactions } = solution;
  if ('figure' in selector)
    return evaluateNumber(selector.figure.tree, within(reactionsOf(reactions), scope));
  if ('reaction' in selector) {
    const reaction = reactions[selector.reaction.charCodeAt(0) - 'A'.charCodeAt(0)];
    return reaction?.[selector.component ?? 'vertical'] ?? Number.NaN;
  }
  if ('shear' in selector) return at(diagrams.shear, selector.shear, selector.side, scope);
  if ('moment' in selector) return at(diagrams.moment, selector.moment, selector.side, scope);
  if ('slope' in selector)
    return at(diagrams.slope, selector.slope, 'left', scope) * (selector.sense === 'clockwise' ? -1 : 1);
  if ('deflection' in selector)
    return at(diagrams.deflection, selector.deflection, 'left', scope) * (selector.sense === 'down' ? -1 : 1);
  const origin = selector.from ? evaluateNumber(selector.from.tree, scope) : 0;
  if ('contraflexure' in selector)
    return Math.abs((solution.contraflexure[selector.contraflexure] ?? Number.NaN) - origin);
  const { value, at: places } = extremeOf(selector, extremes);
  if (selector.read === 'position') return Math.abs((places[0] ?? Number.NaN) - origin);
  return selector.largest === 'deflection' && selector.sense === 'down' ? -value : value;
}

function at(diagram: Piecewise, x: Expression, side: Side, scope: Scope): number {
  const [left, right] = evaluate(diagram, evaluateNumber(x.tree, scope));
  return side === 'left' ? left : right;
}

type Largest = Extract<Selector, { largest: string }>;

function extremeOf({ largest, sense }: Largest, extremes: Solution['extremes']): Extreme {
  const { max, min } = extremes[largest];
  return sense === 'sagging' || sense === 'up' ? max : min;
}

function scaleOf(selector: Selector, { extremes, reactions }: Solution): number {
  const peak = (kind: keyof Solution['extremes']) =>
    Math.max(extremes[kind].max.value, -extremes[kind].min.value);
  if ('reaction' in selector) {
    const component = selector.component ?? 'vertical';
    return Math.max(...reactions.map((reaction) => Math.abs(reaction[component])));
  }
  if ('shear' in selector) return peak('shear');
  if ('slope' in selector) return peak('slope');
  if ('deflection' in selector) return peak('deflection');
  return 'largest' in selector ? peak(selector.largest) : peak('moment');
}
