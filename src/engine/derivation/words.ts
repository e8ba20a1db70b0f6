import type { Piece } from './pieces';
import { moves, type Unknown } from './unknown';

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];
export const countWord = (n: number): string => COUNTS[n] ?? String(n);

export const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "cantilever", "simple span", "two simple spans", "released beam" */
function nameReleased(pieces: readonly Piece[] | null): string {
  if (!pieces) return 'released beam';
  const cantilevers = pieces.filter(({ released }) => released.kind === 'cantilever').length;
  if (pieces.length === 1) return cantilevers === 1 ? 'cantilever' : 'simple span';
  return cantilevers === 0 ? `${countWord(pieces.length)} simple spans` : 'released beam';
}

/** "prop removed", "end A free to turn", "beam cut to turn freely over B" */
function nameRelease({ kind, letter, support }: Unknown): string {
  if (kind === 'reaction')
    return support?.support.rotation.kind === 'free' ? 'prop removed' : `${letter} free to move`;
  return kind === 'fixing' ? `end ${letter} free to turn` : `a hinge ${place(letter, support !== null)}`;
}

const place = (letter: string, supported: boolean): string =>
  supported ? `over ${letter}` : `at section ${letter}`;

/** "B", "over B", "at section 1" */
export const placeOf = ({ letter, kind, support }: Unknown): string =>
  kind === 'internal' ? place(letter, support !== null) : `at ${letter}`;

/** "Deflection at B", "Slope at A", "Gap in slope over B" */
function nameMovement(unknown: Unknown): string {
  if (moves(unknown) === 'deflection') return `Deflection ${placeOf(unknown)}`;
  return unknown.kind === 'fixing' ? `Slope ${placeOf(unknown)}` : `Gap in slope ${placeOf(unknown)}`;
}

/** "Deflection at B of the cantilever, prop removed" */
export function gapTitle(unknown: Unknown, count: number, pieces: readonly Piece[] | null): string {
  const release = count === 1 ? nameRelease(unknown) : 'redundants removed';
  return `${nameMovement(unknown)} of the ${nameReleased(pieces)}, ${release}`;
}

/** "Deflection at B for 1 kN upward at B" */
export function flexibilityTitle(at: Unknown, unit: Unknown): string {
  return `${nameMovement(at)} for ${unitWords(unit)}`;
}

function unitWords(unit: Unknown): string {
  if (unit.kind === 'reaction') return `1 kN upward at ${unit.letter}`;
  if (unit.kind === 'internal') return `1 kNm of sagging moment ${placeOf(unit)}`;
  return `1 kNm ${unit.sense > 0 ? 'anticlockwise' : 'clockwise'} at ${unit.letter}`;
}

/** Why the movements must add up as they do. */
export function compatibilityTitle(unknown: Unknown, imposed: number): string {
  const { kind, letter, support } = unknown;
  if (kind === 'internal') return `The beam is continuous ${placeOf(unknown)}: the two must cancel`;
  const restraint = kind === 'reaction' ? support?.support.vertical : support?.support.rotation;
  if (restraint?.kind === 'spring')
    return `The spring at ${letter} gives way by its force over its stiffness`;
  if (kind === 'fixing') {
    if (imposed !== 0) return `End ${letter} turns with its support: the two must differ by that`;
    return `End ${letter} does not turn: the two must cancel`;
  }
  if (imposed !== 0) return `The support moves at ${letter}: the two must differ by that`;
  const prop = support?.support.rotation.kind === 'free' ? 'The prop' : 'The support';
  return `${prop} holds ${letter} where it was: the two must cancel`;
}

/** What a negative redundant means. */
export function negativeNote({ kind, letter, sense }: Unknown): string {
  if (kind === 'reaction')
    return `Negative: the reaction at ${letter} acts downward, the other way than assumed.`;
  if (kind === 'internal') return `Negative: the beam hogs there.`;
  return `Negative: the moment at ${letter} acts ${sense > 0 ? 'clockwise' : 'anticlockwise'}, the other way than assumed.`;
}

/** "Reaction at B", "Fixing moment at A", "Moment over B"; in lower case within a sentence. */
export function nameForce(unknown: Unknown, where: 'first' | 'within' = 'first'): string {
  const words = { reaction: 'reaction', fixing: 'fixing moment', internal: 'moment' } as const;
  const name = `${words[unknown.kind]} ${placeOf(unknown)}`;
  return where === 'first' ? sentence(name) : name;
}

export function listed(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}
