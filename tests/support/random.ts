/** Seeded random numbers in [0, 1): Tommy Ettinger's mulberry32, public domain. Tests must repeat to the bit. */
export function mulberry32(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

export type Dice = {
  chance: (probability: number) => boolean;
  between: (low: number, high: number) => number;
  /** Evenly spread over the orders of magnitude. */
  logBetween: (low: number, high: number) => number;
  whole: (low: number, high: number) => number;
  pick: <T>(choices: readonly T[]) => T;
  sign: () => number;
};

export function dice(seed: number): Dice {
  const next = mulberry32(seed);
  const between = (low: number, high: number) => low + next() * (high - low);
  const whole = (low: number, high: number) => low + Math.floor(next() * (high - low + 1));
  return {
    chance: (probability) => next() < probability,
    between,
    logBetween: (low, high) => Math.exp(between(Math.log(low), Math.log(high))),
    whole,
    pick: (choices) => choices[whole(0, choices.length - 1)]!,
    sign: () => (next() < 0.5 ? -1 : 1),
  };
}
