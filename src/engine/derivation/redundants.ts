import { constant, divide, type Expression, multiply, negate, subtract, symbol, ZERO } from '../chart/index';
import { type Charted, chartedFlexibility, chartedGap, type Piece, piecesOf, withAdded } from './pieces';
import { calculate, chartsOf, sumUp } from './step';
import type { Kind } from './symbols';
import type { DerivationStep } from './types';
import { flexibilityTex, gapTex, moves, type Unknown } from './unknown';
import type { Worked } from './values';
import { type ReleasedState, releasedStates, workParts, workTex } from './virtual-work';
import { flexibilityTitle, gapTitle } from './words';

/** The movements of the released beam by the charts where they cover it, each checked against the force method. */
export type Movements = {
  pieces: Piece[] | null;
  gaps: (Charted | null)[];
  flexibility: (row: number, column: number) => Charted | null;
  /** The released beam under the loads (null) or a unit value of a redundant, each made when it is first asked for. */
  states: (unit: Unknown | null) => ReleasedState;
};

/** Charts may differ from the exact integrals by rounding alone; anything more is not shown as a formula. */
const SAME = 1e-9;

export function movementsOf(worked: Worked): Movements {
  const { beam, unknowns, gaps, flexibility } = worked;
  const pieces = piecesOf(beam, unknowns);
  const checked = (charted: Charted | null, want: number): Charted | null => {
    if (!charted) return null;
    const sizes = charted.value.map((term) => Math.abs(beam.letters.of([term])));
    const largest = Math.max(Math.abs(want), ...sizes);
    return Math.abs(beam.letters.of(charted.value) - want) <= SAME * largest ? charted : null;
  };
  return {
    pieces,
    gaps: unknowns.map((unknown, i) => pieces && checked(chartedGap(beam, pieces, unknown), gaps[i]!)),
    flexibility: (i, j) => {
      if (!pieces) return null;
      const charted = chartedFlexibility(beam, pieces, unknowns[i]!, unknowns[j]!);
      const own = charted && i === j ? withAdded(charted, ownCompliance(unknowns[i]!)) : charted;
      return checked(own, flexibility[i]![j]!);
    },
    states: releasedStates(worked),
  };
}

/** 1/k where the redundant is the force in a spring. */
function ownCompliance({ kind, letter, support }: Unknown): Expression {
  const restraint =
    kind === 'reaction' ? support?.support.vertical : kind === 'fixing' ? support?.support.rotation : null;
  if (restraint?.kind !== 'spring') return ZERO;
  return divide(constant(1), symbol(kind === 'reaction' ? `k_{${letter}}` : `k_{\\theta ${letter}}`));
}

export const gapKind = (unknown: Unknown): Kind => moves(unknown);
const flexibilityKind = (at: Unknown, unit: Unknown): Kind =>
  `${moves(at)} per ${unit.kind === 'reaction' ? 'force' : 'moment'}`;

/** One step for the gap at each redundant; defines its letter. */
export function gapSteps(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns, gaps } = worked;
  return unknowns.map((unknown, i) => {
    const charted = movements.gaps[i]!;
    const common = {
      id: `gap-${unknown.index.replace('\\', '')}`,
      title: gapTitle(unknown, unknowns.length, movements.pieces),
      left: gapTex(unknown),
      kind: gapKind(unknown),
      scale: 'metre',
      extra: { figure: { structure: 'released' }, ...(charted && { charts: chartsOf(charted.terms) }) },
    } as const;
    const step = charted
      ? calculate(beam.letters, { ...common, expression: charted.value, value: gaps[i]! })
      : integrated(worked, movements, common, unknown, null, gaps[i]!);
    beam.letters.define(gapTex(unknown), gaps[i]!, gapKind(unknown));
    return step;
  });
}

/** Up to so many redundants every coefficient has a step of its own; beyond, the equations show them. */
export const FEW = 3;

/** The flexibility coefficients; defines their letters. */
export function flexibilitySteps(worked: Worked, movements: Movements): DerivationStep[] {
  return worked.unknowns.length <= FEW ? coefficientSteps(worked, movements) : [allCoefficients(worked)];
}

/** All f_ij as what they are, without their values. */
function allCoefficients(worked: Worked): DerivationStep {
  const { beam, unknowns, flexibility } = worked;
  unknowns.forEach((at, i) => {
    unknowns.forEach((unit, j) => {
      beam.letters.define(flexibilityTex(at, unit), flexibility[i]![j]!, flexibilityKind(at, unit));
    });
  });
  const names = { own: 'i', other: 'j', underLoads: false, isAgainst: false };
  return {
    id: 'flexibility',
    title: 'Movement at every redundant for a unit value of every other',
    symbols: `f_{ij}=f_{ji}=${workTex(beam, names)}`,
    numbers: '',
    value: null,
    unit: '',
    display: '',
    note: 'By reciprocity either way round is the same.',
    figure: { structure: 'unit', redundant: 0 },
  };
}

/** One step for each f_ij with i ≤ j that is not zero, and one that its mirror is the same. */
function coefficientSteps(worked: Worked, movements: Movements): DerivationStep[] {
  const { beam, unknowns, flexibility } = worked;
  return unknowns.flatMap((at, i) =>
    unknowns.slice(i).flatMap((unit, offset) => {
      const j = i + offset;
      const value = flexibility[i]![j]!;
      if (value === 0) return [];
      const kind = flexibilityKind(at, unit);
      const charted = movements.flexibility(i, j);
      const common = {
        id: `flexibility-${at.index}-${unit.index}`.replaceAll('\\', ''),
        title: flexibilityTitle(at, unit),
        left: flexibilityTex(at, unit),
        kind,
        scale: 'metre',
        extra: {
          figure: { structure: 'unit', redundant: j },
          ...(charted && { charts: chartsOf(charted.terms) }),
        },
      } as const;
      const step = charted
        ? calculate(beam.letters, { ...common, expression: charted.value, value })
        : integrated(worked, movements, common, at, unit, value);
      const letter = beam.letters.define(flexibilityTex(at, unit), value, kind);
      if (i === j) return [step];
      const mirrorKind = flexibilityKind(unit, at);
      const mirror = calculate(beam.letters, {
        id: `reciprocal-${unit.index}-${at.index}`.replaceAll('\\', ''),
        title: `${flexibilityTitle(unit, at)}: the same, by reciprocity`,
        left: flexibilityTex(unit, at),
        expression: letter,
        kind: mirrorKind,
        scale: 'milli',
      });
      beam.letters.define(flexibilityTex(unit, at), value, mirrorKind);
      return [step, mirror];
    }),
  );
}

type Common = Omit<Parameters<typeof sumUp>[0], 'symbols' | 'parts' | 'value'>;

/** ∫ m M/EI dx under the loads (`other` null) or a unit value of another redundant, with every part's value. */
function integrated(
  worked: Worked,
  { states }: Movements,
  common: Common,
  at: Unknown,
  other: Unknown | null,
  value: number,
): DerivationStep {
  const against = isAgainst(at, other) ? -1 : 1;
  const parts = workParts(worked, states(at), states(other), other === null).map((part) => part * against);
  return sumUp({
    ...common,
    symbols: workTex(worked.beam, {
      own: at.index,
      other: other?.index ?? '0',
      underLoads: other === null,
      isAgainst: isAgainst(at, other),
    }),
    parts,
    value,
  });
}

const isAgainst = (at: Unknown, other: Unknown | null): boolean => other === null && at.kind !== 'internal';

/** Right side of a redundant's equation Σ f X: δ − Δ for a reaction, −θ for an internal moment. */
export function rightSide(worked: Worked, i: number): Expression {
  const unknown = worked.unknowns[i]!;
  const gap = symbol(gapTex(unknown));
  if (unknown.kind === 'internal') return negate(gap);
  return worked.imposed[i] === 0 ? gap : subtract(gap, imposedLetter(unknown));
}

/** Δ_B is down, against R_B; φ_A is anticlockwise. */
export function imposedLetter({ kind, letter, sense }: Unknown): Expression {
  if (kind === 'reaction') return symbol(`\\Delta_{${letter}}`);
  return multiply(constant(-sense), symbol(`\\varphi_{${letter}}`));
}
