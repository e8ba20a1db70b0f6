import { type Expression, expand, multiply, negate, subtract, ZERO } from './expression';
import { resultant, type Stretch } from './stretch';

/** A load with its places and sizes as formulas. Signs are the engine's: down, anticlockwise, sagging. */
export type NamedLoad =
  | { kind: 'point'; at: Expression; p: Expression }
  | { kind: 'couple'; at: Expression; m: Expression }
  | { kind: 'line'; from: Expression; to: Expression; w0: Expression; w1: Expression }
  | { kind: 'curvature'; from: Expression; to: Expression; kappa: Expression };

/** The same seen along an axis from some origin: distances, couples clockwise to one who looks along it. */
export type LocalLoad =
  | { kind: 'point'; a: Expression; p: Expression }
  | { kind: 'couple'; a: Expression; m: Expression }
  | ({ kind: 'line' } & Stretch)
  | ({ kind: 'curvature' } & Stretch);

/** An axis on the beam; seen from the right, couples and slopes change sign. */
export type Axis = { origin: Expression; direction: 1 | -1 };

export const along = ({ origin, direction }: Axis, place: Expression): Expression =>
  expand(direction > 0 ? subtract(place, origin) : subtract(origin, place));

export function localLoad(axis: Axis, load: NamedLoad): LocalLoad {
  const forward = axis.direction > 0;
  switch (load.kind) {
    case 'point':
      return { kind: 'point', a: along(axis, load.at), p: load.p };
    case 'couple':
      return { kind: 'couple', a: along(axis, load.at), m: forward ? negate(load.m) : load.m };
    case 'line':
    case 'curvature': {
      const ends = [along(axis, load.from), along(axis, load.to)] as const;
      const sizes =
        load.kind === 'line' ? ([load.w0, load.w1] as const) : ([load.kappa, load.kappa] as const);
      const [from, to] = forward ? ends : [ends[1], ends[0]];
      const [w0, w1] = forward ? sizes : [sizes[1], sizes[0]];
      return { kind: load.kind, from, to, w0, w1 };
    }
  }
}

/** Seen from the other end of a span of the given length. */
export function mirrored(load: LocalLoad, length: Expression): LocalLoad {
  const back = (place: Expression) => expand(subtract(length, place));
  switch (load.kind) {
    case 'point':
      return { ...load, a: back(load.a) };
    case 'couple':
      return { ...load, a: back(load.a), m: negate(load.m) };
    case 'line':
    case 'curvature':
      return { kind: load.kind, from: back(load.to), to: back(load.from), w0: load.w1, w1: load.w0 };
  }
}

/** Seen from an origin further along. */
export function shifted(load: LocalLoad, by: Expression): LocalLoad {
  const forth = (place: Expression) => expand(subtract(place, by));
  switch (load.kind) {
    case 'point':
    case 'couple':
      return { ...load, a: forth(load.a) };
    case 'line':
    case 'curvature':
      return { ...load, from: forth(load.from), to: forth(load.to) };
  }
}

/** What a load pushes, down. */
export function forceOf(load: NamedLoad | LocalLoad): Expression {
  if (load.kind === 'point') return load.p;
  return load.kind === 'line' ? resultant(load, load.from).force : ZERO;
}

/** What a load turns about a place of its axis, clockwise. */
export function momentOf(load: LocalLoad, about: Expression): Expression {
  switch (load.kind) {
    case 'point':
      return multiply(load.p, expand(subtract(load.a, about)));
    case 'couple':
      return load.m;
    case 'line':
      return resultant(load, about).moment;
    case 'curvature':
      return ZERO;
  }
}

/** What a load on the beam turns about a place of it, clockwise. */
export const momentAbout = (load: NamedLoad, about: Expression): Expression =>
  momentOf(localLoad({ origin: ZERO, direction: 1 }, load), about);
