import {
  add,
  constant,
  divide,
  type Expression,
  expand,
  forceOf,
  momentAbout,
  multiply,
  type NamedLoad,
  negate,
  subtract,
  symbol,
  ZERO,
} from '../chart/index';
import type { NamedBeam, NamedSupport } from './named-beam';
import { partOn } from './pieces';
import { fixingSense, fixingTex, reactionTex, type Unknown } from './unknown';

/** A force (up) or a couple (anticlockwise) on a part, known or not; `amount` is what 1 of its letter is. */
type Action = { tex: string; at: Expression; x: number; kind: 'force' | 'couple'; amount: 1 | -1 };

/** A part between two sections whose moments are known: hinges, and the redundants within the beam. */
export type Part = {
  from: number;
  to: number;
  actions: Action[];
  loads: NamedLoad[];
  moments: [Expression, Expression];
};

/** An equation of equilibrium solved for the one letter in it that is not yet known. */
export type Equilibrium = {
  tex: string;
  value: Expression;
  /** Moments about a point, or forces up and down; of the whole beam or a part of it. */
  about: { x: number; at: Expression } | null;
  part: { from: number; to: number };
  /** The reaction it finds; null for the shear in a section. */
  support: NamedSupport | null;
};

const shearTex = (name: string): string => `V_{${name}}`;

/**
 * Every reaction that is not a redundant, each from one equation with one unknown, in an order that can be followed by
 * hand: parts with one or two unknowns first. The shear just right of a section is an unknown on the way.
 */
export function equilibrium(
  beam: NamedBeam,
  parts: readonly Part[],
  unknowns: readonly Unknown[],
): Equilibrium[] {
  const known = new Set(unknowns.map(({ tex }) => tex));
  const found: Equilibrium[] = [];
  const missing = (part: Part) => part.actions.filter(({ tex }) => !known.has(tex));
  const settle = (part: Part, about: Action | null, wanted: Action) => {
    known.add(wanted.tex);
    found.push({
      tex: wanted.tex,
      value: solvedFor(part, about, wanted),
      about: about && { x: about.x, at: about.at },
      part,
      support: beam.supports.find((s) => [reactionTex(s), fixingTex(s)].includes(wanted.tex)) ?? null,
    });
  };
  for (let waiting = [...parts]; waiting.length > 0; ) {
    const part = waiting.find((candidate) => missing(candidate).length <= 2);
    if (!part) throw new RangeError('no part of the released beam can be solved by itself');
    waiting = waiting.filter((other) => other !== part);
    const [first, second] = missing(part);
    if (first && second) solvePair(part, first, second, settle);
    else if (first) settle(part, first.kind === 'couple' ? first : null, first);
  }
  return found;
}

function solvePair(
  part: Part,
  first: Action,
  second: Action,
  settle: (part: Part, about: Action | null, wanted: Action) => void,
): void {
  const couple = [first, second].find(({ kind }) => kind === 'couple');
  if (couple) {
    settle(part, null, couple === first ? second : first);
    settle(part, couple, couple);
  } else {
    settle(part, second, first);
    settle(part, null, second);
  }
}

/** The parts of the beam between sections whose moment is known, with all that acts on them. */
export function partsOf(beam: NamedBeam, unknowns: readonly Unknown[]): Part[] {
  const internal = unknowns.filter(({ kind }) => kind === 'internal');
  const hinges = beam.hinges.map(({ x }, k) => ({ x, name: hingeName(beam, x, k), moment: ZERO }));
  const cuts = internal.map(({ x, letter, tex }) => ({ x, name: letter, moment: symbol(tex) }));
  const sections = [...hinges, ...cuts].sort((a, b) => a.x - b.x);
  const ends = [0, ...sections.map(({ x }) => x), beam.beam.length];
  return ends.slice(1).map((to, k) => {
    const from = ends[k]!;
    const [left, right] = [sections[k - 1], sections[k]];
    const held = beam.supports.filter(({ x }) => (from < x || from === 0) && from <= x && x <= to);
    const shear = (section: { x: number; name: string } | undefined, amount: 1 | -1): Action[] =>
      section
        ? [
            {
              tex: shearTex(section.name),
              at: beam.places.load(section.x),
              x: section.x,
              kind: 'force',
              amount,
            },
          ]
        : [];
    return {
      from,
      to,
      actions: [...shear(left, 1), ...held.flatMap((s) => reactionsOf(beam, s)), ...shear(right, -1)],
      loads: beam.groups.flatMap(({ fine }) => fine).flatMap((load) => leftOfCut(beam, load, from, to) ?? []),
      moments: [left?.moment ?? ZERO, right?.moment ?? ZERO],
    };
  });
}

function hingeName(beam: NamedBeam, x: number, k: number): string {
  const support = beam.supports.find((s) => s.x === x);
  return support?.letter ?? `h${beam.hinges.length > 1 ? k + 1 : ''}`;
}

function reactionsOf(beam: NamedBeam, named: NamedSupport): Action[] {
  const { support, at, x } = named;
  const vertical: Action = { tex: reactionTex(named), at, x, kind: 'force', amount: 1 };
  const fixing: Action = { tex: fixingTex(named), at, x, kind: 'couple', amount: fixingSense(beam, named) };
  return [
    ...(support.vertical.kind === 'free' ? [] : [vertical]),
    ...(support.rotation.kind === 'free' ? [] : [fixing]),
  ];
}

/** A force at a section belongs to the part at its left, where the support there is; a couple to the part at its right. */
function leftOfCut(beam: NamedBeam, load: NamedLoad, from: number, to: number): NamedLoad | null {
  if (load.kind !== 'point') return load.kind === 'curvature' ? null : partOn(beam, load, from, to);
  const x = beam.letters.of(load.at);
  const tolerance = 1e-10 * beam.beam.length;
  return (x > from + tolerance || from === 0) && x < to + tolerance ? load : null;
}

/** ΣF = 0, or ΣM = 0 about a point, solved for one action. */
function solvedFor(part: Part, about: Action | null, wanted: Action): Expression {
  const others = part.actions.filter((action) => action !== wanted);
  const lever = (at: Expression) => (about ? expand(subtract(at, about.at)) : constant(1));
  const share = ({ tex, at, kind, amount }: Action): Expression => {
    if (kind === 'couple') return about ? multiply(constant(amount), symbol(tex)) : ZERO;
    return multiply(multiply(constant(amount), symbol(tex)), lever(at));
  };
  const [left, right] = part.moments;
  const sum = add(
    ...part.loads.map((load) => negate(about ? momentAbout(load, about.at) : forceOf(load))),
    ...(about ? [negate(left), right] : []),
    ...others.map(share),
  );
  const factor =
    wanted.kind === 'couple' ? constant(wanted.amount) : multiply(constant(wanted.amount), lever(wanted.at));
  return divide(negate(sum), factor);
}

/**
 * The moment at a place from what acts on its part of the beam at its left, or at its right: the side asked for, else
 * whichever is shorter. Sagging positive; just left or right of the place, where the moment jumps there.
 */
export function momentAt(
  beam: NamedBeam,
  parts: readonly Part[],
  { x, at }: { x: number; at: Expression },
  side?: 'left' | 'right',
): Expression {
  const part = parts.find(({ from, to }) => from <= x && x <= to)!;
  if (side) return momentFrom(beam, part, x, at, side);
  const [left, right] = (['left', 'right'] as const).map((from) => momentFrom(beam, part, x, at, from));
  return left!.length <= right!.length ? left! : right!;
}

function momentFrom(
  beam: NamedBeam,
  part: Part,
  x: number,
  at: Expression,
  side: 'left' | 'right',
): Expression {
  const tolerance = 1e-10 * beam.beam.length;
  const isBeyond = (place: number) => (side === 'left' ? place < x - tolerance : place > x + tolerance);
  const [from, to] = side === 'left' ? [part.from, x] : [x, part.to];
  // Seen from the left, what turns clockwise about the place makes it sag; from the right, what turns the other way.
  const actions = part.actions
    .filter((action) => isBeyond(action.x))
    .map(({ tex, at: place, kind, amount }) =>
      kind === 'couple'
        ? multiply(constant(-amount), symbol(tex))
        : multiply(multiply(constant(amount), symbol(tex)), expand(subtract(at, place))),
    );
  const loads = part.loads.flatMap((load) => {
    if (load.kind === 'couple' && !isBeyond(beam.letters.of(load.at))) return [];
    const within = load.kind === 'couple' || load.kind === 'point' ? load : partOn(beam, load, from, to);
    const isOther = within?.kind === 'point' && !isBeyond(beam.letters.of(within.at));
    return within && !isOther ? [momentAbout(within, at)] : [];
  });
  const clockwise = add(...actions, ...loads);
  const [left, right] = part.moments;
  return side === 'left' ? add(left, clockwise) : add(right, negate(clockwise));
}
