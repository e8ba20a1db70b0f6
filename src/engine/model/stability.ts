import { Wide } from '../linear/index';
import type { Beam, Redundant } from './types';

/** A position where the beam is held, or can fold. */
type Joint = { at: number; vertical: boolean; rotation: boolean; hinge: boolean };

/** What decides whether a beam can move: its length and its joints, ascending. */
export type Frame = { length: number; joints: readonly Joint[] };

type Holding = Pick<Beam, 'length' | 'supports' | 'hinges'>;

/** A rigid part that moves: it turns by `amount` (rad, anticlockwise) about a point, or slides by `amount` (m, up). */
export type MovingPart = { from: number; to: number; about: number | null; amount: Wide };

/** What a part can still do when everything at its left is held as it is. */
type Freedom = 'held' | 'slides' | 'free' | { about: number };
type Body = { from: number; freedom: Freedom };

/** Where a redundant acts. */
export const placeOf = ({ supports }: Pick<Beam, 'supports'>, redundant: Redundant): number =>
  redundant.component === 'moment' ? redundant.at : supports[redundant.support]!.at;

/** The beam's frame, or that of the beam without the given redundants. */
export function frameOf(beam: Holding, released: readonly Redundant[] = []): Frame {
  const joints = new Map<number, Joint>();
  const joint = (at: number): Joint => {
    const known = joints.get(at) ?? { at, vertical: false, rotation: false, hinge: false };
    joints.set(at, known);
    return known;
  };
  for (const support of beam.supports) {
    joint(support.at).vertical = support.vertical.kind !== 'free';
    joint(support.at).rotation = support.rotation.kind !== 'free';
  }
  for (const at of beam.hinges) joint(at).hinge = true;
  const frame = { length: beam.length, joints: [...joints.values()].sort((a, b) => a.at - b.at) };
  return released.reduce<Frame>(
    (left, redundant) => without(left, redundant, placeOf(beam, redundant)),
    frame,
  );
}

/** The frame without one more redundant, which acts at `at`; the same frame where that is released already. */
export function without(frame: Frame, { component }: Redundant, at: number): Frame {
  const { length, joints } = frame;
  const next = joints.findIndex((joint) => joint.at >= at);
  const i = next < 0 ? joints.length : next;
  const known = joints[i]?.at === at ? joints[i] : undefined;
  const joint = known ?? { at, vertical: false, rotation: false, hinge: false };
  const [key, value] = component === 'moment' ? (['hinge', true] as const) : ([component, false] as const);
  if (joint[key] === value) return frame;
  return { length, joints: joints.toSpliced(i, known ? 1 : 0, { ...joint, [key]: value }) };
}

/**
 * How the beam can move as a chain of rigid parts, or null where it cannot: then its equilibrium equations have full
 * rank. Walks from left to right and keeps what the part at hand can still do. A movement is trapped, and nothing at
 * its right can stop it, where a part can turn about the very hinge at its right end, or reaches the end not held.
 *
 * The verdict compares positions only, so it is exact, and the same in mm and in inches.
 */
export function findMotion({ length, joints }: Frame): MovingPart[] | null {
  const bodies: Body[] = [{ from: 0, freedom: 'free' }];
  for (const { at, vertical, rotation, hinge } of joints) {
    const body = bodies.at(-1)!;
    if (vertical) body.freedom = holdVertical(body.freedom, at);
    if (rotation) body.freedom = holdRotation(body.freedom);
    if (!hinge) continue;
    if (body.freedom === 'free' || isAbout(body.freedom, at)) return follow(bodies, at, at);
    bodies.push({ from: at, freedom: body.freedom === 'held' ? { about: at } : 'free' });
  }
  const { from, freedom } = bodies.at(-1)!;
  if (freedom === 'held') return null;
  if (freedom === 'slides') return follow(bodies, length, null);
  // Not held at all: the last part turns about its hinge, and a beam without any slides.
  return follow(bodies, length, freedom !== 'free' ? freedom.about : bodies.length > 1 ? from : null);
}

/** Joints come one by one, so that what turns about a place turns about one at its left. */
function holdVertical(freedom: Freedom, at: number): Freedom {
  return freedom === 'free' ? { about: at } : 'held';
}

function holdRotation(freedom: Freedom): Freedom {
  return freedom === 'free' || freedom === 'slides' ? 'slides' : 'held';
}

const isAbout = (freedom: Freedom, at: number) => typeof freedom === 'object' && freedom.about === at;

/** The last part moves by 1; each part at its left follows at the hinge between them, until a hinge that stays. */
function follow(bodies: readonly Body[], end: number, about: number | null): MovingPart[] {
  const last: MovingPart = { from: bodies.at(-1)!.from, to: end, about, amount: Wide.ONE };
  const parts = [last];
  let part = last;
  for (let i = bodies.length - 2; i >= 0; i--) {
    const hinge = part.from;
    if (part.about === hinge) break;
    const rise = riseOf(part, hinge);
    const { from, freedom } = bodies[i]!;
    const pivot = typeof freedom === 'object' ? freedom.about : null;
    part = {
      from,
      to: hinge,
      about: pivot,
      amount: pivot === null ? rise : rise.over(Wide.difference(hinge, pivot)),
    };
    parts.unshift(part);
  }
  return parts;
}

/** Vertical movement of a part at x, m, positive up. */
export function riseOf({ about, amount }: MovingPart, x: number): Wide {
  return about === null ? amount : amount.times(Wide.difference(x, about));
}
