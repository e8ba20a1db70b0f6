import { cantileverTerms } from './cantilever';
import { type Expression, expand, multiply, negate, subtract, ZERO } from './expression';
import { type LocalLoad, mirrored, shifted } from './load';
import type { Movement } from './register';
import { compare, type Setting } from './setting';
import { cut, isUniform, resultant, type Stretch } from './stretch';
import { type ChartTerm, chartTerm, scaled } from './term';

/** A span from 0 to `length`, and the section whose movement is wanted; it may lie on an overhang. */
type Section = { length: Expression; x: Expression; movement: Movement; setting: Setting };

/**
 * Chart terms of the movement at x of a simple span of the given length with overhangs, x from its left support. A load
 * on an overhang acts on the span as a couple at the support; the overhang continues the span's end slope and bends as
 * a cantilever under its own load. Null where no case covers the load.
 */
export function simpleTerms(
  load: LocalLoad,
  length: Expression,
  x: Expression,
  movement: Movement,
  setting: Setting,
): ChartTerm[] | null {
  const section = { length, x, movement, setting };
  if (load.kind === 'point' || load.kind === 'couple') {
    if (compare(load.a, ZERO, setting) < 0)
      return fromTheRight(section, (s) => overhangTerms(mirrored(load, length), s));
    if (compare(load.a, length, setting) > 0) return overhangTerms(load, section);
    return load.kind === 'point'
      ? pointTerms(load.a, load.p, section)
      : [coupleTerm(load.a, load.m, section)];
  }
  const [left, rest] = cut(load, ZERO, setting);
  const [middle, right] = rest ? cut(rest, length, setting) : [null, null];
  const { kind } = load;
  return joined(
    [
      left && fromTheRight(section, (s) => overhangTerms(mirrored({ kind, ...left }, length), s)),
      middle &&
        (kind === 'line'
          ? lineTerms(middle, section)
          : patchTerms('simple-curvature', 'kappa', middle, section)),
      right && overhangTerms({ kind, ...right }, section),
    ],
    [left, middle, right],
  );
}

/** All parts' terms; null where a part that exists has none. */
function joined(
  terms: readonly (ChartTerm[] | null)[],
  parts: readonly (Stretch | null)[],
): ChartTerm[] | null {
  return terms.some((found, k) => parts[k] && !found) ? null : terms.flatMap((found) => found ?? []);
}

function pointTerms(a: Expression, p: Expression, section: Section): ChartTerm[] {
  const onSupport = [ZERO, section.length].some((support) => compare(a, support, section.setting) === 0);
  return onSupport ? [] : [spanTerm('simple-point', { P: p, a }, section)];
}

const coupleTerm = (a: Expression, m: Expression, section: Section): ChartTerm =>
  spanTerm('simple-couple', { M: m, a }, section);

function lineTerms(stretch: Stretch, section: Section): ChartTerm[] | null {
  if (isUniform(stretch)) return patchTerms('simple-uniform', 'w', stretch, section);
  const { length, setting } = section;
  if (compare(stretch.from, ZERO, setting) > 0 || compare(stretch.to, length, setting) < 0) return null;
  const rising = (w: Expression) => [spanTerm('simple-rising', { w }, section)];
  if (stretch.w1.length === 0) {
    return fromTheRight(section, (s) => [spanTerm('simple-rising', { w: stretch.w0 }, s)]);
  }
  if (stretch.w0.length === 0) return rising(stretch.w1);
  const uniform = spanTerm('simple-uniform', { w: stretch.w0, a: length }, section);
  return [uniform, ...rising(subtract(stretch.w1, stretch.w0))];
}

/** A constant over part of the span: from either support, or the difference of two from the left one. */
function patchTerms(
  id: string,
  name: 'w' | 'kappa',
  { from, to, w0 }: Stretch,
  section: Section,
): ChartTerm[] {
  const { length, setting } = section;
  if (compare(from, ZERO, setting) === 0) return [spanTerm(id, { [name]: w0, a: to }, section)];
  if (compare(to, length, setting) === 0) {
    const a = expand(subtract(length, from));
    return fromTheRight(section, (s) => [spanTerm(id, { [name]: w0, a }, s)]) ?? [];
  }
  return [
    spanTerm(id, { [name]: w0, a: to }, section),
    spanTerm(id, { [name]: negate(w0), a: from }, section),
  ];
}

/** A load wholly beyond the right support. */
function overhangTerms(load: LocalLoad, section: Section): ChartTerm[] | null {
  const { length, x, movement, setting } = section;
  const own = shifted(load, length);
  const moment = momentAboutOrigin(own);
  const onSpan = moment.length > 0 ? [coupleTerm(length, moment, section)] : [];
  if (compare(x, length, setting) <= 0) return onSpan;
  const bending = cantileverTerms(own, expand(subtract(x, length)), movement, setting);
  return bending && [...onSpan, ...bending];
}

function momentAboutOrigin(load: LocalLoad): Expression {
  switch (load.kind) {
    case 'point':
      return multiply(load.p, load.a);
    case 'couple':
      return load.m;
    case 'line':
      return resultant(load, ZERO).moment;
    case 'curvature':
      return ZERO;
  }
}

/** The same section seen from the right support, whose slopes are the other way round. */
function fromTheRight(section: Section, terms: (seen: Section) => ChartTerm[] | null): ChartTerm[] | null {
  const found = terms({ ...section, x: expand(subtract(section.length, section.x)) });
  return found && section.movement === 'slope'
    ? found.map((term) => ({ ...term, value: negate(term.value) }))
    : found;
}

/** A case of the span at the section; past a support, the slope there continued straight. */
function spanTerm(id: string, values: Readonly<Record<string, Expression>>, section: Section): ChartTerm {
  const { length, x, movement, setting } = section;
  const all = { ...values, L: length };
  const end = compare(x, ZERO, setting) < 0 ? ZERO : compare(x, length, setting) > 0 ? length : null;
  if (!end) return chartTerm(id, movement, all, x, setting);
  const slope = chartTerm(id, 'slope', all, end, setting);
  return movement === 'slope' ? slope : scaled(slope, expand(subtract(x, end)));
}
