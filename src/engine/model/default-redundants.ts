import { eligibleRedundants, holds, placeRedundant } from './redundants';
import { findMotion, frameOf, placeOf, without } from './stability';
import type { Beam, Redundant, Restraint } from './types';

/**
 * How many redundants may reach over the whole beam. Their flexibility matrix is full, so that the work grows with
 * their cube: a tenth of a second for these, and half a minute for six times as many.
 */
export const MOST_REACHING = 120;

/**
 * The beam's own choice: support moments first, by position, since simple spans keep the flexibility matrix banded and
 * well conditioned; then vertical reactions, inner supports before outer ones. A spring softer than the whole beam goes
 * before all others, since what rests on it would make every flexibility alike. Always admissible.
 *
 * More than MOST_REACHING are moments within and between the spans instead, as far as those go (`nearRedundants`).
 */
export function defaultRedundants(beam: Beam): Redundant[] {
  const chosen: Redundant[] = [];
  let frame = frameOf(beam);
  const take = (wanted: readonly Redundant[]) => {
    for (const redundant of wanted) {
      if (chosen.length === beam.degree) return;
      const less = without(frame, redundant, placeOf(beam, redundant));
      if (less === frame || findMotion(less) !== null) continue;
      chosen.push(redundant);
      frame = less;
    }
  };
  if (beam.degree > MOST_REACHING) take(nearRedundants(beam));
  if (chosen.length < beam.degree) take(rankedRedundants(beam));
  return chosen.sort((a, b) => placeOf(beam, a) - placeOf(beam, b));
}

function rankedRedundants(beam: Beam): Redundant[] {
  const middle = beam.length / 2;
  const rank = (r: Redundant) => {
    const place = placeOf(beam, r);
    if (r.component !== 'vertical') return place;
    return isSoft(beam, beam.supports[r.support]!.vertical) ? -1 : beam.length + Math.abs(place - middle);
  };
  return eligibleRedundants(beam).sort((a, b) => rank(a) - rank(b));
}

function isSoft({ length, segments }: Beam, restraint: Restraint): boolean {
  const stiffest = Math.max(...segments.map(({ ei }) => ei));
  return restraint.kind === 'spring' && restraint.stiffness * length ** 3 < stiffest;
}

/**
 * Moments that bend only the spans beside them: over the supports that let the beam turn, and at the quarter points of
 * the spans beside those that do not. What they leave is simple spans, and cantilevers with a span hung between them.
 */
function nearRedundants(beam: Beam): Redundant[] {
  const supports = beam.supports
    .filter(({ vertical, rotation }) => holds(vertical) || holds(rotation))
    .sort((a, b) => a.at - b.at);
  const places = supports.flatMap(({ at, rotation }, i) => {
    if (!holds(rotation)) return [at];
    const [before, after] = [supports[i - 1]?.at ?? at, supports[i + 1]?.at ?? at];
    return [at - (at - before) / 4, at + (after - at) / 4].filter((x) => x !== at);
  });
  return places
    .filter((x) => x > 0 && x < beam.length)
    .map((at) => placeRedundant(beam, { at, component: 'moment' }))
    .filter((r) => !beam.hinges.includes(placeOf(beam, r)));
}
