import { type Beam, type Span, spansOf } from '../model/index';
import { add, evaluate, type Piecewise, piecewise, scale } from '../polynomial/index';

/**
 * What a deflection is measured from: where the beam was, the straight lines between its supports as they have moved,
 * or one of the supports, by its place in the beam's list.
 */
export type Datum = { kind: 'absolute' } | { kind: 'chord' } | { kind: 'support'; support: number };

/**
 * The deflection measured from a datum, m, positive up, exact: its extremes are those of the polynomial. Over an
 * overhang the chord of the span beside it goes straight on. Null for the chords of a beam with one vertical support.
 */
export function deflectionFrom(beam: Beam, deflection: Piecewise, datum: Datum): Piecewise | null {
  if (datum.kind === 'absolute') return deflection;
  const reference =
    datum.kind === 'chord'
      ? chords(beam, deflection)
      : level(beam, deflection, beam.supports[datum.support]!.at);
  return reference && add(deflection, scale(reference, -1));
}

const level = ({ length }: Beam, deflection: Piecewise, at: number): Piecewise =>
  piecewise([0, length], [[evaluate(deflection, at)[0]]]);

function chords(beam: Beam, deflection: Piecewise): Piecewise | null {
  const spans = spansOf(beam);
  const lines = spans.map((span) => (isOverhang(span) ? null : chordOf(deflection, span)));
  const [first, last] = [lines.find(Boolean), lines.findLast(Boolean)];
  if (!first || !last) return null;
  return piecewise(
    [0, ...spans.map(({ to }) => to)],
    spans.map(({ from, left }, k) => {
      const { at, rise, slope } = lines[k] ?? (left === null ? first : last);
      return [rise + slope * (from - at), slope];
    }),
  );
}

/** An overhang hangs on one support; a beam on one support has nothing else. */
export const isOverhang = ({ left, right }: Span): boolean => left === null || right === null;

function chordOf(deflection: Piecewise, { from, to }: Span) {
  const [rise, end] = [evaluate(deflection, from)[0], evaluate(deflection, to)[0]];
  return { at: from, rise, slope: (end - rise) / (to - from) };
}
