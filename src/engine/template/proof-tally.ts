/** What a sweep has found so far: numbers that grow, and the worst of each kind with its place. JSON only. */
import type { Template } from './document';
import type { BoxPoint } from './proof-box';
import { type Factors, mirrorDifference, scalingDifference } from './proof-laws';
import type { Sameness } from './proof-same';
import { compareForms, type PointReading, type SolvedPoint } from './proof-solve';

/** The largest share found, and where. */
type Worst = { share: number; at: BoxPoint };

export type LawTally = { points: number; failed: number; largest: number };

export type SweepTally = {
  /** Points that were drawn, and those of them that block rules let in. */
  drawn: number;
  points: number;
  /** How many points each block rule kept out. */
  refused: Record<string, number>;
  /** Points without a proven result, the first of them with why. */
  failed: number;
  failures: { message: string; at: BoxPoint }[];
  /** Points whose shortest length allows 1e-6 instead of 1e-9. */
  short: number;
  /** How often each value of each choice was among the points. */
  choices: Record<string, Record<string, number>>;
  equilibrium: number;
  compatibility: number;
  agreement: number;
  /** The point that uses up most of what its proof or its closed forms may differ by. */
  worst: Worst | null;
  /** By the closed form's id. */
  forms: Record<string, { points: number; failed: number; largest: number }>;
  laws: Record<'mirror' | 'lengths' | 'forces' | 'stiffness', LawTally>;
};

export type SamenessTally = {
  drawn: number;
  /** Points of the issued revision's box that both have a result at. */
  points: number;
  differing: number;
  largest: Worst | null;
  /** Points that the issued revision has a result at and this one has not, the first of them with why. */
  lost: number;
  losses: { message: string; at: BoxPoint }[];
};

const law = (): LawTally => ({ points: 0, failed: 0, largest: 0 });

export const beginSweep = (template: Template): SweepTally => ({
  drawn: 0,
  points: 0,
  refused: {},
  failed: 0,
  failures: [],
  short: 0,
  choices: Object.fromEntries(
    template.parameters.flatMap((one) =>
      one.kind === 'choice'
        ? [[one.symbol, Object.fromEntries(one.options.map(({ value }) => [value, 0]))]]
        : [],
    ),
  ),
  equilibrium: 0,
  compatibility: 0,
  agreement: 0,
  worst: null,
  forms: Object.fromEntries(template.results.map(({ id }) => [id, { points: 0, failed: 0, largest: 0 }])),
  laws: { mirror: law(), lengths: law(), forces: law(), stiffness: law() },
});

export const beginSameness = (): SamenessTally => ({
  drawn: 0,
  points: 0,
  differing: 0,
  largest: null,
  lost: 0,
  losses: [],
});

/** Failures that are kept with their points; the rest are counted. */
const KEPT = 5;
/** Mirrored and scaled is every so-manieth point: each costs as much as four points. */
const LAWS_EVERY = 8;

/** No factor a power of two, which would only move the exponents of the doubles. */
const SCALINGS: Readonly<Record<'lengths' | 'forces' | 'stiffness', Factors>> = {
  lengths: { length: 3, force: 1, stiffness: 1 },
  forces: { length: 1, force: 7, stiffness: 1 },
  stiffness: { length: 1, force: 1, stiffness: 11 },
};

export function tallyPoint(
  template: Template,
  tally: SweepTally,
  at: BoxPoint,
  reading: Exclude<PointReading, { state: 'refused' }>,
): void {
  tally.points++;
  countChoices(tally, at);
  if (reading.state === 'failed') {
    tally.failed++;
    if (tally.failures.length < KEPT) tally.failures.push({ message: reading.message, at });
    return;
  }
  const { solved } = reading;
  const { proof, limit } = solved;
  if (limit > 1e-9) tally.short++;
  tally.equilibrium = Math.max(tally.equilibrium, proof.equilibrium);
  tally.compatibility = Math.max(tally.compatibility, proof.compatibility);
  tally.agreement = Math.max(tally.agreement, proof.agreement);
  const used = Math.max(
    proof.equilibrium,
    proof.compatibility,
    proof.agreement,
    tallyForms(template, tally, solved),
  );
  if (used / limit >= (tally.worst?.share ?? 0)) tally.worst = { share: used / limit, at };
  if (tally.points % LAWS_EVERY === 1) tallyLaws(tally, solved);
}

function countChoices({ choices }: SweepTally, { parameters }: BoxPoint): void {
  for (const [symbol, values] of Object.entries(choices)) {
    const value = parameters[symbol];
    if (typeof value === 'string') values[value] = (values[value] ?? 0) + 1;
  }
}

/** The largest difference of the closed forms that hold there. */
function tallyForms(template: Template, { forms }: SweepTally, solved: SolvedPoint): number {
  let largest = 0;
  for (const { id, share } of compareForms(template, solved)) {
    const form = forms[id];
    if (!form) continue;
    form.points++;
    if (!(share <= solved.limit)) form.failed++;
    if (!Number.isFinite(share)) continue;
    form.largest = Math.max(form.largest, share);
    largest = Math.max(largest, share);
  }
  return largest;
}

function tallyLaws({ laws }: SweepTally, solved: SolvedPoint): void {
  const count = (tally: LawTally, share: number) => {
    tally.points++;
    if (!(share <= solved.limit)) tally.failed++;
    if (Number.isFinite(share)) tally.largest = Math.max(tally.largest, share);
  };
  count(laws.mirror, mirrorDifference(solved));
  for (const name of ['lengths', 'forces', 'stiffness'] as const)
    count(laws[name], scalingDifference(solved, SCALINGS[name]));
}

export function tallySameness(tally: SamenessTally, at: BoxPoint, found: NonNullable<Sameness>): void {
  if (found.state === 'lost') {
    tally.lost++;
    if (tally.losses.length < KEPT) tally.losses.push({ message: found.message, at });
    return;
  }
  tally.points++;
  const { share, limit } = found;
  if (!(share <= limit)) tally.differing++;
  if (Number.isFinite(share) && share > (tally.largest?.share ?? 0)) tally.largest = { share, at };
}
