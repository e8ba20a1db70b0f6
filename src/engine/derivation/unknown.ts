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
  /** What tells its flexibility from another's, as TeX: B, or θ where the reaction at B is a redundant too. */
  index: string;
  /** The same for step ids. */
  key: string;
};

/** The movement at a redundant is a deflection or a rotation. */
export const moves = ({ kind }: Unknown): 'deflection' | 'rotation' =>
  kind === 'reaction' ? 'deflection' : 'rotation';

/** A redundant is a force or a moment. */
export const acts = ({ kind }: Unknown): 'force' | 'moment' => (kind === 'reaction' ? 'force' : 'moment');

/** δ_B or θ_B with what it is due to: 0 for all of the released beam, w for one load. */
export const gapTex = (unknown: Unknown, cause = '0'): string => {
  const comma = cause === '0' ? '' : ',';
  return `${unknown.kind === 'reaction' ? '\\delta' : '\\theta'}_{${unknown.letter}${comma}${cause}}`;
};

/** f_BB, f_{Bθ}; a control word must not run into the letter after it. */
export function flexibilityTex({ index: a }: Unknown, { index: b }: Unknown, part = ''): string {
  const gap = a.startsWith('\\') && !a.endsWith('}') && !b.startsWith('\\') ? ' ' : '';
  return `f_{${a}${gap}${b}${part && `,${part}`}}`;
}

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
        key: letter,
      };
    }
    const support = beam.supports.find(({ index }) => index === redundant.support)!;
    const vertical = redundant.component === 'vertical';
    const { letter } = support;
    return {
      redundant,
      kind: vertical ? 'reaction' : 'fixing',
      x: support.x,
      letter,
      support,
      tex: vertical ? reactionTex(support) : fixingTex(support),
      sense: vertical ? 1 : fixingSense(beam, support),
      index: letter,
      key: letter,
    };
  });
  const isTwin = (unknown: Unknown) =>
    unknown.kind !== 'reaction' && named.some((other) => other !== unknown && other.x === unknown.x);
  const isOnlyTwin = named.filter(isTwin).length === 1;
  return named.map((unknown) => {
    if (!isTwin(unknown)) return unknown;
    const index = isOnlyTwin ? '\\theta' : `\\theta_{${unknown.letter}}`;
    return { ...unknown, index, key: `turn-${unknown.letter}` };
  });
}

export const reactionTex = ({ letter }: NamedSupport): string => `R_{${letter}}`;
export const fixingTex = ({ letter }: NamedSupport): string => `M_{${letter}}`;

/** A fixing moment is anticlockwise, but at the right end of the beam clockwise: so that it hogs. */
export const fixingSense = ({ beam }: NamedBeam, { x }: NamedSupport): 1 | -1 => (x === beam.length ? -1 : 1);
