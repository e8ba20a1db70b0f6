import { Sum, Wide } from '../linear/index';
import {
  type Beam,
  type Frame,
  findMotion,
  frameOf,
  type MovingPart,
  type Redundant,
  type Restraint,
  riseOf,
  without,
} from '../model/index';
import type { Actions } from './actions';
import type { Mesh } from './mesh';

/** A reaction of the released beam, and how the beam would move if that alone gave way by 1 in its direction. */
export type Reaction = {
  support: number;
  component: 'vertical' | 'rotation';
  at: number;
  restraint: Restraint;
  motion: readonly MovingPart[];
};

/**
 * The reactions of a statically determinate beam: `beam` without the redundants. Each comes from virtual work, exactly
 * and without solving equations: were its restraint to give way by 1, the beam would move as a chain of rigid parts, and
 *
 *   R · 1 + (work of the loads on that movement) = 0
 *
 * The same movements turn given movements of the supports into the rigid movement of the beam.
 */
export function reactionsWithout(beam: Beam, released: readonly Redundant[]): Reaction[] {
  const frame = frameOf(beam, released);
  return beam.supports.flatMap((support, i) =>
    (['vertical', 'rotation'] as const).flatMap((component): Reaction[] => {
      const restraint = support[component];
      if (restraint.kind === 'free' || isReleased(released, i, component)) return [];
      const motion = unitMotion(frame, { support: i, component }, support.at);
      return [{ support: i, component, at: support.at, restraint, motion }];
    }),
  );
}

/** Whether a component of a support is among the redundants. */
export function isReleased(released: readonly Redundant[], support: number, component: string): boolean {
  return released.some((r) => r.component !== 'moment' && r.component === component && r.support === support);
}

function unitMotion(
  frame: Frame,
  reaction: Extract<Redundant, { support: number }>,
  at: number,
): MovingPart[] {
  const parts = findMotion(without(frame, reaction, at));
  if (!parts) throw new RangeError('the released beam is not statically determinate');
  const moved = reaction.component === 'vertical' ? riseAt(parts, at) : turnAt(parts, at, 'left');
  return parts.map((part) => ({ ...part, amount: part.amount.over(moved) }));
}

/** Whether the movement is one at x. */
export const reaches = (parts: readonly MovingPart[], x: number): boolean =>
  parts[0]!.from <= x && x <= parts.at(-1)!.to;

/** Vertical movement at an x that it reaches; the parts meet in the hinges. */
export const riseAt = (parts: readonly MovingPart[], x: number): Wide =>
  riseOf(parts.find(({ from, to }) => from <= x && x <= to)!, x);

/** Rotation just left or just right of x; at the left end of the beam there is but one. */
export function turnAt(parts: readonly MovingPart[], x: number, side: 'left' | 'right'): Wide {
  const holds = ({ from, to }: MovingPart) =>
    side === 'left' && x > 0 ? from < x && x <= to : from <= x && x < to;
  const part = parts.find(holds);
  return part ? turnOf(part) : Wide.ZERO;
}

/** Rotation of a part; one that slides does not turn. */
export const turnOf = ({ about, amount }: MovingPart): Wide => (about === null ? Wide.ZERO : amount);

/** The load on a piece: ∫ w ds, and ∫ w s ds about its left end. */
type Resultant = { force: Wide; moment: Wide };

const HALF = Wide.of(0.5);
const THIRD = Wide.ONE.over(3);

/** Of every piece; null where there is no load. */
export const resultantsOf = ({ lengths }: Mesh, { start, rate }: Actions): (Resultant | null)[] =>
  lengths.map((h, k) => {
    const [w0, w1] = [start[k]!, rate[k]!];
    if (w0.hi === 0 && w1.hi === 0) return null;
    const rise = w1.times(h);
    return {
      force: w0.plus(rise.times(HALF)).times(h),
      moment: w0.times(HALF).plus(rise.times(THIRD)).times(h).times(h),
    };
  });

/**
 * Work of the actions, and of the resultants of their loads, on a rigid movement. A couple at a point where the beam is
 * cut acts at the right of the cut, so that the moment there, if it is a redundant, is the one just left of the couple.
 */
export function workOf(
  mesh: Mesh,
  { force, couple }: Actions,
  resultants: readonly (Resultant | null)[],
  parts: readonly MovingPart[],
): Wide {
  const work = new Sum();
  const end = mesh.points.length - 1;
  for (const part of parts) {
    const [first, last] = [mesh.index.get(part.from)!, mesh.index.get(part.to)!];
    const turn = turnOf(part);
    for (let i = first; i <= last; i++) {
      const load = i < last ? resultants[i] : null;
      // Where two parts meet the force there moves with both, and works once.
      const point = i > first || i === 0 ? force[i]! : Wide.ZERO;
      if (load || point.hi !== 0) {
        const rise = riseOf(part, mesh.points[i]!);
        work.subtract(point.times(rise));
        if (load) work.subtract(load.force.times(rise).plus(load.moment.times(turn)));
      }
      if (i < last || i === end) work.add(couple[i]!.times(turn));
    }
  }
  return work.total();
}
