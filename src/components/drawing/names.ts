import { type Beam, type LetteredSupport, letteredSupports, type Support } from '@/engine/model/index';

export const holds = ({ vertical, rotation }: Support): boolean =>
  vertical.kind !== 'free' || rotation.kind !== 'free';

/** The supports that hold something, from the left: a free end is not drawn. */
export const namedSupports = (beam: Beam): LetteredSupport[] =>
  letteredSupports(beam).filter(({ support }) => holds(support));

/** The letter of the support at x, if there is one. */
export function letterAt(names: readonly LetteredSupport[], x: number, length: number): string | undefined {
  return names.find(({ support }) => Math.abs(support.at - x) < length * 1e-6)?.letter;
}

/** What stations are measured from: "A" where the first support is the left end. */
export function origin(beam: Beam): string {
  return letterAt(namedSupports(beam), 0, beam.length) ?? 'the left end';
}
