import { type ChartTerm, type Expression, evaluate, oriented, texOf } from '../chart/index';
import { formatNumber, fromUnit, toUnit } from '../quantity/index';
import { type Kind, type Letters, numberTex, type Scale, toTex, unitOf } from './symbols';
import type { ChartUse, DerivationStep, DisplayUnit } from './types';

const FIGURES = 4;
const MOST_FIGURES = 10;
/** A result this small beside its largest term is what is left of a difference, and shows that term's decimals. */
const REMAINDER = 1e-3;

/** A step that calculates one value from an expression. */
export type Calculation = {
  id: string;
  title: string;
  /** What stands left of the equals sign. */
  left: string;
  /** Written instead of the expression's own symbols. */
  symbols?: string;
  expression: Expression;
  /** Where it is known better than the expression gives it. */
  value?: number;
  kind: Kind;
  /** Closed forms give movements in m; results are handed on in mm. */
  scale: Scale;
  extra?: Pick<DerivationStep, 'key' | 'note' | 'charts' | 'figure'>;
};

/**
 * The step with its TeX. Its numbers get as many figures as it takes until they come to the displayed result: what is
 * printed can be recalculated. Where no reasonable number of figures does that, the result alone is written.
 */
export function calculate(letters: Letters, calculation: Calculation): DerivationStep {
  const { id, title, left, symbols, kind, scale, extra } = calculation;
  const expression = oriented(calculation.expression, letters.value);
  const value = calculation.value ?? letters.of(expression);
  const unit = displayUnit(kind);
  const largest = Math.max(0, ...expression.map((term) => Math.abs(letters.of([term]))));
  const show = (si: number) => display(si, unit, largest);
  const inScale = unitOf(kind, scale);
  const recalculated = (figures: number) =>
    fromUnit(
      evaluate(expression, (tex) => letters.shown(tex, scale, figures)),
      inScale,
    );
  const figures = fewest((count) => show(recalculated(count)) === show(value));
  const result = withUnit(value, inScale, largest);
  const written = figures === null ? null : texOf(expression, letters.numbers(scale, figures));
  return {
    id,
    title,
    symbols: `${left}=${symbols ?? texOf(expression, letters.symbols())}`,
    numbers: written === null ? result : inScale === unit ? written : `${written}=${result}`,
    value,
    unit,
    display: show(value),
    ...extra,
  };
}

/** A step whose arithmetic is a plain sum of parts, such as integrals over the pieces of the beam. */
export function sumUp(
  calculation: Omit<Calculation, 'expression' | 'symbols'> & {
    symbols: string;
    parts: readonly number[];
    value: number;
  },
): DerivationStep {
  const { id, title, left, symbols, parts, value, kind, scale, extra } = calculation;
  const unit = displayUnit(kind);
  const inScale = unitOf(kind, scale);
  const largest = Math.max(0, ...parts.map(Math.abs));
  const show = (si: number) => display(si, unit, largest);
  const shown = (figures: number) => parts.map((part) => Number(toUnit(part, inScale).toPrecision(figures)));
  const total = (figures: number) =>
    fromUnit(
      shown(figures).reduce((sum, part) => sum + part, 0),
      inScale,
    );
  const terms = shown(fewest((count) => show(total(count)) === show(value)) ?? MOST_FIGURES).filter(
    (part) => part !== 0,
  );
  const sum =
    terms.map((part, k) => (part < 0 || k === 0 ? numberTex(part) : `+${numberTex(part)}`)).join('') || '0';
  const result = inScale === unit ? '' : `=${withUnit(value, inScale, largest)}`;
  return {
    id,
    title,
    symbols: `${left}=${symbols}`,
    numbers: terms.length === 1 && inScale !== unit ? result.slice(1) : `${sum}${result}`,
    value,
    unit,
    display: show(value),
    ...extra,
  };
}

/** The least number of figures that will do; null if none does. */
function fewest(isEnough: (figures: number) => boolean): number | null {
  for (let figures = FIGURES; figures <= MOST_FIGURES; figures++) if (isEnough(figures)) return figures;
  return null;
}

/** A value as it was given, with its unit, for maths mode. */
export const given = (si: number, unit: string): string =>
  `${numberTex(toUnit(si, unit))}\\,\\mathrm{${unitTex(unit)}}`;

const unitTex = (unit: string): string => unit.replace(/2$/, '^2');

/** A result in its unit, with unit, for maths mode. */
export function withUnit(si: number, unit: string, largest = Math.abs(si)): string {
  return `${toTex(display(si, unit, largest))}\\,\\mathrm{${unitTex(unit)}}`;
}

/** To four figures, or to the decimals of the terms where they cancel. */
export function display(si: number, unit: string, largest = Math.abs(si)): string {
  const value = toUnit(si, unit);
  const reference = Math.abs(toUnit(largest, unit));
  if (Math.abs(value) > REMAINDER * reference) return formatNumber(value, { significant: FIGURES });
  const places = reference === 0 ? 0 : Math.max(0, FIGURES - 1 - Math.floor(Math.log10(reference)));
  return formatNumber(Math.abs(value) < 0.5 * 10 ** -places ? 0 : value, { places });
}

const DISPLAYED: Partial<Record<Kind, DisplayUnit>> = {
  force: 'kN',
  moment: 'kNm',
  length: 'm',
  deflection: 'mm',
  rotation: 'mrad',
  'deflection per force': 'mm/kN',
  'deflection per moment': 'mm/kNm',
  'rotation per force': 'mrad/kN',
  'rotation per moment': 'mrad/kNm',
};

const displayUnit = (kind: Kind): DisplayUnit => DISPLAYED[kind] ?? '';

/** The charts that terms come from, each once. */
export function chartsOf(terms: readonly ChartTerm[]): ChartUse[] {
  const used = new Map(terms.map(({ chart }) => [chart.id, chart]));
  return [...used.values()].map(({ id, title, source }) => ({
    id,
    title,
    source: [
      source.work,
      source.edition && `${source.edition} edition`,
      source.table && `table ${source.table}`,
      `case ${source.entry}`,
      source.fromMemory && 'from memory',
    ]
      .filter(Boolean)
      .join(', '),
  }));
}
