import type { BeamDocument, Load, SegmentDocument, SupportDocument } from '@/engine/model/index';
import { type Dice, dice } from './random';

/** No two points are closer than this part of the length, unless they coincide: below it the limits are others. */
const APART = 2e-4;

/** What the members of one beam share, so that its loads, stiffness and movements are of sizes that go together. */
type Draft = {
  roll: Dice;
  length: number;
  /** Where the supports go, and every other point taken so far. */
  places: number[];
  points: number[];
  /** Typical span, line load, and an EI under which that load sags a span's few hundredths of a hundredth. */
  span: number;
  w: number;
  ei: number;
};

/** The beam that a load is put on. */
type Bare = { draft: Draft; hinges: number[]; supports: SupportDocument[]; steps: number[] };

/**
 * A plausible beam of 1 to 12 spans with any support, spring, movement, hinge, step, and load, and points that fall on
 * one another on purpose. Hinges may make a mechanism of it: the caller skips what the model refuses as unstable.
 */
export function randomBeam(seed: number): BeamDocument {
  const draft = layOut(dice(seed));
  const hinges = randomHinges(draft);
  const supports = draft.places.map((at) => randomSupport(draft, at, hinges.includes(at)));
  const bare = placeFor(draft);
  if (draft.roll.chance(0.15) && !draft.places.includes(bare)) supports.push({ at: bare, kind: 'free' });
  const segments = randomSegments(draft);
  const count = draft.roll.chance(0.07) ? 0 : draft.roll.whole(1, 7);
  const steps = segments.slice(1).map(({ from }) => from);
  const loads = Array.from({ length: count }, () => randomLoad({ draft, hinges, supports, steps }));
  return { length: draft.length, segments, supports, hinges, loads, horizontal: 'ignore' };
}

function layOut(roll: Dice): Draft {
  const span = roll.logBetween(1, 12);
  const spans = Math.min(12, roll.whole(1, 13)); // long beams turn mechanisms more often
  const places = [roll.chance(0.3) ? span * roll.logBetween(0.05, 0.6) : 0];
  const cantilever = spans === 1 && roll.chance(0.7);
  for (let k = 0; k < spans; k++) places.push(places.at(-1)! + span * roll.logBetween(0.4, 1.8));
  const end = places.at(-1)!;
  const length = cantilever ? end : end + (roll.chance(0.3) ? span * roll.logBetween(0.05, 0.6) : 0);
  const kept = cantilever ? places.slice(0, 1) : places;
  const w = roll.logBetween(1e2, 1e5);
  const ei = w * span ** 3 * roll.logBetween(20, 500);
  return { roll, length, places: kept, points: [0, length, ...kept], span, w, ei };
}

/** A place anywhere on the beam, moved onto a taken point where it would come too near; remembered. */
function placeFor({ roll, length, points }: Draft): number {
  const near = roll.chance(0.03);
  const base = roll.pick(points);
  const wished = near ? base + roll.sign() * 4e-4 * length : roll.between(0, length);
  const x = Math.min(length, Math.max(0, wished));
  const taken = points.find((point) => Math.abs(point - x) < APART * length);
  if (taken !== undefined) return taken;
  points.push(x);
  return x;
}

function randomHinges(draft: Draft): number[] {
  const { roll, places, points, length } = draft;
  if (places.length === 1 || !roll.chance(0.5)) return [];
  const inner = places.filter((at) => at > 0 && at < length);
  const wanted = roll.whole(1, Math.max(1, Math.floor(places.length / 2)));
  const hinges = Array.from({ length: wanted }, () =>
    inner.length > 0 && roll.chance(0.3) ? roll.pick(inner) : placeFor(draft),
  );
  points.push(...hinges);
  return [...new Set(hinges)].filter((x) => x > 0 && x < length).sort((a, b) => a - b);
}

function randomSupport(
  { roll, length, places, span, w, ei }: Draft,
  at: number,
  hinged: boolean,
): SupportDocument {
  const alone = places.length === 1;
  const end = at === 0 || at === length;
  const kinds: SupportDocument['kind'][] = ['pin', 'roller', 'roller', 'free'];
  if (!hinged)
    kinds.push(...(end ? (['fixed', 'fixed', 'guided'] as const) : (['fixed', 'guided'] as const)));
  const kind = alone ? 'fixed' : roll.pick(kinds);
  const support: SupportDocument = { at, kind };
  const slides = kind === 'free' || kind === 'guided';
  if (kind === 'free' || (slides && roll.chance(0.6)))
    support.kv = (ei / span ** 3) * roll.logBetween(1e-2, 1e4);
  const turns = kind !== 'fixed' && kind !== 'guided' && !hinged;
  if (turns && roll.chance(0.15)) support.kr = (ei / span) * roll.logBetween(1e-2, 1e3);
  const sag = (w * span ** 4) / ei;
  const heldUp = !slides || support.kv !== undefined;
  const heldRound = (!turns && !hinged) || support.kr !== undefined;
  if (heldUp && roll.chance(0.15)) support.rise = roll.sign() * sag * roll.logBetween(1e-3, 1);
  if (heldRound && roll.chance(0.3)) support.rotation = roll.sign() * (sag / span) * roll.logBetween(1e-3, 1);
  return support;
}

function randomSegments(draft: Draft): SegmentDocument[] {
  const { roll, length, points, ei, span } = draft;
  const steps = roll.chance(0.5) ? roll.whole(1, 4) : 0;
  const inner = points.filter((x) => x > 0 && x < length);
  const cuts = Array.from({ length: steps }, () =>
    inner.length > 0 && roll.chance(0.5) ? roll.pick(inner) : placeFor(draft),
  );
  const ends = [...new Set([0, ...cuts, length])].sort((a, b) => a - b);
  const shears = roll.chance(0.3);
  return ends.slice(1).map((to, k) => {
    const own = ei * (ends.length > 2 ? roll.logBetween(0.2, 5) : 1);
    const ga = shears && roll.chance(0.8) ? own / (span ** 2 * roll.logBetween(1e-4, 0.5)) : null;
    return { from: ends[k]!, to, ei: own, ga };
  });
}

function randomLoad(bare: Bare): Load {
  const { draft, hinges } = bare;
  const { roll, span, w, ei } = draft;
  const size = roll.chance(0.04) ? 0 : (roll.chance(0.25) ? -1 : 1) * roll.logBetween(0.1, 3);
  const where = () => loadPlace(bare);
  switch (roll.pick(['point', 'point', 'line', 'line', 'line', 'couple', 'curvature'] as const)) {
    case 'point':
      return { kind: 'point', at: where(), p: size * w * span };
    case 'couple': {
      const at = where();
      return hinges.some((x) => Math.abs(x - at) < 1e-9 * draft.length)
        ? { kind: 'point', at, p: size * w * span }
        : { kind: 'couple', at, m: size * w * span ** 2 };
    }
    case 'line': {
      const [from, to] = stretch(draft, where);
      const [w0, w1] = roll.pick([
        [1, 1],
        [0, 1],
        [1, 0],
        [1, roll.between(-1, 2)],
      ]) as [number, number];
      return { kind: 'line', from, to, w0: w0 * size * w, w1: w1 * size * w };
    }
    case 'curvature': {
      const [from, to] = stretch(draft, where);
      return { kind: 'curvature', from, to, kappa: (size * w * span ** 2 * 0.1) / ei };
    }
  }
}

function stretch({ roll, length }: Draft, where: () => number): [number, number] {
  if (roll.chance(0.2)) return [0, length];
  const [a, b] = [where(), where()];
  if (roll.chance(0.08)) return [a, a];
  return [Math.min(a, b), Math.max(a, b)];
}

/** Often on a point that is already something: a support, a hinge, an end, a step, another load. */
function loadPlace({ draft, hinges, supports, steps }: Bare): number {
  const { roll, length, points } = draft;
  if (roll.chance(0.45)) return placeFor(draft);
  if (roll.chance(0.05)) {
    const { at } = roll.pick(supports);
    return Math.min(length, at * (1 + 2 ** -51)); // a rounding beside the support, as sums of lengths give
  }
  if (hinges.length > 0 && roll.chance(0.3)) return roll.pick(hinges);
  if (steps.length > 0 && roll.chance(0.55)) return roll.pick(steps);
  return roll.chance(0.15) ? roll.pick([0, length]) : roll.pick(points);
}
