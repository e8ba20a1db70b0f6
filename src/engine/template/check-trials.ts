import { type Solution, solveBeam } from '../beam/index';
import { checkRedundants, readBeam } from '../model/index';
import { readQuantity } from '../quantity/index';
import type { TemplateFault } from './check-expression';
import type { Rule, Template } from './document';
import { defaultEi, instantiate } from './instance';
import { loadOf, loadShares, loadSizes } from './loads';
import type { Path } from './measured';
import { judgeRules, type Known, type RuleOutcome } from './rules';
import { allMeasured, scopeOf } from './scope';
import { isRows, readParameters, type Value, type Values } from './values';

/** Evaluates the template: at its defaults everything must hold, and each rule's trial must break that rule. */
export function checkTrials(template: Template): TemplateFault[] {
  const defaults = readParameters(template, {});
  if (!defaults.ok) return under(['parameters'], defaults.faults);
  return [
    ...defaultFaults(template, defaults.values),
    ...proportionFaults(template, defaults.values),
    ...template.rules.flatMap((rule, index) => trialFaults(template, rule, ['rules', index, 'trial'])),
  ];
}

type Solving = { ok: true; solution: Solution } | { ok: false; faults: TemplateFault[] };

const under = (prefix: Path, faults: readonly TemplateFault[]): TemplateFault[] =>
  faults.map((fault) => ({ ...fault, path: [...prefix, ...fault.path] }));

function solve(template: Template, values: Values, ei: number): Solving {
  const made = instantiate(template, values, { ei });
  if (!made.ok) return { ok: false, faults: under(['parameters'], made.faults) };
  const beam = readBeam(made.instance.beam);
  if (!beam.ok) return { ok: false, faults: under(['beam'], beam.faults) };
  const { redundants = [] } = made.instance.beam;
  const inadmissible = checkRedundants(beam.value, redundants);
  if (inadmissible.length > 0) return { ok: false, faults: under(['beam'], inadmissible) };
  return { ok: true, solution: solveBeam(beam.value, redundants) };
}

/** The defaults with each named value of each choice in turn. */
const variants = (template: Template, values: Values): Values[] =>
  template.parameters.flatMap((parameter) =>
    parameter.kind === 'choice'
      ? parameter.options.map(({ value }) => ({ ...values, [parameter.symbol]: value }))
      : [],
  );

function defaultFaults(template: Template, values: Values): TemplateFault[] {
  const ei = defaultEi(template);
  const solving = solve(template, values, ei);
  if (!solving.ok) return solving.faults;
  const others = variants(template, values).flatMap((variant) => {
    const other = solve(template, variant, ei);
    // A named value that a block rule refuses is there to be refused in words.
    return other.ok ? [] : other.faults.filter(({ code }) => code !== 'rule_broken');
  });
  const outcomes = judgeRules(template, scopeOf(template, values, ei), { solution: solving.solution });
  const broken = outcomes.flatMap(({ state, severity, message }, index): TemplateFault[] =>
    state === 'broken' && severity !== 'note'
      ? [
          {
            path: ['rules', index],
            code: 'broken_at_defaults',
            message: `Broken at the defaults: ${message}`,
          },
        ]
      : [],
  );
  return [...others, ...broken];
}

/** Twice the loads must be loads twice as large, or the shares of their groups could not be told apart. */
function proportionFaults(template: Template, values: Values): TemplateFault[] {
  const ei = defaultEi(template);
  const sizes = (of: Values) => loadShares(template, of, ei).flatMap((share) => loadSizes(loadOf(share)));
  const [single, double] = [sizes(values), sizes(doubled(template, values))];
  const isProportional = single.every(
    (size, index) => Math.abs((double[index] ?? 0) - 2 * size) <= 1e-12 * Math.abs(size),
  );
  if (isProportional) return [];
  const message = 'A load does not grow in proportion to its parameters. Write it as a product with them.';
  return [{ path: ['beam', 'loads'], code: 'not_proportional', message }];
}

function doubled(template: Template, values: Values): Values {
  const loads = new Set(
    allMeasured(template).flatMap(({ symbol, group }) => (group === undefined ? [] : [symbol])),
  );
  const cell = (symbol: string, value: number | string) =>
    typeof value === 'number' && loads.has(symbol) ? 2 * value : value;
  const twice = (value: Value): Value => {
    if (typeof value !== 'object') return value;
    if (isRows(value)) return value.map((row) => mapCells(row, cell));
    return mapCells(value, (_, part) => 2 * part);
  };
  return mapCells(values, (_, value) => twice(value));
}

const mapCells = <In, Out>(
  cells: Readonly<Record<string, In>>,
  map: (key: string, cell: In) => Out,
): Record<string, Out> =>
  Object.fromEntries(Object.entries(cells).map(([key, cell]) => [key, map(key, cell)]));

function trialFaults(template: Template, rule: Rule, path: Path): TemplateFault[] {
  const values = readParameters(template, rule.trial.parameters);
  if (!values.ok) return under([...path, 'parameters'], values.faults);
  const ei = siOf(rule.trial.ei, 'bending_stiffness') ?? defaultEi(template);
  const depth = siOf(rule.trial.depth, 'length');
  const judged = (known: Known): RuleOutcome | undefined =>
    judgeRules(template, scopeOf(template, values.values, ei), known).find(({ id }) => id === rule.id);
  const early = judged({ depth });
  if (early?.state === 'broken') return [];
  const solving = solve(template, values.values, ei);
  if (!solving.ok) return under(path, solving.faults);
  if (judged({ depth, solution: solving.solution })?.state === 'broken') return [];
  return [{ path, code: 'not_broken', message: 'The trial does not break the rule. Give values that do.' }];
}

function siOf(text: string | undefined, dimension: 'bending_stiffness' | 'length'): number | undefined {
  if (text === undefined) return undefined;
  const reading = readQuantity(text, dimension);
  return reading.ok ? reading.value : undefined;
}
