import { type Expression, type NamedLoad, type Setting, ZERO } from '../chart/index';
import type { Beam, Load, Restraint, Support } from '../model/index';
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
export type LetteredLoad = { load: NamedLoad; numeric: Load };

/** The beam with a letter for everything in it. */
export type NamedBeam = {
  beam: Beam;
  letters: Letters;
  places: Places;
  length: Expression;
  /** From the left. */
  supports: readonly NamedSupport[];
  hinges: readonly { x: number; at: Expression }[];
  loads: readonly LetteredLoad[];
  /** EI of each segment; one letter where all are alike. */
  stiffness: readonly Expression[];
  setting: (ei: Expression) => Setting;
};

export function nameBeam({ beam, names }: Pick<DeriveInput, 'beam' | 'names'>): NamedBeam {
  const letters = new Letters();
  const places = new Places(letters, beam.length, names?.lengths ?? []);
  const stiffness = nameStiffness(beam, letters);
  const order = beam.supports
    .map((support, index) => ({ support, index }))
    .sort((a, b) => a.support.at - b.support.at);
  let before = 0;
  const spanTo = (x: number) => {
    const at = places.span(x, before);
    before = x;
    return at;
  };
  const supports = order.map(
    ({ support, index }, k): NamedSupport => ({
      letter: letterOf(k),
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
    loads: nameLoads(beam, letters, places, names?.loads ?? []),
    stiffness,
    setting: (ei) => ({ value: letters.value, ei, length: beam.length }),
  };
}

/** A … Z, then AA, AB … */
export const letterOf = (k: number): string => {
  const last = String.fromCharCode('A'.charCodeAt(0) + (k % 26));
  return k < 26 ? last : letterOf(Math.floor(k / 26) - 1) + last;
};

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
 * the derivation); what has no letter gets w, P, M or κ with a number. Loads that do nothing are left out.
 */
function nameLoads(beam: Beam, letters: Letters, places: Places, names: readonly LoadName[]): LetteredLoad[] {
  return merged(beam.loads, names).map((sized) => ({
    numeric: sized.load,
    load: nameLoad(sized, letters, places),
  }));
}

function nameLoad({ load, tex }: Sized, letters: Letters, places: Places): NamedLoad {
  const size = (value: number, kind: Kind, letter: string): Expression => {
    if (value === 0 && tex === '') return ZERO;
    return (tex === '' ? null : letters.add(tex, value, kind)) ?? letters.number(letter, value, kind);
  };
  if (load.kind === 'point') {
    return { kind: 'point', at: places.load(load.at), p: size(load.p, 'force', 'P') };
  }
  if (load.kind === 'couple') {
    return { kind: 'couple', at: places.load(load.at), m: size(load.m, 'moment', 'C') };
  }
  const [from, to] = [places.load(load.from), places.load(load.to)];
  if (load.kind === 'curvature') {
    return { kind: 'curvature', from, to, kappa: size(load.kappa, 'curvature', '\\kappa') };
  }
  const w0 = size(load.w0, 'line', 'w');
  const w1 = load.w1 === load.w0 ? w0 : load.w1 === 0 ? ZERO : letters.number('w', load.w1, 'line');
  return { kind: 'line', from, to, w0, w1 };
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
