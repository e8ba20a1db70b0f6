import type { Movement } from './case';
import { type Expression, expand, multiply, negate, subtract, ZERO } from './expression';
import type { LocalLoad } from './load';
import { compare, type Setting } from './setting';
import { cut, isUniform, resultant, type Stretch } from './stretch';
import { type ChartTerm, chartTerm } from './term';

type Section = { x: Expression; movement: Movement; setting: Setting };

/**
 * Chart terms of the movement of a cantilever at distance x ≥ 0 from its fixed end. What stands beyond x acts there as
 * its resultant and the couple of it; past its loads the cantilever stays straight. Null where no case covers the load.
 */
export function cantileverTerms(
  load: LocalLoad,
  x: Expression,
  movement: Movement,
  setting: Setting,
): ChartTerm[] | null {
  const section = { x, movement, setting };
  switch (load.kind) {
    case 'point': {
      if (compare(load.a, ZERO, setting) <= 0) return [];
      if (compare(load.a, x, setting) <= 0)
        return [term('cantilever-point', { P: load.p, a: load.a }, section)];
      return carried(load.p, multiply(load.p, expand(subtract(load.a, x))), section);
    }
    case 'couple':
      if (compare(load.a, ZERO, setting) <= 0) return [];
      return [term('cantilever-couple', { M: load.m, a: load.a }, section)];
    case 'curvature': {
      const [, outer] = cut(load, ZERO, setting);
      const [near] = outer ? cut(outer, x, setting) : [null];
      return near ? fromRoot('cantilever-curvature', 'kappa', near, section) : [];
    }
    case 'line': {
      const [, outer] = cut(load, ZERO, setting);
      return outer ? lineTerms(outer, section) : [];
    }
  }
}

function lineTerms(stretch: Stretch, section: Section): ChartTerm[] | null {
  if (!isUniform(stretch) && compare(stretch.from, ZERO, section.setting) === 0)
    return nearLine(stretch, section);
  const [near, far] = cut(stretch, section.x, section.setting);
  const nearTerms = near ? nearLine(near, section) : [];
  if (!nearTerms || !far) return nearTerms;
  const { force, moment } = resultant(far, section.x);
  return [...nearTerms, ...carried(force, moment, section)];
}

function nearLine(near: Stretch, section: Section): ChartTerm[] | null {
  if (isUniform(near)) return fromRoot('cantilever-uniform', 'w', near, section);
  if (compare(near.from, ZERO, section.setting) > 0) return null;
  const a = near.to;
  if (near.w1.length === 0) return [term('cantilever-falling', { w: near.w0, a }, section)];
  const rising = term('cantilever-rising', { w: subtract(near.w1, near.w0), a }, section);
  return near.w0.length === 0 ? [rising] : [term('cantilever-uniform', { w: near.w0, a }, section), rising];
}

/** A constant over from … to is the same over 0 … to, less that over 0 … from. */
function fromRoot(id: string, name: 'w' | 'kappa', { from, to, w0 }: Stretch, section: Section): ChartTerm[] {
  const whole = term(id, { [name]: w0, a: to }, section);
  if (compare(from, ZERO, section.setting) === 0) return [whole];
  return [whole, term(id, { [name]: negate(w0), a: from }, section)];
}

/** A force and a couple that act at the section itself. */
function carried(force: Expression, moment: Expression, section: Section): ChartTerm[] {
  return [
    term('cantilever-point', { P: force, a: section.x }, section),
    term('cantilever-couple', { M: moment, a: section.x }, section),
  ];
}

function term(id: string, values: Record<string, Expression>, { x, movement, setting }: Section): ChartTerm {
  return chartTerm(id, movement, values, x, setting);
}
