import { verify } from './agree';
import { CASES, evenSpans } from './cases';
import { checked, envelopes, fast, finePeer, others, peer } from './contestants';
import { race, ratio, type Timing, warmUp } from './measure';
import { mathjs, mlMatrix } from './peers';
import { heading, row, target } from './table';

/** Rounds of a race, and how long each contestant runs in one, ms. */
const ROUNDS = 41;
const TURN = 20;
/** The same where one solve may take seconds. */
const FEW = 3;
const SHORT = 1;

/** How many times as fast as ml-matrix with one element per segment, in the order of the cases, and with many. */
const FASTER = [3, 8, 10];
const FINER = 1000;
/** Solves a second that ml-matrix with one element per segment must do on the first case, or it is written badly. */
const PEER = 150_000;
/** What a span among 200 may cost beside one among 10, if the cost is linear. */
const LINEAR = 1.25;
/** Single solves that an envelope of ten combinations and six patterned spans may cost, by one solver. */
const ENVELOPE_COST = 120;

console.info(
  'Each solve takes a beam that is a little different from the one before, from its geometry on, and answers',
);
console.info(
  'the reactions, and V, M, slope and deflection at 11 stations. Processor time, medians, all in one run, in turns.',
);

for (const { beams } of CASES) verify(beams, mlMatrix);
const close = CASES.map(({ beams }) => [fast(beams), checked(beams), peer(beams)]);
for (const contestants of close) warmUp(contestants);
const closeRaces = close.map((contestants) => race(contestants, ROUNDS, TURN));
const fineRaces = CASES.map(({ beams }) => race([fast(beams), finePeer(beams)], FEW, SHORT));

for (const { beams } of CASES) verify(beams, mathjs);
const other = CASES.map(({ beams }) => [fast(beams), ...others(beams)]);
for (const contestants of other) warmUp(contestants);
const otherRaces = other.map((contestants) => race(contestants, FEW, TURN));

CASES.forEach(({ name }, i) => {
  const [ours, ourChecked, theirs] = closeRaces[i] as [Timing, Timing, Timing];
  const [reference, fine] = fineRaces[i] as [Timing, Timing];
  const [base, ...rest] = otherRaces[i] as [Timing, ...Timing[]];
  heading(name);
  row(ours, ours);
  row(ourChecked, ours);
  row(theirs, ours);
  row(fine, reference);
  for (const timing of rest) row(timing, base);
  if (i === 0) target('ml-matrix, one element per segment, a second', 1e6 / theirs.median, PEER);
  target('times as fast as ml-matrix, one element per segment', ratio(theirs, ours), FASTER[i]!);
  target('the same with the check on', ratio(theirs, ourChecked), 1);
  target('times as fast as ml-matrix, 50 elements per span', ratio(fine, reference), FINER);
});

heading('Spans under a uniform load, with exact extremes');
const counts = [10, 50, 100, 200];
const growing = counts.map((count) => fast(evenSpans(count)));
warmUp(growing);
const growth = race(growing, ROUNDS, TURN);
growth.forEach((timing, i) => {
  const each = (1000 * timing.median) / counts[i]!;
  row({ ...timing, name: `${counts[i]} spans, ${each.toFixed(0)} ns each` });
});
target(
  'cost of a span among 200, beside one among 10',
  (ratio(growth[3]!, growth[0]!) * 10) / 200,
  LINEAR,
  'most',
);

heading('Exact envelope of 6 patterned spans in 10 combinations');
const enveloping = envelopes();
warmUp(enveloping);
const [single, envelope, fastSingle, fastEnvelope] = race(enveloping, ROUNDS, TURN) as [
  Timing,
  Timing,
  Timing,
  Timing,
];
row(single, single);
row(envelope, single);
row(fastSingle, fastSingle);
row(fastEnvelope, fastSingle);
target('single solves that an envelope costs, 32 digits', ratio(envelope, single), ENVELOPE_COST, 'most');
target('fast ones that one of fast solves costs', ratio(fastEnvelope, fastSingle), ENVELOPE_COST, 'most');
