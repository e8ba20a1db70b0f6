/** Whether a template that has the right form also makes sense. */
import { type DimensionName, readQuantity } from '../quantity/index';
import { checkBeam } from './check-beam';
import { expressionFaults, type TemplateFault } from './check-expression';
import { checkParameters } from './check-parameters';
import { checkTrials } from './check-trials';
import type { Kinds } from './dimension';
import type { Selector, Template } from './document';
import type { Path } from './measured';
import { PRINTED } from './proof';
import { PLACEHOLDER } from './rules';
import { columnKinds, figureKinds, kindsOf, ruleKinds } from './scope';
import { selectorDimension } from './select';

export type { TemplateFault };

/**
 * Every fault of meaning in a template: symbols given twice, defaults outside their range, unsound dimensions, loads
 * without a group, unknown supports, sources and results, rules that cannot be broken, a beam that cannot be solved
 * at the defaults. Empty for a template that may be evaluated. Trials run only on what is sound.
 */
export function checkTemplate(template: Template): TemplateFault[] {
  const kinds = kindsOf(template);
  const faults = [
    ...checkParameters(template),
    ...template.derived.flatMap(({ expression }, index) =>
      expressionFaults(expression, 'any number', kinds, ['derived', index, 'expression']),
    ),
    ...checkBeam(template),
    ...quantityFaults(template.stiffness.default_ei, 'bending_stiffness', ['stiffness', 'default_ei']),
    ...checkRules(template),
    ...checkResults(template, kinds),
    ...checkProofCases(template, kinds),
    ...checkSources(template),
  ];
  return faults.length > 0 ? faults : checkTrials(template);
}

function quantityFaults(text: string | undefined, dimension: DimensionName, path: Path): TemplateFault[] {
  if (text === undefined) return [];
  const reading = readQuantity(text, dimension);
  return reading.ok ? [] : [{ path, code: reading.code, message: reading.message }];
}

function checkRules(template: Template): TemplateFault[] {
  const known = ruleKinds(template);
  return template.rules.flatMap(({ expression, shown, message, repeat, trial }, index) => {
    const path = ['rules', index];
    const rows = template.parameters.find(({ symbol }) => symbol === repeat);
    const kinds: Kinds = rows?.kind === 'rows' ? new Map([...known, ...columnKinds(rows.columns)]) : known;
    const strangers = [...message.matchAll(PLACEHOLDER)].flatMap(([, symbol = '']) =>
      kinds.has(symbol) ? [] : [symbol],
    );
    return [
      ...expressionFaults(expression, 'condition', kinds, [...path, 'expression']),
      ...expressionFaults(shown?.expression, 'any number', known, [...path, 'shown', 'expression']),
      ...strangers.map((symbol) => unknown([...path, 'message'], `{${symbol}}`, [...kinds.keys()])),
      ...(repeat !== undefined && rows?.kind !== 'rows' ? [unknown([...path, 'repeat'], repeat, [])] : []),
      ...quantityFaults(trial.ei, 'bending_stiffness', [...path, 'trial', 'ei']),
      ...quantityFaults(trial.depth, 'length', [...path, 'trial', 'depth']),
    ];
  });
}

function checkResults(template: Template, kinds: Kinds): TemplateFault[] {
  return template.results.flatMap(({ quantity, expression, when, source }, index) => {
    const path = ['results', index];
    return [
      ...selectorFaults(template, quantity, kinds, [...path, 'quantity']),
      ...expressionFaults(expression, selectorDimension(quantity), kinds, [...path, 'expression']),
      ...expressionFaults(when, 'condition', kinds, [...path, 'when']),
      ...sourceFaults(template, source, [...path, 'source']),
    ];
  });
}

function selectorFaults(template: Template, selector: Selector, kinds: Kinds, path: Path): TemplateFault[] {
  if ('figure' in selector)
    return expressionFaults(selector.figure, selector.dimension, figureKinds(template), [...path, 'figure']);
  const places = Object.entries(selector).flatMap(([key, value]) =>
    typeof value === 'object' ? expressionFaults(value, 'length', kinds, [...path, key]) : [],
  );
  if (!('reaction' in selector)) return places;
  const index = selector.reaction.charCodeAt(0) - 'A'.charCodeAt(0);
  return index < template.beam.supports.length
    ? places
    : [unknown([...path, 'reaction'], selector.reaction, [])];
}

function checkProofCases(template: Template, kinds: Kinds): TemplateFault[] {
  const ids = template.results.map(({ id }) => id);
  return template.proof_cases.flatMap(({ source, ei, expect }, index) => [
    ...sourceFaults(template, source, ['proof_cases', index, 'source']),
    ...quantityFaults(ei, 'bending_stiffness', ['proof_cases', index, 'ei']),
    ...expect.flatMap((expectation, row) => {
      const path = ['proof_cases', index, 'expect', row];
      if ('result' in expectation)
        return ids.includes(expectation.result)
          ? []
          : [unknown([...path, 'result'], expectation.result, ids)];
      const { quantity } = expectation;
      const dimension = selectorDimension(quantity);
      const sized =
        'exact' in expectation
          ? expectation.exact
          : 'times' in expectation
            ? expectation.times
            : 'over' in expectation
              ? expectation.over
              : undefined;
      return [
        ...selectorFaults(template, quantity, kinds, [...path, 'quantity']),
        ...expressionFaults(sized, dimension, kinds, path),
        ...('printed' in expectation
          ? printedFaults(expectation.printed, sized === undefined ? dimension : 'ratio', [
              ...path,
              'printed',
            ])
          : []),
      ];
    }),
  ]);
}

const printedFaults = (printed: string, dimension: DimensionName, path: Path): TemplateFault[] =>
  PRINTED.test(printed)
    ? quantityFaults(printed, dimension, path)
    : [
        {
          path,
          code: 'not_printed',
          message: 'Give the figure as it is printed, such as 0.4215 or 33.28 kN.',
        },
      ];

function checkSources(template: Template): TemplateFault[] {
  return template.sources.flatMap(({ id, table, derivation }, index) => {
    const path = ['sources', index];
    const isTwice = template.sources.findIndex((source) => source.id === id) !== index;
    return [
      ...(isTwice
        ? [
            {
              path: [...path, 'id'],
              code: 'duplicate',
              message: `There are two sources “${id}”. Rename one.`,
            },
          ]
        : []),
      ...(table === undefined && derivation === undefined
        ? [{ path, code: 'no_place', message: 'Name the table or clause, or file the derivation.' }]
        : []),
    ];
  });
}

function sourceFaults(template: Template, source: string, path: Path): TemplateFault[] {
  const ids = template.sources.map(({ id }) => id);
  return ids.includes(source) ? [] : [unknown(path, source, ids)];
}

function unknown(path: Path, name: string, known: readonly string[]): TemplateFault {
  const use = known.length > 0 ? ` Use ${known.join(', ')}.` : '';
  return { path, code: 'unknown', message: `“${name}” is not known here.${use}` };
}
