import { z } from 'zod';
import type { Direction } from '@/engine/influence/index';
import type { Reading } from '@/engine/model/index';
import { read } from '@/lib/read';
import { lineSolver } from './choose-solver';
import {
  jointLines,
  type ReadBeam,
  readWithRedundants,
  solveAbsoluteMoment,
  solveTrain,
  type TrainOnLine,
} from './further';
import { type Outcome, quantityAnswer, quantityRequest, toOutcome } from './further-answer';
import { position, quantity, solveRequest } from './request';

const MOST_WHEELS = 40;

const Wheel = z.strictObject({
  offset: position.describe('How far behind the front of the train.'),
  force: quantity('force').describe('Downward.'),
});

/**
 * The body of POST /api/v1/beams/moving-load: the beam of beams/solve, whose loads have no part in it, and a train of
 * wheels.
 */
export const movingLoadRequest = solveRequest.extend({
  wheels: z.array(Wheel).min(1).max(MOST_WHEELS),
  direction: z
    .enum(['right', 'left', 'both'])
    .optional()
    .describe('Where the train runs to, its front ahead; without it, either way.'),
  quantity: quantityRequest.optional(),
  absolute_moment: z
    .boolean()
    .optional()
    .describe('Also the largest and smallest moment at any section; always where there is no quantity.'),
});
export type MovingLoadRequest = z.output<typeof movingLoadRequest>;

const direction = z.enum(['right', 'left']);
const anywhere = z.strictObject({
  value: z.number(),
  direction,
  at: z
    .array(z.number())
    .describe(
      'Every place of the front that brings it about, ascending; none where the train off the beam does.',
    ),
  wheels: z
    .array(z.number().nullable())
    .describe('Where each wheel stands with the front at the first of them; null off the beam.'),
  section: z.number().nullable(),
});
const worst = anywhere
  .omit({ section: true })
  .extend({ ordinates: z.array(z.number().nullable()).describe('Of the line under each wheel.') });

/** What POST /api/v1/beams/moving-load answers with: of the train alone, without any other load. */
export const movingLoadAnswer = z.strictObject({
  worst: z
    .strictObject({ quantity: quantityAnswer, max: worst, min: worst })
    .optional()
    .describe('Where a quantity was asked for.'),
  absolute_moment: z.strictObject({ max: anywhere, min: anywhere }).optional(),
});
export type MovingLoadAnswer = z.output<typeof movingLoadAnswer>;

/** The worst positions asked for in the body, or everything that keeps them from being found. */
export function answerMovingLoad(body: unknown): Outcome<MovingLoadAnswer> {
  const request = read(movingLoadRequest, body);
  return request.ok ? movingLoadDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function movingLoadDocument(request: MovingLoadRequest): Outcome<MovingLoadAnswer> {
  const { wheels, direction: way, quantity: asked, absolute_moment: absolute, ...document } = request;
  const beam = readWithRedundants(document);
  return toOutcome(beam.ok ? work(beam.value) : beam);

  function work(given: ReadBeam): Reading<MovingLoadAnswer> {
    const train = { wheels, directions: DIRECTIONS[way ?? 'both'] };
    const isAnyway = absolute || !asked;
    const solve = lineSolver(given.beam, isAnyway ? jointLines(given.beam) : 1);
    if (!solve.ok) return solve;
    const onLine = asked ? solveTrain(given, asked, train, solve.value) : undefined;
    if (onLine && !onLine.ok) return onLine;
    const anyway = isAnyway ? solveAbsoluteMoment(given, train, solve.value) : undefined;
    if (anyway && !anyway.ok) return anyway;
    return {
      ok: true,
      value: {
        ...(onLine && { worst: toWorst(onLine.value) }),
        ...(anyway && { absolute_moment: anyway.value }),
      },
    };
  }
}

const DIRECTIONS: Readonly<Record<'right' | 'left' | 'both', readonly Direction[]>> = {
  right: ['right'],
  left: ['left'],
  both: ['right', 'left'],
};

const toWorst = ({ influence, max, min }: TrainOnLine) => ({ quantity: influence.quantity, max, min });
