import { z } from 'zod';
import { prepareFast } from '@/engine/continuous/index';
import type { Fault, Reading } from '@/engine/model/index';
import {
  type FirstFrequency,
  joinMasses,
  type Masses,
  massOfLoads,
  totalMass,
} from '@/engine/vibration/index';
import { read } from '@/lib/read';
import { type ReadBeam, readWithRedundants, solveFrequency } from './further';
import { type Outcome, toOutcome } from './further-answer';
import { group, LIMITS, position, quantity, solveRequest } from './request';

const massPerLength = quantity('mass_per_length');

/** The body of POST /api/v1/beams/frequency: the beam of beams/solve, and what moves with it. */
export const frequencyRequest = solveRequest.extend({
  mass: massPerLength.optional().describe('Of the beam itself, all along it, kg/m.'),
  distributed: z
    .array(z.strictObject({ from: position, to: position, start: massPerLength, end: massPerLength }))
    .max(LIMITS.loads)
    .optional()
    .describe('Along a stretch, kg/m, varying linearly.'),
  lumped: z
    .array(z.strictObject({ at: position, mass: z.number().describe('kg') }))
    .max(LIMITS.loads)
    .optional(),
  permanent: z
    .array(group)
    .max(LIMITS.patterns)
    .optional()
    .describe('Groups of loads that are weights: line and point loads become masses, w/g and P/g.'),
});
export type FrequencyRequest = z.output<typeof frequencyRequest>;

/** What POST /api/v1/beams/frequency answers with. */
export const frequencyAnswer = z.strictObject({
  frequency: z.number().describe('The first natural frequency, Hz.'),
  bounds: z.strictObject({
    lower: z.number().describe('Hz; no natural frequency lies below.'),
    upper: z.number().describe('Hz; `count` natural frequencies lie below.'),
    count: z.int(),
  }),
  estimate: z.strictObject({
    rule: z.literal('18/√δ, δ in mm'),
    frequency: z.number(),
    deflection: z
      .number()
      .describe('δ, m: the largest deflection, up or down, under the weight of the masses.'),
    at: z.number(),
  }),
  mass: z.strictObject({ distributed: z.number(), lumped: z.number() }).describe('kg in all'),
  left_out: z
    .array(z.int())
    .describe('Loads of the permanent groups without a mass: couples, curvatures, and what pulls up.'),
});
export type FrequencyAnswer = z.output<typeof frequencyAnswer>;

/** The first natural frequency of the beam in the body, or everything that keeps it from being found. */
export function answerFrequency(body: unknown): Outcome<FrequencyAnswer> {
  const request = read(frequencyRequest, body);
  return request.ok ? frequencyDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function frequencyDocument(request: FrequencyRequest): Outcome<FrequencyAnswer> {
  const { mass: own, distributed = [], lumped = [], permanent = [], ...document } = request;
  const beam = readWithRedundants(document);
  return toOutcome(beam.ok ? work(beam.value) : beam);

  function work({ beam: given }: ReadBeam): Reading<FrequencyAnswer> {
    if (own !== undefined && own < 0) return { ok: false, faults: [NEGATIVE] };
    const weights = massOfLoads(
      given.loads,
      ({ group: name }) => name !== undefined && permanent.includes(name),
    );
    const stretches = own === undefined ? distributed : [...distributed, alongAll(given.length, own)];
    const masses = joinMasses({ distributed: stretches, lumped }, weights.masses);
    const found = solveFrequency({ beam: given }, masses, prepareFast);
    return found.ok ? { ok: true, value: toAnswer(found.value, masses, weights.leftOut) } : found;
  }
}

const NEGATIVE: Fault = {
  path: ['mass'],
  code: 'out_of_range',
  message: 'A mass cannot be less than zero.',
};

const alongAll = (length: number, mass: number) => ({ from: 0, to: length, start: mass, end: mass });

function toAnswer(
  { frequency, lower, upper, count, sag, estimate }: FirstFrequency,
  masses: Masses,
  leftOut: number[],
): FrequencyAnswer {
  return {
    frequency,
    bounds: { lower, upper, count },
    estimate: { rule: '18/√δ, δ in mm', frequency: estimate, ...sag },
    mass: totalMass(masses),
    left_out: leftOut,
  };
}
