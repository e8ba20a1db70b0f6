import type { ChartCase, Movement } from './case';
import { add, type Expression, multiply, substitute } from './expression';
import { chart } from './register';
import { compare, type Setting } from './setting';

/** One load's part of a movement, and the chart case that it comes from. */
export type ChartTerm = { chart: ChartCase; value: Expression };

/** A case of the register with this beam's letters, at x, on that side of a where x is. */
export function chartTerm(
  id: string,
  movement: Movement,
  values: Readonly<Record<string, Expression>>,
  x: Expression,
  setting: Setting,
): ChartTerm {
  const found = chart(id);
  const beyond = found.beyond && values['a'] && compare(x, values['a'], setting) >= 0 ? found.beyond : null;
  const curve = beyond ?? found.within;
  return { chart: found, value: substitute(curve[movement], { ...values, x, EI: setting.ei }) };
}

export const scaled = (term: ChartTerm, by: Expression): ChartTerm => ({
  ...term,
  value: multiply(term.value, by),
});

export const total = (terms: readonly ChartTerm[]): Expression => add(...terms.map(({ value }) => value));
