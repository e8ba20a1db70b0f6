/** The lines under a template's drawing: rules, closed forms, proof cases and sources, in a screen's words and units. */
import {
  DIMENSIONS,
  equalDimensions,
  formatFor,
  formatNumber,
  type Purpose,
  type UnitSystemName,
} from '@/engine/quantity';
import {
  dimensionOf,
  evaluateNumber,
  evaluateTruth,
  type Instance,
  type KindReading,
  type ProofResult,
  type RuleOutcome,
  ruleKinds,
  type Selector,
  type Severity,
  type Source,
  selectorDimension,
  type Template,
} from '@/engine/template';

/** "AISC Steel Construction Manual, 15th edition, 2017, Table 3-23, Case 1 (from memory)". */
export function sourceText({ publication, edition, table, case: place, from_memory }: Source): string {
  const parts = [publication, edition, table, place].filter((part) => part !== undefined);
  return `${parts.join(', ')}${from_memory ? ' (from memory)' : ''}`;
}

const sourceOf = (template: Template, id: string): string => {
  const source = template.sources.find((one) => one.id === id);
  return source ? sourceText(source) : id;
};

export type RuleLine = {
  id: string;
  title: string;
  severity: Severity;
  state: RuleOutcome['state'];
  /** What to do where the rule is broken or unknown; nothing where it holds. */
  message: string | null;
  /** The figure beside the rule. */
  figure: { tex: string; text: string } | null;
};

/** The rules in the order of the template, each with its figure. */
export function toRuleLines(
  template: Template,
  outcomes: readonly RuleOutcome[],
  system: UnitSystemName,
): RuleLine[] {
  const kinds = ruleKinds(template);
  return template.rules.flatMap(({ id, title, severity, shown }): RuleLine[] => {
    const outcome = outcomes.find((one) => one.id === id);
    if (!outcome) return [];
    const { state, shown: value } = outcome;
    const message = state === 'holds' ? null : outcome.message.replace(`: ${title}`, '.');
    const figure =
      shown && value !== undefined
        ? { tex: shown.tex, text: figureText(value, dimensionOf(shown.expression.tree, kinds), system) }
        : null;
    return [{ id, title, severity, state, message, figure }];
  });
}

const FIGURES = {
  reaction: DIMENSIONS.force,
  moment: DIMENSIONS.moment,
  position: DIMENSIONS.length,
} as const;
const RATIO_FIGURES = 3;

/** A figure that is known by its dimension alone; anything unusual is shown as a plain number. */
function figureText(value: number, reading: KindReading, system: UnitSystemName): string {
  const kind = reading.ok ? reading.kind : undefined;
  const purpose = (['reaction', 'moment', 'position'] as const).find(
    (one) => kind?.is === 'number' && equalDimensions(FIGURES[one], kind.dimension),
  );
  return purpose ? formatFor(value, purpose, system) : formatNumber(value, { significant: RATIO_FIGURES });
}

/** How what a selector reads is shown: movements in small units, places in large ones. */
export function purposeOfSelector(selector: Selector): Purpose {
  const dimension = selectorDimension(selector);
  if (dimension === 'force') return 'reaction';
  if (dimension === 'rotation') return 'slope';
  if (dimension !== 'length') return dimension;
  const isMovement = 'deflection' in selector || ('largest' in selector && selector.read !== 'position');
  return isMovement ? 'deflection' : 'position';
}

export type ResultLine = {
  id: string;
  name: string;
  tex: string;
  formula: string;
  text: string;
  source: string;
};

/** The closed forms that hold at these values, with what they come to. */
export const toResultLines = (
  template: Template,
  { scope }: Pick<Instance, 'scope'>,
  system: UnitSystemName,
): ResultLine[] =>
  template.results
    .filter(({ when }) => when === undefined || evaluateTruth(when.tree, scope))
    .map(({ id, name, tex, formula, quantity, expression, source }) => ({
      id,
      name,
      tex,
      formula,
      text: formatFor(evaluateNumber(expression.tree, scope), purposeOfSelector(quantity), system),
      source: sourceOf(template, source),
    }));

export type ProofLine = {
  name: string;
  source: string;
  ok: boolean;
  /** Why the case could not be solved. */
  fault: string | null;
  checks: { name: string; against: string; expected: string; got: string; ok: boolean }[];
};

/** The proof cases with what was expected and what came out. */
export const toProofLines = (
  template: Template,
  results: readonly ProofResult[],
  system: UnitSystemName,
): ProofLine[] =>
  results.map(({ name, source, ok, checks, fault = null }) => ({
    name,
    source: sourceOf(template, source),
    ok,
    fault,
    checks: checks.map((check) => {
      const purpose = purposeOfSelector(check.quantity);
      const [expected, got] = [check.expected, check.got].map((value) => formatFor(value, purpose, system));
      return {
        name: check.name,
        against: check.against,
        expected: expected ?? '',
        got: got ?? '',
        ok: check.ok,
      };
    }),
  }));
