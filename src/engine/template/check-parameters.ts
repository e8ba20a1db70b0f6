import { type DimensionName, readQuantity } from '../quantity/index';
import type { TemplateFault } from './check-expression';
import type { Template } from './document';
import { limitsOf, type Path } from './measured';
import type { ChoiceParameter, Column, Parameter, QuantityParameter } from './parts';
import { isReserved } from './scope';
import { readParameters } from './values';

/** Faults of symbols, ranges and defaults. */
export function checkParameters(template: Template): TemplateFault[] {
  const faults = [
    ...symbolFaults(template),
    ...template.parameters.flatMap((parameter, index) => parameterFaults(parameter, ['parameters', index])),
  ];
  if (faults.length > 0) return faults;
  const defaults = readParameters(template, {});
  return defaults.ok
    ? []
    : defaults.faults.map((fault) => ({ ...fault, path: ['parameters', ...fault.path] }));
}

function symbolFaults(template: Template): TemplateFault[] {
  const named: (readonly [string, Path])[] = [
    ...template.parameters.map(({ symbol }, index) => [symbol, ['parameters', index, 'symbol']] as const),
    ...template.parameters.flatMap((parameter, index) =>
      parameter.kind === 'rows'
        ? parameter.columns.map(
            ({ symbol }, column) => [symbol, ['parameters', index, 'columns', column, 'symbol']] as const,
          )
        : [],
    ),
    ...template.derived.map(({ symbol }, index) => [symbol, ['derived', index, 'symbol']] as const),
  ];
  return named.flatMap(([symbol, path], index) => {
    if (isReserved(symbol))
      return [
        {
          path,
          code: 'reserved',
          message: `“${symbol}” has its own meaning in every template. Use another symbol.`,
        },
      ];
    const isTwice = named.findIndex(([other]) => other === symbol) !== index;
    return isTwice
      ? [{ path, code: 'duplicate', message: `“${symbol}” is used twice. Use another symbol.` }]
      : [];
  });
}

function parameterFaults(parameter: Parameter | Column, path: Path): TemplateFault[] {
  switch (parameter.kind) {
    case 'quantity':
      return quantityFaults(parameter, path);
    case 'choice':
      return choiceFaults(parameter, path);
    case 'group':
      return [];
    case 'rows':
      return parameter.columns.flatMap((column, index) =>
        parameterFaults(column, [...path, 'columns', index]),
      );
  }
}

function quantityFaults(parameter: QuantityParameter, path: Path): TemplateFault[] {
  const texts = (['default', 'min', 'max', 'step'] as const).flatMap((key) => {
    const reading = readQuantity(parameter[key], parameter.dimension);
    return reading.ok ? [] : [{ path: [...path, key], code: reading.code, message: reading.message }];
  });
  if (texts.length > 0) return texts;
  const { min, max, default: start, step } = limitsOf(parameter);
  return [
    ...(min < max
      ? []
      : [
          {
            path: [...path, 'max'],
            code: 'order',
            message: 'The largest value is not above the smallest. Widen the range.',
          },
        ]),
    ...(start >= min && start <= max
      ? []
      : [
          {
            path: [...path, 'default'],
            code: 'out_of_range',
            message: 'The default lies outside the range. Move one of them.',
          },
        ]),
    ...(step > 0
      ? []
      : [{ path: [...path, 'step'], code: 'not_positive', message: 'A step is more than zero.' }]),
    ...unitFaults(parameter, parameter.dimension, path),
  ];
}

function unitFaults(
  { units = {} }: QuantityParameter,
  dimension: DimensionName,
  path: Path,
): TemplateFault[] {
  return Object.entries(units).flatMap(([system, unit]) => {
    const reading = readQuantity('1', dimension, { unit });
    return reading.ok
      ? []
      : [{ path: [...path, 'units', system], code: reading.code, message: reading.message }];
  });
}

function choiceFaults({ options, default: start }: ChoiceParameter, path: Path): TemplateFault[] {
  const values = options.map(({ value }) => value);
  return [
    ...(new Set(values).size === values.length
      ? []
      : [
          {
            path: [...path, 'options'],
            code: 'duplicate',
            message: 'Two options have one value. Rename one.',
          },
        ]),
    ...(values.includes(start)
      ? []
      : [{ path: [...path, 'default'], code: 'not_allowed', message: `Give one of ${values.join(', ')}.` }]),
  ];
}
