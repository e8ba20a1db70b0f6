import { multiply, simplest, subtract, symbol } from '../chart/index';
import type { Redundant } from '../model/index';
import { solveStiffness } from '../stiffness/index';
import { expressionOf } from './movement';
import { gapKind, movementsOf } from './movements';
import { calculate } from './step';
import type { DerivationStep } from './types';
import { acts, flexibilityTex, gapTex, type Unknown } from './unknown';
import { type Worked, work } from './values';
import { placeOf, sentence } from './words';

/**
 * With one redundant: the movement at another component that could have been released, from its own released beam and
 * the value found for it; it must be what its support allows. Else the first redundant by the stiffness method.
 */
export function checkStep(worked: Worked): DerivationStep[] {
  if (worked.unknowns.length === 0) return [];
  if (worked.unknowns.length > 1) return [byStiffness(worked)];
  const others = worked.solution.forceMethod.eligible.filter(
    (other) => JSON.stringify(other) !== JSON.stringify(worked.unknowns[0]!.redundant),
  );
  const found = others.map((other) => byOther(worked, other)).find((step) => step !== null);
  return [found ?? byStiffness(worked)];
}

/** A check with more terms than this convinces nobody. */
const MOST_TERMS = 5;

/** θ_A = θ_A0 − M_A f_AA, with the charts' terms; null where they do not cover it. */
function byOther(worked: Worked, other: Redundant): DerivationStep | null {
  const { beam } = worked;
  const second = work(beam, [other]);
  const unknown = second.unknowns[0]!;
  if (unknown.kind === 'internal' || !beam.letters.has(unknown.tex) || isSprung(unknown)) return null;
  const movements = movementsOf(second);
  const [gap, flexibility] = [expressionOf(movements.gap(0)), expressionOf(movements.flexibility(0, 0))];
  if (!gap || !flexibility) return null;
  const expression = subtract(simplest(gap), multiply(symbol(unknown.tex), simplest(flexibility)));
  if (expression.length > MOST_TERMS) return null;
  const letter = gapTex(unknown).replace('0}', '}');
  const left = `${letter}=${gapTex(unknown)}-${unknown.tex}${flexibilityTex(unknown, unknown)}`;
  return calculate(beam.letters, {
    id: 'check',
    title: `Check: ${unknown.kind === 'reaction' ? 'deflection' : 'slope'} ${placeOf(unknown)} from the other redundant`,
    left,
    expression,
    value: second.imposed[0]!,
    kind: gapKind(unknown),
    scale: 'base',
    extra: { note: expected(second, unknown) },
  });
}

/** A spring's own end moves: nothing is known of it beforehand. */
const isSprung = ({ kind, support }: Unknown): boolean =>
  support?.support[kind === 'reaction' ? 'vertical' : 'rotation'].kind === 'spring';

function expected({ imposed }: Worked, unknown: Unknown): string {
  const word = unknown.kind === 'reaction' ? 'move' : 'turn';
  return imposed[0] === 0
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
