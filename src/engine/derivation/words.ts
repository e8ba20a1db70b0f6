import type { Cause } from './charted';
import type { Piece } from './pieces';
import type { Units } from './units';
import { moves, type Unknown } from './unknown';

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];
export const countWord = (n: number): string => COUNTS[n] ?? String(n);

export const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "cantilever", "simple span", "span that is guided at one end", "two simple spans", "released beam" */
function nameReleased(pieces: readonly Piece[] | null): string {
  const kinds = (pieces ?? []).map(({ released }) => released.kind);
  const [only] = kinds;
  if (kinds.length > 1 && kinds.every((kind) => kind === 'simple'))
    return `${countWord(kinds.length)} simple spans`;
  if (kinds.length !== 1) return 'released beam';
  if (only === 'guided') return 'span that is guided at one end';
  return only === 'simple' ? 'simple span' : 'cantilever';
}

/** What is left: "a cantilever fixed at A", "a simple span from A to C, overhanging C", "two simple spans, A–B and B–C". */
export function describeReleased(pieces: readonly Piece[] | null, length: number): string {
  if (!pieces) return 'a determinate beam';
  const isSpanned = pieces.length > 1 && pieces.every(({ released }) => released.kind === 'simple');
  if (!isSpanned) return listed(pieces.map((piece) => describePiece(piece, length)));
  const names = pieces.map(({ vertical: [a, b] }) => `${a?.letter}–${b?.letter}`);
  return `${countWord(pieces.length)} simple spans, ${listed(names)}`;
}

function describePiece({ released, vertical, turning, from, to }: Piece, length: number): string {
  const [first, second] = vertical.map(({ letter }) => letter);
  if (released.kind === 'cantilever') return `a cantilever fixed at ${first}`;
  if (released.kind === 'guided') return `a span guided at ${turning?.letter} and propped at ${first}`;
  const over = [
    vertical[0]!.x > from + 1e-9 * length ? first : '',
    vertical[1]!.x < to - 1e-9 * length ? second : '',
  ].filter((letter) => letter !== '');
  const overhanging = over.length > 0 ? `, overhanging ${listed(over as string[])}` : '';
  return `a simple span from ${first} to ${second}${overhanging}`;
}

/** "prop removed", "end A free to turn", "beam cut to turn freely over B" */
function nameRelease({ kind, letter, support }: Unknown): string {
  if (kind === 'reaction')
    return support?.support.rotation.kind === 'free' ? `support ${letter} removed` : `${letter} free to move`;
  return kind === 'fixing' ? `end ${letter} free to turn` : `a hinge ${place(letter, support !== null)}`;
}

const place = (letter: string, supported: boolean): string =>
  supported ? `over ${letter}` : `at section ${letter}`;

/** "at B", "over B", "at section 1" */
export const placeOf = ({ letter, kind, support }: Unknown): string =>
  kind === 'internal' ? place(letter, support !== null) : `at ${letter}`;

/** "Deflection at B", "Slope at A", "Gap in slope over B" */
export function nameMovement(unknown: Unknown): string {
  if (moves(unknown) === 'deflection') return `Deflection ${placeOf(unknown)}`;
  return unknown.kind === 'fixing' ? `Slope ${placeOf(unknown)}` : `Gap in slope ${placeOf(unknown)}`;
}

/** "Deflection at B of the cantilever, prop removed" */
export function gapTitle(unknown: Unknown, count: number, pieces: readonly Piece[] | null): string {
  const release = count === 1 ? nameRelease(unknown) : 'redundants removed';
  return `${nameMovement(unknown)} of the ${nameReleased(pieces)}, ${release}`;
}

/** "under w", "as supports move", "by springs", "by shear" */
export function causeWords(cause: Cause | { kind: 'curvature' }): string {
  switch (cause.kind) {
    case 'load':
      return `under ${plainLetter(cause.tex)}`;
    case 'loads':
      return 'under the loads';
    case 'ends':
      return 'by the end moments';
    case 'bending':
      return 'by bending';
    case 'curvature':
      return 'by the free curvature';
    case 'shear':
      return 'by shear';
    case 'springs':
      return 'by springs';
    case 'movements':
      return 'as supports move';
  }
}

/** Index of a part of a movement. */
export function causeTex(cause: Cause | { kind: 'curvature' }): string {
  switch (cause.kind) {
    case 'load':
      return cause.tex;
    case 'loads':
      return '\\mathrm{p}';
    case 'ends':
      return '\\mathrm{m}';
    case 'bending':
      return '\\mathrm{b}';
    case 'curvature':
      return '\\kappa';
    case 'shear':
      return '\\mathrm{s}';
    case 'springs':
      return '\\mathrm{k}';
    case 'movements':
      return '\\Delta';
  }
}

const GREEK: Readonly<Record<string, string>> = {
  kappa: 'κ',
  alpha: 'α',
  beta: 'β',
  theta: 'θ',
  varphi: 'φ',
  Delta: 'Δ',
};

/** A letter in running text: w, P_{1}, C_{A}, "the own weight". */
function plainLetter(tex: string): string {
  if (tex.includes('self')) return 'the own weight';
  return tex
    .replaceAll(/\\([a-zA-Z]+)/g, (_, name: string) => GREEK[name] ?? '')
    .replace(/^([^_]+)_\{?([^{}]+)\}?$/, '$1_{$2}');
}

/** "Deflection at B for 1 kN upward at B" */
export function flexibilityTitle(at: Unknown, unit: Unknown, units: Units): string {
  return `${nameMovement(at)} for ${unitWords(unit, units)}`;
}

function unitWords(unit: Unknown, units: Units): string {
  const one = `1 ${units.shown(unit.kind === 'reaction' ? 'force' : 'moment')}`;
  if (unit.kind === 'reaction') return `${one} upward at ${unit.letter}`;
  if (unit.kind === 'internal') return `${one} of sagging moment ${placeOf(unit)}`;
  return `${one} ${unit.sense > 0 ? 'anticlockwise' : 'clockwise'} at ${unit.letter}`;
}

/** Why the movements must add up as they do. */
export function compatibilityTitle(unknown: Unknown, imposed: number): string {
  const { kind, letter, support } = unknown;
  if (kind === 'internal') return `The beam is continuous ${placeOf(unknown)}: the two must cancel`;
  const restraint = kind === 'reaction' ? support?.support.vertical : support?.support.rotation;
  if (restraint?.kind === 'spring') return `The spring at ${letter} gives by its force over its stiffness`;
  if (kind === 'fixing') {
    if (imposed !== 0) return `End ${letter} turns with its support: the two must differ by that`;
    return `End ${letter} does not turn: the two must cancel`;
  }
  if (imposed !== 0) return `The support moves at ${letter}: the two must differ by that`;
  return `The support holds ${letter} where it was: the two must cancel`;
}

/** What a negative redundant means. */
export function negativeNote(unknown: Unknown): string {
  const { kind, letter, sense, support } = unknown;
  if (kind === 'reaction')
    return `Negative: the reaction at ${letter} acts downward, the other way than assumed.`;
  if (kind === 'internal')
    return `Negative: the beam hogs ${support ? `over ${letter}` : 'there'}, the other way than assumed.`;
  return `Negative: the moment at ${letter} acts ${sense > 0 ? 'clockwise' : 'anticlockwise'}, the other way than assumed.`;
}

/** "Reaction at B", "Fixing moment at A", "Moment over B"; in lower case within a sentence. */
export function nameForce(unknown: Unknown, where: 'first' | 'within' = 'first'): string {
  const words = { reaction: 'reaction', fixing: 'fixing moment', internal: 'moment' } as const;
  const name = `${words[unknown.kind]} ${placeOf(unknown)}`;
  return where === 'first' ? sentence(name) : name;
}

export function listed(words: readonly string[], and = 'and'): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} ${and} ${words.at(-1)}`;
}
