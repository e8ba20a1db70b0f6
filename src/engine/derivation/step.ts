import { add, type ChartCase, type Expression, evaluate, oriented, texOf } from '../chart/index';
import { display, FIGURES, withUnit } from './display';
import type { Letters } from './symbols';
import type { ChartUse, DerivationStep } from './types';
import { type Kind, type Scale, toSi, unitTex } from './units';

const MOST_FIGURES = 10;

/** What every calculated step has. */
export type Frame = {
  id: string;
  title: string;
  /** What stands left of the equals sign; "" where the symbols say it all. */
  left: string;
  kind: Kind;
  /** Closed forms give movements in m or ft; results are handed on in mm or in. */
  scale: Scale;
  extra?: Pick<DerivationStep, 'key' | 'note' | 'charts' | 'figure'>;
};

/** A step that calculates one value from an expression. */
type Calculation = Frame & {
  expression: Expression;
  /** Written instead of the expression's own symbols. */
  symbols?: string;
  /** Where it is known better than the expression gives it. */
  value?: number;
  /** What it is nothing beside: results of its kind, SI. */
  beside?: number;
  /** Written in the order it has, as a rule of solution reads; else what is positive comes first. */
  isRule?: true;
};

export function calculate(letters: Letters, calculation: Calculation): DerivationStep {
  const { symbols, value, isRule, beside } = calculation;
  const given = isRule ? calculation.expression : oriented(calculation.expression, letters.value);
  const expression = add(given);
  const { unit, shown, numbers, result } = arithmetic(letters, calculation, expression, value, beside);
  const { id, title, left, extra } = calculation;
  const tex = (terms: Expression) => texOf(terms, letters.symbols());
  const right =
    symbols ?? (expression.length < given.length ? `${tex(given)}=${tex(expression)}` : tex(given));
  return {
    id,
    title,
    symbols: left === '' ? right : `${left}=${right}`,
    numbers: withResult(letters, calculation, numbers, result),
    value: value ?? letters.of(expression),
    unit,
    display: shown,
    ...extra,
  };
}

/** An expression's numbers, and what they come to. Terms that are nothing are left out of them. */
export function arithmetic(
  letters: Letters,
  { kind, scale }: Pick<Frame, 'kind' | 'scale'>,
  expression: Expression,
  value = letters.of(expression),
  beside = 0,
) {
  const counting = expression.filter((term) => letters.of([term]) !== 0);
  return written(
    letters,
    { kind, scale },
    {
      value,
      largest: Math.max(letters.largest(expression), beside),
      total: (figures) => evaluate(counting, (tex) => letters.shown(tex, scale, figures)),
      tex: (figures) => (counting.length === 0 ? '' : texOf(counting, letters.numbers(scale, figures))),
    },
  );
}

/** Numbers at a precision still to be chosen. */
export type Written = {
  /** SI, and of the largest of its terms. */
  value: number;
  largest: number;
  /** What the numbers come to in the unit of the scale, and how they are written, at so many figures. */
  total: (figures: number) => number;
  tex: (figures: number) => string;
};

/**
 * The numbers get as many figures as it takes until they come to the displayed result: what is printed can be
 * recalculated. Where no reasonable number of figures does that, the result alone is written.
 */
export function written(
  { units }: Letters,
  { kind, scale }: Pick<Frame, 'kind' | 'scale'>,
  { value, largest, total, tex }: Written,
) {
  const unit = units.shown(kind);
  const inScale = units.of(kind, scale);
  const shown = display(value, unit, largest);
  const result = withUnit(value, inScale, largest, shown);
  const figures = fewest((count) => display(toSi(total(count), inScale), unit, largest) === shown);
  return { unit, shown, result, numbers: figures === null ? result : tex(figures) };
}

/** A number by itself, with nothing to work out. */
const isPlain = (tex: string): boolean => /^-?\d[\d.]*(?:\\,\d{3})*(?:\.\d+)?$/.test(tex);

/** Numbers whose result is displayed in another unit end in it, unless it is nothing. */
export function withResult(
  { units }: Letters,
  { kind, scale }: Pick<Frame, 'kind' | 'scale'>,
  numbers: string,
  result: string,
): string {
  const isNothing = !/[1-9]/.test(result.replace(/\\mathrm.*$/, ''));
  const isDone =
    numbers === '' || numbers === result || isNothing || units.of(kind, scale) === units.shown(kind);
  if (isPlain(numbers) && !isNothing && units.of(kind, scale) !== units.shown(kind))
    return `${numbers}\\,${unitTex(units.of(kind, scale))}`;
  return isDone ? numbers : `${numbers}=${result}`;
}

/** The least number of figures that will do; null if none does. */
export function fewest(isEnough: (figures: number) => boolean): number | null {
  for (let figures = FIGURES; figures <= MOST_FIGURES; figures++) if (isEnough(figures)) return figures;
  return null;
}

/** The charts that terms come from, each once. */
export function chartsOf(terms: readonly { chart: ChartCase }[]): ChartUse[] {
  const used = new Map(terms.map(({ chart }) => [chart.id, chart]));
  return [...used.values()].map(({ id, title, source: { work, edition, table, entry, fromMemory } }) => ({
    id,
    title,
    source: [
      work,
      edition && `${edition} edition`,
      table && `table ${table}`,
      table ? `case ${entry}` : entry,
      fromMemory && 'from memory',
    ]
      .filter(Boolean)
      .join(', '),
  }));
}
