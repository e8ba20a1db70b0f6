import { type Expression, type NamedLoad, type Setting, ZERO } from '../chart/index';
import {
  type Beam,
  defaultRedundants,
  type LineLoad,
  type Load,
  letteredSupports,
  type Redundant,
  type Restraint,
  type Support,
} from '../model/index';
import { Places } from './place';
import { type Kind, Letters } from './symbols';
import type { DeriveInput, LoadName } from './types';

export type NamedSupport = {
  /** A, B, C … from the left. */
  letter: string;
  /** In the beam's list. */
  index: number;
  x: number;
  at: Expression;
  support: Support;
};

/** A load with its letters; `x` is where it starts. */
type LetteredLoad = { load: NamedLoad; numeric: Load };

/** The beam with a letter for everything in it. */
export type NamedBeam = {
  beam: Beam;
  letters: Letters;
  places: Places;
  length: Expression;
  /** From the left. */
  supports: readonly NamedSupport[];
  hinges: readonly { x: number; at: Expression }[];
  /** Loads that vary are cut at every support and section, so that their size there has a letter. */
  loads: readonly LetteredLoad[];
  /** The same, cut only where the released beam has a support or a section: what the charts are asked for. */
  chartLoads: readonly LetteredLoad[];
  /** EI of each segment; one letter where all are alike. */
  stiffness: readonly Expression[];
  setting: (ei: Expression) => Setting;
};

export function nameBeam({ beam, names, redundants }: DeriveInput): NamedBeam {
  const letters = new Letters();
  const places = new Places(letters, beam.length, names?.lengths ?? []);
  const stiffness = nameStiffness(beam, letters);
  let before = 0;
  const spanTo = (x: number) => {
    const at = places.span(x, before);
    before = x;
    return at;
  };
  const supports = letteredSupports(beam).map(
    ({ support, index, letter }): NamedSupport => ({
      letter,
      index,
      x: support.at,
      at: spanTo(support.at),
      support,
    }),
  );
  const length = spanTo(beam.length);
  for (const { letter, support } of supports) nameRestraints(letters, letter, support);
  return {
    beam,
    letters,
    places,
    length,
    supports,
    hinges: beam.hinges.map((x) => ({ x, at: places.load(x) })),
    ...nameLoads(beam, redundants, merged(beam.loads, names?.loads ?? []), letters, places),
    stiffness,
    setting: (ei) => ({ value: letters.value, ei, length: beam.length }),
  };
}

function nameStiffness({ segments }: Beam, letters: Letters): Expression[] {
  const different = new Set(segments.map(({ ei }) => ei)).size > 1;
  const found = new Map<number, Expression>();
  return segments.map(({ ei }) => {
    const named =
      found.get(ei) ??
      (different ? letters.number('EI', ei, 'bending') : letters.define('EI', ei, 'bending', true));
    found.set(ei, named);
    return named;
  });
}

/** Springs and prescribed movements, by their support's letter: k_B, Δ_B down, φ_B anticlockwise. */
function nameRestraints(letters: Letters, letter: string, { vertical, rotation }: Support): void {
  if (vertical.kind === 'spring') letters.define(`k_{${letter}}`, vertical.stiffness, 'spring', true);
  if (rotation.kind === 'spring')
    letters.define(`k_{\\theta ${letter}}`, rotation.stiffness, 'rotational spring', true);
  const [rise, turn] = [movementOf(vertical), movementOf(rotation)];
  if (rise !== 0) letters.define(settlement(letter), -rise, 'deflection', true);
  if (turn !== 0) letters.define(turning(letter), turn, 'rotation', true);
}

export const settlement = (letter: string): string => `\\Delta_{${letter}}`;
export const turning = (letter: string): string => `\\varphi_{${letter}}`;

export const movementOf = (restraint: Restraint): number =>
  restraint.kind === 'free' ? 0 : restraint.movement;

/**
 * Loads with letters. Loads of one letter at one place are one load (a size that is split between groups is one size in
 * the derivation); what has no letter gets w, P, C or κ with a number. Loads that do nothing are left out.
 */
function nameLoads(
  beam: Beam,
  redundants: readonly Redundant[] | undefined,
  loads: readonly Sized[],
  letters: Letters,
  places: Places,
): Pick<NamedBeam, 'loads' | 'chartLoads'> {
  const chosen = redundants ?? defaultRedundants(beam);
  const removed = new Set(chosen.flatMap((r) => (r.component === 'vertical' ? [r.support] : [])));
  const sections = [...beam.hinges, ...chosen.flatMap((r) => (r.component === 'moment' ? [r.at] : []))];
  const supportsAt = (keep: (index: number) => boolean) =>
    beam.supports.filter((_, index) => keep(index)).map(({ at }) => at);
  const all = new Set([...sections, ...supportsAt(() => true)]);
  const staying = new Set([...sections, ...supportsAt((index) => !removed.has(index))]);
  const named = loads.map(({ load, tex }) => {
    const name = sizer(letters, tex);
    if (load.kind !== 'line' || load.w0 === load.w1) {
      const one = { numeric: load, load: nameLoad(load, name, places) };
      return { fine: [one], coarse: [one] };
    }
    const points = pointsWithin(load, all).map((x) => sizedPoint(load, x, name, letters, places));
    const coarse = points.filter(({ x }) => x === load.from || x === load.to || staying.has(x));
    return { fine: stretches(load, points), coarse: stretches(load, coarse) };
  });
  return { loads: named.flatMap(({ fine }) => fine), chartLoads: named.flatMap(({ coarse }) => coarse) };
}

type Size = (value: number, kind: Kind, letter: string) => Expression;

/** The load's own letter for its size, else a numbered one; nothing for nothing. */
const sizer =
  (letters: Letters, tex: string): Size =>
  (value, kind, letter) => {
    if (value === 0 && tex === '') return ZERO;
    return (tex === '' ? null : letters.add(tex, value, kind)) ?? letters.number(letter, value, kind);
  };

function nameLoad(load: Load, size: Size, places: Places): NamedLoad {
  if (load.kind === 'point') {
    return { kind: 'point', at: places.load(load.at), p: size(load.p, 'force', 'P') };
  }
  if (load.kind === 'couple') {
    return { kind: 'couple', at: places.load(load.at), m: size(load.m, 'moment', 'C') };
  }
  const ends = { from: places.load(load.from), to: places.load(load.to) };
  if (load.kind === 'curvature') {
    return { kind: 'curvature', ...ends, kappa: size(load.kappa, 'curvature', '\\kappa') };
  }
  const w = size(load.w0, 'line', 'w');
  return { kind: 'line', ...ends, w0: w, w1: w };
}

/** A place of a load that varies, and its size there. */
type SizedPoint = { x: number; at: Expression; value: number; size: Expression };

const pointsWithin = ({ from, to }: LineLoad, cuts: ReadonlySet<number>): number[] => [
  from,
  ...[...cuts].filter((x) => from < x && x < to).sort((a, b) => a - b),
  to,
];

/** The load's letter is the size at its left end, or at its right where there is none at its left. */
function sizedPoint(load: LineLoad, x: number, own: Size, letters: Letters, places: Places): SizedPoint {
  const { from, to, w0, w1 } = load;
  const value = x === to ? w1 : w0 + ((w1 - w0) * (x - from)) / (to - from);
  const isOwn = x === (w0 === 0 ? to : from);
  const size = value === 0 ? ZERO : isOwn ? own(value, 'line', 'w') : letters.number('w', value, 'line');
  return { x, at: places.load(x), value, size };
}

function stretches(load: LineLoad, points: readonly SizedPoint[]): LetteredLoad[] {
  return points.slice(1).map((end, k) => {
    const start = points[k]!;
    return {
      numeric: { ...load, from: start.x, to: end.x, w0: start.value, w1: end.value },
      load: { kind: 'line', from: start.at, to: end.at, w0: start.size, w1: end.size },
    };
  });
}

type Sized = { load: Load; tex: string };

function merged(loads: readonly Load[], names: readonly LoadName[]): Sized[] {
  const found = new Map<string, Sized>();
  loads.forEach((load, i) => {
    const tex = names[i]?.tex ?? '';
    if (tex === '' && isNothing(load)) return;
    const place = 'at' in load ? load.at : `${load.from}–${load.to}`;
    const key = tex === '' ? String(i) : `${load.kind} ${tex} ${place}`;
    const alike = found.get(key);
    found.set(key, { load: alike ? together(alike.load, load) : load, tex });
  });
  return [...found.values()];
}

function isNothing(load: Load): boolean {
  if (load.kind === 'point') return load.p === 0;
  if (load.kind === 'couple') return load.m === 0;
  if (load.from === load.to) return true;
  return load.kind === 'line' ? load.w0 === 0 && load.w1 === 0 : load.kappa === 0;
}

function together(a: Load, b: Load): Load {
  if (a.kind === 'point' && b.kind === 'point') return { ...a, p: a.p + b.p };
  if (a.kind === 'couple' && b.kind === 'couple') return { ...a, m: a.m + b.m };
  if (a.kind === 'line' && b.kind === 'line') return { ...a, w0: a.w0 + b.w0, w1: a.w1 + b.w1 };
  if (a.kind === 'curvature' && b.kind === 'curvature') return { ...a, kappa: a.kappa + b.kappa };
  return b;
}
