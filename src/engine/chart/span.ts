import { cantileverTerms } from './cantilever';
import type { Movement } from './case';
import { type Expression, expand, negate, subtract, ZERO } from './expression';
import { type LocalLoad, mirrored, momentOf, shifted } from './load';
import { compare, type Setting } from './setting';
import { cut, isUniform, type Stretch } from './stretch';
import { type ChartTerm, chartTerm, scaled } from './term';

/** A span from 0 to `length`, and the section whose movement is wanted; it may lie on an overhang. */
export type Span = {
  kind: 'simple' | 'guided';
  length: Expression;
  x: Expression;
  movement: Movement;
  setting: Setting;
};

/**
 * Chart terms of the movement at x of a span with overhangs: on two supports, x from the left one; or guided, x from the
 * guide. A load on an overhang acts on the span as a couple at the support; the overhang continues the span's end slope
 * and bends as a cantilever under its own load. Null where no case covers the load.
 */
export function spanTerms(load: LocalLoad, span: Span): ChartTerm[] | null {
  const { length, setting } = span;
  if (span.kind === 'guided' && compare(span.x, ZERO, setting) < 0) return null;
  if (load.kind === 'point' || load.kind === 'couple') {
    if (compare(load.a, ZERO, setting) < 0) return beforeTerms(load, span);
    if (compare(load.a, length, setting) > 0) return beyondTerms(load, span);
    if (load.kind === 'couple') return [coupleTerm(load.a, load.m, span)];
    return isOnSupport(load.a, span) ? [] : [spanTerm('point', { P: load.p, a: load.a }, span)];
  }
  const [left, rest] = cut(load, ZERO, setting);
  const [middle, right] = rest ? cut(rest, length, setting) : [null, null];
  const { kind } = load;
  return joined([
    left && (() => beforeTerms({ kind, ...left }, span)),
    middle && (() => (kind === 'line' ? lineTerms(middle, span) : curvatureTerms(middle, span))),
    right && (() => beyondTerms({ kind, ...right }, span)),
  ]);
}

/** All parts' terms; null where a part that exists has none. */
function joined(parts: readonly ((() => ChartTerm[] | null) | null)[]): ChartTerm[] | null {
  const found = parts.map((terms) => (terms ? terms() : []));
  return found.some((terms) => terms === null) ? null : found.flatMap((terms) => terms ?? []);
}

const isOnSupport = (a: Expression, { kind, length, setting }: Span): boolean =>
  compare(a, length, setting) === 0 || (kind === 'simple' && compare(a, ZERO, setting) === 0);

const coupleTerm = (a: Expression, m: Expression, span: Span): ChartTerm =>
  spanTerm('couple', { M: m, a }, span);

function lineTerms(stretch: Stretch, span: Span): ChartTerm[] | null {
  if (isUniform(stretch)) return uniformTerms(stretch, span);
  const { kind, length, setting } = span;
  if (compare(stretch.from, ZERO, setting) > 0) {
    const isFromTheRight = kind === 'simple' && compare(stretch.to, length, setting) === 0;
    return isFromTheRight ? seenBack(lineTerms(turned(stretch, length), fromTheRight(span)), span) : null;
  }
  const { to: a, w0, w1 } = stretch;
  if (w1.length === 0) {
    const isWhole = kind === 'simple' && compare(a, length, setting) === 0;
    if (isWhole) return seenBack([spanTerm('rising', { w: w0 }, fromTheRight(span))], span);
    return [spanTerm(kind === 'simple' ? 'part-falling' : 'falling', { w: w0, a }, span)];
  }
  const uniform = w0.length === 0 ? [] : uniformTerms({ ...stretch, w1: w0 }, span);
  return [...uniform, risingTerm(subtract(w1, w0), a, span)];
}

const turned = ({ from, to, w0, w1 }: Stretch, length: Expression): Stretch => ({
  from: expand(subtract(length, to)),
  to: expand(subtract(length, from)),
  w0: w1,
  w1: w0,
});

function risingTerm(w: Expression, a: Expression, span: Span): ChartTerm {
  if (span.kind === 'guided') return spanTerm('rising', { w, a }, span);
  const isWhole = compare(a, span.length, span.setting) === 0;
  return isWhole ? spanTerm('rising', { w }, span) : spanTerm('part-rising', { w, a }, span);
}

function uniformTerms({ from, to, w0 }: Stretch, span: Span): ChartTerm[] {
  const { kind, length, setting } = span;
  if (kind === 'guided') return patchTerms('uniform', 'w', { from, to, w0 }, span);
  const isLeft = compare(from, ZERO, setting) === 0;
  const isRight = compare(to, length, setting) === 0;
  if (isLeft && isRight) return [spanTerm('uniform', { w: w0 }, span)];
  if (isLeft || isRight) return patchTerms('part-uniform', 'w', { from, to, w0 }, span);
  return withinTerms({ from, to, w0 }, span);
}

/** A uniform load that reaches neither support, as the difference whose formulas are the shortest where x is. */
function withinTerms({ from, to, w0 }: Pick<Stretch, 'from' | 'to' | 'w0'>, span: Span): ChartTerm[] {
  const { length, x, setting } = span;
  const part = (w: Expression, a: Expression, seen: Span) => spanTerm('part-uniform', { w, a }, seen);
  const seen = fromTheRight(span);
  const [rest, beyond] = [from, to].map((end) => expand(subtract(length, end))) as [Expression, Expression];
  const back = (terms: ChartTerm[]) => seenBack(terms, span);
  if (compare(x, to, setting) >= 0) return [part(w0, to, span), part(negate(w0), from, span)];
  if (compare(x, from, setting) <= 0) return back([part(w0, rest, seen), part(negate(w0), beyond, seen)]);
  const whole = spanTerm('uniform', { w: w0 }, span);
  return [whole, part(negate(w0), from, span), ...back([part(negate(w0), beyond, seen)])];
}

const curvatureTerms = (stretch: Stretch, span: Span): ChartTerm[] =>
  patchTerms('curvature', 'kappa', stretch, span);

/** A constant over part of the span: from where the case has its origin, or the difference of two from there. */
function patchTerms(
  load: string,
  name: 'w' | 'kappa',
  { from, to, w0 }: Pick<Stretch, 'from' | 'to' | 'w0'>,
  span: Span,
): ChartTerm[] {
  const { kind, length, setting } = span;
  if (compare(from, ZERO, setting) === 0) return [spanTerm(load, { [name]: w0, a: to }, span)];
  if (kind === 'simple' && compare(to, length, setting) === 0) {
    const a = expand(subtract(length, from));
    return seenBack([spanTerm(load, { [name]: w0, a }, fromTheRight(span))], span);
  }
  return [spanTerm(load, { [name]: w0, a: to }, span), spanTerm(load, { [name]: negate(w0), a: from }, span)];
}

/** A load wholly before the left support. Beyond a guide, no case. */
function beforeTerms(load: LocalLoad, span: Span): ChartTerm[] | null {
  if (span.kind === 'guided') return null;
  return seenBack(beyondTerms(mirrored(load, span.length), fromTheRight(span)), span);
}

/** A load wholly beyond the right support. */
function beyondTerms(load: LocalLoad, span: Span): ChartTerm[] | null {
  const { length, x, movement, setting } = span;
  const own = shifted(load, length);
  const moment = momentOf(own, ZERO);
  const onSpan = moment.length > 0 ? [coupleTerm(length, moment, span)] : [];
  if (compare(x, length, setting) <= 0) return onSpan;
  const bending = cantileverTerms(own, expand(subtract(x, length)), movement, setting);
  return bending && [...onSpan, ...bending];
}

/** The same section seen from the right support. */
const fromTheRight = (span: Span): Span => ({ ...span, x: expand(subtract(span.length, span.x)) });

/** What was found from the right support, whose slopes are the other way round. */
function seenBack<T extends ChartTerm[] | null>(terms: T, { movement }: Span): ChartTerm[] | T {
  if (!terms || movement === 'deflection') return terms;
  return terms.map((term) => ({ ...term, value: negate(term.value) }));
}

/** A case of the span at the section; past a support, the slope there continued straight. */
function spanTerm(load: string, values: Readonly<Record<string, Expression>>, span: Span): ChartTerm {
  const { kind, length, x, movement, setting } = span;
  const id = `${kind}-${load}`;
  const all = { ...values, L: length };
  const end = compare(x, ZERO, setting) < 0 ? ZERO : compare(x, length, setting) > 0 ? length : null;
  if (!end) return chartTerm(id, movement, all, x, setting);
  const slope = chartTerm(id, 'slope', all, end, setting);
  return movement === 'slope' ? slope : scaled(slope, expand(subtract(x, end)));
}
