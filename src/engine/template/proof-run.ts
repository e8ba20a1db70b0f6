/**
 * The proof of a template before it is issued, in units of work that can be done a few at a time: whoever runs it keeps
 * the progress between them as JSON, and goes on from there. The server's entry; a browser never needs it.
 */
import { checkTemplate, type TemplateFault } from './check';
import type { Template } from './document';
import { type ProofResult, runProofCases } from './proof';
import { BATCH, type BoxPoint, boxOf } from './proof-box';
import { type Limit, limitTasks, proveLimit } from './proof-limits';
import { compareResults } from './proof-same';
import { solvePoint } from './proof-solve';
import {
  beginSameness,
  beginSweep,
  type SamenessTally,
  type SweepTally,
  tallyPoint,
  tallySameness,
} from './proof-tally';
import { asProofCase, type WrittenCase } from './proof-worst';

export type { BoxPoint } from './proof-box';
export type { Limit } from './proof-limits';
export type { LawTally, SamenessTally, SweepTally } from './proof-tally';

/** What is proven: a checked template, and the issued revision that it would take the place of. */
export type ProofSubject = { readonly template: Template; readonly issued: Template | null };

/** Points of the sweep, the fewest that prove anything, and hypercubes until block rules have let in that many. */
const POINTS = 240;
const LEAST_POINTS = 200;
const BATCHES = 40;
const SEED = 1;

/** How far a proof has come: `done` of `total` units of work. Nothing in it but JSON. */
export type ProofProgress = {
  readonly done: number;
  readonly total: number;
  readonly faults: readonly TemplateFault[];
  readonly cases: readonly ProofResult[];
  readonly limits: readonly Limit[];
  readonly sweep: SweepTally;
  /** Null where nothing is issued. */
  readonly same: SamenessTally | null;
};

export function beginProof({ template, issued }: ProofSubject): ProofProgress {
  return {
    done: 0,
    total: 1 + limitTasks(template).length + POINTS + (issued ? POINTS : 0),
    faults: [],
    cases: [],
    limits: [],
    sweep: beginSweep(template),
    same: issued && beginSameness(),
  };
}

/** Does so many units of work more. The same progress and subject give the same result. */
export function proveFurther(subject: ProofSubject, progress: ProofProgress, units: number): ProofProgress {
  const { template, issued } = subject;
  const next = structuredClone(progress) as Writable<ProofProgress>;
  const box = boxOf(template, SEED);
  const tasks = limitTasks(template);
  for (let unit = 0; unit < units && next.done < next.total; unit++, next.done++) {
    const index = next.done - 1;
    const task = tasks[index];
    if (index < 0) {
      next.faults = checkTemplate(template);
      next.cases = runProofCases(template);
    } else if (task) next.limits = [...next.limits, proveLimit(template, task, box)];
    else if (index < tasks.length + POINTS) sweepOn(template, next.sweep, box);
    else if (issued && next.same) compareOn(template, issued, next.same);
  }
  return next;
}

type Writable<T> = { -readonly [K in keyof T]: T[K] };

/** To the next point of the box that block rules let in. */
function sweepOn(template: Template, tally: SweepTally, box: (index: number) => BoxPoint): void {
  while (tally.drawn < BATCH * BATCHES) {
    const point = box(tally.drawn++);
    const reading = solvePoint(template, point);
    if (reading.state === 'refused') {
      tally.refused[reading.rule] = (tally.refused[reading.rule] ?? 0) + 1;
      continue;
    }
    tallyPoint(template, tally, point, reading);
    return;
  }
}

/** The same over the box of the issued revision. */
function compareOn(template: Template, issued: Template, tally: SamenessTally): void {
  const box = boxOf(issued, SEED);
  while (tally.drawn < BATCH * BATCHES) {
    const point = box(tally.drawn++);
    const found = compareResults(template, issued, point);
    if (!found) continue;
    tallySameness(tally, point, found);
    return;
  }
}

export type ProofReport = Omit<ProofProgress, 'done' | 'total'> & {
  readonly seed: number;
  readonly passed: boolean;
  /** What stands in its way, in sentences. */
  readonly reasons: readonly string[];
  /** Proven by evaluation that it gives the results of the issued revision; null where nothing is issued. */
  readonly sameResults: boolean | null;
  /** The worst point of the sweep, to be kept as a proof case. */
  readonly worstCase: WrittenCase | null;
};

/** What a proof that has come to its end found. */
export function proofReport({ template }: ProofSubject, progress: ProofProgress): ProofReport {
  const { done: _, total: __, ...found } = progress;
  const { sweep, same } = found;
  const reasons = reasonsOf(template, progress);
  const name = `Worst of ${sweep.points} points of the parameter box`;
  return {
    ...found,
    seed: SEED,
    passed: reasons.length === 0,
    reasons,
    sameResults: same && same.points >= LEAST_POINTS && same.lost === 0 && same.differing === 0,
    worstCase: sweep.worst && asProofCase(template, sweep.worst.at, name),
  };
}

function reasonsOf(template: Template, { faults, cases, limits, sweep }: ProofProgress): string[] {
  const failedCases = cases.filter(({ ok }) => !ok);
  const failedLimits = limits.filter(({ state }) => state === 'failed');
  const nameOf = (id: string) => template.results.find((one) => one.id === id)?.name ?? id;
  const wrongForms = Object.entries(sweep.forms).filter(([, { failed }]) => failed > 0);
  return [
    ...faults.map(({ message }) => message),
    ...failedCases.map(({ name, fault }) => `The proof case “${name}” fails. ${fault ?? ''}`.trim()),
    ...failedLimits.map(
      ({ symbol, column, held, message }) =>
        `${column ? `${column} of ${symbol}` : symbol} at ${held}: ${message ?? ''}`,
    ),
    ...(sweep.points < LEAST_POINTS
      ? [
          `Block rules let in ${sweep.points} of ${sweep.drawn} points of the parameter box, fewer than ${LEAST_POINTS}. Narrow the ranges to what the rules allow.`,
        ]
      : []),
    ...(sweep.failed > 0
      ? [`${sweep.failed} of ${sweep.points} points of the sweep have no proven result.`]
      : []),
    ...wrongForms.map(
      ([id, { failed, points }]) =>
        `The closed form “${nameOf(id)}” does not hold at ${failed} of ${points} points of the sweep.`,
    ),
    ...lawReasons(sweep),
  ];
}

const LAWS = {
  mirror: 'The mirrored beam does not give the mirrored results',
  lengths: 'Results do not grow with the lengths as their dimensions ask for',
  forces: 'Results do not grow with the loads as their dimensions ask for',
  stiffness: 'Results do not change with EI as their dimensions ask for',
} as const;

const lawReasons = ({ laws }: SweepTally): string[] =>
  (['mirror', 'lengths', 'forces', 'stiffness'] as const).flatMap((law) =>
    laws[law].failed > 0 ? [`${LAWS[law]} at ${laws[law].failed} of ${laws[law].points} points.`] : [],
  );
