import { DIMENSIONS, type DimensionName, equalDimensions, nameDimension } from '../quantity/index';
import { dimensionOf, type Kinds, nameKind } from './dimension';
import type { Path } from './measured';
import type { Expression } from './tree';

/** What is wrong with a template, where, and what to do; `at` is the place inside an expression. */
export type TemplateFault = { path: Path; code: string; message: string };

/** What an expression must yield. */
export type Expected = DimensionName | 'condition' | 'any number';

/** The fault of an expression that is unsound, or yields something else than its place takes. */
export function expressionFaults(
  expression: Expression | undefined,
  expected: Expected,
  kinds: Kinds,
  path: Path,
): TemplateFault[] {
  if (!expression) return [];
  const reading = dimensionOf(expression.tree, kinds);
  if (!reading.ok) return [{ path, code: 'unsound', message: reading.message }];
  const { kind } = reading;
  if (expected === 'condition' ? kind.is === 'truth' : kind.is === 'zero') return [];
  if (expected !== 'condition' && kind.is === 'number') {
    if (expected === 'any number' || equalDimensions(kind.dimension, DIMENSIONS[expected])) return [];
  }
  const wanted =
    expected === 'condition'
      ? 'a condition'
      : expected === 'any number'
        ? 'a number'
        : nameDimension(DIMENSIONS[expected]);
  return [
    { path, code: 'wrong_dimension', message: `${expression.text} is ${nameKind(kind)}. Give ${wanted}.` },
  ];
}
