import type { Redundant } from '../model/index';
import type { NamedBeam, NamedSupport } from './named-beam';

/**
 * A redundant with its letters. Its assumed sense is upward for a reaction; for a fixing moment the one in which a
 * downward load makes it act (anticlockwise, but clockwise at the right end); sagging for an internal moment.
 */
export type Unknown = {
  redundant: Redundant;
  kind: 'reaction' | 'fixing' | 'internal';
  x: number;
  /** B, or a number where no support is. */
  letter: string;
  support: NamedSupport | null;
  /** R_B, M_A */
  tex: string;
  /** Its sense against the engine's: anticlockwise and sagging positive. */
  sense: 1 | -1;
  /** What tells its flexibility from another's: B, or θB where the reaction at B is a redundant too. */
  index: string;
};

/** The movement at a redundant is a deflection or a rotation. */
export const moves = ({ kind }: Unknown): 'deflection' | 'rotation' =>
  kind === 'reaction' ? 'deflection' : 'rotation';

/** δ_B0 or θ_B0 */
export const gapTex = (unknown: Unknown): string =>
  `${unknown.kind === 'reaction' ? '\\delta' : '\\theta'}_{${unknown.index}0}`;

export const flexibilityTex = (a: Unknown, b: Unknown): string => `f_{${a.index}${b.index}}`;

export function unknownsOf(beam: NamedBeam, redundants: readonly Redundant[]): Unknown[] {
  let unsupported = 0;
  const named = redundants.map((redundant): Unknown => {
    if (redundant.component === 'moment') {
      const support = beam.supports.find(({ x }) => x === redundant.at) ?? null;
      const letter = support?.letter ?? String(++unsupported);
      return {
        redundant,
        kind: 'internal',
        x: redundant.at,
        letter,
        support,
        tex: `M_{${letter}}`,
        sense: 1,
        index: letter,
      };
    }
    const support = beam.supports.find(({ index }) => index === redundant.support)!;
    const vertical = redundant.component === 'vertical';
    return {
      redundant,
      kind: vertical ? 'reaction' : 'fixing',
      x: support.x,
      letter: support.letter,
      support,
      tex: vertical ? reactionTex(support) : fixingTex(support),
      sense: vertical ? 1 : fixingSense(beam, support),
      index: support.letter,
    };
  });
  return named.map((unknown) => {
    const twin = named.some((other) => other !== unknown && other.letter === unknown.letter);
    return twin && unknown.kind !== 'reaction'
      ? { ...unknown, index: `{\\theta ${unknown.letter}}` }
      : unknown;
  });
}

export const reactionTex = ({ letter }: NamedSupport): string => `R_{${letter}}`;
export const fixingTex = ({ letter }: NamedSupport): string => `M_{${letter}}`;

/** A fixing moment is anticlockwise, but at the right end of the beam clockwise: so that it hogs. */
export const fixingSense = ({ beam }: NamedBeam, { x }: NamedSupport): 1 | -1 => (x === beam.length ? -1 : 1);
