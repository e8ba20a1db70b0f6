import { multiply, subtract, symbol } from '../chart/index';
import type { Redundant } from '../model/index';
import { solveStiffness } from '../stiffness/index';
import { gapKind, movementsOf } from './redundants';
import { calculate } from './step';
import type { DerivationStep } from './types';
import { flexibilityTex, gapTex, type Unknown } from './unknown';
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

/** θ_A = θ_A0 − M_A f_AA, with the charts' terms; null where they do not cover it. */
function byOther(worked: Worked, other: Redundant): DerivationStep | null {
  const { beam } = worked;
  const second = work(beam, [other]);
  const [unknown] = second.unknowns as [Unknown];
  const movements = movementsOf(second);
  const [gap, flexibility] = [movements.gaps[0], movements.flexibility(0, 0)];
  if (!gap || !flexibility) return null;
  const value = unknown.kind === 'internal' ? null : beam.letters.value(unknown.tex);
  if (value === null) return null;
  const expression = subtract(gap.value, multiply(symbol(unknown.tex), flexibility.value));
  const letter = gapTex(unknown).replace('0}', '}');
  const left = `${letter}=${gapTex(unknown)}-${unknown.tex}${flexibilityTex(unknown, unknown)}`;
  return calculate(beam.letters, {
    id: 'check',
    title: `Check: ${unknown.kind === 'reaction' ? 'deflection' : 'slope'} ${placeOf(unknown)} from the other redundant`,
    left,
    expression,
    kind: gapKind(unknown),
    scale: 'metre',
    extra: { note: expected(second, unknown) },
  });
}

function expected({ imposed }: Worked, unknown: Unknown): string {
  const word = unknown.kind === 'reaction' ? 'move' : 'turn';
  return imposed[0] === 0
    ? `${sentence(placeOf(unknown))} the support does not ${word}, and neither does the beam.`
    : `${sentence(placeOf(unknown))} the beam moves as its support does.`;
}

/** The difference from the independent solution, which shares nothing with the force method. */
function byStiffness(worked: Worked): DerivationStep {
  const { beam, unknowns } = worked;
  const [unknown] = unknowns as [Unknown];
  const { reactions, pieces } = solveStiffness(beam.beam);
  const value =
    unknown.redundant.component === 'moment'
      ? (pieces.find(({ to }) => to === unknown.x)?.right.moment ?? 0)
      : unknown.kind === 'reaction'
        ? reactions[unknown.redundant.support]!.vertical
        : reactions[unknown.redundant.support]!.moment * unknown.sense;
  const kind = unknown.kind === 'reaction' ? 'force' : 'moment';
  const tex = `${unknown.tex}^{\\mathrm{st}}`;
  return calculate(beam.letters, {
    id: 'check',
    title: `Check: the stiffness method gives the same ${unknown.kind === 'reaction' ? 'reaction' : 'moment'} ${placeOf(unknown)}`,
    left: `${unknown.tex}-${tex}`,
    symbols: '0',
    expression: subtract(symbol(unknown.tex), beam.letters.define(tex, value, kind)),
    kind,
    scale: 'metre',
  });
}
