import { z } from 'zod';
import type { Solution } from '@/engine/beam';
import type { CheckRow, DeflectionLimit, Finding } from '@/engine/check';
import type { DerivationStep } from '@/engine/derivation';
import type { CombinationEnvelope, EnvelopeReaction, GroupReaction } from '@/engine/envelope';
import type { Beam } from '@/engine/model';
import { type Piecewise, piecewise } from '@/engine/polynomial';
import type { Dimensioned, NamedLoad, RuleOutcome } from '@/engine/template';
import type { ResolvedSection } from '@/features/section/resolve';
import type { MemberEvaluation, ProofLine } from './evaluate';
import type { Patterning } from './solve';

type StoredCurve = { breaks: number[]; degree: number; coefficients: number[] };
type Quantity = keyof Solution['diagrams'];

/** A solution as JSON keeps it: everything, its diagrams as exact polynomials. */
export type StoredSolution = Omit<Solution, 'diagrams'> & {
  readonly diagrams: Record<Quantity, StoredCurve>;
};

/** What a combination came to over all patterns, without its diagrams; the groups' own reactions stand with the groups. */
type StoredEnvelope = Pick<CombinationEnvelope, 'combination' | 'extremes'> & {
  readonly reactions: readonly Omit<EnvelopeReaction, 'groups'>[];
};

/** What the server found for a member, whole: a sheet is printed from it alone. SI, the engine's signs. */
export type MemberResult = {
  readonly kind: 'result';
  readonly schema_version: 2;
  readonly beam: Beam;
  readonly ei: number;
  readonly section: ResolvedSection | null;
  readonly lengths: readonly Dimensioned[];
  readonly load_names: readonly NamedLoad[];
  readonly total: StoredSolution;
  readonly groups: readonly { readonly group: string; readonly solution: StoredSolution }[];
  /** Support by support, of every group: of a patterned one the most and the least. */
  readonly group_reactions: readonly Readonly<Record<string, GroupReaction>>[];
  readonly strength: readonly StoredEnvelope[];
  readonly service: readonly (StoredEnvelope & { readonly limit: DeflectionLimit })[];
  readonly patterning: Patterning;
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

const toEnvelope = ({ combination, extremes, reactions }: CombinationEnvelope): StoredEnvelope => ({
  combination,
  extremes,
  reactions: reactions.map(({ at, max, min }) => ({ at, max, min })),
});

/** What is stored of an evaluation; of one that is not proven, only that it is not. */
export function toStoredResult(evaluation: MemberEvaluation): StoredResult {
  const { instance, section, beam, total, groups, checks, rules, proof, patterning } = evaluation;
  if (!proof.proven)
    return {
      kind: 'fault',
      message:
        'The two methods do not agree, so that there is no result that can be trusted. Look for points that almost coincide, and for stiffnesses that are far apart.',
      proof,
    };
  return {
    kind: 'result',
    schema_version: 2,
    beam,
    ei: instance.ei,
    section,
    lengths: instance.dimensions,
    load_names: instance.loadNames,
    total: toSolution(total),
    groups: groups.map(({ group, solution }) => ({ group, solution: toSolution(solution) })),
    group_reactions: evaluation.groupReactions,
    strength: evaluation.strength.map(toEnvelope),
    service: evaluation.service.map((envelope) => ({ ...toEnvelope(envelope), limit: envelope.limit })),
    patterning,
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
