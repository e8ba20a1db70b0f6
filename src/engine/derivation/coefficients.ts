import { constant, type Expression, multiply, negate, subtract, symbol } from '../chart/index';
import { movementSteps } from './movement';
import { flexibilityKind, gapKind, type Movements } from './movements';
import { settlementOf, turningOf } from './named-beam';
import type { DerivationStep } from './types';
import { flexibilityTex, gapTex, type Unknown } from './unknown';
import type { Worked } from './values';
import { flexibilityTitle, gapTitle, nameMovement } from './words';

/** The steps for the gap at each redundant; defines its letter. */
export function gapSteps(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns, gaps } = worked;
  return unknowns.flatMap((unknown, i) =>
    movementSteps(
      beam.letters,
      {
        id: `gap-${unknown.key}`,
        title: gapTitle(unknown, unknowns.length, movements.pieces),
        short: nameMovement(unknown),
        left: gapTex(unknown),
        partTex: (index) => gapTex(unknown, index),
        kind: gapKind(unknown),
        value: gaps[i]!,
        extra: { figure: { structure: 'released' } },
      },
      movements.gap(i),
    ),
  );
}

/** The steps for every f_ij that is not zero; f_ji, by reciprocity the same, by its own closed form where it has one. */
export function flexibilitySteps(worked: Worked, movements: Movements): DerivationStep[] {
  const { unknowns, flexibility } = worked;
  return unknowns.flatMap((at, i) =>
    unknowns.slice(i).flatMap((unit, offset) => {
      const j = i + offset;
      if (flexibility[i]![j] === 0) return [];
      const steps = coefficientSteps(worked, movements, i, j);
      return i === j ? steps : [...steps, ...reciprocalSteps(worked, movements, at, unit, i, j)];
    }),
  );
}

function coefficientSteps(worked: Worked, movements: Movements, i: number, j: number): DerivationStep[] {
  const { beam, unknowns, flexibility } = worked;
  const [at, unit] = [unknowns[i]!, unknowns[j]!];
  const { units } = beam.letters;
  return movementSteps(
    beam.letters,
    {
      id: `flexibility-${at.key}-${unit.key}`,
      title: flexibilityTitle(at, unit, units),
      short: flexibilityTitle(at, unit, units),
      left: flexibilityTex(at, unit),
      partTex: (index) => flexibilityTex(at, unit, index),
      kind: flexibilityKind(at, unit),
      value: flexibility[i]![j]!,
      extra: { figure: { structure: 'unit', redundant: j } },
    },
    movements.flexibility(i, j),
  );
}

function reciprocalSteps(
  worked: Worked,
  movements: Movements,
  at: Unknown,
  unit: Unknown,
  i: number,
  j: number,
): DerivationStep[] {
  const parts = movements.flexibility(j, i);
  const isCharted = parts.every((part) => 'expression' in part);
  const steps = coefficientSteps(worked, movements, j, i);
  const last = steps.at(-1)!;
  const same = `${flexibilityTex(unit, at)}=${flexibilityTex(at, unit)}`;
  const title = `${last.title}: the same, by reciprocity`;
  if (isCharted) {
    const symbols = `${same}=${last.symbols.slice(last.symbols.indexOf('=') + 1)}`;
    return [...steps.slice(0, -1), { ...last, id: `reciprocal-${unit.key}-${at.key}`, title, symbols }];
  }
  // The integrals are the same to the letter.
  const { note: _, ...rest } = last;
  return [{ ...rest, id: `reciprocal-${unit.key}-${at.key}`, title, symbols: same, numbers: '' }];
}

/** Right side of a redundant's equation Σ f X: δ − Δ for a reaction, −θ for an internal moment. */
export function rightSide(worked: Worked, i: number): Expression {
  const unknown = worked.unknowns[i]!;
  const gap = symbol(gapTex(unknown));
  if (unknown.kind === 'internal') return negate(gap);
  return subtract(gap, imposedOf(unknown) ?? []);
}

/** What the support of a redundant is made to do against its sense: Δ_B is down, φ_A anticlockwise; null for nothing. */
export function imposedOf({ kind, support, sense }: Unknown): Expression | null {
  if (!support || kind === 'internal') return null;
  if (kind === 'reaction') return settlementOf(support);
  const turn = turningOf(support);
  return turn && multiply(constant(-sense), turn);
}
