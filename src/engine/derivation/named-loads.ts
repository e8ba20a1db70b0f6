import { type Expression, type NamedLoad, symbolsOf, ZERO } from '../chart/index';
import { type Beam, defaultRedundants, type LineLoad, type Load, type Redundant } from '../model/index';
import type { Places } from './place';
import type { Letters } from './symbols';
import type { LoadName } from './types';
import type { Kind } from './units';

/** A load with its letters. */
export type LoadGroup = {
  /** The letter that it is known by. */
  tex: string;
  numeric: Load;
  /** Places in the beam's list of those that it is the sum of. */
  of: readonly number[];
  /** Cut at every support and section where it varies, so that its size there has a letter. */
  fine: readonly NamedLoad[];
  /** The same, cut only where the released beam has a support or a section: what the charts are asked for. */
  coarse: readonly NamedLoad[];
};

type Sized = { load: Load; tex: string; of: readonly number[] };

/**
 * Loads with letters. Loads of one letter at one place are one load (a size that is split between groups is one size in
 * the derivation); what has no letter gets w, P, C or κ with a number. Loads that do nothing are left out.
 */
export function nameLoads(
  beam: Beam,
  redundants: readonly Redundant[] | undefined,
  names: readonly LoadName[],
  letters: Letters,
  places: Places,
): LoadGroup[] {
  const chosen = redundants ?? defaultRedundants(beam);
  const removed = new Set(chosen.flatMap((r) => (r.component === 'vertical' ? [r.support] : [])));
  const sections = [...beam.hinges, ...chosen.flatMap((r) => (r.component === 'moment' ? [r.at] : []))];
  const supportsAt = (keep: (index: number) => boolean) =>
    beam.supports.filter((_, index) => keep(index)).map(({ at }) => at);
  const all = new Set([...sections, ...supportsAt(() => true)]);
  const staying = new Set([...sections, ...supportsAt((index) => !removed.has(index))]);
  return merged(beam.loads, names).map(({ load, tex, of }) => {
    const size = sizer(letters, tex);
    if (load.kind === 'line' && load.w0 !== load.w1) {
      const points = pointsWithin(load, all).map((x) => sizedPoint(load, x, size, letters, places));
      const kept = points.filter(({ x }) => x === load.from || x === load.to || staying.has(x));
      return { ...groupOf(load, tex, stretches(points), stretches(kept)), of };
    }
    const one = [nameLoad(load, size, places)];
    return { ...groupOf(load, tex, one, one), of };
  });
}

/** The letter is the template's, else that of the size. */
function groupOf(numeric: Load, tex: string, fine: NamedLoad[], coarse: NamedLoad[]): Omit<LoadGroup, 'of'> {
  const sizes = fine.flatMap((load) => {
    if (load.kind === 'point') return symbolsOf(load.p);
    if (load.kind === 'couple') return symbolsOf(load.m);
    return load.kind === 'line' ? [...symbolsOf(load.w0), ...symbolsOf(load.w1)] : symbolsOf(load.kappa);
  });
  return { tex: sizes[0] ?? tex, numeric, fine, coarse };
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
type SizedPoint = { x: number; at: Expression; size: Expression };

const pointsWithin = ({ from, to }: LineLoad, cuts: ReadonlySet<number>): number[] => [
  from,
  ...[...cuts].filter((x) => from < x && x < to).sort((a, b) => a - b),
  to,
];

/** The load's own letter is its size at the end where it begins, or at the other if it begins with nothing. */
function sizedPoint(load: LineLoad, x: number, own: Size, letters: Letters, places: Places): SizedPoint {
  const { from, to, w0, w1 } = load;
  const value = x === to ? w1 : w0 + ((w1 - w0) * (x - from)) / (to - from);
  const isOwn = x === (w0 === 0 ? to : from);
  const sized = () => (isOwn ? own(value, 'line', 'w') : letters.number('w', value, 'line'));
  return { x, at: places.load(x), size: value === 0 ? ZERO : sized() };
}

function stretches(points: readonly SizedPoint[]): NamedLoad[] {
  return points.slice(1).map((end, k) => {
    const start = points[k]!;
    return { kind: 'line', from: start.at, to: end.at, w0: start.size, w1: end.size };
  });
}

function merged(loads: readonly Load[], names: readonly LoadName[]): Sized[] {
  const found = new Map<string, Sized>();
  loads.forEach((load, i) => {
    const tex = names[i]?.tex ?? '';
    if (isNothing(load)) return;
    const place = 'at' in load ? load.at : `${load.from}–${load.to}`;
    const key = tex === '' ? String(i) : `${load.kind} ${tex} ${place}`;
    const alike = found.get(key);
    found.set(key, { load: alike ? together(alike.load, load) : load, tex, of: [...(alike?.of ?? []), i] });
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
