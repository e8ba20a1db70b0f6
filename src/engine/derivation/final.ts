import {
  type ChartTerm,
  chartTerms,
  constant,
  divide,
  type Expression,
  movementTerms,
  multiply,
  type NamedLoad,
  negate,
  type Released,
  type SupportMovements,
  shearTerms,
  subtract,
  symbol,
} from '../chart/index';
import { evaluate } from '../polynomial/index';
import type { Cause } from './charted';
import { fromChart, type MovementPart, together } from './movement';
import { type NamedBeam, type NamedSupport, settlementOf, springOf, turningOf } from './named-beam';
import { partOn, stiffnessBetween } from './pieces';
import { supportMomentTex } from './reactions';
import { fixingSense, fixingTex, reactionTex } from './unknown';
import type { Worked } from './values';

/** A span of the solved beam seen as a simple span, with the moments that are known at its supports. */
type Span = { left: NamedSupport; right: NamedSupport; from: number; to: number };

/**
 * The deflection of an indeterminate beam at a place, by the charts: its span on two supports, or the whole as a
 * cantilever, under its own loads and under the moments found at its ends. Null where the charts do not hold that.
 */
export function finalDeflection(
  worked: Worked,
  x: number,
  place: Expression,
): { parts: MovementPart[]; how: string } | null {
  const { beam } = worked;
  const seen = seenSpan(worked, x) ?? seenCantilever(worked);
  const stiffness = seen && stiffnessBetween(beam, seen.from, seen.to);
  if (!seen || !stiffness) return null;
  const { released, loads, moments, movements } = seen;
  const setting = beam.setting(stiffness.ei);
  const under = (some: readonly NamedLoad[]) =>
    some.map((load) => chartTerms(released, load, place, 'deflection', setting));
  const [byLoads, byMoments] = [under(loads), under(moments)];
  if (![...byLoads, ...byMoments].every((terms) => terms !== null)) return null;
  const { ga } = stiffness;
  const causes: [Cause, ChartTerm[]][] = [
    [{ kind: 'loads' }, byLoads.flatMap((terms) => terms ?? [])],
    [{ kind: 'ends' }, byMoments.flatMap((terms) => terms ?? [])],
    [{ kind: 'movements' }, movementTerms(released, movements, place, 'deflection', setting)],
    [
      { kind: 'shear' },
      ga ? shearTerms(released, [...loads, ...moments], place, 'deflection', setting, ga) : [],
    ],
  ];
  const parts = causes.flatMap(([cause, terms]) => {
    const value = terms.flatMap((term) => term.value);
    return value.length === 0 ? [] : [fromChart(beam.letters, { cause, value, terms })];
  });
  const ends = ['', ' and the moment at its end', ' and the moments at its ends'][moments.length] ?? '';
  return { parts: together(parts), how: `: ${seen.name} under its loads${ends}` };
}

/** A part of the solved beam as one that the charts know. */
type Seen = {
  name: string;
  released: Released;
  from: number;
  to: number;
  loads: NamedLoad[];
  moments: NamedLoad[];
  movements: SupportMovements;
};

function seenSpan(worked: Worked, x: number): Seen | null {
  const { beam } = worked;
  const span = spanAround(beam, x);
  const moments = span && endMoments(worked, span);
  if (!span || !moments) return null;
  const { left, right, from, to } = span;
  return {
    name: `${left.letter}–${right.letter} as a simple span`,
    released: { kind: 'simple', left: left.at, right: right.at },
    from,
    to,
    loads: loadsOnSpan(beam, span),
    moments,
    movements: movementsOf(span),
  };
}

/** Where one support alone carries the beam, and holds it: a cantilever with the couples of the others on it. */
function seenCantilever({ beam }: Worked): Seen | null {
  const { supports, hinges, groups, length } = beam;
  const [root, ...others] = supports.filter(({ support }) => support.vertical.kind !== 'free');
  if (!root || others.length > 0 || hinges.length > 0) return null;
  const { vertical, rotation } = root.support;
  if (rotation.kind !== 'rigid' || vertical.kind !== 'rigid') return null;
  const turning = supports.filter((s) => s !== root && s.support.rotation.kind !== 'free');
  const moments = turning.map((support) => {
    const m = multiply(constant(fixingSense(beam, support)), symbol(fixingTex(support)));
    return { kind: 'couple' as const, at: support.at, m };
  });
  const rise = negate(settlementOf(root) ?? []);
  return {
    name: `a cantilever fixed at ${root.letter}`,
    released: { kind: 'cantilever', root: root.at },
    from: 0,
    to: beam.letters.of(length),
    loads: groups.flatMap(({ fine }) => fine),
    moments,
    movements: { rises: [rise, []], rotation: turningOf(root) ?? [] },
  };
}

/** Between the supports on either side; at the ends of the beam with the overhang there. */
function spanAround({ supports, hinges, beam }: NamedBeam, x: number): Span | null {
  const held = supports.filter(({ support }) => support.vertical.kind !== 'free');
  const right = held.find((s) => s.x > x) ?? held.at(-1);
  const left = right && held.findLast((s) => s.x < right.x);
  if (!left || !right) return null;
  const from = x < left.x ? 0 : left.x;
  const to = x > right.x ? beam.length : right.x;
  const isCut = hinges.some(
    (hinge) => from < hinge.x && hinge.x < to && hinge.x !== left.x && hinge.x !== right.x,
  );
  const isHeld = supports.some(
    (s) => from <= s.x && s.x <= to && s !== left && s !== right && s.support.rotation.kind !== 'free',
  );
  return isCut || isHeld ? null : { left, right, from, to };
}

/** A couple at a support of the span is in the moment found beside it, but at an end of the beam it is a load. */
function loadsOnSpan(beam: NamedBeam, { from, to }: Span): NamedLoad[] {
  const all = beam.groups.flatMap(({ fine }) => fine);
  return all.flatMap((load) => {
    const part = partOn(beam, load, from, to);
    if (part?.kind !== 'couple') return part ?? [];
    const isAtCut = from > 0 && beam.letters.of(part.at) <= from + 1e-10 * beam.beam.length;
    return isAtCut ? [] : part;
  });
}

/** The moments on the span's ends, as couples; null where one has no letter. */
function endMoments(worked: Worked, span: Span): NamedLoad[] | null {
  const { beam } = worked;
  const found = (['left', 'right'] as const).map((end) => {
    const support = span[end];
    const isOpen = end === 'left' ? span.from < support.x : span.to > support.x;
    const isEnd = support.x === 0 || support.x === beam.beam.length;
    if (isOpen || (isEnd && support.support.rotation.kind === 'free')) return [];
    const sagging = saggingAt(worked, support, end === 'left' ? 'right' : 'left');
    if (!sagging) return null;
    // A sagging moment turns the left end clockwise and the right end anticlockwise.
    const m = end === 'left' ? negate(sagging) : sagging;
    return sagging.length === 0 ? [] : [{ kind: 'couple' as const, at: support.at, m }];
  });
  return found.every((moments) => moments !== null) ? found.flat() : null;
}

/** The sagging moment beside a support as its letter. */
function saggingAt(
  { beam, solution }: Worked,
  support: NamedSupport,
  side: 'left' | 'right',
): Expression | null {
  const { x } = support;
  if (x === 0 || x === beam.beam.length)
    return multiply(constant(-fixingSense(beam, support) * (x === 0 ? 1 : -1)), symbol(fixingTex(support)));
  const value = evaluate(solution.diagrams.moment, x)[side === 'left' ? 0 : 1];
  const { moment } = solution.extremes;
  if (Math.abs(value) <= 1e-9 * Math.max(Math.abs(moment.max.value), Math.abs(moment.min.value))) return [];
  const tex = [supportMomentTex(support, side), supportMomentTex(support)].find((name) =>
    beam.letters.has(name),
  );
  return tex === undefined ? null : symbol(tex);
}

/** What the supports do: where they are moved to, and what their springs give under their reactions. */
function movementsOf({ left, right }: Span) {
  const rise = (support: NamedSupport): Expression => {
    const [settlement, stiffness] = [settlementOf(support), springOf(support)];
    const given = stiffness ? negate(divide(symbol(reactionTex(support)), stiffness)) : [];
    return subtract(given, settlement ?? []);
  };
  return { rises: [rise(left), rise(right)] as const, rotation: [] };
}
