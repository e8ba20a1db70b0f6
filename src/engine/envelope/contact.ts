import { type PreparedBeam, prepareBeam, type Solution } from '../beam/index';
import {
  type Beam,
  describeMotion,
  findMotion,
  frameOf,
  type Load,
  type MovingPart,
  nameSupport,
  type Redundant,
  riseOf,
} from '../model/index';
import { evaluate } from '../polynomial/index';

/** Part of the largest reaction, or deflection, below which a pull, or a beam's end inside a support, is rounding. */
const NOTHING = 1e-9;

/** A beam on the supports that it stays on under some loads. */
export type Resting = { readonly beam: Beam; readonly solution: Solution; readonly lifted: number[] };

export type RestingOutcome =
  | { readonly ok: true; readonly value: Resting }
  | { readonly ok: false; readonly message: string };

/** The beam without some of its supports: solvable, or how it moves. */
type Variant = { beam: Beam; prepared: PreparedBeam | null; motion: readonly MovingPart[] | null };

/** Supports that the beam is off at the moment, and how far above each it is, m. */
type Gaps = Map<number, number>;

/**
 * A beam on supports that hold it up and cannot pull it down: at each of them either it rests with R ≥ 0, or it is off
 * the support with R = 0 and a gap ≥ 0. Of all such states the elastic energy has one least: it is looked for from the
 * beam held everywhere, by letting go of the support that pulls most and following the beam until it rests elsewhere.
 * Every step loosens the beam's energy, so that no state comes twice.
 * Source: the active-set method for convex quadratic programs, J. Nocedal, S. J. Wright, Numerical Optimization, 16.5
 * (from memory); that resting beams are such a program, A. Signorini's contact conditions.
 */
export class ContactBeam {
  private readonly variants = new Map<string, Variant>();

  constructor(
    private readonly beam: Beam,
    /** Indices of the supports that cannot pull. */
    private readonly oneSided: readonly number[],
    private readonly redundants?: readonly Redundant[] | undefined,
  ) {}

  /** The beam under the loads and the movements of its supports. */
  solve(loads: readonly Load[]): RestingOutcome {
    const gaps: Gaps = new Map();
    let released = -1;
    for (let step = 0; step < 20 * (this.oneSided.length + 1); step++) {
      const { beam, prepared, motion } = this.without(gaps);
      if (!prepared) {
        if (!this.followMotion(motion!, gaps, released)) return { ok: false, message: fallWords(beam, gaps) };
        continue;
      }
      const solution = prepared.solve(loads);
      if (this.followBeam(solution, gaps)) continue;
      const pulling = this.mostPulling(solution, gaps);
      if (pulling < 0) {
        const lifted = [...gaps.keys()].sort((a, b) => a - b);
        return { ok: true, value: { beam: { ...beam, loads }, solution, lifted } };
      }
      released = pulling;
      gaps.set(released, 0);
    }
    return { ok: false, message: 'The supports on which the beam rests cannot be told from one another.' };
  }

  private without(gaps: Gaps): Variant {
    const key = [...gaps.keys()].sort((a, b) => a - b).join();
    const known = this.variants.get(key);
    if (known) return known;
    const supports = this.beam.supports.map((support, i) =>
      gaps.has(i) ? { ...support, vertical: { kind: 'free' as const } } : support,
    );
    const beam = { ...this.beam, supports, degree: this.beam.degree - gaps.size };
    const motion = findMotion(frameOf(beam));
    const prepared = motion ? null : prepareBeam(beam, gaps.size === 0 ? this.redundants : undefined);
    const variant = { beam, prepared, motion };
    this.variants.set(key, variant);
    return variant;
  }

  /** A mechanism moves up from the support let go, until it meets another; false where it meets none. */
  private followMotion(motion: readonly MovingPart[], gaps: Gaps, released: number): boolean {
    const up = this.riseAt(motion, released);
    const rises = new Map([...gaps.keys()].map((i) => [i, this.riseAt(motion, i) / up]));
    return this.move(gaps, rises, Number.POSITIVE_INFINITY);
  }

  /** The beam moves to where it would be on the supports that it has now; true where it meets another on its way. */
  private followBeam(solution: Solution, gaps: Gaps): boolean {
    const { max, min } = solution.extremes.deflection;
    const nothing = NOTHING * Math.max(Math.abs(max.value), Math.abs(min.value));
    const rises = new Map<number, number>();
    for (const [i, gap] of gaps) {
      const above = this.heightAbove(solution, i);
      rises.set(i, (above < -nothing ? above : Math.max(above, 0)) - gap);
    }
    return this.move(gaps, rises, 1);
  }

  /** Moves by `rises` times as much as can be before a gap closes, at most `most`; whether one has closed. */
  private move(gaps: Gaps, rises: ReadonlyMap<number, number>, most: number): boolean {
    let amount = most;
    let meeting = -1;
    for (const [i, gap] of gaps) {
      const rise = rises.get(i)!;
      if (gap + amount * rise < 0) {
        amount = -gap / rise;
        meeting = i;
      }
    }
    if (meeting < 0 && amount === Number.POSITIVE_INFINITY) return false;
    for (const [i, gap] of gaps) gaps.set(i, Math.max(0, gap + amount * rises.get(i)!));
    return gaps.delete(meeting);
  }

  /** The support that pulls most, or −1. */
  private mostPulling({ reactions }: Solution, gaps: Gaps): number {
    const nothing = NOTHING * Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)));
    let [found, least] = [-1, -nothing];
    for (const i of this.oneSided) {
      const { vertical } = reactions[i]!;
      if (!gaps.has(i) && vertical < least) [found, least] = [i, vertical];
    }
    return found;
  }

  private riseAt(motion: readonly MovingPart[], support: number): number {
    const { at } = this.beam.supports[support]!;
    const part = motion.find(({ from, to }) => from <= at && at <= to);
    return part ? riseOf(part, at).rounded() : 0;
  }

  /** How far the beam is above a support that it is off. */
  private heightAbove({ diagrams }: Solution, support: number): number {
    const { at, vertical } = this.beam.supports[support]!;
    const ground = vertical.kind === 'free' ? 0 : vertical.movement;
    return evaluate(diagrams.deflection, at)[1] - ground;
  }
}

function fallWords(beam: Beam, gaps: Gaps): string {
  const off = [...gaps.keys()].sort((a, b) => a - b).map((i) => nameSupport(beam.supports[i]!));
  return `It lifts off ${off.join(' and ')}, and nothing keeps it down. ${describeMotion(beam)}`;
}
