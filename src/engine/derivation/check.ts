import { type Expression, multiply, simplest, subtract, symbol } from '../chart/index';
import type { Redundant } from '../model/index';
import { solveStiffness } from '../stiffness/index';
import { chartedFlexibility, chartedGap } from './charted';
import { imposedOf } from './coefficients';
import { gapKind } from './movements';
import type { NamedBeam } from './named-beam';
import { piecesOf } from './pieces';
import { calculate } from './step';
import type { DerivationStep } from './types';
import { acts, flexibilityTex, gapTex, type Unknown, unknownsOf } from './unknown';
import type { Worked } from './values';
import { placeOf, sentence } from './words';

/**
 * With one redundant: the movement at another component that could have been released, from its own released beam and
 * the value found for it; it must be what its support allows. Else the first redundant by the stiffness method.
 */
export function checkStep(worked: Worked): DerivationStep[] {
  const { unknowns, solution } = worked;
  if (unknowns.length === 0) return [];
  if (unknowns.length > 1) return [byStiffness(worked)];
  for (const other of solution.forceMethod.eligible) {
    if (JSON.stringify(other) === JSON.stringify(unknowns[0]!.redundant)) continue;
    const step = byOther(worked, other);
    if (step) return [step];
  }
  return [byStiffness(worked)];
}

/** A check with more terms than this convinces nobody. */
const MOST_TERMS = 5;

/** θ_A = θ_A0 − M_A f_AA, with the charts' terms; null where they do not cover it. */
function byOther({ beam }: Worked, other: Redundant): DerivationStep | null {
  const { letters } = beam;
  const unknown = unknownsOf(beam, [other])[0]!;
  if (unknown.kind === 'internal' || !letters.has(unknown.tex) || isSprung(unknown)) return null;
  const movement = movementOf(beam, unknown);
  if (!movement || movement.length > MOST_TERMS) return null;
  const imposed = imposedOf(unknown);
  const value = imposed ? letters.of(imposed) : 0;
  if (Math.abs(letters.of(movement) - value) > SAME * letters.largest(movement)) return null;
  const letter = gapTex(unknown).replace('0}', '}');
  const left = `${letter}=${gapTex(unknown)}-${unknown.tex}${flexibilityTex(unknown, unknown)}`;
  return calculate(letters, {
    id: 'check',
    title: `Check: ${unknown.kind === 'reaction' ? 'deflection' : 'slope'} ${placeOf(unknown)} from the other redundant`,
    left,
    expression: movement,
    value,
    kind: gapKind(unknown),
    scale: 'base',
    extra: { note: expected(unknown, value) },
  });
}

/** Closed forms may differ from what they must be by rounding alone. */
const SAME = 1e-9;

/** What moves at the other redundant by the charts, with the value that was found for it. */
function movementOf(beam: NamedBeam, unknown: Unknown): Expression | null {
  const pieces = piecesOf(beam, [unknown]);
  if (!pieces) return null;
  const gaps = [...chartedGap(beam, pieces, unknown).values()];
  const flexibility = chartedFlexibility(beam, pieces, unknown, unknown);
  if (!gaps.every((part) => part !== null) || !flexibility) return null;
  const [gap, own] = [gaps, flexibility].map((parts) => simplest(parts.flatMap(({ value }) => value)));
  return subtract(gap!, multiply(symbol(unknown.tex), own!));
}

/** A spring's own end moves: nothing is known of it beforehand. */
const isSprung = ({ kind, support }: Unknown): boolean =>
  support?.support[kind === 'reaction' ? 'vertical' : 'rotation'].kind === 'spring';

function expected(unknown: Unknown, imposed: number): string {
  const word = unknown.kind === 'reaction' ? 'move' : 'turn';
  return imposed === 0
    ? `${sentence(placeOf(unknown))} the support does not ${word}, and neither does the beam.`
    : `${sentence(placeOf(unknown))} the beam moves as its support does.`;
}

/** The difference from the independent solution, which shares nothing with the force method. */
function byStiffness(worked: Worked): DerivationStep {
  const { beam, unknowns } = worked;
  const unknown = unknowns[0]!;
  const { reactions, pieces } = solveStiffness(beam.beam);
  const value =
    unknown.redundant.component === 'moment'
      ? (pieces.find(({ to }) => to === unknown.x)?.right.moment ?? 0)
      : unknown.kind === 'reaction'
        ? reactions[unknown.redundant.support]!.vertical
        : reactions[unknown.redundant.support]!.moment * unknown.sense;
  const kind = acts(unknown);
  const tex = `${unknown.tex}^{\\mathrm{st}}`;
  return calculate(beam.letters, {
    id: 'check',
    title: `Check: the stiffness method, which shares nothing with this working, gives the same ${unknown.kind === 'reaction' ? 'reaction' : 'moment'} ${placeOf(unknown)}`,
    left: '',
    expression: subtract(beam.letters.define(tex, value, kind), symbol(unknown.tex)),
    kind,
    scale: 'base',
  });
}
