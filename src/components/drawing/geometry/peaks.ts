import type { Extreme } from '@/engine/beam/index';
import type { Piecewise } from '@/engine/polynomial/index';
import { valuesAt } from './curve';

/** A point of a diagram worth a dot and a label. `to` is the far end where the value holds over a stretch. */
export type Peak = {
  kind: 'extreme' | 'zero';
  x: number;
  to?: number | undefined;
  value: number;
  rank: number;
  /** The combination or pattern it comes from, in envelopes. */
  of?: string | undefined;
};

const STEPS = 12;

type Sample = { x: number; value: number };

/** Steps along the diagram, with both sides of every jump. */
function walk(curve: Piecewise): Sample[] {
  const samples: Sample[] = [];
  for (let piece = 0; piece < curve.breaks.length - 1; piece++) {
    const start = curve.breaks[piece] ?? 0;
    const end = curve.breaks[piece + 1] ?? 0;
    const [left, right] = valuesAt(curve, start);
    if (piece === 0 || Math.abs(left - right) > 1e-9 * Math.max(Math.abs(left), Math.abs(right))) {
      samples.push({ x: start, value: right });
    }
    for (let i = 1; i < STEPS; i++) {
      const x = start + ((end - start) * i) / STEPS;
      samples.push({ x, value: valuesAt(curve, x)[1] });
    }
    samples.push({ x: end, value: valuesAt(curve, end)[0] });
  }
  return samples;
}

/** The top between two samples, smooth or a corner, by golden sections on the polynomials themselves. */
function refined(curve: Piecewise, from: number, to: number, sign: number): Sample {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [from, to];
  for (let i = 0; i < 60; i++) {
    const [c, d] = [b - ratio * (b - a), a + ratio * (b - a)];
    if (sign * valuesAt(curve, c)[1] > sign * valuesAt(curve, d)[1]) b = d;
    else a = c;
  }
  const x = (a + b) / 2;
  return { x, value: valuesAt(curve, x)[1] };
}

/** Points where the diagram turns back towards its baseline, corners and jumps included. */
export function localPeaks(curve: Piecewise): Sample[] {
  const samples = walk(curve);
  const found: Sample[] = [];
  samples.forEach((sample, i) => {
    const sign = Math.sign(sample.value);
    if (sign === 0) return;
    const before = samples[i - 1];
    const after = samples[i + 1];
    const rises = before === undefined || sign * sample.value > sign * before.value;
    const falls = after === undefined || sign * sample.value >= sign * after.value;
    if (!rises || !falls) return;
    const corner =
      before === undefined || after === undefined || before.x === sample.x || after.x === sample.x;
    found.push(corner ? sample : refined(curve, before.x, after.x, sign));
  });
  return found;
}

function isConstant(curve: Piecewise, from: number, to: number, value: number): boolean {
  return [0.25, 0.5, 0.75].every((t) => {
    const [left, right] = valuesAt(curve, from + (to - from) * t);
    return Math.abs(left - value) + Math.abs(right - value) <= Math.abs(value) * 1e-9;
  });
}

function fromExtreme(curve: Piecewise, extreme: Extreme, rank: number): Peak[] {
  const { at, value } = extreme;
  const [first, last] = [at[0], at.at(-1)];
  if (first === undefined || last === undefined) return [];
  const holds = at.length > 1 && at.slice(1).every((x, i) => isConstant(curve, at[i] ?? first, x, value));
  if (holds) return [{ kind: 'extreme', x: first, to: last, value, rank }];
  return at.map((x, i) => ({ kind: 'extreme', x, value, rank: i === 0 ? rank : rank + 2 }));
}

/**
 * What a single-run diagram labels, in the order in which labels may be lost: the governing extreme (rank 0), the other one, contraflexure,
 * then the lesser peaks of each span. Values come from the engine's exact extremes wherever it gives them.
 */
export function peaksOf(
  curve: Piecewise,
  extremes: { max: Extreme; min: Extreme },
  contraflexure: readonly number[] = [],
): Peak[] {
  const { max, min } = extremes;
  const [governing, other] = Math.abs(min.value) > Math.abs(max.value) ? [min, max] : [max, min];
  const size = Math.abs(governing.value);
  if (!(size > 0)) return [];
  const worth = (value: number, part: number) => Math.abs(value) > size * part;
  const outward = other.value * governing.value < 0;
  const peaks = [
    ...fromExtreme(curve, governing, 0),
    ...(outward && worth(other.value, 1e-6) ? fromExtreme(curve, other, 1) : []),
  ];
  const near = (x: number, value: number) =>
    peaks.some(
      (peak) =>
        Math.abs(peak.value - value) < size * 1e-6 &&
        x >= peak.x - 1e-4 * Math.max(1, x) &&
        x <= (peak.to ?? peak.x) + 1e-4 * Math.max(1, x),
    );
  const locals = localPeaks(curve).filter(({ x, value }) => worth(value, 0.08) && !near(x, value));
  locals.sort((a, b) => Math.abs(b.value) - Math.abs(a.value));
  return [
    ...peaks,
    ...locals.map(
      ({ x, value }, i): Peak => ({ kind: 'extreme', x, value, rank: (worth(value, 0.25) ? 10 : 300) + i }),
    ),
    ...contraflexure.map((x, i): Peak => ({ kind: 'zero', x, value: 0, rank: 100 + i })),
  ];
}
