/** What is measured: `run` solves the k-th of a case's beams. */
export type Contestant = { name: string; run: (k: number) => void };

/** Microseconds a solve, in every round and at the median. */
export type Timing = { name: string; median: number; rounds: readonly number[] };

/** What a contestant runs for before it is measured, ms: compilers share a busy machine. */
const WARM = 1000;

const median = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;

export function warmUp(contestants: readonly Contestant[]): void {
  for (const { run } of contestants) {
    const start = performance.now();
    for (let k = 0; performance.now() - start < WARM; k++) run(k);
  }
}

/**
 * Times contestants in turn, round by round, so that whatever slows the machine slows all of them: each for about
 * `turn` ms a round, at least one solve.
 */
export function race(contestants: readonly Contestant[], rounds: number, turn: number): Timing[] {
  const batches = contestants.map(({ run }) => batchFor(run, turn));
  const times = contestants.map((): number[] => []);
  for (let round = 0; round < rounds; round++) {
    contestants.forEach(({ run }, c) => {
      times[c]!.push(time(run, batches[c]!) / batches[c]!);
    });
  }
  return contestants.map(({ name }, c) => ({ name, rounds: times[c]!, median: median(times[c]!) }));
}

/** How many times longer one takes than the other: the median of the rounds' own ratios. */
export const ratio = (slow: Timing, fast: Timing): number =>
  median(slow.rounds.map((value, round) => value / fast.rounds[round]!));

/** How many solves fill the turn. */
function batchFor(run: (k: number) => void, turn: number): number {
  for (let batch = 1; ; batch *= 2) {
    const spent = time(run, batch) / 1000;
    if (spent >= turn) return Math.max(1, Math.round((batch * turn) / spent));
  }
}

/** Microseconds of processor time that `count` solves take, collecting garbage included; other programs do not count. */
function time(run: (k: number) => void, count: number): number {
  const start = process.cpuUsage();
  for (let k = 0; k < count; k++) run(k);
  const { user, system } = process.cpuUsage(start);
  return user + system;
}
