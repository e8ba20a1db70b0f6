import { type ChartTerm, type Expression, symbol } from '../chart/index';
import type { Cause, ChartedPart } from './charted';
import { type NumberTerm, sumTex } from './integral';
import { calculate, chartsOf, type Frame, withResult, written } from './step';
import type { Letters } from './symbols';
import type { DerivationStep } from './types';
import { toSi } from './units';
import type { WorkPart } from './virtual-work';
import { causeTex, causeWords } from './words';

/** A part of a movement: by closed forms, or as integrals whose numbers are written out. */
export type MovementPart = { cause: Cause | { kind: 'curvature' }; value: number } & (
  | { expression: Expression; terms: ChartTerm[] }
  | { symbols: string; numbers: NumberTerm[] }
);

export const fromChart = (letters: Letters, { cause, value, terms }: ChartedPart): MovementPart => ({
  cause,
  value: letters.of(value),
  expression: value,
  terms,
});

/** Integrals of the work of all loads, or of one load alone. */
export const fromWork = (
  letters: Letters,
  { kind, symbols, terms }: WorkPart,
  dimension: Frame['kind'],
  cause: MovementPart['cause'] = { kind },
): MovementPart => {
  const unit = letters.units.of(dimension, 'base');
  const total = terms.reduce((sum, term) => sum + term.value(17), 0);
  return { cause, symbols, numbers: terms, value: toSi(total, unit) };
};

/** The closed form of all parts together; null where one is an integral. */
export function expressionOf(parts: readonly MovementPart[]): Expression | null {
  if (!parts.every((part) => 'expression' in part)) return null;
  return parts.flatMap(({ expression }) => expression);
}

/** Closed forms may differ from the exact value by rounding alone. */
const SAME = 1e-9;

/** Whether the parts come to the value; what does not is not shown as a formula. */
export function addUpTo(letters: Letters, parts: readonly MovementPart[], value: number): boolean {
  const sizes = parts.map((part) =>
    'expression' in part ? letters.largest(part.expression) : Math.abs(part.value),
  );
  const total = parts.reduce((sum, part) => sum + part.value, 0);
  return Math.abs(total - value) <= SAME * Math.max(Math.abs(value), ...sizes);
}

/** Up to so many terms are read at once. */
const AT_ONCE = 3;

/** Closed forms of few terms as one part; others, and more, part by part. */
export function together(parts: readonly MovementPart[]): MovementPart[] {
  const charted = parts.filter((part) => 'expression' in part);
  const expression = charted.flatMap((part) => part.expression);
  const isFew = expression.length > 0 && expression.length <= AT_ONCE;
  if (!isFew || charted.length < parts.length) return [...parts];
  const value = charted.reduce((sum, part) => sum + part.value, 0);
  return [{ cause: { kind: 'loads' }, value, expression, terms: charted.flatMap(({ terms }) => terms) }];
}

/** Where a movement is found, without its parts. */
export type Found = Pick<Frame, 'id' | 'left' | 'kind' | 'extra'> & {
  title: string;
  /** For the title of a part: "Deflection at B". */
  short: string;
  /** The letter of a part with its index. */
  partTex: (index: string) => string;
  value: number;
};

/**
 * One step where a movement has one part; else one for each, and their sum. Defines the letters of the parts, and that of
 * the whole.
 */
export function movementSteps(
  letters: Letters,
  found: Found,
  parts: readonly MovementPart[],
): DerivationStep[] {
  const { id, title, left, kind, extra, short, partTex, value } = found;
  const [first] = parts;
  const whole = { id, title, left, kind, scale: 'base' as const };
  const own = { ...whole, ...(extra && { extra }) };
  if (parts.length <= 1) {
    const step = first
      ? partStep(letters, own, first, value)
      : calculate(letters, { ...own, expression: [], value: 0 });
    letters.define(left, value, kind);
    return [step];
  }
  const steps = parts.map((part) => {
    const tex = partTex(causeTex(part.cause));
    const step = partStep(
      letters,
      {
        ...whole,
        id: `${id}-${causeKey(part.cause)}`,
        title: `${short} ${causeWords(part.cause)}`,
        left: tex,
        ...(extra && { extra }),
      },
      part,
      part.value,
    );
    letters.define(tex, part.value, kind);
    return step;
  });
  const sum = parts.flatMap(({ cause }) => symbol(partTex(causeTex(cause))));
  const total = calculate(letters, {
    ...whole,
    title: `${title}: together`,
    scale: 'handed',
    expression: sum,
    value,
  });
  letters.define(left, value, kind);
  return [...steps, total];
}

const causeKey = (cause: MovementPart['cause']): string =>
  cause.kind === 'load' ? cause.tex.replaceAll(/[^A-Za-z0-9]/g, '') : cause.kind;

function partStep(letters: Letters, frame: Frame, part: MovementPart, value: number): DerivationStep {
  if ('expression' in part) {
    const charts = chartsOf(part.terms);
    const extra = { ...frame.extra, ...(charts.length > 0 && { charts }) };
    return calculate(letters, { ...frame, expression: part.expression, value, extra });
  }
  return integralStep(letters, frame, part, value);
}

/** The integrals of a part with their numbers. */
function integralStep(
  letters: Letters,
  frame: Frame,
  { symbols, numbers }: Extract<MovementPart, { numbers: NumberTerm[] }>,
  value: number,
): DerivationStep {
  const {
    unit,
    shown,
    numbers: tex,
    result,
  } = written(letters, frame, {
    value,
    largest: toSi(Math.max(...numbers.map(({ size }) => size)), letters.units.of(frame.kind, frame.scale)),
    total: (figures) => numbers.reduce((sum, term) => sum + term.value(figures), 0),
    tex: (figures) => sumTex(numbers, figures),
  });
  const { id, title, left, extra } = frame;
  const note = numbers.length > 1 && symbols.includes('dx') ? { note: PARTED } : {};
  return {
    id,
    title,
    symbols: `${left}=${symbols}`,
    numbers: withResult(letters, frame, tex, result),
    value,
    unit,
    display: shown,
    ...note,
    ...extra,
  };
}

const PARTED = 'One integral for each stretch, x from its left end.';
