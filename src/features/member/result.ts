import { z } from 'zod';
import type { Reaction, Solution } from '@/engine/beam';
import type { CheckRow, DeflectionLimit, Finding } from '@/engine/check';
import type { Combination } from '@/engine/combination';
import type { DerivationStep } from '@/engine/derivation';
import type { Beam } from '@/engine/model';
import { type Piecewise, piecewise } from '@/engine/polynomial';
import type { Dimensioned, NamedLoad, RuleOutcome } from '@/engine/template';
import type { ResolvedSection } from '@/features/section/resolve';
import type { MemberEvaluation, ProofLine } from './evaluate';

type StoredCurve = { breaks: number[]; degree: number; coefficients: number[] };
type Quantity = keyof Solution['diagrams'];

/** A solution as JSON keeps it: everything, its diagrams as exact polynomials. */
export type StoredSolution = Omit<Solution, 'diagrams'> & {
  readonly diagrams: Record<Quantity, StoredCurve>;
};

/** What a combination came to, without its diagrams. */
type StoredArrangement = {
  readonly combination: Combination;
  readonly reactions: readonly Reaction[];
  readonly extremes: Solution['extremes'];
};

/** What the server found for a member, whole: a sheet is printed from it alone. SI, the engine's signs. */
type MemberResult = {
  readonly kind: 'result';
  readonly beam: Beam;
  readonly ei: number;
  readonly section: ResolvedSection | null;
  readonly lengths: readonly Dimensioned[];
  readonly load_names: readonly NamedLoad[];
  readonly total: StoredSolution;
  readonly groups: readonly { readonly group: string; readonly solution: StoredSolution }[];
  readonly strength: readonly StoredArrangement[];
  readonly service: readonly (StoredArrangement & { readonly limit: DeflectionLimit })[];
  readonly checks: {
    readonly rows: readonly CheckRow[];
    readonly findings: readonly Finding[];
    readonly not_checked: readonly string[];
  } | null;
  readonly rules: readonly RuleOutcome[];
  readonly proof: ProofLine;
  /** The worked derivation under all loads together. The server adds it: a drag in the browser does without. */
  readonly derivation?: readonly DerivationStep[];
};

/** Kept in place of a result that its proof does not bear out. */
type MemberFault = { readonly kind: 'fault'; readonly message: string; readonly proof: ProofLine };

export type StoredResult = MemberResult | MemberFault;

/** Only the server writes it, so that its kind is all there is to ask. */
export const storedResult = z.custom<StoredResult>(
  (value) =>
    typeof value === 'object' &&
    value !== null &&
    'kind' in value &&
    (value.kind === 'result' || value.kind === 'fault'),
);

const toCurve = ({ breaks, degree, coefficients }: Piecewise): StoredCurve => ({
  breaks: [...breaks],
  degree,
  coefficients: [...coefficients],
});

const toSolution = ({ diagrams, ...rest }: Solution): StoredSolution => ({
  ...rest,
  diagrams: {
    shear: toCurve(diagrams.shear),
    moment: toCurve(diagrams.moment),
    slope: toCurve(diagrams.slope),
    deflection: toCurve(diagrams.deflection),
  },
});

/** The stored solution as drawings take it. */
export function drawnSolution({ diagrams, ...rest }: StoredSolution): Solution {
  const curve = ({ breaks, degree, coefficients }: StoredCurve): Piecewise =>
    piecewise(
      Float64Array.from(breaks),
      breaks.slice(1).map((_, k) => coefficients.slice(k * (degree + 1), (k + 1) * (degree + 1))),
    );
  return {
    ...rest,
    diagrams: {
      shear: curve(diagrams.shear),
      moment: curve(diagrams.moment),
      slope: curve(diagrams.slope),
      deflection: curve(diagrams.deflection),
    },
  };
}

/** What is stored of an evaluation; of one that is not proven, only that it is not. */
export function toStoredResult(evaluation: MemberEvaluation): StoredResult {
  const { instance, section, beam, total, groups, strength, service, checks, rules, proof } = evaluation;
  if (!proof.proven)
    return {
      kind: 'fault',
      message:
        'The two methods do not agree, so that there is no result that can be trusted. Look for points that almost coincide, and for stiffnesses that are far apart.',
      proof,
    };
  return {
    kind: 'result',
    beam,
    ei: instance.ei,
    section,
    lengths: instance.dimensions,
    load_names: instance.loadNames,
    total: toSolution(total),
    groups: groups.map(({ group, solution }) => ({ group, solution: toSolution(solution) })),
    strength: strength.map(({ combination, solution: { reactions, extremes } }) => ({
      combination,
      reactions,
      extremes,
    })),
    service: service.map(({ limit, solution: { reactions, extremes } }) => ({
      limit,
      combination: limit.combination,
      reactions,
      extremes,
    })),
    checks: checks && {
      rows: checks.rows,
      findings: checks.findings,
      not_checked: checks.notChecked,
    },
    rules,
    proof,
  };
}

/** The worst judged figure. */
export const governingOf = (result: StoredResult | null): CheckRow | null =>
  result?.kind === 'result' ? (result.checks?.rows[0] ?? null) : null;

/** Two evaluations of the same inputs agree to this share of the larger figure: the rounding of two machines. */
const SAME = 1e-9;

/** Whether the browser shows what the server stored: every reaction and every ratio. */
export function sameFigures(a: StoredResult, b: StoredResult): boolean {
  if (a.kind !== b.kind) return false;
  if (a.kind === 'fault' || b.kind === 'fault') return true;
  const figures = (result: MemberResult) => [
    result.total.reactions.flatMap(({ vertical, moment }) => [vertical, moment]),
    result.checks?.rows.map(({ ratio }) => ratio) ?? [],
  ];
  const [left, right] = [figures(a), figures(b)];
  return left.every((list, k) => {
    const others = right[k] ?? [];
    const scale = Math.max(...list.map(Math.abs), ...others.map(Math.abs), 0);
    return (
      list.length === others.length &&
      list.every((value, i) => Math.abs(value - (others[i] ?? 0)) <= SAME * scale)
    );
  });
}
