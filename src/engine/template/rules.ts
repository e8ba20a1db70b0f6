import {
  DIMENSIONS,
  equalDimensions,
  formatFor,
  formatQuantity,
  type Purpose,
  type UnitSystemName,
} from '../quantity/index';
import type { Rule, Template } from './document';
import { evaluateNumber, evaluateTruth, rowsOf, type Scope, within } from './evaluate';
import type { Severity } from './parts';
import { allMeasured, kindsOf, reactionsOf, sourcesOf } from './scope';
import { symbolsOf } from './tree';

/** What is known of the section and the result, for the rules that speak of them. */
export type Known = {
  depth?: number | undefined;
  ga?: number | null | undefined;
  solution?:
    | {
        reactions: readonly { vertical: number }[];
        extremes: { deflection: { max: { value: number }; min: { value: number } } };
      }
    | undefined;
};

export type RuleOutcome = {
  id: string;
  severity: Severity;
  state: 'holds' | 'broken' | 'unknown';
  /** The rule as a sentence where it holds; what is wrong and what to do where it is broken; what is missing. */
  message: string;
  /** The figure shown beside the rule, as a ratio or SI value. */
  shown?: number | undefined;
  /** The parameter to change, and its row. */
  path: readonly (string | number)[];
};

/**
 * Judges every rule of a template. `scope` holds parameters and derived values; a rule that speaks of a result or of
 * a section that is not known yet is `unknown`, never `holds`.
 */
export function judgeRules(
  template: Template,
  scope: Scope,
  known: Known = {},
  system: UnitSystemName = 'metric',
): RuleOutcome[] {
  const full = withKnown(scope, known);
  return template.rules.map((rule) => judge(template, rule, full, system));
}

function withKnown(scope: Scope, { depth, ga, solution }: Known): Scope {
  const more = new Map<string, number | string>(solution && reactionsOf(solution.reactions));
  more.set('shear', ga == null ? 'left-out' : 'included');
  if (depth !== undefined) more.set('h', depth);
  if (solution) {
    const { max, min } = solution.extremes.deflection;
    more.set('dmax', Math.max(max.value, -min.value));
  }
  return within(more, scope);
}

function judge(template: Template, rule: Rule, scope: Scope, system: UnitSystemName): RuleOutcome {
  const { id, severity, expression, repeat, shown, title } = rule;
  const outcome = { id, severity, path: pathOf(template, rule) };
  const places = repeat === undefined ? [scope] : rowsOf(repeat, scope).map((row) => within(row, scope));
  const symbols = [...symbolsOf(expression.tree)];
  if (places.some((place) => symbols.some((symbol) => place.get(symbol) === undefined)))
    return { ...outcome, state: 'unknown', message: `Not checked until a section is chosen: ${title}` };
  const figure = shown && repeat === undefined ? { shown: evaluateNumber(shown.expression.tree, scope) } : {};
  const failing = places.findIndex((place) => !evaluateTruth(expression.tree, place));
  if (failing < 0) return { ...outcome, ...figure, state: 'holds', message: title };
  const message = fill(template, rule, places[failing] ?? scope, system);
  const path = repeat === undefined ? outcome.path : [repeat, failing];
  return { ...outcome, ...figure, path, state: 'broken', message };
}

/** The first parameter that the rule depends on: where its fault is shown. */
function pathOf(template: Template, { expression, repeat }: Rule): string[] {
  if (repeat !== undefined) return [repeat];
  const sources = sourcesOf(template, expression.tree);
  return [...sources]
    .filter((symbol) => template.parameters.some((one) => one.symbol === symbol))
    .slice(0, 1);
}

/** The rule's message with each {symbol} as a figure with its unit. */
function fill(template: Template, rule: Rule, scope: Scope, system: UnitSystemName): string {
  return rule.message.replaceAll(PLACEHOLDER, (_, symbol: string) => {
    const value = scope.get(symbol);
    return typeof value === 'number' ? figureOf(template, symbol, value, system) : String(value);
  });
}

/** A symbol to be filled in, as in "The overhang {a} is too long". */
export const PLACEHOLDER = /\{([A-Za-z0-9]+)\}/g;

/** A parameter that names its own unit is shown in it, as its field is. */
function figureOf(template: Template, symbol: string, value: number, system: UnitSystemName): string {
  const unit = allMeasured(template).find((one) => one.symbol === symbol)?.units?.[system];
  return unit ? formatQuantity(value, unit) : formatFor(value, purposeOf(template, symbol), system);
}

/** How the figure of a symbol is shown. */
function purposeOf(template: Template, symbol: string): Purpose {
  const measured = allMeasured(template).find((one) => one.symbol === symbol);
  if (measured) return measured.dimension;
  if (symbol === 'h') return 'section_size';
  if (symbol === 'dmax') return 'deflection';
  if (symbol === 'EI') return 'bending_stiffness';
  const kind = kindsOf(template).get(symbol);
  const dimension = kind?.is === 'number' ? kind.dimension : DIMENSIONS.force;
  const derived = (['position', 'reaction', 'moment', 'line_load', 'ratio'] as const).find((purpose) =>
    equalDimensions(dimension, PURPOSE_DIMENSIONS[purpose]),
  );
  return derived ?? 'ratio';
}

const PURPOSE_DIMENSIONS = {
  position: DIMENSIONS.length,
  reaction: DIMENSIONS.force,
  moment: DIMENSIONS.moment,
  line_load: DIMENSIONS.line_load,
  ratio: DIMENSIONS.ratio,
} as const;
