import { type ChartTerm, type Expression, evaluate, oriented, texOf } from '../chart/index';
import { display, FIGURES, withUnit } from './display';
import { inUnit, type Kind, type Letters, numberTex, type Scale, toSi, unitOf } from './symbols';
import type { ChartUse, DerivationStep, DisplayUnit } from './types';

const MOST_FIGURES = 10;

/** What every calculated step has. */
type Frame = {
  id: string;
  title: string;
  /** What stands left of the equals sign. */
  left: string;
  kind: Kind;
  /** Closed forms give movements in m; results are handed on in mm. */
  scale: Scale;
  extra?: Pick<DerivationStep, 'key' | 'note' | 'charts' | 'figure'>;
};

/** A step that calculates one value from an expression. */
export type Calculation = Frame & {
  expression: Expression;
  /** Written instead of the expression's own symbols. */
  symbols?: string;
  /** Where it is known better than the expression gives it. */
  value?: number;
};

/** A step whose arithmetic is a plain sum of parts, such as integrals over the pieces of the beam. */
export type Summation = Frame & { symbols: string; parts: readonly number[]; value: number };

export function calculate(letters: Letters, calculation: Calculation): DerivationStep {
  const { symbols, scale, kind } = calculation;
  const expression = oriented(calculation.expression, letters.value);
  const sizes = expression.map((term) => Math.abs(letters.of([term])));
  return finish(calculation, {
    symbols: symbols ?? texOf(expression, letters.symbols()),
    value: calculation.value ?? letters.of(expression),
    largest: Math.max(0, ...sizes),
    total: (figures) =>
      toSi(
        evaluate(expression, (tex) => letters.shown(tex, scale, figures)),
        unitOf(kind, scale),
      ),
    tex: (figures) => texOf(expression, letters.numbers(scale, figures)),
  });
}

export function sumUp(summation: Summation): DerivationStep {
  const { symbols, parts, value, kind, scale } = summation;
  const unit = unitOf(kind, scale);
  const terms = (figures: number) =>
    parts.map((part) => Number(inUnit(part, unit).toPrecision(figures))).filter((part) => part !== 0);
  return finish(summation, {
    symbols,
    value,
    largest: Math.max(0, ...parts.map(Math.abs)),
    total: (figures) =>
      toSi(
        terms(figures).reduce((sum, part) => sum + part, 0),
        unit,
      ),
    tex: (figures) =>
      terms(figures)
        .map((part, k) => (part < 0 || k === 0 ? numberTex(part) : `+${numberTex(part)}`))
        .join('') || '0',
  });
}

type Arithmetic = {
  symbols: string;
  value: number;
  /** Of its terms. */
  largest: number;
  /** What the numbers come to, SI, and how they are written, at so many figures. */
  total: (figures: number) => number;
  tex: (figures: number) => string;
};

/**
 * The step with its TeX. Its numbers get as many figures as it takes until they come to the displayed result: what is
 * printed can be recalculated. Where no reasonable number of figures does that, the result alone is written.
 */
function finish(
  { id, title, left, kind, scale, extra }: Frame,
  { symbols, value, largest, total, tex }: Arithmetic,
): DerivationStep {
  const unit = displayUnit(kind);
  const inScale = unitOf(kind, scale);
  const shown = display(value, unit, largest);
  const result = withUnit(value, inScale, largest, shown);
  const figures = fewest((count) => display(total(count), unit, largest) === shown);
  const numbers = figures === null ? result : tex(figures);
  return {
    id,
    title,
    symbols: `${left}=${symbols}`,
    numbers: figures === null || inScale === unit ? numbers : `${numbers}=${result}`,
    value,
    unit,
    display: shown,
    ...extra,
  };
}

/** The least number of figures that will do; null if none does. */
function fewest(isEnough: (figures: number) => boolean): number | null {
  for (let figures = FIGURES; figures <= MOST_FIGURES; figures++) if (isEnough(figures)) return figures;
  return null;
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
