import { z } from 'zod';
import { stationPositions } from '@/engine/beam/index';
import type { InfluenceLine, InfluenceQuantity } from '@/engine/influence/index';
import { type BeamDocument, COINCIDENT } from '@/engine/model/index';
import { evaluate, magnitude, type Piecewise, pieceAt, pieceCount, settle } from '@/engine/polynomial/index';
import { read } from '@/lib/read';
import { solveAnswer } from './answer';
import { lineSolver } from './choose-solver';
import { readWithRedundants, solveInfluence } from './further';
import { type Outcome, quantityAnswer, quantityRequest, toOutcome } from './further-answer';
import { solveRequest } from './request';

/** The body of POST /api/v1/beams/influence: the beam of beams/solve, whose loads have no part in it, and a quantity. */
export const influenceRequest = solveRequest.extend({ quantity: quantityRequest });
export type InfluenceRequest = z.output<typeof influenceRequest>;

const { extremes, proof } = solveAnswer.shape;

/** What POST /api/v1/beams/influence answers with: the quantity for a downward force of 1 N at x. */
export const influenceAnswer = z.strictObject({
  quantity: quantityAnswer,
  unit: z.enum(['N/N', 'N·m/N', 'm/N']),
  breaks: z.array(z.number()).describe('Positions between which the line is one cubic, ascending.'),
  coefficients: z
    .array(z.array(z.number()).length(4))
    .describe('Of each piece, from the constant up, in powers of the distance from its left break.'),
  stations: z.array(
    z.strictObject({
      x: z.number(),
      value: z.tuple([z.number(), z.number()]).describe('just left, just right'),
    }),
  ),
  extremes: extremes.shape.moment,
  areas: z
    .array(z.strictObject({ from: z.number(), to: z.number(), positive: z.number(), negative: z.number() }))
    .describe('Under the line, span by span and overhang by overhang: times a uniform load, its effect.'),
  proof,
});
export type InfluenceAnswer = z.output<typeof influenceAnswer>;

/** The influence line asked for in the body, or everything that keeps it from being so. */
export function answerInfluence(body: unknown): Outcome<InfluenceAnswer> {
  const request = read(influenceRequest, body);
  return request.ok ? influenceDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function influenceDocument({ quantity, ...document }: InfluenceRequest): Outcome<InfluenceAnswer> {
  const beam = readWithRedundants(document);
  if (!beam.ok) return toOutcome(beam);
  const solve = lineSolver(beam.value.beam);
  const line = solve.ok ? solveInfluence(beam.value, quantity, solve.value) : solve;
  return toOutcome(line.ok ? { ok: true, value: toAnswer(document, line.value) } : line);
}

function toAnswer(document: BeamDocument, influence: InfluenceLine): InfluenceAnswer {
  const { quantity, line, extremes: found, areas, proof: proven } = influence;
  return {
    quantity,
    unit: unitOf(quantity),
    breaks: [...line.breaks],
    coefficients: Array.from({ length: pieceCount(line) }, (_, k) => cubic(line, k)),
    stations: ordinates(line, stationPositions(document, document.stations)),
    extremes: found,
    areas,
    proof: proven,
  };
}

const unitOf = (quantity: InfluenceQuantity): InfluenceAnswer['unit'] => {
  if (quantity.kind === 'deflection') return 'm/N';
  if (quantity.kind === 'reaction') return quantity.component === 'vertical' ? 'N/N' : 'N·m/N';
  return quantity.kind === 'shear' ? 'N/N' : 'N·m/N';
};

function cubic({ degree, coefficients }: Piecewise, k: number): number[] {
  const first = k * (degree + 1);
  return [0, 1, 2, 3].map((j) => (j <= degree ? coefficients[first + j]! : 0));
}

/** Positions within 1e-12 of the length of a break coincide with it. */
function ordinates(line: Piecewise, positions: readonly number[]): InfluenceAnswer['stations'] {
  const { breaks } = line;
  const nearness = COINCIDENT * (breaks.at(-1)! - breaks[0]!);
  const largest = magnitude(line);
  return positions.map((x) => {
    const k = pieceAt(line, x);
    const place = [breaks[k]!, breaks[k + 1]!].find((at) => Math.abs(at - x) <= nearness) ?? x;
    const [left, right] = evaluate(line, place);
    return { x, value: [settle(left, largest), settle(right, largest)] };
  });
}
