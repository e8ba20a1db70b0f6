import { z } from 'zod';
import type { LawTally, Limit, ProofReport, SamenessTally, SweepTally } from '@/engine/template/proof-run';
import { RUN_STATES } from '@/features/review/review';
import { pointer } from '@/lib/pointer';

const values = z.record(z.string(), z.union([z.string(), z.array(z.record(z.string(), z.string()))]));
/** A point of the parameter box, each value as an author would type it. */
const Point = { parameters: values, ei: z.string() };
/** Shares are of the largest value of their kind. */
const share = z.number();
const count = z.int();

const Case = z.strictObject({
  name: z.string(),
  source: z.string(),
  ok: z.boolean(),
  /** Why it could not be solved. */
  fault: z.string().nullable(),
  checks: z.array(
    z.strictObject({
      name: z.string(),
      against: z.string(),
      expected: z.number(),
      got: z.number(),
      tolerance: z.number(),
      ok: z.boolean(),
    }),
  ),
});

const LimitView = z.strictObject({
  symbol: z.string(),
  /** Of a list of rows. */
  column: z.string().nullable(),
  held: z.string(),
  state: z.enum(['proven', 'refused', 'failed']),
  message: z.string().nullable(),
  /** Of a length at zero: from the beam without what has no length, and from a millionth of the beam's length. */
  without: share.nullable(),
  near: share.nullable(),
});

const Law = z.strictObject({ points: count, failed: count, largest: share });

const Sweep = z.strictObject({
  /** Points that block rules let in, of those that were drawn. */
  points: count,
  drawn: count,
  refused: z.record(z.string(), count),
  failed: count,
  failures: z.array(z.strictObject({ message: z.string(), ...Point })),
  /** Points whose shortest length allows 1e-6 instead of 1e-9. */
  short: count,
  choices: z.record(z.string(), z.record(z.string(), count)),
  equilibrium: share,
  compatibility: share,
  agreement: share,
  /** `share`: of what its proof or closed forms may differ by. */
  worst: z.strictObject({ share, ...Point }).nullable(),
  forms: z.array(z.strictObject({ id: z.string(), points: count, failed: count, largest: share })),
  laws: z.strictObject({ mirror: Law, lengths: Law, forces: Law, stiffness: Law }),
});

const Same = z.strictObject({
  proven: z.boolean(),
  points: count,
  differing: count,
  largest: z.strictObject({ share, ...Point }).nullable(),
  lost: count,
  losses: z.array(z.strictObject({ message: z.string(), ...Point })),
});

const ReportView = z.strictObject({
  passed: z.boolean(),
  reasons: z.array(z.string()),
  seed: z.int(),
  faults: z.array(z.strictObject({ pointer: z.string(), code: z.string(), message: z.string() })),
  cases: z.array(Case),
  limits: z.array(LimitView),
  sweep: Sweep,
  /** Whether it gives the results of the issued revision; null where nothing is issued. */
  same_results: Same.nullable(),
  /** The worst point of the sweep as a proof case, to be added to the document. */
  worst_case: z.record(z.string(), z.unknown()).nullable(),
});
type ReportView = z.output<typeof ReportView>;

/** What a run of the worker's has in common, whatever it is for. */
export const runFields = {
  id: z.uuid(),
  state: z.enum(RUN_STATES),
  done: count,
  /** 0 until it is begun. */
  total: count,
  /** Of the revision as it stands, by the engine of today. */
  current: z.boolean(),
  sha256: z.string(),
  engine_version: z.string(),
  error: z.string().nullable(),
  asked_by: z.string(),
  created_at: z.iso.datetime(),
  finished_at: z.iso.datetime().nullable(),
};

export const ProofView = z.strictObject({
  ...runFields,
  /** Null until it is finished. */
  passed: z.boolean().nullable(),
  /** Null until it is finished, and of a proof by its proof cases alone. */
  report: ReportView.nullable(),
});
export type ProofView = z.output<typeof ProofView>;

const toLimit = ({ symbol, column, held, state, message, without, near }: Limit) => ({
  symbol,
  column: column ?? null,
  held,
  state,
  message: message ?? null,
  without: without ?? null,
  near: near ?? null,
});

const toLaw = ({ points, failed, largest }: LawTally) => ({ points, failed, largest });

const toSweep = ({ failures, worst, forms, laws, ...rest }: SweepTally) => ({
  ...rest,
  failures: failures.map(({ message, at }) => ({ message, ...at })),
  worst: worst && { share: worst.share, ...worst.at },
  forms: Object.entries(forms).map(([id, form]) => ({ id, ...form })),
  laws: {
    mirror: toLaw(laws.mirror),
    lengths: toLaw(laws.lengths),
    forces: toLaw(laws.forces),
    stiffness: toLaw(laws.stiffness),
  },
});

const toSame = ({ points, differing, largest, lost, losses }: SamenessTally, proven: boolean) => ({
  proven,
  points,
  differing,
  largest: largest && { share: largest.share, ...largest.at },
  lost,
  losses: losses.map(({ message, at }) => ({ message, ...at })),
});

export const toReportView = (report: ProofReport): ReportView => ({
  passed: report.passed,
  reasons: [...report.reasons],
  seed: report.seed,
  faults: report.faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message })),
  cases: report.cases.map(({ name, source, ok, fault, checks }) => ({
    name,
    source,
    ok,
    fault: fault ?? null,
    checks: checks.map(({ quantity: _, ...check }) => check),
  })),
  limits: report.limits.map(toLimit),
  sweep: toSweep(report.sweep),
  same_results: report.same && toSame(report.same, report.sameResults ?? false),
  worst_case: report.worstCase && { ...report.worstCase },
});
