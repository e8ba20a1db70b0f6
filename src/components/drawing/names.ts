import type { Beam, Support } from '@/engine/model/index';

/** A support that holds something, with its letter: A, B, C from the left. */
export type NamedSupport = { support: Support; index: number; letter: string };

export const holds = ({ vertical, rotation }: Support): boolean =>
  vertical.kind !== 'free' || rotation.kind !== 'free';

const letterOf = (place: number): string => {
  const letter = String.fromCharCode(65 + (place % 26));
  return place < 26 ? letter : `${letterOf(Math.floor(place / 26) - 1)}${letter}`;
};

export function namedSupports(beam: Beam): NamedSupport[] {
  return beam.supports
    .map((support, index) => ({ support, index }))
    .filter(({ support }) => holds(support))
    .sort((a, b) => a.support.at - b.support.at)
    .map((each, place) => ({ ...each, letter: letterOf(place) }));
}

/** The letter of the support at x, if there is one. */
export function letterAt(names: readonly NamedSupport[], x: number, length: number): string | undefined {
  return names.find(({ support }) => Math.abs(support.at - x) < length * 1e-6)?.letter;
}

/** What stations are measured from: "A" where the first support is the left end. */
export function origin(beam: Beam): string {
  return letterAt(namedSupports(beam), 0, beam.length) ?? 'the left end';
}
