import { type EnvelopeTask, envelopeTask } from '@/engine/envelope/index';
import { type Beam, type Load, readBeam, type SupportDocument } from '@/engine/model/index';

/** Beams of one case, alike but for spans and loads that vary a little, so that no solve can rest on the one before. */
export type Case = { name: string; beams: readonly Beam[] };

/** Beams that a case goes round; more than a few, so that a branch predictor does not learn them. */
export const VARIANTS = 64;
const EI = 2e7; // N·m²

/** ±1 % and repeating: the k-th of many different small changes. */
const wobble = (k: number): number => 1 + 0.01 * Math.sin(12.9898 * k + 1);

const variants = (make: (k: number) => Beam): Beam[] => Array.from({ length: VARIANTS }, (_, k) => make(k));

function beamOf(length: number, supports: SupportDocument[], loads: Load[]): Beam {
  const reading = readBeam({ length, ei: EI, supports, loads, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

const uniform = (to: number, w: number): Load => ({ kind: 'line', from: 0, to, w0: w, w1: w });
const point = (at: number, p: number): Load => ({ kind: 'point', at, p });

/** Propped cantilever with an overhang, under a uniform load and one point load. */
function propped(k: number): Beam {
  const span = 6 * wobble(k);
  const length = span + 1.8 * wobble(k + 100);
  const supports: SupportDocument[] = [
    { at: 0, kind: 'fixed' },
    { at: span, kind: 'roller' },
  ];
  return beamOf(length, supports, [
    uniform(length, 8e3 * wobble(k + 200)),
    point(0.4 * span, 12e3 * wobble(k + 300)),
  ]);
}

/** Equal spans but for the wobble, under a uniform load, and a point load within each span if asked for. */
function spans(count: number, k: number, pointed: boolean): Beam {
  const at = [0];
  for (let j = 0; j < count; j++) at.push(at[j]! + 6 * wobble(k + 37 * j));
  const length = at[count]!;
  const points = pointed ? at.slice(1).map((x, j) => point(x - 3.3, 12e3 * wobble(k + 53 * j))) : [];
  const supports = at.map((x): SupportDocument => ({ at: x, kind: 'roller' }));
  return beamOf(length, supports, [uniform(length, 8e3 * wobble(k)), ...points]);
}

export const CASES: readonly Case[] = [
  { name: '(i) propped cantilever with overhang, uniform and point load', beams: variants(propped) },
  { name: '(ii) 5 spans, uniform and 5 point loads', beams: variants((k) => spans(5, k, true)) },
  { name: '(iii) 20 spans, uniform load', beams: variants((k) => spans(20, k, false)) },
];

export const evenSpans = (count: number): Beam[] => variants((k) => spans(count, k, false));

/** Six unequal spans under a permanent load and a patterned one, in ten combinations. */
export const ENVELOPE: EnvelopeTask = envelopeTask(
  beamOf(
    36,
    [0, 6, 12.5, 18, 24.2, 30, 36].map((x): SupportDocument => ({ at: x, kind: 'roller' })),
    [
      { ...uniform(36, 5e3), group: 'G' },
      { ...uniform(36, 8e3), group: 'Q' },
    ],
  ),
  {
    combinations: Array.from({ length: 10 }, (_, k) => ({
      name: `${k + 1}`,
      factors: { G: 0.9 + 0.05 * k, Q: 1.5 - 0.1 * k },
    })),
    patterns: ['Q'],
  },
);
